/** Files on disk: clear refusals, and writing beside the target before renaming, so that a kill leaves the old file whole. */
import { randomBytes } from "node:crypto";
import { existsSync, mkdirSync, readFileSync, renameSync, rmSync, statSync, writeFileSync } from "node:fs";
import { basename, dirname, join, resolve } from "node:path";
import { WorkbookFailure } from "../workbook/failure";

const LARGEST_TEXT_BYTES = 100_000_000;

const REASONS: Readonly<Record<string, string>> = {
  ENOENT: "there is no such file",
  EACCES: "permission is denied",
  EPERM: "permission is denied",
  EROFS: "the folder is read-only",
  ENOSPC: "the disk is full",
  EBUSY: "the file is open in another program",
  EISDIR: "this is a folder, not a file",
  ENOTDIR: "a part of the path is not a folder",
};

function failure(path: string, fault: unknown): WorkbookFailure {
  const code = (fault as NodeJS.ErrnoException).code ?? "";
  return new WorkbookFailure(`${path}: ${REASONS[code] ?? (fault instanceof Error ? fault.message : String(fault))}.`);
}

export function readBytes(path: string): Uint8Array {
  try {
    return new Uint8Array(readFileSync(path));
  } catch (fault) {
    throw failure(path, fault);
  }
}

export function readText(path: string): string {
  try {
    const { size } = statSync(path);
    if (size > LARGEST_TEXT_BYTES) {
      throw new WorkbookFailure(`${path}: ${size} bytes; at most ${LARGEST_TEXT_BYTES} are read.`);
    }
    return readFileSync(path, "utf8");
  } catch (fault) {
    throw fault instanceof WorkbookFailure ? fault : failure(path, fault);
  }
}

/** Text of a file, or undefined where there is none. */
export function readTextIfThere(path: string): string | undefined {
  return existsSync(path) ? readText(path) : undefined;
}

/** Refuses a target before any work is done: it exists and may not be replaced, or its folder is missing. */
export function requireTarget(path: string, force: boolean): void {
  if (existsSync(path) && !force) {
    throw new WorkbookFailure(`${path} exists already; give another --out, or --force to replace it.`);
  }
  const folder = dirname(resolve(path));
  if (!existsSync(folder)) throw new WorkbookFailure(`${folder}: there is no such folder.`);
}

/** Writes beside the target and renames: the target is the old file or the new one, never a part. */
export function writeFileWhole(path: string, content: Uint8Array | string): void {
  const beside = join(dirname(path), `.${basename(path)}.${randomBytes(4).toString("hex")}.part`);
  try {
    writeFileSync(beside, content, { flag: "wx" });
    renameSync(beside, path);
  } catch (fault) {
    rmSync(beside, { force: true });
    throw failure(path, fault);
  }
}

export function makeFolder(path: string): void {
  try {
    mkdirSync(path, { recursive: true });
  } catch (fault) {
    throw failure(path, fault);
  }
}
