import type { FunctionTable } from "../workbook/function-table";

/** What a command needs of the world around it; tests hand in their own. */
export interface Surroundings {
  /** A line for the person who asked. */
  out(line: string): void;
  /** Progress and faults. */
  err(line: string): void;
  readonly functions: FunctionTable;
  readonly version: string;
  now(): Date;
}

export const EXIT = { success: 0, badInput: 1, wrongCall: 2 } as const;

/** A wrong call of a command; shown with a hint to its help. */
export class WrongCall extends Error {
  override readonly name = "WrongCall";
}
