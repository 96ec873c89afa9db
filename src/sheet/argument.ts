import { contains, type Domain } from "../model/domain";
import { DomainError } from "../model/errors";
import { CellError, wrongInput } from "./cell-error";

/** How one parameter reads its cells. */
export interface Argument {
  readonly role: "scalar" | "list" | "parallel" | "grid" | "raw";
  readonly cells: readonly (readonly unknown[])[];
  readonly optional: boolean;
  readonly fallback: unknown;
  /** True where 0 cannot be meant, so that an empty cell passed as 0 counts as missing. */
  readonly zeroIsMissing: boolean;
  /** Quick test for numeric kinds: a number within `low` and `high` needs no further look. */
  readonly low: number;
  readonly high: number;
  readonly whole: boolean;
  /** The value for a cell that is not missing, or the reason why it has none. */
  read(cell: unknown, where: string): unknown;
  /** The allowed values in words. */
  readonly words: string;
}

type Cells = readonly (readonly unknown[])[] | null | undefined;

// An optional argument that the formula leaves out arrives as null.
function matrix(cells: Cells): readonly (readonly unknown[])[] {
  if (cells === null || cells === undefined) return [[null]];
  if (!Array.isArray(cells)) return [[cells]];
  if (cells.length === 0 || !Array.isArray(cells[0]) || cells[0].length === 0) return [[null]];
  return cells as readonly (readonly unknown[])[];
}

const bits = new DataView(new ArrayBuffer(8));

function neighbour(value: number, up: boolean): number {
  if (value === 0) return up ? Number.MIN_VALUE : -Number.MIN_VALUE;
  bits.setFloat64(0, value);
  bits.setBigInt64(0, bits.getBigInt64(0) + (up === value > 0 ? 1n : -1n));
  return bits.getFloat64(0);
}

const closedEnds = new WeakMap<Domain, { low: number; high: number }>();

// Open ends become the next number inside, so that the quick test is two comparisons.
function ends(domain: Domain): { low: number; high: number } {
  let known = closedEnds.get(domain);
  if (!known) {
    known = {
      low: domain.openLow ? neighbour(domain.low, true) : domain.low,
      high: domain.openHigh ? neighbour(domain.high, false) : domain.high,
    };
    closedEnds.set(domain, known);
  }
  return known;
}

function numeric(
  role: Argument["role"],
  cells: Cells,
  domain: Domain,
  optional: boolean,
  fallback: number | undefined,
): Argument {
  const { low, high } = ends(domain);
  return {
    role,
    cells: matrix(cells),
    optional,
    fallback,
    zeroIsMissing: !contains(domain, 0),
    low,
    high,
    whole: domain.whole,
    words: domain.words,
    read(cell, where) {
      if (typeof cell === "number" && contains(domain, cell)) return cell;
      return wrongInput(new DomainError(where, cell, domain.words).message);
    },
  };
}

function textual(cells: Cells, words: readonly string[] | undefined, optional: boolean, fallback?: string): Argument {
  const allowed = words ? words.map((word) => `"${word}"`).join(", ") : "a text";
  const byLowerCase = new Map((words ?? []).map((word) => [word.toLowerCase(), word]));
  return {
    role: "scalar",
    cells: matrix(cells),
    optional,
    fallback,
    zeroIsMissing: true,
    low: Infinity,
    high: -Infinity,
    whole: false,
    words: allowed,
    read(cell, where) {
      if (typeof cell === "string") {
        if (!words) return cell.trim();
        const word = byLowerCase.get(cell.trim().toLowerCase());
        if (word !== undefined) return word;
      }
      return wrongInput(new DomainError(where, cell, allowed).message);
    },
  };
}

/** A number in every cell. */
export function number(cells: Cells, domain: Domain): Argument {
  return numeric("scalar", cells, domain, false, undefined);
}

/** A number that may be left out; without a default the model gets undefined. */
export function optionalNumber(cells: Cells, domain: Domain, fallback?: number): Argument {
  return numeric("scalar", cells, domain, true, fallback);
}

/** Free text. */
export function text(cells: Cells): Argument {
  return textual(cells, undefined, false);
}

/** One of some words, in any case. */
export function choice(cells: Cells, words: readonly string[]): Argument {
  return textual(cells, words, false);
}

/** One of some words, in any case, that may be left out. */
export function optionalChoice(cells: Cells, words: readonly string[], fallback: string): Argument {
  return textual(cells, words, true, fallback);
}

/** TRUE or FALSE, FALSE when left out. */
export function flag(cells: Cells): Argument {
  return {
    role: "scalar",
    cells: matrix(cells),
    optional: true,
    fallback: false,
    zeroIsMissing: true,
    low: Infinity,
    high: -Infinity,
    whole: false,
    words: "TRUE or FALSE",
    read(cell, where) {
      if (typeof cell === "boolean") return cell;
      if (cell === 1) return true;
      return wrongInput(new DomainError(where, cell, "TRUE or FALSE").message);
    },
  };
}

/** A range taken whole as numbers, blanks dropped. */
export function list(cells: Cells, domain: Domain): Argument {
  return numeric("list", cells, domain, false, undefined);
}

/** One of several ranges whose items belong together, place by place; a single cell serves every place. */
export function parallel(cells: Cells, domain: Domain): Argument {
  return numeric("parallel", cells, domain, false, undefined);
}

/** As `parallel`, with a default for blank places. */
export function optionalParallel(cells: Cells, domain: Domain, fallback: number): Argument {
  return numeric("parallel", cells, domain, true, fallback);
}

/** A range taken whole as rows of numbers; blank rows and columns at its end are dropped. */
export function grid(cells: Cells, domain: Domain): Argument {
  return numeric("grid", cells, domain, false, undefined);
}

/** A range taken whole and unread. */
export function rawRange(cells: Cells): Argument {
  return {
    role: "raw",
    cells: matrix(cells),
    optional: true,
    fallback: undefined,
    zeroIsMissing: false,
    low: Infinity,
    high: -Infinity,
    whole: false,
    words: "a range",
    read: (cell) => cell,
  };
}

/** An empty cell as any host passes it, the ambiguous 0 apart. */
export function isBlank(cell: unknown): boolean {
  return cell === null || cell === undefined || (typeof cell === "string" && cell.trim() === "");
}

/**
 * Whether cells that belong together are all empty. Some hosts pass an empty cell as 0, others as null: where no null
 * is seen a 0 may be an empty cell, but only if at least one of the cells cannot be a meant 0.
 */
export function allBlank(cells: readonly unknown[], zeroIsMissing: readonly boolean[]): boolean {
  let sure = false;
  let zero = false;
  let nulls = false;
  for (let i = 0; i < cells.length; i++) {
    const cell = cells[i];
    if (isBlank(cell)) {
      sure = true;
      if (cell === null || cell === undefined) nulls = true;
    } else if (cell === 0) {
      if (zeroIsMissing[i]) sure = true;
      else zero = true;
    } else return false;
  }
  return sure && !(zero && nulls);
}

/** The value of one cell: its reading, the default, or the reason why it has none. */
export function readCell(argument: Argument, name: string, cell: unknown, where = name): unknown {
  if (cell instanceof CellError) return cell;
  if (isBlank(cell) || (cell === 0 && argument.zeroIsMissing)) {
    if (argument.optional) return argument.fallback;
    return wrongInput(`${where} is missing; allowed: ${argument.words}.`);
  }
  return argument.read(cell, where);
}
