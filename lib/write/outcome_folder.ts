/**
 * Writing the outcome folder all or nothing.
 *
 * @module
 */
import { randomUUID } from "node:crypto";
import { access, mkdir, readdir, rename, rm, writeFile } from "node:fs/promises";
import { basename, dirname, join, resolve } from "node:path";
import { UnwritableError } from "../layer/errors.ts";

/** A file that marks a folder as an outcome, so that `force` never replaces anything else. */
const MARK = "record.json";

/** How to treat what is already there. */
export interface FolderOptions {
  /** Replace an earlier outcome. A folder that holds anything else is never replaced. @default false */
  readonly force?: boolean;
}

/**
 * Refuses early, before anything is computed, when `folder` could not be written later.
 *
 * @throws {UnwritableError} when it exists and `force` is off, or is no outcome, or its parent is no folder.
 */
export async function checkFolder(folder: string, options: FolderOptions = {}): Promise<void> {
  const entries = await entriesOf(folder);
  if (entries === null || entries.length === 0) return;
  if (!entries.includes(MARK)) {
    throw new UnwritableError(
      `Cannot write to ${folder} as it holds other files (${
        entries.slice(0, 3).join(", ")
      }); name a new folder with --out`,
    );
  }
  if (!options.force) {
    throw new UnwritableError(
      `Cannot write to ${folder} as an outcome is already there; add --force to replace it or name another folder`,
    );
  }
}

/**
 * Writes files into a temporary sibling of `folder`, then renames it, so that a reader sees the whole
 * outcome or none of it. An earlier outcome stays until the new one is complete.
 *
 * @param files Path inside the folder (with `/`) to content.
 * @throws {UnwritableError} as {@link checkFolder}, and when the disk refuses; nothing half-written stays.
 */
export async function writeFolder(
  folder: string,
  files: ReadonlyMap<string, Uint8Array | string>,
  options: FolderOptions = {},
): Promise<void> {
  await checkFolder(folder, options);
  const target = resolve(folder);
  const sibling = (word: string) =>
    join(dirname(target), `.${basename(target)}.${word}-${randomUUID().slice(0, 8)}`);
  const fresh = sibling("partial"), old = sibling("replaced");
  try {
    for (const [path, content] of files) {
      await mkdir(dirname(join(fresh, path)), { recursive: true });
      await writeFile(join(fresh, path), content);
    }
    if (await entriesOf(target) !== null) await rename(target, old);
    await rename(fresh, target);
  } catch (error) {
    await rm(fresh, { recursive: true, force: true });
    if (await entriesOf(old) !== null && await entriesOf(target) === null) {
      await rename(old, target);
    }
    throw new UnwritableError(`Cannot write ${folder}: ${reasonOf(error)}`);
  }
  await rm(old, { recursive: true, force: true });
}

/**
 * Writes single files where the user asked for them, making their folders.
 *
 * @param files Path to content.
 * @throws {UnwritableError} when one exists and `force` is off (then none is written), or the disk refuses.
 */
export async function writeFiles(
  files: ReadonlyMap<string, Uint8Array | string>,
  options: FolderOptions = {},
): Promise<void> {
  for (const path of options.force ? [] : files.keys()) {
    if (await access(path).then(() => true, () => false)) {
      throw new UnwritableError(
        `Cannot write ${path} as it already exists; add --force to replace it or name another`,
      );
    }
  }
  for (const [path, content] of files) {
    try {
      await mkdir(dirname(path), { recursive: true });
      await writeFile(path, content);
    } catch (error) {
      throw new UnwritableError(`Cannot write ${path}: ${reasonOf(error)}`);
    }
  }
}

/** Names in a folder, or null where there is none. */
async function entriesOf(folder: string): Promise<string[] | null> {
  try {
    return await readdir(folder);
  } catch (error) {
    const { code } = error as { code?: string };
    if (code === "ENOENT") return null;
    throw new UnwritableError(
      code === "ENOTDIR"
        ? `Cannot write to ${folder} as a file stands in the way; name a folder with --out`
        : `Cannot write to ${folder}: ${reasonOf(error)}`,
    );
  }
}

function reasonOf(error: unknown): string {
  const { code, message } = error as { code?: string; message?: string };
  const known: Record<string, string> = {
    EACCES: "permission denied",
    EPERM: "permission denied",
    EROFS: "the disk is read-only",
    ENOSPC: "the disk is full",
    ENOENT: "its parent folder does not exist",
  };
  return (code && known[code]) ?? message ?? String(error);
}
