/** Puts a function into the workbook, where the cells are free. */
import type { FunctionText, RegisteredFunction } from "../../sheet/registry";
import { PaneFailure } from "../failure";
import { written } from "../formula";
import { say, texts } from "../say";
import { areaOfCell, areaText, placeText } from "../workbook/address";
import type { Area, OpenWorkbook } from "../workbook/workbook";
import { answerOf, exampleOf, layOut } from "./example";

const SHEET_ROWS = 1_048_576;
const SHEET_COLUMNS = 16_384;

async function requireFree(book: OpenWorkbook, area: Area): Promise<void> {
  const fits = area.row + area.rows <= SHEET_ROWS && area.column + area.columns <= SHEET_COLUMNS;
  const free = fits && (await book.read(area)).formulas.every((row) => row.every((cell) => cell === ""));
  if (free) return;
  throw new PaneFailure(say(texts.find.occupied, { place: areaText(area), rows: area.rows, columns: area.columns }));
}

/** Writes a function's example from the selected cell on; answers with what to tell. */
export async function insertExample(
  book: OpenWorkbook,
  text: FunctionText,
  entry: RegisteredFunction,
  namespace: string,
): Promise<string> {
  const example = exampleOf(text, namespace);
  const answer = example && answerOf(example, entry);
  if (!example || !answer) throw new Error(`${text.id} has no example that can be laid out`);
  const layout = layOut(text, example, answer, await book.selected(), namespace, texts.find.resultHeading);
  await requireFree(book, layout.area);
  await book.write(layout.area.sheet, layout.edits);
  await book.select(areaOfCell(layout.result));
  return say(texts.find.inserted, { formula: layout.formula, place: placeText(layout.result) });
}

/** Writes the formula that gives a function's method text into the selected cell. */
export async function insertMethodText(book: OpenWorkbook, id: string, namespace: string): Promise<string> {
  const at = await book.selected();
  await requireFree(book, areaOfCell(at));
  const formula = `=${namespace}.METHOD.TEXT(${written(id)})`;
  await book.write(at.sheet, [{ row: at.row, column: at.column, content: { formula } }]);
  return say(texts.find.methodInserted, { id: `${namespace}.${id}`, place: placeText(at) });
}
