/** The one file that imports the spreadsheet library; everything else goes through the types below. */
import { Workbook } from "@cj-tech-master/excelts";
import { installChartSupport } from "@cj-tech-master/excelts/chart";
import { calculateFormulas, installFormulaEngine } from "@cj-tech-master/excelts/formula";
import { WorkbookFailure } from "../failure";

let ready = false;

function prepare(): void {
  if (ready) return;
  installFormulaEngine();
  // Without it the reader rejects any file that holds a chart.
  installChartSupport();
  ready = true;
}

export type Book = Workbook;
export type Sheet = ReturnType<Workbook["addWorksheet"]>;
export type Cell = ReturnType<Sheet["getCell"]>;

export function newBook(): Book {
  prepare();
  return new Workbook();
}

/**
 * Loads a workbook into the engine.
 *
 * @throws WorkbookFailure where the library cannot read it
 */
export async function loadBook(bytes: Uint8Array): Promise<Book> {
  const book = newBook();
  try {
    await book.xlsx.load(bytes);
  } catch (fault) {
    throw new WorkbookFailure(`the workbook cannot be read: ${fault instanceof Error ? fault.message : String(fault)}`);
  }
  return book;
}

export async function writeBook(book: Book): Promise<Uint8Array> {
  return new Uint8Array(await book.xlsx.writeBuffer());
}

/** One run of the library's calculation over sheets that are shown to it. */
export const runCalculation = calculateFormulas as unknown as (view: unknown) => void;
