/** Loads a new forecast into the open workbook and says what moved in its plan. */
import { changeCells } from "../../sheet/plan-tables";
import { CHANGES_HEADINGS, SHEETS } from "../../workbook/build/sheet-names";
import { HEADING_ROW } from "../../workbook/build/input-sheet";
import { readForecast } from "../../workbook/csv/forecast";
import { WorkbookFailure } from "../../workbook/failure";
import { putForecast, type TableEdit } from "../../workbook/forecast-edit";
import { PaneFailure } from "../failure";
import { say, texts } from "../say";
import { stopIfAsked, type Work } from "../work";
import { areaText } from "../workbook/address";
import type { Area, Edit, OpenWorkbook } from "../workbook/workbook";
import { isUnfinished, untilCalculated } from "./calculation";
import { findPlan, rereadPlan, valueAt } from "./plan-in-sheets";

/** The name that formulas use for the forecast. */
export const TABLE = "DemandTable";
const NOTE_ROW = 3;
/** Column of a change that says which column of the plan moved, and the column that holds the verdict. */
const MOVED_COLUMN = 3;
const VERDICT = "limitedBy";

/** A forecast that is read and checked, with what it would do. */
export interface Prepared {
  readonly file: string;
  readonly table: Area;
  readonly edit: TableEdit;
  /** Contents of the edited cells before. */
  readonly former: readonly Edit[];
  /** Users of the last year that old and new forecast share. */
  readonly users: { readonly year: string; readonly before: number; readonly after: number } | undefined;
}

export interface Outcome {
  /** What moved in the plan, headings first; verdicts first. */
  readonly changes: readonly (readonly unknown[])[];
  readonly rows: number;
  readonly verdicts: number;
  /** False where no plan was there before to compare with. */
  readonly compared: boolean;
  /** What the plan shows where it should stand, if not a plan. */
  readonly error: string | undefined;
}

function said<T>(read: () => T): T {
  try {
    return read();
  } catch (fault) {
    throw fault instanceof WorkbookFailure ? new PaneFailure(fault.message) : fault;
  }
}

function usersByYear(rows: readonly (readonly unknown[])[]): Map<number, number> {
  const [headings = [], ...body] = rows;
  const names = headings.map((name) => String(name).trim().toLowerCase());
  const [year, users] = [names.indexOf("year"), names.indexOf("users")];
  const sums = new Map<number, number>();
  for (const row of body) {
    if (row[year] === "" || row[year] === null) continue;
    const key = Number(row[year]);
    sums.set(key, (sums.get(key) ?? 0) + Number(row[users]));
  }
  return sums;
}

/** Reads a forecast and works out what it would change; writes nothing. */
export async function prepareForecast(book: OpenWorkbook, text: string, file: string): Promise<Prepared> {
  const forecast = said(() => readForecast(text, file));
  const table = await book.namedArea(TABLE);
  if (!table) throw new PaneFailure(say(texts.plan.forecastNoTable, { name: TABLE }));
  const { formulas, values } = await book.read(table);
  const edit = said(() => putForecast(values, forecast, areaText(table)));
  const before = usersByYear(values);
  const after = usersByYear(forecast);
  const year = Math.max(...[...after.keys()].filter((key) => before.has(key)));
  return {
    file,
    table,
    edit,
    former: edit.edits.map(({ row, column }) => ({
      row: table.row + row,
      column: table.column + column,
      content: asContent(formulas[row]?.[column] ?? null),
    })),
    users: Number.isFinite(year)
      ? { year: String(year), before: before.get(year)!, after: after.get(year)! }
      : undefined,
  };
}

/** What a cell holds, for writing it again. */
function asContent(cell: unknown): Edit["content"] {
  if (typeof cell === "string") return cell === "" ? null : cell.startsWith("=") ? { formula: cell } : cell;
  return typeof cell === "number" || typeof cell === "boolean" ? cell : null;
}

function verdictsFirst(changes: readonly (readonly unknown[])[]): (readonly unknown[])[] {
  const [headings = [], ...rows] = changes;
  const isVerdict = (row: readonly unknown[]): boolean => row[MOVED_COLUMN] === VERDICT;
  return [headings, ...rows.filter(isVerdict), ...rows.filter((row) => !isVerdict(row))];
}

async function writeChanges(
  book: OpenWorkbook,
  changes: readonly (readonly unknown[])[],
  note: string,
  work: Work,
): Promise<void> {
  const sheet = SHEETS.changes;
  if (!(await book.sheetNames()).includes(sheet)) await book.addSheet(sheet);
  const used = await book.usedArea(sheet);
  const former = used ? used.row + used.rows - (HEADING_ROW - 1) : 0;
  const edits: Edit[] = [{ row: NOTE_ROW - 1, column: 0, content: note }];
  for (let r = 0; r < Math.max(changes.length, former); r++) {
    CHANGES_HEADINGS.forEach((_, column) =>
      edits.push({ row: HEADING_ROW - 1 + r, column, content: asContent(changes[r]?.[column] ?? null) }),
    );
  }
  await book.write(sheet, edits, work);
}

/** Writes a prepared forecast, waits for the plan and compares it with what it was. */
export async function loadForecast(book: OpenWorkbook, prepared: Prepared, work: Work): Promise<Outcome> {
  const { table, edit } = prepared;
  work.progress(texts.plan.forecastReading);
  await untilCalculated(book, work, () => Promise.resolve(true), texts.work.nothingChanged);
  const before = await findPlan(book, work);
  if (!before) throw new PaneFailure(texts.plan.forecastNoPlan);
  stopIfAsked(work, texts.work.nothingChanged);
  work.progress(texts.plan.forecastWriting);
  await book.write(
    table.sheet,
    edit.edits.map(({ row, column, value }) => ({
      row: table.row + row,
      column: table.column + column,
      content: value as Edit["content"],
    })),
  );
  if (edit.rows > table.rows) await book.setNamedArea(TABLE, { ...table, rows: edit.rows });
  await book.recalculate();
  const settled = async (): Promise<boolean> => !isUnfinished(await valueAt(book, before.at));
  await untilCalculated(book, work, settled, texts.plan.forecastStopped);
  work.progress(texts.plan.forecastComparing);
  const after = await rereadPlan(book, before.at, work);
  const nothing = { changes: [], rows: 0, verdicts: 0, compared: false };
  if ("shown" in after) return { ...nothing, error: String(after.shown) };
  if (!before.cells) return { ...nothing, error: undefined };
  const changes = verdictsFirst(said(() => changeCells(before.cells, after.plan.cells)));
  const body = changes.slice(1);
  const outcome = {
    changes,
    rows: new Set(body.map((row) => JSON.stringify(row.slice(0, MOVED_COLUMN)))).size,
    verdicts: body.filter((row) => row[MOVED_COLUMN] === VERDICT).length,
    compared: true,
    error: undefined,
  };
  stopIfAsked(work, texts.plan.forecastStopped);
  const { rows, verdicts } = outcome;
  await writeChanges(book, changes, say(texts.plan.forecastNote, { values: body.length, rows, verdicts }), work);
  return outcome;
}

/** Puts back what the forecast replaced. */
export async function undoForecast(book: OpenWorkbook, { table, former }: Prepared): Promise<void> {
  await book.write(table.sheet, former);
  await book.setNamedArea(TABLE, table);
  await book.recalculate();
}
