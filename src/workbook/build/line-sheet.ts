/** Pieces of sheets that are laid out line by line: inputs beside their labels, results beside how they are computed. */
import type { Cell, Sheet } from "../engine/library";
import type { FunctionTable } from "../function-table";
import { toStored } from "../stored-names";
import { FONT, INK, markInput, putNote } from "./look";

/** An input in a line: its value and the range that is usual. */
export interface LineInput {
  readonly value: number | string;
  readonly format?: string;
  readonly low?: number;
  readonly high?: number;
  readonly words?: readonly string[];
}

/** An input cell with a validation that explains itself. */
export function putLineInput(sheet: Sheet, cell: Cell, label: string, input: LineInput): void {
  markInput(cell);
  cell.value = input.value;
  if (input.format !== undefined) cell.numFmt = input.format;
  const title = label.slice(0, 32);
  const rule = input.words
    ? { type: "list", formulae: [`"${input.words.join(",")}"`], error: `One of: ${input.words.join(", ")}.` }
    : {
        type: "decimal",
        operator: "between",
        formulae: [input.low, input.high],
        error: `${label}: ${input.low} to ${input.high}.`,
      };
  (sheet.dataValidations as unknown as { add(area: string, rule: object): void }).add(cell.address, {
    ...rule,
    showErrorMessage: true,
    errorTitle: title,
    showInputMessage: true,
    promptTitle: title,
    prompt: rule.error.slice(0, 250),
  });
}

/** A formula that gives one value. */
export function putFormula(cell: Cell, formula: string, functions: FunctionTable, format?: string): void {
  cell.value = { formula: toStored(formula, functions) };
  if (format !== undefined) cell.numFmt = format;
  cell.font = { name: FONT, size: 11, bold: true, color: { argb: INK } };
}

export function putLabel(cell: Cell, text: string): void {
  putNote(cell, text);
}
