/** Puts a new forecast into a plan workbook, recalculates it, and says what moved. */
import { changeCells } from "../sheet/plan-tables";
import { CHANGES_HEADINGS, SHEETS } from "./build/sheet-names";
import { HEADING_ROW } from "./build/input-sheet";
import { loadBook, type Book } from "./engine/library";
import { WorkbookFailure } from "./failure";
import { putForecast, type TableEdit } from "./forecast-edit";
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

interface ForecastCells {
  readonly sheet: string;
  readonly values: Map<string, NewValue>;
  readonly lastRow: number;
  readonly edit: TableEdit;
}

/** The cells of the workbook that the new forecast changes. */
function forecastCells(book: Book, forecast: readonly (readonly unknown[])[]): ForecastCells {
  const { sheet: name, from, to } = namedRange(book, DEMAND_RANGE);
  const sheet = book.getWorksheet(name);
  if (!sheet) throw new WorkbookFailure(`the workbook has no sheet named ${name}.`);
  const table = Array.from({ length: to.row - from.row + 1 }, (_, r) =>
    Array.from({ length: to.column - from.column + 1 }, (_, c) => plainValue(sheet, from.row + r, from.column + c)),
  );
  const edit = putForecast(table, forecast, `sheet ${name}`);
  const values = new Map(
    edit.edits.map(({ row, column, value }) => [`${from.row + row},${from.column + column}`, { value, input: true }]),
  );
  return { sheet: name, values, lastRow: from.row + edit.rows - 1, edit };
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
  const { sheet, values, lastRow, edit } = forecastCells(await loadBook(bytes), forecast);
  const file = Package.open(bytes);
  patchCells(file, new Map([[sheet, values]]));
  growRange(file, DEMAND_RANGE, lastRow);
  const renewed = await recalculate(file.bytes(), functions);
  const after = await loadBook(renewed.bytes);
  const changes = changeCells(before, planOf(after));
  const result = Package.open(renewed.bytes);
  writeChanges(result, after, changes, noteOn(changes));
  const { matched, added, gone } = edit;
  return { bytes: result.bytes(), matched, added, gone, changes };
}
