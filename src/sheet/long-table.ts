/** Whole tables as long as a sheet: the rows that a function gives are the answer, and none is copied. */
import { readCell, type Argument } from "./argument";
import { CellError, wrongInput } from "./cell-error";
import { errorCell, resultCell, type CellValue } from "./to-cell";

/**
 * A function of whole ranges and of single cells that may be left out, which gives a table of rows of equal length.
 *
 * The table is taken over, so the function must not keep it.
 *
 * @param fn the function, called once
 * @param args its parameters by name, in its order
 */
export function longTable(
  // eslint-disable-next-line @typescript-eslint/no-explicit-any
  fn: (...values: any[]) => unknown[][],
  args: Readonly<Record<string, Argument>>,
): CellValue[][] {
  const values: unknown[] = [];
  for (const [name, argument] of Object.entries(args)) {
    const { role, cells } = argument;
    if (role === "raw") {
      values.push(cells);
      continue;
    }
    if (cells.length > 1 || cells[0]!.length > 1) {
      return [[wrongInput("The answer is a whole table, so parameters beside its ranges must be single cells.")]];
    }
    const value = readCell(argument, name, cells[0]![0]);
    if (value instanceof CellError) return [[value]];
    values.push(value);
  }
  let table: unknown[][];
  try {
    table = fn(...values);
  } catch (thrown) {
    return [[errorCell(thrown)]];
  }
  for (const row of table) {
    for (let c = 0; c < row.length; c++) {
      const cell = row[c];
      if (typeof cell !== "string" && !(typeof cell === "number" && Number.isFinite(cell))) row[c] = resultCell(cell);
    }
  }
  return table as CellValue[][];
}
