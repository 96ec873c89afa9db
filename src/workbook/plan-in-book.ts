/** Finds the plan and the named tables inside a workbook. */
import { CellError } from "../sheet/cell-error";
import { parseRange, type Place } from "./address";
import { HEADING_ROW } from "./build/input-sheet";
import type { Book, Sheet } from "./engine/library";
import { WorkbookFailure } from "./failure";

/** Value of a cell as plain data, formulas by their last result. */
export function plainValue(sheet: Sheet, row: number, column: number): unknown {
  const cell = sheet.findCell(row, column);
  if (!cell) return null;
  const raw: unknown = (cell.type as number) === 6 ? cell.result : cell.value;
  if (raw === null || raw === undefined) return null;
  if (typeof raw !== "object") return raw;
  if (raw instanceof Date) return raw.getTime() / 86_400_000 + 25_569;
  const { error, richText, text } = raw as { error?: string; richText?: { text: string }[]; text?: unknown };
  if (error !== undefined) return new CellError(error as CellError["code"], "");
  if (richText) return richText.map((part) => part.text).join("");
  return typeof text === "string" ? text : null;
}

const PLAN_KEYS = ["cell", "year", "scheme"];
const HEADINGS_WITHIN = 30;

/** Where a sheet's headings begin, if it holds a plan. */
function headingRow(sheet: Sheet): number | undefined {
  for (let row = 1; row <= Math.min(HEADINGS_WITHIN, sheet.rowCount); row++) {
    const names = Array.from({ length: Math.min(60, sheet.columnCount) }, (_, c) =>
      String(plainValue(sheet, row, c + 1)),
    );
    if (PLAN_KEYS.every((key) => names.includes(key)) && names.includes("carriersRequired")) return row;
  }
  return undefined;
}

/**
 * The plan of a workbook as it was last calculated, headings first.
 *
 * @throws WorkbookFailure where no sheet holds one
 */
export function planOf(book: Book): unknown[][] {
  for (const sheet of book.worksheets) {
    const top = headingRow(sheet);
    if (top !== undefined) return tableBelow(sheet, top);
  }
  throw new WorkbookFailure("no sheet of the workbook holds a plan (headings cell, year, scheme, carriersRequired).");
}

/** The table of a result sheet, headings first; undefined where the workbook has no such sheet. */
export function tableOf(book: Book, name: string): unknown[][] | undefined {
  const sheet = book.getWorksheet(name);
  return sheet && tableBelow(sheet, HEADING_ROW);
}

/** A table from its row of headings down to the first row without a first cell. */
function tableBelow(sheet: Sheet, top: number): unknown[][] {
  const headings: string[] = [];
  for (let c = 1; c <= sheet.columnCount; c++) {
    const name = plainValue(sheet, top, c);
    if (name === null || name === "") break;
    headings.push(String(name));
  }
  const rows: unknown[][] = [headings];
  for (let row = top + 1; row <= sheet.rowCount; row++) {
    const first = plainValue(sheet, row, 1);
    if (first === null || first === "") break;
    rows.push(headings.map((_, c) => plainValue(sheet, row, c + 1)));
  }
  return rows;
}

export interface NamedRange {
  readonly sheet: string;
  readonly from: Place;
  readonly to: Place;
}

/** The area that a name stands for. */
export function namedRange(book: Book, name: string): NamedRange {
  const entries = (book.definedNames as unknown as { model: { name: string; ranges: string[] }[] }).model ?? [];
  const found = entries.find((entry) => entry.name === name)?.ranges[0];
  const match = found === undefined ? null : /^(?:'((?:[^']|'')+)'|([^!]+))!(.+)$/.exec(found);
  const range = match && parseRange(match[3]!);
  if (!match || !range)
    throw new WorkbookFailure(`the workbook has no range named ${name}; it was not made by the command new.`);
  return { sheet: match[1]?.replace(/''/g, "'") ?? match[2]!, ...range };
}
