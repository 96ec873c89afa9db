/** Builds and runs every benchmark of this directory, one after the other; one that fails fails the run. */
import { spawnSync } from "node:child_process";
import { mkdtempSync, readdirSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { basename, join } from "node:path";
import { fileURLToPath } from "node:url";
import { build } from "esbuild";

const here = fileURLToPath(new URL(".", import.meta.url));
const wanted = process.argv.slice(2);
const files = readdirSync(here)
  .filter((file) => file.endsWith(".bench.ts"))
  .filter((file) => wanted.length === 0 || wanted.includes(basename(file, ".bench.ts")))
  .sort();
if (files.length === 0) {
  process.stderr.write(`No benchmark is called ${wanted.join(", ")}.\n`);
  process.exit(1);
}

const directory = mkdtempSync(join(tmpdir(), "benchmarks-"));
try {
  for (const file of files) {
    const outfile = join(directory, `${basename(file, ".ts")}.cjs`);
    await build({ entryPoints: [join(here, file)], bundle: true, platform: "node", outfile, logLevel: "error" });
    process.stdout.write(`\n${file}\n`);
    const { status } = spawnSync(process.execPath, ["--expose-gc", outfile], { stdio: "inherit" });
    if (status !== 0) process.exitCode = 1;
  }
} finally {
  rmSync(directory, { recursive: true, force: true });
}
