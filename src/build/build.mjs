// @ts-check
/** `npm run build`: checks the declarations and leaves dist/ ready to serve and to run. */
import { gzipSync } from "node:zlib";
import { existsSync, readFileSync, rmSync } from "node:fs";
import { join, resolve } from "node:path";
import { fileURLToPath } from "node:url";
import { build } from "esbuild";
import { generate } from "./generate.mjs";
import { writeLibrary } from "./library.mjs";
import { writeManifest } from "./manifest.mjs";
import { writeStarter } from "./starter.mjs";

const root = resolve(fileURLToPath(import.meta.url), "../../..");
const dist = join(root, "dist");

const { version } = JSON.parse(readFileSync(join(root, "package.json"), "utf8"));
/** @type {import("esbuild").BuildOptions} */
const common = {
  bundle: true,
  absWorkingDir: root,
  logLevel: "warning",
  legalComments: "external",
  define: { PRODUCT_VERSION: JSON.stringify(version) },
  loader: { ".csv": "text" },
};

async function main() {
  rmSync(dist, { recursive: true, force: true });
  const { count } = await generate(root);
  await build({
    ...common,
    entryPoints: ["src/host/entry.ts"],
    outfile: "dist/functions.js",
    format: "iife",
    platform: "browser",
    target: "es2020",
    minify: true,
    treeShaking: true,
    globalName: "capacityFunctions",
  });
  await build({
    ...common,
    entryPoints: ["src/pane/entry.ts", "src/pane/pane.css"],
    outdir: "dist",
    entryNames: "pane",
    format: "iife",
    platform: "browser",
    target: "es2020",
    minify: true,
  });
  await build({
    ...common,
    entryPoints: ["src/server/entry.ts"],
    outfile: "dist/server.js",
    format: "cjs",
    platform: "node",
    target: "node20",
    packages: "external",
  });
  if (existsSync(join(root, "src/command/entry.ts"))) {
    await build({
      ...common,
      entryPoints: ["src/command/entry.ts"],
      outfile: "dist/capacity.js",
      format: "cjs",
      platform: "node",
      target: "node20",
      banner: { js: "#!/usr/bin/env node" },
    });
    writeStarter(root);
  }
  writeManifest(root, version);
  writeLibrary(root);
  const bytes = gzipSync(readFileSync(join(dist, "functions.js"))).length;
  console.log(`${count} functions; dist/functions.js ${(bytes / 1024).toFixed(0)} KB gzipped`);
}

main().catch((/** @type {unknown} */ fault) => {
  console.error(fault instanceof Error ? fault.message : fault);
  process.exitCode = 1;
});
