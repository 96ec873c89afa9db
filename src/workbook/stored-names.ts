/** How a saved workbook names custom functions: `CAP.ERLANGB.BLOCKING` is stored as `_xldudf_CAP_ERLANGB_BLOCKING`. */
import { NAMESPACE } from "../sheet/registry";
import type { FunctionTable } from "./function-table";

const PREFIX = `_xldudf_${NAMESPACE}_`;

export function storedName(id: string): string {
  return PREFIX + id.replace(/\./g, "_");
}

/** A formula as people write it, in the stored form. */
export function toStored(formula: string, functions: FunctionTable): string {
  return replaceOutsideText(
    formula.replace(/^=/, ""),
    new RegExp(`\\b${NAMESPACE}\\.([A-Z0-9.]+)(?=\\s*\\()`, "gi"),
    (name, id) => (functions[id.toUpperCase()] ? storedName(id.toUpperCase()) : name),
  );
}

/** A stored formula as people write it. */
export function toWritten(formula: string, functions: FunctionTable): string {
  const byStored = new Map(Object.keys(functions).map((id) => [storedName(id).toUpperCase(), `${NAMESPACE}.${id}`]));
  const written = replaceOutsideText(
    formula,
    /_xldudf_[A-Z0-9_]+/gi,
    (name) => byStored.get(name.toUpperCase()) ?? name,
  );
  return `=${replaceOutsideText(written, /_xlfn\.ANCHORARRAY\(([^()]*)\)/g, (_, reference) => `${reference}#`).replace(/_xlfn\.(_xlws\.)?|_xlpm\./g, "")}`;
}

/** Custom functions that a formula calls, by stored name. */
export function storedCalls(formula: string): string[] {
  return formula.match(/_xldudf_\w+/gi) ?? [];
}

/** Replaces in a formula, but not inside its quoted texts. */
function replaceOutsideText(formula: string, pattern: RegExp, by: (match: string, group: string) => string): string {
  return formula
    .split(/("(?:[^"]|"")*")/)
    .map((part, i) => (i % 2 === 1 ? part : part.replace(pattern, (match: string, group: string) => by(match, group))))
    .join("");
}
