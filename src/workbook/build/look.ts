/** The look of every sheet: one place for colours, fonts and what marks an input. */
import type { Cell, Sheet } from "../engine/library";

export const INK = "FF1B2A33";
export const DEEP = "FF20515A";
export const PALE = "FFE6EFEE";
export const INPUT = "FFFFF6DC";
export const LINE = "FFB9C6C4";
export const WARN = "FFB4411B";

export const FONT = "Calibri";

const solid = (argb: string): object => ({ type: "pattern", pattern: "solid", fgColor: { argb } });
const line = { style: "thin", color: { argb: LINE } };
const BORDER = { top: line, bottom: line, left: line, right: line };

export function putTitle(sheet: Sheet, title: string, purpose: string): void {
  const cell = sheet.getCell(1, 1);
  cell.value = title;
  cell.font = { name: FONT, size: 18, bold: true, color: { argb: DEEP } };
  sheet.getRow(1).height = 28;
  const note = sheet.getCell(2, 1);
  note.value = purpose;
  note.font = { name: FONT, size: 11, italic: true, color: { argb: INK } };
}

export function putHeading(cell: Cell, text: string): void {
  cell.value = text;
  markHeading(cell);
}

/** Style of a heading whose text a formula brings. */
export function markHeading(cell: Cell): void {
  cell.font = { name: FONT, size: 11, bold: true, color: { argb: "FFFFFFFF" } };
  cell.fill = solid(DEEP) as never;
  cell.alignment = { vertical: "middle", horizontal: "left", wrapText: true };
  cell.border = BORDER as never;
}

/** An input: unlocked, tinted, and framed so that it shows in black and white too. */
export function markInput(cell: Cell): void {
  cell.fill = solid(INPUT) as never;
  cell.border = BORDER as never;
  cell.font = { name: FONT, size: 11, color: { argb: INK } };
  cell.protection = { locked: false };
}

export function putNote(cell: Cell, text: string, bold = false): void {
  cell.value = text;
  cell.font = { name: FONT, size: 11, bold, color: { argb: INK } };
  cell.alignment = { wrapText: true, vertical: "top" };
}

const LINE_HEIGHT = 15;

/** Height of a row whose text wraps: programs disagree on when to fit it by themselves. */
export function fitHeight(sheet: Sheet, row: number, text: string, width: number): void {
  const lines = text.split("\n").reduce((sum, part) => sum + Math.max(1, Math.ceil((part.length * 1.08) / width)), 0);
  sheet.getRow(row).height = Math.min(400, Math.max(LINE_HEIGHT, lines * LINE_HEIGHT));
}

/** Printing: landscape, one page wide, the headings on every page. */
export function printed(sheet: Sheet, headingRow: number, pagesHigh = 0): void {
  Object.assign(sheet.pageSetup, {
    orientation: "landscape",
    fitToPage: true,
    fitToWidth: 1,
    fitToHeight: pagesHigh,
    paperSize: 9,
    printTitlesRow: `${headingRow}:${headingRow}`,
  });
  sheet.headerFooter.oddFooter = "&L&A&RPage &P of &N";
}

export async function locked(sheet: Sheet): Promise<void> {
  await sheet.protect(undefined, {
    formatColumns: true,
    formatRows: true,
    formatCells: true,
    sort: true,
    autoFilter: true,
    insertRows: true,
  });
}
