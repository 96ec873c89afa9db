/** What the metadata generator lets pass must fail the build. */
import { execFileSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";

const root = join(__dirname, "../..");

const declaration = (id: string, name: string, parameters: [string, string][]): string => `
/**
 * Says something.
 * @customfunction ${id}
${parameters.map(([parameter, text]) => ` * @param ${parameter} ${text}`).join("\n")}
 * @returns A number.
 * @method None.
 * @source None.
 * @example =CAP.${id}(1) is 1
 */
export function ${name}(${parameters.map(([parameter]) => `${parameter.replace(/[[\]]/g, "")}${parameter.startsWith("[") ? "?" : ""}: any[][]`).join(", ")}): any[][] {
  return [];
}
`;

interface Case {
  readonly name: string;
  readonly source: string;
  /** How often the file is read, for ids that two files share. */
  readonly copies?: number;
  readonly fault: string;
}

const a: [string, string] = ["a", "A."];
const cases: Case[] = [
  { name: "a sound declaration", source: declaration("SAMPLE.ONE", "sampleOne", [a, ["[b]", "B."]]), fault: "" },
  { name: "an underscore", source: declaration("SAMPLE_ONE.A", "sampleA", [a]), fault: "without underscores" },
  {
    name: "an id in two files",
    source: declaration("SAMPLE.ONE", "sampleOne", [a]),
    copies: 2,
    fault: "declared twice",
  },
  { name: "no parameter text", source: declaration("SAMPLE.ONE", "sampleOne", [["a", ""]]), fault: "has no text" },
  {
    name: "a long parameter text",
    source: declaration("SAMPLE.ONE", "sampleOne", [["a", "x".repeat(129)]]),
    fault: "129 characters",
  },
  {
    name: "a required parameter after an optional one",
    source: declaration("SAMPLE.ONE", "sampleOne", [
      ["[a]", "A."],
      ["b", "B."],
    ]),
    fault: "follows an optional one",
  },
  {
    name: "another function name",
    source: declaration("SAMPLE.ONE", "other", [a]),
    fault: "should be named sampleOne",
  },
];

// The build scripts are ES modules; one child process runs all cases through them.
const SCRIPT = `
  import { readFileSync } from "node:fs";
  import { generateCustomFunctionsMetadata } from "custom-functions-metadata";
  import { readDeclarations } from "./src/build/declarations.mjs";
  import { lintDeclarations } from "./src/build/lint.mjs";
  const found = [];
  for (const { file, copies } of JSON.parse(process.argv[1])) {
    const { metadataJson } = await generateCustomFunctionsMetadata([file], false);
    const declarations = Array.from({ length: copies }, () => readDeclarations(file)).flat();
    found.push(lintDeclarations(declarations, JSON.parse(metadataJson)).join("\\n"));
  }
  process.stdout.write(JSON.stringify(found));`;

let found: string[];

beforeAll(() => {
  const folder = mkdtempSync(join(tmpdir(), "declarations-"));
  try {
    const inputs = cases.map(({ source, copies = 1 }, i) => {
      const file = join(folder, `sample${i}.ts`);
      writeFileSync(file, source);
      return { file, copies };
    });
    const args = ["--input-type=module", "-e", SCRIPT, JSON.stringify(inputs)];
    found = JSON.parse(execFileSync(process.execPath, args, { cwd: root, encoding: "utf8" }));
  } finally {
    rmSync(folder, { recursive: true });
  }
});

test.each(cases.map(({ name, fault }, i) => [name, fault, i] as const))("%s: %s", (_, fault, i) => {
  if (fault === "") expect(found[i]).toBe("");
  else expect(found[i]).toContain(fault);
});
