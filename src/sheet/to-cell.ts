import { DomainError, NoAnswerError } from "../model/errors";
import { CellError, noAnswer, wrongInput } from "./cell-error";

/** What a cell may hold after a call. */
export type CellValue = number | string | boolean | CellError;

/** The error that a cell shows for something the model threw. */
export function errorCell(thrown: unknown): CellError {
  if (thrown instanceof CellError) return thrown;
  if (thrown instanceof DomainError) return wrongInput(thrown.message);
  if (thrown instanceof NoAnswerError) return noAnswer(thrown.message);
  // Anything else is a defect of ours; the message says so, and the fuzz test looks for it.
  const reason = thrown instanceof Error ? thrown.message : String(thrown);
  return wrongInput(`Internal fault, please report it: ${reason}`);
}

/** A model result as a cell: hosts show NaN and infinities inside an array as 0, so they become errors. */
export function resultCell(result: unknown): CellValue {
  if (typeof result === "number") {
    if (Number.isFinite(result)) return result;
    return noAnswer("The answer lies beyond the numbers that a cell can hold.");
  }
  if (typeof result === "string" || typeof result === "boolean" || result instanceof CellError) return result;
  if (result === null || result === undefined) return "";
  return wrongInput("Internal fault, please report it: the result is not a cell value.");
}
