/** Finds the plan among the sheets and reads it. */
import { stopIfAsked, type Work } from "../work";
import { areaOfCell } from "../workbook/address";
import type { OpenWorkbook, Place } from "../workbook/workbook";

const KEYS = ["cell", "year", "scheme", "carriersRequired"];
const ROWS_SEARCHED = 30;
const COLUMNS_SEARCHED = 60;

export interface PlanInSheets {
  /** The first cell of the headings. */
  readonly at: Place;
  /** Headings first. */
  readonly cells: readonly (readonly unknown[])[];
}

/** The plan on a sheet whose headings begin at a place. */
async function readFrom(book: OpenWorkbook, at: Place, work: Work): Promise<PlanInSheets | undefined> {
  const used = await book.usedArea(at.sheet);
  if (!used) return undefined;
  const rows = used.row + used.rows - at.row;
  const columns = used.column + used.columns - at.column;
  if (rows < 1 || columns < 1) return undefined;
  const { values } = await book.read({ ...at, rows, columns }, work);
  const width = values[0]!.findIndex((name) => name === "");
  const length = values.findIndex((row) => row[0] === "");
  const cells = values.slice(0, length < 0 ? undefined : length).map((row) => (width < 0 ? row : row.slice(0, width)));
  return cells.length > 0 && KEYS.every((key) => cells[0]!.includes(key)) ? { at, cells } : undefined;
}

/** A formula that fills a sheet with a plan, whatever it shows now. */
const PLAN_FORMULA = /\.PLAN\.TABLE\(/i;

/** Where the plan of the first sheet that holds one begins; `cells` is missing where it shows an error instead. */
export async function findPlan(
  book: OpenWorkbook,
  work: Work,
): Promise<PlanInSheets | { readonly at: Place; readonly cells: undefined } | undefined> {
  for (const sheet of await book.sheetNames()) {
    stopIfAsked(work);
    const used = await book.usedArea(sheet);
    if (!used) continue;
    const top = {
      ...used,
      rows: Math.min(used.rows, ROWS_SEARCHED),
      columns: Math.min(used.columns, COLUMNS_SEARCHED),
    };
    const { values, formulas } = await book.read(top);
    const headings = values.findIndex((line) => KEYS.every((key) => line.includes(key)));
    const isPlanFormula = (cell: unknown): boolean => PLAN_FORMULA.test(String(cell));
    const row = headings >= 0 ? headings : formulas.findIndex((line) => line.some(isPlanFormula));
    if (row < 0) continue;
    // A plan has its own words for its columns, so the first filled cell of that row begins it.
    const column =
      headings >= 0 ? values[row]!.findIndex((cell) => cell !== "") : formulas[row]!.findIndex(isPlanFormula);
    const at = { sheet, row: used.row + row, column: used.column + column };
    return (await readFrom(book, at, work)) ?? { at, cells: undefined };
  }
  return undefined;
}

/** The plan at a place where one was before, or what the place shows instead. */
export async function rereadPlan(
  book: OpenWorkbook,
  at: Place,
  work: Work,
): Promise<{ readonly plan: PlanInSheets } | { readonly shown: unknown }> {
  const plan = await readFrom(book, at, work);
  return plan ? { plan } : { shown: await valueAt(book, at) };
}

export async function valueAt(book: OpenWorkbook, at: Place): Promise<unknown> {
  return (await book.read(areaOfCell(at))).values[0]?.[0];
}
