import { wrongInput, type CellError } from "./cell-error";
import type { Argument } from "./argument";

/** Rows and columns of a result. */
export interface Shape {
  readonly rows: number;
  readonly columns: number;
}

/** The shape that arguments spread to, as a spreadsheet spreads its own arrays, or why they do not fit together. */
export function commonShape(named: readonly (readonly [string, Argument])[]): Shape | CellError {
  let rows = 1;
  let columns = 1;
  for (const [, { cells }] of named) {
    rows = Math.max(rows, cells.length);
    columns = Math.max(columns, cells[0]!.length);
  }
  for (const [name, { cells }] of named) {
    const height = cells.length;
    const width = cells[0]!.length;
    if ((height !== 1 && height !== rows) || (width !== 1 && width !== columns)) {
      return wrongInput(
        `${name} has ${height} rows and ${width} columns, which does not fit ${rows} rows and ${columns} columns.`,
      );
    }
  }
  return { rows, columns };
}
