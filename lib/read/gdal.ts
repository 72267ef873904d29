/**
 * GDAL itself: the one instance, its messages, its drivers.
 *
 * GDAL comes as WebAssembly with a file system of its own in memory. Nothing on disk is visible to it:
 * callers put bytes into a `GdalFolder` and take bytes out, so that no side file ever appears
 * beside a user's data and the working folder does not matter.
 *
 * @module
 */
import { UnreadableError } from "../layer/errors.ts";
import { readGdalAssets } from "./gdal_assets.ts";

/** The part used of the module that emscripten made of GDAL. Pointers are numbers; 0 is null. */
export interface GdalModule {
  ccall(
    name: string,
    returns: "number" | "string" | null,
    takes: readonly ("number" | "string")[],
    values: readonly (number | string)[],
  ): unknown;
  _malloc(size: number): number;
  _free(pointer: number): void;
  setValue(pointer: number, value: number, type: "i32"): void;
  lengthBytesUTF8(text: string): number;
  stringToUTF8(text: string, pointer: number, size: number): void;
  readonly FS: GdalFileSystem;
}

/** The part used of the in-memory file system. */
export interface GdalFileSystem {
  mkdirTree(path: string): void;
  rmdir(path: string): void;
  unlink(path: string): void;
  readdir(path: string): string[];
  readFile(path: string): Uint8Array<ArrayBuffer>;
  writeFile(path: string, bytes: Uint8Array, options: { canOwn: boolean }): void;
  stat(path: string): { mode: number; size: number };
  isDir(mode: number): boolean;
  readonly filesystems: {
    readonly MEMFS: { expandFileStorage(node: MemoryFile, wanted: number): void };
  };
}

/** A file of that file system: `contents` has room for more than the bytes used. */
export interface MemoryFile {
  contents: Uint8Array | null;
  readonly usedBytes: number;
}

/** One of GDAL's drivers for vector data. */
export interface GdalDriver {
  /** GDAL's own short name, such as `GPKG`. */
  readonly driver: string;
  readonly title: string;
  /** Without dots; empty where the format has none of its own. */
  readonly extensions: readonly string[];
  readonly reads: boolean;
}

type ModuleFactory = (options: Record<string, unknown>) => Promise<GdalModule>;

/** GDAL stopped in the middle of a call; the instance is not to be used again. */
export class GdalCrash extends UnreadableError {
  /** Whether memory ran out, so that trying again is no use. */
  readonly outOfMemory: boolean;

  constructor(reason: string, cause: Error) {
    super(
      `GDAL broke off (${reason}); a file that needs more than the 2 GB GDAL has here must be cut into smaller ones`,
      { cause },
    );
    this.outOfMemory = /memory|OOM|alloc/i.test(reason);
  }
}

/** The loaded GDAL. Calls are synchronous and single-threaded. */
export class Gdal {
  readonly module: GdalModule;
  readonly #messages: string[];
  #folders = 0;
  #broken = false;

  /** @param messages Where the module puts the lines it prints. */
  constructor(module: GdalModule, messages: string[]) {
    this.module = module;
    this.#messages = messages;
  }

  /** Whether a call crashed: then the next `loadGdal` starts another instance. */
  get broken(): boolean {
    return this.#broken;
  }

  /** Path of a folder in GDAL's memory that nobody else has. */
  freshPath(): string {
    return `/nearkin/${++this.#folders}`;
  }

  /** Calls a function of GDAL's C interface; text is passed as UTF-8. */
  call(name: string, ...values: readonly (number | string)[]): number {
    return this.#guarded(name, "number", values) as number;
  }

  /** Like {@link Gdal.call}, for functions that return text. */
  text(name: string, ...values: readonly (number | string)[]): string {
    return this.#guarded(name, "string", values) as string;
  }

  /**
   * What GDAL complained about since last asked, and forgets it. GDAL's return values only say that
   * something failed; the reason is here, as `ERROR 1: …` and `Warning 1: …` lines.
   */
  takeMessages(): readonly string[] {
    return this.#messages.splice(0);
  }

  /** Passes a list of strings to `use` as a C array, which is freed afterwards. */
  withStrings<T>(strings: readonly string[], use: (pointer: number) => T): T {
    const { module } = this;
    const pointers = strings.map((text) => {
      const size = module.lengthBytesUTF8(text) + 1;
      const pointer = module._malloc(size);
      module.stringToUTF8(text, pointer, size);
      return pointer;
    });
    const list = module._malloc(4 * (pointers.length + 1));
    [...pointers, 0].forEach((pointer, i) => module.setValue(list + 4 * i, pointer, "i32"));
    try {
      return use(list);
    } finally {
      for (const pointer of [list, ...pointers]) module._free(pointer);
    }
  }

  /** Runs `use` with GDAL configuration options set, and unset again. */
  withConfig<T>(config: Readonly<Record<string, string>>, use: () => T): T {
    for (const [key, value] of Object.entries(config)) this.call("CPLSetConfigOption", key, value);
    try {
      return use();
    } finally {
      for (const key of Object.keys(config)) this.call("CPLSetConfigOption", key, 0);
    }
  }

  /** All vector drivers, in GDAL's own order. */
  drivers(): GdalDriver[] {
    const drivers: GdalDriver[] = [];
    const count = this.call("GDALGetDriverCount");
    for (let i = 0; i < count; i++) {
      const driver = this.call("GDALGetDriver", i);
      const item = (key: string) => this.text("GDALGetMetadataItem", driver, key, 0);
      if (item("DCAP_VECTOR") !== "YES") continue;
      drivers.push({
        driver: this.text("GDALGetDriverShortName", driver),
        title: item("DMD_LONGNAME").trim(),
        extensions: item("DMD_EXTENSIONS").split(" ").filter((extension) => extension !== ""),
        reads: item("DCAP_OPEN") === "YES",
      });
    }
    return drivers;
  }

  #guarded(
    name: string,
    returns: "number" | "string",
    values: readonly (number | string)[],
  ): unknown {
    const takes = values.map((value) => typeof value === "string" ? "string" : "number");
    try {
      return this.module.ccall(name, returns, takes, values);
    } catch (cause) {
      if (!(cause instanceof WebAssembly.RuntimeError)) throw cause;
      this.#broken = true;
      throw new GdalCrash(this.takeMessages().at(-1) ?? cause.message, cause);
    }
  }
}

/** The one stated exception to "nothing hidden": 40 MB that a process loads once, when first needed. */
let loading: Promise<Gdal> | null = null;

/**
 * The GDAL of this process, loaded at the first call, and again after a crash.
 *
 * Cost: about 0.4 s the first time (reading 0.1 s, compiling 0.2 s), nothing after. Throws
 * `UnreadableError` where the two asset files cannot be read; the next call tries again.
 */
export async function loadGdal(): Promise<Gdal> {
  loading ??= startGdal();
  try {
    const gdal = await loading;
    if (!gdal.broken) return gdal;
    loading = startGdal();
    return await loading;
  } catch (cause) {
    loading = null;
    const reason = cause instanceof Error ? cause.message : String(cause);
    throw new UnreadableError(`Cannot start GDAL (${reason}); reinstall nearkin`, { cause });
  }
}

async function startGdal(): Promise<Gdal> {
  const [{ wasm, data }, start] = await Promise.all([readGdalAssets(), importFactory()]);
  const messages: string[] = [];
  const module = await start({
    // As a buffer: emscripten would copy a view.
    wasmBinary: exactBuffer(wasm),
    getPreloadedPackage: () => exactBuffer(data),
    print: (line: string) => messages.push(line),
    printErr: (line: string) => messages.push(line),
    preRun: [({ ENV }: { ENV: Record<string, string> }) => {
      ENV.PROJ_LIB = "/usr/share/proj";
      ENV.GDAL_DATA = "/usr/share/gdal";
      ENV.GDAL_NUM_THREADS = "0";
      // A Shapefile that came without its .shx can be read all the same.
      ENV.SHAPE_RESTORE_SHX = "YES";
      // Conversion by Arrow batches is no faster here and fails on null geometry of mixed types.
      ENV.OGR2OGR_USE_ARROW_API = "NO";
    }],
  });
  module.FS.filesystems.MEMFS.expandFileStorage = growByDoubling;
  const gdal = new Gdal(module, messages);
  gdal.call("GDALAllRegister");
  return gdal;
}

/** The emscripten module itself: the package's own wrapper finds its assets by the working folder. */
async function importFactory(): Promise<ModuleFactory> {
  const imported: { default: unknown } = await import(
    "gdal3.js/build/package/gdal3WebAssembly.js"
  );
  return imported.default as ModuleFactory;
}

/**
 * Emscripten's files in memory grow by an eighth at a time, so that writing one of 30 MB copies it 30 times: half
 * the time of a conversion.
 */
function growByDoubling(node: MemoryFile, wanted: number): void {
  const room = node.contents?.length ?? 0;
  if (room >= wanted) return;
  const grown = new Uint8Array(Math.max(wanted, 2 * room, 256));
  if (node.contents) grown.set(node.contents.subarray(0, node.usedBytes));
  node.contents = grown;
}

/** The loader insists on an ArrayBuffer that holds nothing else. */
function exactBuffer(bytes: Uint8Array): ArrayBufferLike {
  const whole = bytes.byteOffset === 0 && bytes.byteLength === bytes.buffer.byteLength;
  return whole ? bytes.buffer : bytes.slice().buffer;
}
