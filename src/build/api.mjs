// @ts-check
/** The exported surface of the library as text, so that it changes on purpose only. */
import { readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import ts from "typescript";

/**
 * Names and types of everything that dist/model/index.d.ts exports.
 * @param {string} root folder of the project, built
 */
export function apiText(root) {
  const entry = join(root, "dist", "model", "index.d.ts");
  const program = ts.createProgram([entry], {
    target: ts.ScriptTarget.ES2022,
    module: ts.ModuleKind.ESNext,
    skipLibCheck: true,
    types: [],
  });
  const checker = program.getTypeChecker();
  const file = program.getSourceFile(entry);
  const module = file && checker.getSymbolAtLocation(file);
  if (!module) throw new Error("dist/model/index.d.ts is missing; run npm run build.");
  /** @type {string[]} */
  const lines = [];
  for (const symbol of checker.getExportsOfModule(module)) {
    const target = symbol.flags & ts.SymbolFlags.Alias ? checker.getAliasedSymbol(symbol) : symbol;
    if (!(target.flags & ts.SymbolFlags.ValueModule)) {
      lines.push(`${symbol.name}: ${signature(checker, target)}`);
      continue;
    }
    for (const member of checker.getExportsOfModule(target)) {
      const real = member.flags & ts.SymbolFlags.Alias ? checker.getAliasedSymbol(member) : member;
      lines.push(`${symbol.name}.${member.name}: ${signature(checker, real)}`);
    }
  }
  return `${lines.sort().join("\n")}\n`;
}

/**
 * @param {ts.TypeChecker} checker
 * @param {ts.Symbol} symbol
 */
function signature(checker, symbol) {
  const declaration = symbol.declarations?.[0];
  if (!declaration) return "unknown";
  if (symbol.flags & (ts.SymbolFlags.Interface | ts.SymbolFlags.TypeAlias)) return "type";
  if (symbol.flags & ts.SymbolFlags.Class) return "class";
  return checker.typeToString(
    checker.getTypeOfSymbolAtLocation(symbol, declaration),
    undefined,
    ts.TypeFormatFlags.NoTruncation,
  );
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  const root = join(fileURLToPath(import.meta.url), "../../..");
  const target = join(root, "tests", "model", "api.txt");
  writeFileSync(target, apiText(root));
  console.log(`Wrote ${readFileSync(target, "utf8").trim().split("\n").length} names to tests/model/api.txt.`);
}
