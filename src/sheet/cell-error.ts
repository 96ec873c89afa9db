/** The error values a cell can show; hosts show the message of `#VALUE!` and `#N/A` only. */
export type ErrorCode = "#VALUE!" | "#N/A" | "#NUM!" | "#DIV/0!" | "#NULL!" | "#NAME?" | "#REF!" | "#SPILL!" | "#CALC!";

/** An error as the value of a cell, known to every host of the functions. */
export class CellError {
  constructor(
    readonly code: ErrorCode,
    readonly message: string,
  ) {}

  toString(): string {
    return this.code;
  }
}

/** An input that is wrong in type, shape or domain. */
export function wrongInput(message: string): CellError {
  return new CellError("#VALUE!", message);
}

/** Inputs that are fine and have no answer. */
export function noAnswer(message: string): CellError {
  return new CellError("#N/A", message);
}
