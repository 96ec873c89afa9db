// @ts-check
/** Makes everything that follows from the declarations: functions.json, the function table and its texts. */
import { mkdirSync, writeFileSync } from "node:fs";
import { basename, join } from "node:path";
import { generateCustomFunctionsMetadata } from "custom-functions-metadata";
import { declarationFiles, readDeclarations } from "./declarations.mjs";
import { lintDeclarations } from "./lint.mjs";

/**
 * @param {string} root folder of the project
 * @returns {Promise<{ count: number }>}
 * @throws Error that lists every fault of the declarations
 */
export async function generate(root) {
  const files = declarationFiles(join(root, "functions"));
  const { metadataJson, errors } = await generateCustomFunctionsMetadata(files, false);
  if (errors.length > 0) throw new Error(`The metadata generator reports:\n${errors.join("\n")}`);
  const metadata = JSON.parse(metadataJson);
  const declarations = files.flatMap(readDeclarations);
  const faults = lintDeclarations(declarations, metadata);
  if (faults.length > 0) throw new Error(`Faults in the declarations:\n${faults.join("\n")}`);

  const dist = join(root, "dist");
  const generated = join(root, "functions", "generated");
  mkdirSync(dist, { recursive: true });
  mkdirSync(generated, { recursive: true });
  writeFileSync(join(dist, "functions.json"), `${JSON.stringify(metadata, null, 1)}\n`);
  const texts = declarations.map(({ file: _file, functionName: _name, ...text }) => text);
  writeFileSync(join(generated, "texts.json"), `${JSON.stringify(texts, null, 1)}\n`);
  writeFileSync(join(generated, "function-table.ts"), tableSource(files, declarations));
  return { count: declarations.length };
}

/**
 * @param {string[]} files
 * @param {import("./declarations.mjs").Declaration[]} declarations
 */
function tableSource(files, declarations) {
  const subject = (/** @type {string} */ file) => basename(file, ".ts");
  const imports = files.map((file) => `import * as ${subject(file)} from "../${subject(file)}";`);
  const rows = declarations.map(({ id, file, functionName }) => `  "${id}": ${subject(file)}.${functionName},`);
  return [
    "// Generated from the declarations in functions/; do not edit.",
    ...imports,
    'import { registerAll } from "../../src/sheet/registry";',
    'import texts from "./texts.json";',
    "",
    "export const functionTable = registerAll(",
    "  {",
    ...rows.map((row) => `  ${row}`),
    "  },",
    "  texts,",
    ");",
    "",
  ].join("\n");
}
