import { readFileSync } from "node:fs";
import { join } from "node:path";
import { gzipSync } from "node:zlib";

const LARGEST_GZIPPED = 120 * 1024;

test("functions.js stays small enough for a quick cold load", () => {
  const bytes = gzipSync(readFileSync(join(__dirname, "../../dist/functions.js"))).length;
  expect(bytes).toBeLessThanOrEqual(LARGEST_GZIPPED);
});
test("functions.json stays below the host's limit", () => {
  expect(readFileSync(join(__dirname, "../../dist/functions.json")).length).toBeLessThan(1_000_000);
});
test("functions.js reaches for no network and no dynamic code", () => {
  const text = readFileSync(join(__dirname, "../../dist/functions.js"), "utf8");
  for (const forbidden of [/\bfetch\(/, /XMLHttpRequest/, /\beval\(/, /new Function\(/, /import\(/])
    expect(text).not.toMatch(forbidden);
});
