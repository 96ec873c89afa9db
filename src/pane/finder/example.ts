/** A function's worked example, and how it is laid out in cells so that its inputs can be changed. */
import type { FunctionText, RegisteredFunction } from "../../sheet/registry";
import { parseCall, type Argument } from "../formula";
import { localAddress } from "../workbook/address";
import type { Area, Edit, Place } from "../workbook/workbook";

export interface Example {
  /** The call as the documentation writes it, with the namespace of this installation. */
  readonly formula: string;
  readonly args: readonly Argument[];
}

/** The first example of a function; "=CAP.POWER.DB(200) is 23.01" without its answer. */
export function exampleOf(text: FunctionText, namespace: string): Example | undefined {
  const line = text.examples[0];
  if (line === undefined) return undefined;
  const end = line.lastIndexOf(" is ");
  const formula = `=${namespace}.${text.id}(${(end < 0 ? line : line.slice(0, end)).replace(/^[^(]*\(/, "")}`;
  const call = parseCall(formula);
  return call && { formula, args: call.args };
}

/** Cells of an argument; undefined for one that is not a plain value. */
export function cellsOf(argument: Argument): (string | number | boolean | null)[][] | undefined {
  if (argument.kind === "value") return [[argument.value]];
  return argument.kind === "array" ? argument.rows.map((row) => [...row]) : undefined;
}

/** What a function answers to its example. */
export function answerOf(example: Example, entry: RegisteredFunction): unknown[][] | undefined {
  const cells = example.args.map(cellsOf);
  return cells.includes(undefined) ? undefined : entry.call(cells as unknown[][][]);
}

export interface Layout {
  /** Room that inputs, formula and answer take together. */
  readonly area: Area;
  readonly edits: readonly Edit[];
  readonly formula: string;
  readonly result: Place;
}

/**
 * Headings in the first row, inputs below them, the formula to their right.
 *
 * @param at upper left cell
 * @param answer what the formula will give, for the room that it needs
 */
export function layOut(
  text: FunctionText,
  example: Example,
  answer: readonly (readonly unknown[])[],
  at: Place,
  namespace: string,
  resultHeading: string,
): Layout {
  const edits: Edit[] = [];
  const references: string[] = [];
  let column = at.column;
  let rows = 1;
  example.args.forEach((argument, i) => {
    const cells = cellsOf(argument) ?? [[null]];
    const width = cells[0]!.length;
    edits.push({ row: at.row, column, content: text.parameters[i]?.name ?? "" });
    cells.forEach((line, r) =>
      line.forEach((content, c) => edits.push({ row: at.row + 1 + r, column: column + c, content })),
    );
    references.push(localAddress({ sheet: at.sheet, row: at.row + 1, column, rows: cells.length, columns: width }));
    rows = Math.max(rows, cells.length);
    column += width;
  });
  const formula = `=${namespace}.${text.id}(${references.join(",")})`;
  edits.push({ row: at.row, column, content: resultHeading }, { row: at.row + 1, column, content: { formula } });
  return {
    area: {
      ...at,
      rows: 1 + Math.max(rows, answer.length),
      columns: column - at.column + Math.max(1, answer[0]?.length ?? 1),
    },
    edits,
    formula,
    result: { sheet: at.sheet, row: at.row + 1, column },
  };
}
