/** A sheet that one spilled formula fills. */
import type { FunctionTable } from "../function-table";
import type { Book, Sheet } from "../engine/library";
import { toStored } from "../stored-names";
import { lookOf, widthOf } from "./columns";
import { HEADING_ROW } from "./input-sheet";
import { locked, markHeading, printed, putTitle } from "./look";

export interface ResultTable {
  /** Formula as people write it, with names for ranges. */
  readonly formula: string;
  readonly column: number;
  /** Headings that the formula brings, for widths and formats. */
  readonly headings: readonly string[];
}

/** Puts a formula that spills. */
export function putSpill(sheet: Sheet, row: number, column: number, formula: string, functions: FunctionTable): void {
  const cell = sheet.getCell(row, column);
  cell.value = {
    formula: toStored(formula, functions),
    shareType: "array",
    ref: cell.address,
    isDynamicArray: true,
  } as never;
}

export async function addResultSheet(
  book: Book,
  name: string,
  title: string,
  purpose: string,
  tables: readonly ResultTable[],
  functions: FunctionTable,
): Promise<Sheet> {
  const sheet = book.addWorksheet(name, {
    views: [{ state: "frozen", ySplit: HEADING_ROW, xSplit: 1 }],
    properties: { tabColor: { argb: "FF20515A" } },
  } as never);
  putTitle(sheet, title, purpose);
  for (const { formula, column, headings } of tables) {
    headings.forEach((heading, i) => {
      const { format } = lookOf(heading);
      const target = sheet.getColumn(column + i);
      target.width = widthOf(heading);
      if (format !== undefined) target.numFmt = format;
      markHeading(sheet.getCell(HEADING_ROW, column + i));
    });
    putSpill(sheet, HEADING_ROW, column, formula, functions);
  }
  sheet.getRow(HEADING_ROW).height = 32;
  printed(sheet, HEADING_ROW);
  await locked(sheet);
  return sheet;
}
