/** Between the engine's runtime values and plain cells. */
import { CellError } from "../../sheet/cell-error";

/** Kinds of the engine's runtime values. */
const BLANK = 0;
const NUMBER = 1;
const TEXT = 2;
const BOOLEAN = 3;
const ERROR = 4;
const ARRAY = 5;

interface RuntimeValue {
  readonly kind: number;
  readonly value?: unknown;
  readonly code?: string;
  readonly rows?: readonly (readonly RuntimeValue[])[];
  readonly [extra: string]: unknown;
}

/** A runtime argument as the cells of a call. */
export function toCells(argument: RuntimeValue | undefined): unknown[][] {
  if (argument?.kind === ARRAY) return argument.rows!.map((row) => row.map(toCell));
  return [[toCell(argument)]];
}

function toCell(value: RuntimeValue | undefined): unknown {
  if (value === undefined || value.kind === BLANK) return null;
  if (value.kind !== ERROR) return value.value;
  return new CellError((value.code ?? "#VALUE!") as CellError["code"], "an error in a cell that the formula uses");
}

function fromCell(cell: unknown): RuntimeValue {
  if (typeof cell === "number") {
    // NaN would travel on as a number.
    return Number.isFinite(cell) ? { kind: NUMBER, value: cell } : { kind: ERROR, code: "#NUM!" };
  }
  if (typeof cell === "string") return { kind: TEXT, value: cell };
  if (typeof cell === "boolean") return { kind: BOOLEAN, value: cell };
  if (cell instanceof CellError) return { kind: ERROR, code: cell.code };
  return { kind: BLANK };
}

/** The answer of a call as a runtime value. */
export function fromCells(cells: readonly (readonly unknown[])[]): RuntimeValue {
  if (cells.length === 1 && cells[0]!.length === 1) return fromCell(cells[0]![0]);
  return { kind: ARRAY, rows: cells.map((row) => row.map(fromCell)), height: cells.length, width: cells[0]!.length };
}
