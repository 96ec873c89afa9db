/** Puts a new forecast into a plan workbook, recalculates it, and says what moved. */
import { changeCells } from "../sheet/plan-tables";
import { CHANGES_HEADINGS, SHEETS } from "./build/sheet-names";
import { HEADING_ROW } from "./build/input-sheet";
import { loadBook, type Book } from "./engine/library";
import { WorkbookFailure } from "./failure";
import type { FunctionTable } from "./function-table";
import { Package } from "./package/archive";
import { patchCells, type NewValue } from "./package/patch-cells";
import { addSheet, sheetParts } from "./package/sheets";
import { namedRange, plainValue, planOf } from "./plan-in-book";
import { recalculate } from "./recalculate";

export const DEMAND_RANGE = "DemandTable";

export interface Refreshed {
  readonly bytes: Uint8Array;
  /** Rows of the forecast: users replaced or kept, added, taken out. */
  readonly matched: number;
  readonly added: number;
  readonly gone: number;
  /** What moved in the plan, headings first. */
  readonly changes: unknown[][];
}

interface ForecastEdit {
  readonly values: Map<string, NewValue>;
  readonly matched: number;
  readonly added: number;
  readonly gone: number;
  readonly lastRow: number;
}

/** Rows are matched by area and year, so that the planner's notes beside them stay with them. */
function editForecast(book: Book, forecast: readonly (readonly unknown[])[]): ForecastEdit {
  const range = namedRange(book, DEMAND_RANGE);
  const sheet = book.getWorksheet(range.sheet);
  if (!sheet) throw new WorkbookFailure(`the workbook has no sheet named ${range.sheet}.`);
  const columnOf = new Map<string, number>();
  for (let c = range.from.column; c <= range.to.column; c++) {
    columnOf.set(
      String(plainValue(sheet, range.from.row, c))
        .trim()
        .toLowerCase(),
      c,
    );
  }
  const place = (name: string): number => {
    const column = columnOf.get(name.toLowerCase());
    if (column === undefined)
      throw new WorkbookFailure(`sheet ${range.sheet} has no column ${name} in row ${range.from.row}.`);
    return column;
  };
  const [area, year, users] = [place("area"), place("year"), place("users")];
  const headings = forecast[0]!.map(String);
  const errorAt = headings.indexOf("errorPerYear");
  const errorColumn = errorAt < 0 ? undefined : columnOf.get("errorperyear");
  const rowOf = new Map<string, number>();
  let lastFilled = range.from.row;
  for (let row = range.from.row + 1; row <= range.to.row; row++) {
    const name = plainValue(sheet, row, area);
    if (name === null || name === "") continue;
    rowOf.set(JSON.stringify([String(name), Number(plainValue(sheet, row, year))]), row);
    lastFilled = row;
  }
  const values = new Map<string, NewValue>();
  const put = (row: number, column: number, value: unknown): void =>
    void values.set(`${row},${column}`, { value, input: true });
  let matched = 0;
  let added = 0;
  let next = lastFilled + 1;
  for (const cells of forecast.slice(1)) {
    const key = JSON.stringify([String(cells[0]), Number(cells[1])]);
    let row = rowOf.get(key);
    if (row === undefined) {
      row = next++;
      added++;
      put(row, area, cells[0]);
      put(row, year, cells[1]);
    } else {
      rowOf.delete(key);
      matched++;
    }
    put(row, users, cells[2]);
    if (errorColumn !== undefined && cells[errorAt] !== null && cells[errorAt] !== undefined)
      put(row, errorColumn, cells[errorAt]);
  }
  for (const row of rowOf.values()) {
    for (const column of [area, year, users, ...(errorColumn === undefined ? [] : [errorColumn])])
      put(row, column, null);
  }
  return { values, matched, added, gone: rowOf.size, lastRow: next - 1 };
}

/** Lets the named range reach its last row. */
function growRange(file: Package, name: string, lastRow: number): void {
  const workbook = file.text("xl/workbook.xml");
  const pattern = new RegExp(`(<definedName\\b[^>]*\\bname="${name}"[^>]*>[^<]*:\\$[A-Z]+\\$)(\\d+)(<)`);
  file.set(
    "xl/workbook.xml",
    workbook.replace(pattern, (whole, head: string, row: string, tail: string) =>
      Number(row) >= lastRow ? whole : `${head}${lastRow}${tail}`,
    ),
  );
}

/** Writes the list of changes into its sheet, over an earlier list. */
function writeChanges(file: Package, book: Book, changes: readonly (readonly unknown[])[], note: string): void {
  if (!sheetParts(file).some(({ name }) => name === SHEETS.changes)) {
    addSheet(file, SHEETS.changes, [[note], [], [], [], CHANGES_HEADINGS], [12, 8, 20, 22, 16, 16, 16]);
  }
  const sheet = book.getWorksheet(SHEETS.changes);
  const values = new Map<string, NewValue>([["3,1", { value: note, input: true }]]);
  const width = CHANGES_HEADINGS.length;
  const rows = Math.max(changes.length, (sheet?.rowCount ?? 0) - HEADING_ROW + 1);
  for (let r = 0; r < rows; r++) {
    for (let c = 0; c < width; c++)
      values.set(`${HEADING_ROW + r},${c + 1}`, { value: changes[r]?.[c] ?? null, input: true });
  }
  patchCells(file, new Map([[SHEETS.changes, values]]));
}

function noteOn(changes: readonly (readonly unknown[])[]): string {
  const rows = new Set(
    changes.slice(1).map(([cell, year, scheme]) => `${String(cell)} ${String(year)} ${String(scheme)}`),
  );
  const verdicts = changes.filter((row) => row[3] === "limitedBy").length;
  return `${changes.length - 1} values moved in ${rows.size} rows of the plan; the verdict (limitedBy) changed in ${verdicts}.`;
}

/**
 * @param bytes a plan workbook
 * @param forecast the new forecast, headings first, checked
 * @param functions our functions
 */
export async function refresh(
  bytes: Uint8Array,
  forecast: readonly (readonly unknown[])[],
  functions: FunctionTable,
): Promise<Refreshed> {
  const old = await recalculate(bytes, functions);
  const before = planOf(await loadBook(old.bytes));
  const edit = editForecast(await loadBook(bytes), forecast);
  const file = Package.open(bytes);
  const { sheet } = namedRange(await loadBook(bytes), DEMAND_RANGE);
  patchCells(file, new Map([[sheet, edit.values]]));
  growRange(file, DEMAND_RANGE, edit.lastRow);
  const renewed = await recalculate(file.bytes(), functions);
  const after = await loadBook(renewed.bytes);
  const changes = changeCells(before, planOf(after));
  const result = Package.open(renewed.bytes);
  writeChanges(result, after, changes, noteOn(changes));
  const { matched, added, gone } = edit;
  return { bytes: result.bytes(), matched, added, gone, changes };
}
