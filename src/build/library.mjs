// @ts-check
/** Leaves the pure module in dist/model as plain ES modules with types, for use without a spreadsheet. */
import { execFileSync } from "node:child_process";
import { mkdirSync, readdirSync, readFileSync, writeFileSync } from "node:fs";
import { createRequire } from "node:module";
import { dirname, join, relative } from "node:path";
import { transformSync } from "esbuild";

/** @param {string} folder @returns {string[]} */
function sources(folder) {
  return readdirSync(folder, { withFileTypes: true }).flatMap((entry) => {
    const path = join(folder, entry.name);
    if (entry.isDirectory()) return sources(path);
    return entry.name.endsWith(".ts") ? [path] : [];
  });
}

/** @param {string} root folder of the project */
export function writeLibrary(root) {
  const from = join(root, "src", "model");
  const to = join(root, "dist", "model");
  for (const file of sources(from)) {
    const { code } = transformSync(readFileSync(file, "utf8"), { loader: "ts", format: "esm", target: "es2022" });
    const target = join(to, relative(from, file)).replace(/\.ts$/, ".js");
    mkdirSync(dirname(target), { recursive: true });
    // One file a module keeps the library tree-shakable; browsers and Node want the ending in the address.
    writeFileSync(target, code.replace(/(from\s+"\.[^"]*)"/g, '$1.js"'));
  }
  writeFileSync(join(to, "package.json"), `${JSON.stringify({ type: "module", sideEffects: false })}\n`);
  const tsc = createRequire(import.meta.url).resolve("typescript/bin/tsc");
  const options = [
    "-p",
    join(from, "tsconfig.json"),
    "--noEmit",
    "false",
    "--emitDeclarationOnly",
    "--declaration",
    "--outDir",
    to,
  ];
  execFileSync(process.execPath, [tsc, ...options], { stdio: "inherit" });
}
