/** Which files are served, and as what. Everything else in the folder stays private. */
import { readFileSync, realpathSync, statSync } from "node:fs";
import { extname, join, sep } from "node:path";

/** Files of the add-in at the top of the folder. */
const TOP_FILES: ReadonlySet<string> = new Set([
  "functions.js",
  "functions.json",
  "help.html",
  "manifest.json",
  "manifest.xml",
  "pane.css",
  "pane.html",
  "pane.js",
  "starter.xlsx",
]);
const FOLDERS = [/^icons\/[a-z\d-]+\.png$/, /^office\/(?:[a-z-]+\/)?[a-z\d._-]+\.js$/i];

const TYPES: Readonly<Record<string, string>> = {
  ".css": "text/css; charset=utf-8",
  ".html": "text/html; charset=utf-8",
  ".js": "text/javascript; charset=utf-8",
  ".json": "application/json; charset=utf-8",
  ".png": "image/png",
  ".xlsx": "application/vnd.openxmlformats-officedocument.spreadsheetml.sheet",
  ".xml": "text/xml; charset=utf-8",
};

export interface ServedFile {
  readonly bytes: Buffer;
  readonly type: string;
  /** Whether it is a text that shrinks when packed. */
  readonly packable: boolean;
  readonly tag: string;
}

/** The name inside the folder that a request's path asks for, or undefined where it asks for nothing served. */
export function servedName(path: string): string | undefined {
  let name;
  try {
    name = decodeURIComponent(path).replace(/^\//, "");
  } catch {
    return undefined;
  }
  if (name === "") return "pane.html";
  const known = TOP_FILES.has(name) || FOLDERS.some((pattern) => pattern.test(name));
  return known && !name.includes("..") ? name : undefined;
}

/** @returns the file, or undefined where it is not there or leads out of the folder */
export function readServed(folder: string, name: string): ServedFile | undefined {
  try {
    const path = realpathSync(join(folder, name));
    const facts = statSync(path);
    if (!path.startsWith(realpathSync(folder) + sep) || !facts.isFile()) return undefined;
    const type = TYPES[extname(name)] ?? "application/octet-stream";
    return {
      bytes: readFileSync(path),
      type,
      packable: /^text|json/.test(type),
      tag: `"${facts.size.toString(36)}-${Math.round(facts.mtimeMs).toString(36)}"`,
    };
  } catch {
    return undefined;
  }
}
