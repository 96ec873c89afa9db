/** A sheet on which a table is filled in. */
import { addressOf, columnLetters } from "../address";
import type { Book, Sheet } from "../engine/library";
import { lookOf, widthOf } from "./columns";
import { locked, markInput, printed, putHeading, putTitle } from "./look";

/** Row of the headings on every sheet with a table. */
export const HEADING_ROW = 5;
/** Room for rows to come, so that formulas reach them. */
const SPARE_SHARE = 0.5;
const SPARE_ROWS = 40;

export interface InputTable {
  readonly sheet: string;
  /** Name of the range, which formulas use. */
  readonly range: string;
  readonly title: string;
  readonly purpose: string;
  readonly cells: readonly (readonly unknown[])[];
}

/** Last row that the range of a table with so many rows of data reaches. */
export function lastRowFor(rows: number): number {
  return HEADING_ROW + rows + Math.max(SPARE_ROWS, Math.ceil(rows * SPARE_SHARE));
}

function validate(sheet: Sheet, column: number, name: string, lastRow: number): void {
  const { help, range, words } = lookOf(name);
  if (help === "") return;
  const area = `${addressOf(HEADING_ROW + 1, column)}:${addressOf(lastRow, column)}`;
  const prompt = { showInputMessage: true, promptTitle: name.slice(0, 32), prompt: help.slice(0, 250) };
  const model = sheet.dataValidations as unknown as { add(area: string, rule: object): void };
  if (range) {
    model.add(area, {
      type: "decimal",
      operator: "between",
      formulae: [range[0], range[1]],
      allowBlank: true,
      showErrorMessage: true,
      errorTitle: name.slice(0, 32),
      error: `${help} Allowed: ${range[0]} to ${range[1]}.`.slice(0, 250),
      ...prompt,
    });
  } else if (words) {
    model.add(area, {
      type: "list",
      formulae: [`"${words.join(",")}"`],
      allowBlank: true,
      showErrorMessage: true,
      errorTitle: name.slice(0, 32),
      error: help.slice(0, 250),
      ...prompt,
    });
  } else model.add(area, { type: "custom", formulae: ["TRUE"], allowBlank: true, ...prompt });
}

/** Adds the sheet with its named range; the planner's own columns may follow to the right. */
export async function addInputSheet(book: Book, table: InputTable): Promise<Sheet> {
  const sheet = book.addWorksheet(table.sheet, {
    views: [{ state: "frozen", ySplit: HEADING_ROW, xSplit: 1 }],
    properties: { tabColor: { argb: "FFE0B23C" } },
  } as never);
  putTitle(sheet, table.title, table.purpose);
  sheet.getCell(3, 1).value =
    "Fill in the framed, tinted cells; units are in the headings. Your own columns may follow to the right of the table.";
  const heading = table.cells[0]!.map(String);
  const lastRow = lastRowFor(table.cells.length - 1);
  heading.forEach((name, c) => {
    putHeading(sheet.getCell(HEADING_ROW, c + 1), name);
    sheet.getColumn(c + 1).width = c === 0 && table.sheet === "Radio" ? 26 : widthOf(name);
    const { format } = lookOf(name);
    for (let row = HEADING_ROW + 1; row <= lastRow; row++) {
      const cell = sheet.getCell(row, c + 1);
      markInput(cell);
      if (format !== undefined) cell.numFmt = format;
      const value = table.cells[row - HEADING_ROW]?.[c];
      if (value !== undefined && value !== null && value !== "") cell.value = value as string | number;
    }
    validate(sheet, c + 1, name, lastRow);
  });
  sheet.getRow(HEADING_ROW).height = 32;
  const area = `${table.sheet}!$A$${HEADING_ROW}:$${columnLetters(heading.length)}$${lastRow}`;
  book.definedNames.add(area, table.range);
  printed(sheet, HEADING_ROW);
  await locked(sheet);
  return sheet;
}
