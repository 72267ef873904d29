/**
 * A folder in GDAL's memory and the datasets opened in it, all released together.
 *
 * @module
 */
import type { Gdal } from "./gdal.ts";

/** GDAL's open flags: vector data only, and tell why when a file cannot be opened. */
const OPEN_FLAGS = 0x04 | 0x40;
const UPDATE_FLAG = 0x01;

/** Bytes under a file name. */
export interface NamedBytes {
  readonly name: string;
  readonly bytes: Uint8Array;
}

/** Choices of {@link GdalFolder.open}. */
export interface OpenOptions {
  /** GDAL open options of the format, `KEY=VALUE`. @default [] */
  readonly openOptions?: readonly string[];
  /** Whether the copy in memory may be changed. @default false */
  readonly update?: boolean;
}

/** Choices of {@link GdalFolder.translate}. */
export interface TranslateOptions {
  /** As on the command line of ogr2ogr. */
  readonly args: readonly string[];
  /** GDAL configuration options that hold during the call. @default {} */
  readonly config?: Readonly<Record<string, string>>;
}

/** Why GDAL refused, as GDAL words it, without the paths of its memory. */
export class GdalError extends Error {
  override readonly name: string = "GdalError";
}

/** A working folder, held with `using`; datasets opened in it are closed and its files deleted on disposal. */
export class GdalFolder implements Disposable {
  readonly #gdal: Gdal;
  readonly #path: string;
  readonly #open = new Set<number>();

  /** Makes the folder in this GDAL's memory. */
  constructor(gdal: Gdal) {
    this.#gdal = gdal;
    this.#path = gdal.freshPath();
    gdal.module.FS.mkdirTree(this.#path);
  }

  /** Stores a file; `name` may contain folders. The bytes are not copied and must not change. */
  put(name: string, bytes: Uint8Array): void {
    const { FS } = this.#gdal.module;
    const path = this.#inside(name);
    FS.mkdirTree(path.slice(0, path.lastIndexOf("/")));
    FS.writeFile(path, bytes, { canOwn: true });
  }

  /** Makes an empty folder. */
  makeFolder(name: string): void {
    this.#gdal.module.FS.mkdirTree(this.#inside(name));
  }

  /** Bytes of a file. */
  take(name: string): Uint8Array<ArrayBuffer> {
    return this.#gdal.module.FS.readFile(this.#inside(name));
  }

  /** All files below `name`, folders walked, names relative to it, sorted. */
  files(name: string): NamedBytes[] {
    const { FS } = this.#gdal.module;
    const root = this.#inside(name);
    const walk = (below: string): NamedBytes[] => {
      const path = `${root}${below}`;
      if (!FS.isDir(FS.stat(path).mode)) {
        return [{ name: below.slice(1), bytes: FS.readFile(path) }];
      }
      return entries(FS.readdir(path)).flatMap((entry) => walk(`${below}/${entry}`));
    };
    return walk("");
  }

  /**
   * Opens a vector dataset.
   * @throws GdalError with GDAL's reason where no driver takes it.
   */
  open(name: string, { openOptions = [], update = false }: OpenOptions = {}): number {
    const gdal = this.#gdal;
    gdal.takeMessages();
    const flags = update ? OPEN_FLAGS | UPDATE_FLAG : OPEN_FLAGS;
    const dataset = gdal.withStrings(
      openOptions,
      (options) => gdal.call("GDALOpenEx", this.#inside(name), flags, 0, options, 0),
    );
    if (dataset === 0) throw this.#error(`Cannot open ${name}`);
    this.#open.add(dataset);
    return dataset;
  }

  /** What `ogrinfo -json` tells of a dataset. */
  info(dataset: number, args: readonly string[]): unknown {
    const gdal = this.#gdal;
    gdal.takeMessages();
    const text = gdal.withStrings(["-json", ...args], (list) => {
      const options = gdal.call("GDALVectorInfoOptionsNew", list, 0);
      const answer = gdal.text("GDALVectorInfo", dataset, options);
      gdal.call("GDALVectorInfoOptionsFree", options);
      return answer;
    });
    if (text === "") throw this.#error("Cannot describe the dataset");
    return JSON.parse(text);
  }

  /**
   * Converts a dataset into the file `target` of this folder, as ogr2ogr does.
   * @returns GDAL's warnings.
   * @throws GdalError where GDAL reports an error at any point, also one it would go on after: a
   * file that lacks features would pass for whole.
   */
  translate(dataset: number, target: string, options: TranslateOptions): readonly string[] {
    const gdal = this.#gdal;
    gdal.takeMessages();
    const written = gdal.withConfig(options.config ?? {}, () => {
      const made = this.#vectorTranslate(dataset, this.#inside(target), options.args);
      if (made !== 0) gdal.call("GDALClose", made);
      return made;
    });
    const messages = gdal.takeMessages();
    if (written === 0 || messages.some(isError)) {
      throw this.#error(`Cannot write ${target}`, messages);
    }
    return messages.map((line) => this.#withoutPaths(line));
  }

  #vectorTranslate(dataset: number, path: string, args: readonly string[]): number {
    const gdal = this.#gdal;
    const { module } = gdal;
    return gdal.withStrings(args, (list) => {
      const options = gdal.call("GDALVectorTranslateOptionsNew", list, 0);
      if (options === 0) return 0;
      const sources = module._malloc(8);
      module.setValue(sources, dataset, "i32");
      module.setValue(sources + 4, 0, "i32");
      try {
        return gdal.call("GDALVectorTranslate", path, 0, 1, sources, options, sources + 4);
      } finally {
        module._free(sources);
        gdal.call("GDALVectorTranslateOptionsFree", options);
      }
    });
  }

  /** Closes the datasets and deletes the files. */
  [Symbol.dispose](): void {
    if (this.#gdal.broken) return;
    for (const dataset of this.#open) this.#gdal.call("GDALClose", dataset);
    this.#open.clear();
    this.#gdal.takeMessages();
    this.#remove(this.#path);
  }

  #remove(path: string): void {
    const { FS } = this.#gdal.module;
    if (!FS.isDir(FS.stat(path).mode)) return FS.unlink(path);
    for (const entry of entries(FS.readdir(path))) this.#remove(`${path}/${entry}`);
    FS.rmdir(path);
  }

  #inside(name: string): string {
    return `${this.#path}/${name}`;
  }

  #withoutPaths(line: string): string {
    return line.replaceAll(`${this.#path}/`, "");
  }

  #error(otherwise: string, messages: readonly string[] = this.#gdal.takeMessages()): GdalError {
    const reasons = messages.filter(isError).map((line) => line.replace(/^ERROR \d+: /, ""));
    const reason = this.#withoutPaths(reasons.join("; ")) || otherwise;
    return new GdalError(reason.replace(/\.$/, ""));
  }
}

function entries(names: readonly string[]): string[] {
  return names.filter((name) => name !== "." && name !== "..").sort();
}

/** PROJ words it as an error when a reference system is not in its database, which does no harm. */
function isError(line: string): boolean {
  return /^ERROR \d+: (?!PROJ:)/.test(line);
}
