/**
 * Why a cell shows an error. The program keeps a function's message to itself, so a formula that is one call with
 * plain arguments is computed once more, here, to read it.
 */
import { parseCall, type Argument } from "../formula";
import type { PageFunctions } from "../functions-on-page";
import { texts } from "../say";
import { areaOf, areaOfCell } from "../workbook/address";
import type { Area, OpenWorkbook } from "../workbook/workbook";
import type { ErrorCell } from "./scan";

const MOST_MESSAGES = 3;
/** Larger inputs are not read again just for a message. */
const MOST_CELLS = 200_000;

/** What an error code means, for everybody. */
export function meaningOf(code: string): string {
  return (texts.check.meanings as Readonly<Record<string, string>>)[code] ?? texts.check.meanings.other;
}

async function areaOfArgument(
  book: OpenWorkbook,
  argument: Argument & { kind: "reference" },
  sheet: string,
): Promise<Area | undefined> {
  const direct = areaOf(argument.sheet ?? sheet, argument.range);
  if (!direct) return book.namedArea(argument.range);
  return argument.spill ? book.spilledArea(direct) : direct;
}

async function cellsOfArgument(
  book: OpenWorkbook,
  argument: Argument,
  sheet: string,
): Promise<readonly (readonly unknown[])[] | null | undefined> {
  if (argument.kind === "value") return argument.value === null ? null : [[argument.value]];
  if (argument.kind === "array") return argument.rows;
  if (argument.kind === "other") return undefined;
  const area = await areaOfArgument(book, argument, sheet);
  if (!area || area.rows * area.columns > MOST_CELLS) return undefined;
  // An empty cell reaches the function as nothing.
  return (await book.read(area)).values.map((row) => row.map((cell) => (cell === "" ? null : cell)));
}

function messagesIn(answer: readonly (readonly unknown[])[]): string[] {
  const messages = new Set<string>();
  for (const row of answer) {
    for (const cell of row) {
      if (typeof cell === "object" && cell !== null && "message" in cell && typeof cell.message === "string")
        messages.add(cell.message);
      if (messages.size >= MOST_MESSAGES) return [...messages];
    }
  }
  return [...messages];
}

/** The messages of an error cell; none where its formula is not a plain call of one of our functions. */
export async function messagesOf(
  book: OpenWorkbook,
  error: ErrorCell,
  functions: PageFunctions | undefined,
  namespace: string,
): Promise<string[]> {
  let { formula } = error;
  let at = error.place;
  if (formula === undefined) {
    const [parent] = await book.spillParents([error.place]);
    if (!parent) return [];
    at = parent;
    formula = String((await book.read(areaOfCell(parent))).formulas[0]?.[0] ?? "");
  }
  const call = parseCall(formula);
  const prefix = `${namespace}.`;
  const entry = call?.name.startsWith(prefix) ? functions?.functionTable[call.name.slice(prefix.length)] : undefined;
  if (!call || !entry || call.args.length > entry.parameters.length) return [];
  const args: (readonly (readonly unknown[])[] | null)[] = [];
  for (const argument of call.args) {
    const cells = await cellsOfArgument(book, argument, at.sheet);
    if (cells === undefined) return [];
    args.push(cells);
  }
  while (args.length < entry.parameters.length) args.push(null);
  return messagesIn(entry.call(args));
}
