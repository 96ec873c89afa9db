/** A worked example of a declaration: `=CAP.ERLANGB.BLOCKING(10, 15) is 0.0365`, also `{1;2}` arrays and texts. */
export interface WorkedExample {
  readonly id: string;
  readonly args: unknown[][][];
  /** First cell of the answer as the example prints it. */
  readonly printed: string;
}

function literal(text: string): unknown {
  const trimmed = text.trim();
  if (trimmed === "") return null;
  if (/^".*"$/s.test(trimmed)) return trimmed.slice(1, -1).replace(/""/g, '"');
  if (/^(TRUE|FALSE)$/i.test(trimmed)) return /^true$/i.test(trimmed);
  const value = Number(trimmed);
  if (!Number.isFinite(value)) throw new Error(`not a literal: ${trimmed}`);
  return value;
}

/** Splits at a separator outside quotes and braces. */
function split(text: string, separator: string): string[] {
  const parts = [""];
  let quoted = false;
  let depth = 0;
  for (const letter of text) {
    if (letter === '"') quoted = !quoted;
    if (!quoted && letter === "{") depth++;
    if (!quoted && letter === "}") depth--;
    if (letter === separator && !quoted && depth === 0) parts.push("");
    else parts[parts.length - 1] += letter;
  }
  return parts;
}

function argument(text: string): unknown[][] {
  const trimmed = text.trim();
  if (!trimmed.startsWith("{")) return [[literal(trimmed)]];
  return split(trimmed.slice(1, -1), ";").map((row) => split(row, ",").map(literal));
}

export function parseExample(text: string): WorkedExample {
  const match = /^=CAP\.([A-Z0-9.]+)\((.*)\) is (.+)$/s.exec(text);
  if (!match) throw new Error(`not a worked example: ${text}`);
  const [, id, list, printed] = match;
  return { id: id!, args: list!.trim() === "" ? [] : split(list!, ",").map(argument), printed: printed!.trim() };
}

/** Half a unit of the last printed digit. */
export function printedTolerance(printed: string): number {
  const [mantissa = "", exponent = "0"] = printed.toLowerCase().split("e");
  const decimals = mantissa.includes(".") ? mantissa.length - mantissa.indexOf(".") - 1 : 0;
  return 0.5000001 * 10 ** (Number(exponent) - decimals);
}
