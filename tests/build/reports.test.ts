/** Committed texts that are generated: they must say what the build says. */
import { execFileSync } from "node:child_process";
import { readFileSync } from "node:fs";
import { join } from "node:path";

const root = join(__dirname, "../..");

// The build scripts are ES modules; a child process imports them as they are used.
function evaluate(script: string): string {
  return execFileSync(process.execPath, ["--input-type=module", "-e", script], { cwd: root, encoding: "utf8" });
}

test("functions/REFERENCE.md is up to date (npm run reference)", () => {
  const text = evaluate(`
    import { readFileSync } from "node:fs";
    import { referenceText } from "./src/build/reference.mjs";
    const entries = JSON.parse(readFileSync("functions/generated/texts.json", "utf8"));
    process.stdout.write(await referenceText(entries));
  `);
  expect(readFileSync(join(root, "functions/REFERENCE.md"), "utf8")).toBe(text);
});

test("the library exports what tests/model/api.txt says (npm run api)", () => {
  const text = evaluate('import { apiText } from "./src/build/api.mjs"; process.stdout.write(apiText("."));');
  expect(readFileSync(join(root, "tests/model/api.txt"), "utf8")).toBe(text);
});

test("the library runs as plain ES modules", () => {
  const text = evaluate(
    'import { erlangB } from "./dist/model/index.js"; process.stdout.write(String(erlangB.channels(10, 0.01)));',
  );
  expect(text).toBe("18");
});
