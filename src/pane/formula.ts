/** Takes apart a formula that is one call with plain arguments. */

/** An argument of a call: a value, an array of values, or a reference. */
export type Argument =
  | { readonly kind: "value"; readonly value: string | number | boolean | null }
  | { readonly kind: "array"; readonly rows: readonly (readonly (string | number | boolean)[])[] }
  | { readonly kind: "reference"; readonly sheet: string | undefined; readonly range: string; readonly spill: boolean }
  | { readonly kind: "other"; readonly text: string };

export interface FormulaCall {
  /** Name as written, with its namespace. */
  readonly name: string;
  readonly args: readonly Argument[];
}

const CALL = /^=\s*([A-Z_][A-Z0-9_.]*)\s*\((.*)\)\s*$/is;
const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;
const REFERENCE =
  /^(?:(?:'((?:[^']|'')+)'|([\p{L}_][\p{L}\d_.]*))!)?(\$?[A-Z]{1,3}\$?\d{1,7}(?::\$?[A-Z]{1,3}\$?\d{1,7})?|[\p{L}_\\][\p{L}\d_.]*)(#)?$/iu;

/** Splits at a separator outside quotes and brackets; undefined where they do not match. */
export function splitOutside(text: string, separator: string): string[] | undefined {
  const parts = [""];
  const open: string[] = [];
  let quote = "";
  for (const letter of text) {
    if (quote) quote = letter === quote ? "" : quote;
    else if (letter === '"' || letter === "'") quote = letter;
    else if (letter === "(" || letter === "{") open.push(letter);
    else if (letter === ")" || letter === "}") {
      if (open.pop() !== (letter === ")" ? "(" : "{")) return undefined;
    } else if (letter === separator && open.length === 0) {
      parts.push("");
      continue;
    }
    parts[parts.length - 1] += letter;
  }
  return quote || open.length > 0 ? undefined : parts;
}

function constant(text: string): string | number | boolean | undefined {
  if (NUMBER.test(text)) return Number(text);
  if (/^(true|false)$/i.test(text)) return text.toLowerCase() === "true";
  return /^"(?:[^"]|"")*"$/.test(text) ? text.slice(1, -1).replace(/""/g, '"') : undefined;
}

function arrayOf(text: string): Argument | undefined {
  const rows = splitOutside(text.slice(1, -1), ";")?.map((row) =>
    (splitOutside(row, ",") ?? [""]).map((cell) => constant(cell.trim())),
  );
  if (!rows || rows.some((row) => row.length !== rows[0]!.length || row.includes(undefined))) return undefined;
  return { kind: "array", rows: rows as (string | number | boolean)[][] };
}

function argumentOf(text: string): Argument {
  if (text === "") return { kind: "value", value: null };
  const value = constant(text);
  if (value !== undefined) return { kind: "value", value };
  if (text.startsWith("{") && text.endsWith("}")) return arrayOf(text) ?? { kind: "other", text };
  const match = REFERENCE.exec(text);
  if (!match) return { kind: "other", text };
  return {
    kind: "reference",
    sheet: match[1]?.replace(/''/g, "'") ?? match[2],
    range: match[3]!.replace(/\$/g, ""),
    spill: match[4] === "#",
  };
}

/** The call that a formula is, or undefined where it is anything else. */
export function parseCall(formula: string): FormulaCall | undefined {
  const match = CALL.exec(formula);
  if (!match) return undefined;
  const inside = match[2]!.trim();
  const parts = inside === "" ? [] : splitOutside(inside, ",");
  return parts && { name: match[1]!.toUpperCase(), args: parts.map((part) => argumentOf(part.trim())) };
}

/** A constant as a formula writes it. */
export function written(value: string | number | boolean | null): string {
  if (value === null) return "";
  return typeof value === "string" ? `"${value.replace(/"/g, '""')}"` : String(value).toUpperCase();
}
