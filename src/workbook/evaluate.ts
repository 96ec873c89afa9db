/** One formula, computed in an empty workbook. */
import { calculate, type Value } from "./engine/calculate";
import { newBook } from "./engine/library";
import { WorkbookFailure } from "./failure";
import type { FunctionTable } from "./function-table";
import { toStored } from "./stored-names";

export interface Evaluated {
  readonly cells: Value[][];
  /** Messages of errors, in words. */
  readonly messages: readonly string[];
}

/**
 * @param formula with or without "="
 * @param functions our functions
 */
export function evaluate(formula: string, functions: FunctionTable): Evaluated {
  const unknown = [...formula.replace(/"(?:[^"]|"")*"/g, "").matchAll(/\bCAP\.([A-Z0-9.]+)\s*\(/gi)].find(
    ([, id]) => !functions[id!.toUpperCase()],
  );
  if (unknown)
    throw new WorkbookFailure(
      `there is no function CAP.${unknown[1]!.toUpperCase()}; the command functions lists them.`,
    );
  const book = newBook();
  const sheet = book.addWorksheet("Formula");
  sheet.getCell(1, 1).value = {
    formula: toStored(formula, functions),
    shareType: "array",
    ref: "A1",
    isDynamicArray: true,
  } as never;
  const { cells, messages } = calculate(book, functions);
  const grid: Value[][] = [];
  for (const [key, { value }] of cells.get("Formula") ?? []) {
    const [row = 1, column = 1] = key.split(",").map(Number);
    (grid[row - 1] ??= [])[column - 1] = value;
  }
  return { cells: grid, messages: messages.map(({ id, code, message }) => `CAP.${id} ${code}: ${message}`) };
}
