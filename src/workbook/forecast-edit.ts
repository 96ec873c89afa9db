/** Which cells of a demand table change when a new forecast comes. */
import { WorkbookFailure } from "./failure";

/** A new value for a cell of a table, counted from its heading's first cell. */
export interface CellEdit {
  readonly row: number;
  readonly column: number;
  readonly value: unknown;
}

export interface TableEdit {
  readonly edits: readonly CellEdit[];
  /** Rows that the table has afterwards, its heading and its gaps included. */
  readonly rows: number;
  /** Rows of the forecast: users replaced or kept, added, taken out. */
  readonly matched: number;
  readonly added: number;
  readonly gone: number;
}

/**
 * Rows are matched by area and year, so that the planner's notes beside them stay with them.
 *
 * @param table cells of the table, headings first, blank rows included
 * @param forecast checked cells: area, year, users and perhaps errorPerYear, headings first
 * @param place where the table stands, for messages
 */
export function putForecast(
  table: readonly (readonly unknown[])[],
  forecast: readonly (readonly unknown[])[],
  place: string,
): TableEdit {
  const headings = (table[0] ?? []).map((name) => textOf(name).toLowerCase());
  const columnOf = (name: string): number => {
    const column = headings.lastIndexOf(name.toLowerCase());
    if (column < 0) throw new WorkbookFailure(`${place} has no column ${name}.`);
    return column;
  };
  const [area, year, users] = [columnOf("area"), columnOf("year"), columnOf("users")];
  const errorAt = forecast[0]!.map(String).indexOf("errorPerYear");
  const errorColumn = errorAt < 0 ? -1 : headings.lastIndexOf("errorperyear");
  const rowOf = new Map<string, number>();
  let lastFilled = 0;
  table.forEach((cells, row) => {
    if (row === 0 || textOf(cells[area]) === "") return;
    rowOf.set(key(cells[area], cells[year]), row);
    lastFilled = row;
  });
  const edits: CellEdit[] = [];
  let matched = 0;
  let added = 0;
  let next = lastFilled + 1;
  for (const cells of forecast.slice(1)) {
    const id = key(cells[0], cells[1]);
    let row = rowOf.get(id);
    if (row === undefined) {
      row = next++;
      added++;
      edits.push({ row, column: area, value: cells[0] }, { row, column: year, value: cells[1] });
    } else {
      rowOf.delete(id);
      matched++;
    }
    edits.push({ row, column: users, value: cells[2] });
    if (errorColumn >= 0 && cells[errorAt] !== null && cells[errorAt] !== undefined)
      edits.push({ row, column: errorColumn, value: cells[errorAt] });
  }
  for (const row of rowOf.values()) {
    for (const column of [area, year, users, ...(errorColumn < 0 ? [] : [errorColumn])])
      edits.push({ row, column, value: null });
  }
  return { edits, rows: next, matched, added, gone: rowOf.size };
}

function textOf(cell: unknown): string {
  return typeof cell === "string" || typeof cell === "number" ? String(cell).trim() : "";
}

function key(area: unknown, year: unknown): string {
  return JSON.stringify([textOf(area), Number(year)]);
}
