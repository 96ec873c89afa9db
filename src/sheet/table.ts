import { contains, type Domain } from "../model/domain";
import { allBlank, isBlank } from "./argument";
import { CellError, wrongInput } from "./cell-error";
import { closest } from "./spelling";

/** What one column of a labelled table holds. */
export type Column =
  | {
      readonly kind: "number";
      readonly domain: Domain;
      readonly optional?: boolean;
      readonly fallback?: number;
      /** True where 0 is rarely meant, so that an empty cell passed as 0 must not count as 0. */
      readonly zeroIsBlank?: boolean;
    }
  | { readonly kind: "text"; readonly optional?: boolean; readonly fallback?: string }
  | {
      readonly kind: "choice";
      readonly words: readonly string[];
      readonly optional?: boolean;
      readonly fallback?: string;
    };

export type Schema = Readonly<Record<string, Column>>;

/** A wrong cell of a table: which row (1 is the heading) and column, and why. */
export interface Problem {
  readonly row: number;
  readonly column: string;
  readonly message: string;
}

/** A labelled table, read by its schema. */
export interface TableRows {
  /** Rows that hold data, blank rows dropped, rows with problems included. */
  readonly count: number;
  /** Row of the range that each data row came from, the heading being row 1. */
  readonly rowNumbers: readonly number[];
  /** Columns of the schema that the table has. */
  readonly present: ReadonlySet<string>;
  readonly problems: readonly Problem[];
  /** Numbers of a column; NaN where an optional cell without default is blank or the cell is wrong. */
  numbers(column: string): Float64Array;
  /** Texts of a column; "" where an optional cell without default is blank or the cell is wrong. */
  texts(column: string): readonly string[];
}

type Cells = readonly (readonly unknown[])[];

/** Where each column of the schema stands in the heading row. */
function headings(cells: Cells, table: string, schema: Schema): Map<string, number> {
  const names = Object.keys(schema);
  const byLower = new Map(names.map((name) => [name.toLowerCase(), name]));
  const found = new Map<string, number>();
  const others: string[] = [];
  cells[0]!.forEach((heading, c) => {
    if (isBlank(heading) || heading === 0) return;
    const text = String(heading).trim();
    const name = byLower.get(text.toLowerCase());
    if (name === undefined) others.push(text);
    else if (found.has(name)) throw wrongInput(`${table} has the column ${name} twice.`);
    else found.set(name, c);
  });
  const absent = names.filter((name) => !found.has(name));
  for (const other of others) {
    const meant = closest(other, absent);
    if (meant !== undefined) {
      throw wrongInput(
        `${table} column "${other}" looks like ${meant}, misspelt; correct it, or rename it if it is your own.`,
      );
    }
  }
  const missing = absent.filter((name) => !schema[name]!.optional);
  if (missing.length > 0) {
    throw wrongInput(`${table} lacks the column ${missing.join(", ")}; its first row must hold the column names.`);
  }
  return found;
}

function allowedWords(column: Column): string {
  if (column.kind === "number") return column.domain.words;
  return column.kind === "text" ? "a text" : column.words.map((word) => `"${word}"`).join(", ");
}

/**
 * Reads a labelled table: first row the column names in any order, further columns ignored, blank rows dropped.
 * Cells that are wrong are collected as problems, so that a caller can answer the other rows.
 *
 * @throws CellError where the heading itself is wrong
 */
export function readTable(cells: Cells, table: string, schema: Schema): TableRows {
  if (cells.length === 0 || cells[0]!.every((cell) => isBlank(cell) || cell === 0)) {
    throw wrongInput(`${table} is empty; its first row must hold the column names.`);
  }
  const found = headings(cells, table, schema);
  const used = [...found].map(([name, at]) => ({ name, at, column: schema[name]! }));
  const zeroIsMissing = used.map(({ column }) => column.kind !== "number" || !contains(column.domain, 0));
  const rowNumbers: number[] = [];
  for (let r = 1; r < cells.length; r++) {
    const row = cells[r]!;
    // A first filled cell settles it for almost every row.
    const first = row[used[0]!.at];
    if (!isBlank(first) && first !== 0) rowNumbers.push(r + 1);
    else if (
      !allBlank(
        used.map(({ at }) => row[at]),
        zeroIsMissing,
      )
    )
      rowNumbers.push(r + 1);
  }
  const count = rowNumbers.length;
  const problems: Problem[] = [];
  const numbers = new Map<string, Float64Array>();
  const texts = new Map<string, string[]>();
  const readers: Reader[] = [];
  for (const [name, column] of Object.entries(schema)) {
    const at = found.get(name);
    if (column.kind === "number") {
      const values = new Float64Array(count).fill(column.fallback ?? NaN);
      if (at !== undefined) readers.push(numberReader(at, name, column, values, problems));
      numbers.set(name, values);
    } else {
      const values = new Array<string>(count).fill(column.fallback ?? "");
      if (at !== undefined) readers.push(textReader(at, name, column, values, problems));
      texts.set(name, values);
    }
  }
  // Row by row, since a long table is spread over memory by its rows.
  for (let i = 0; i < count; i++) {
    const row = rowNumbers[i]!;
    const line = cells[row - 1]!;
    for (let k = 0; k < readers.length; k++) {
      const { at, above, below, whole, numbers: values, read } = readers[k]!;
      const cell = line[at];
      if (
        typeof cell === "number" &&
        cell > above &&
        cell < below &&
        cell !== 0 &&
        (!whole || Number.isInteger(cell))
      ) {
        values[i] = cell;
      } else read(cell, i, row);
    }
  }
  return {
    count,
    rowNumbers,
    present: new Set(found.keys()),
    problems: problems.map((p) => ({ ...p, message: `${table} row ${p.row}, column ${p.column}: ${p.message}` })),
    numbers: (column) => numbers.get(column)!,
    texts: (column) => texts.get(column)!,
  };
}

/** One column on its way from cells to values: numbers well inside the domain are taken at once, all else is looked at. */
interface Reader {
  readonly at: number;
  readonly above: number;
  readonly below: number;
  readonly whole: boolean;
  readonly numbers: Float64Array;
  readonly read: (cell: unknown, i: number, row: number) => void;
}

type NumberColumn = Extract<Column, { kind: "number" }>;

function numberReader(
  at: number,
  name: string,
  column: NumberColumn,
  values: Float64Array,
  problems: Problem[],
): Reader {
  const zeroIsMissing = column.zeroIsBlank === true || !contains(column.domain, 0);
  const read: Reader["read"] = (cell, i, row) => {
    if (typeof cell === "number" && contains(column.domain, cell) && !(cell === 0 && zeroIsMissing)) values[i] = cell;
    else if (cell === "" || isBlank(cell) || (cell === 0 && zeroIsMissing)) {
      if (!column.optional) problems.push({ row, column: name, message: `missing; allowed: ${allowedWords(column)}.` });
    } else {
      values[i] = NaN;
      problems.push({ row, column: name, message: `${shown(cell)} is not allowed; allowed: ${allowedWords(column)}.` });
    }
  };
  const { low, high, whole } = column.domain;
  return { at, above: low, below: high, whole, numbers: values, read };
}

const NO_NUMBERS = new Float64Array(0);

function textReader(
  at: number,
  name: string,
  column: Exclude<Column, NumberColumn>,
  values: string[],
  problems: Problem[],
): Reader {
  const words = column.kind === "choice" ? new Map(column.words.map((word) => [word.toLowerCase(), word])) : undefined;
  const read: Reader["read"] = (cell, i, row) => {
    if (isBlank(cell) || cell === 0) {
      if (!column.optional) problems.push({ row, column: name, message: `missing; allowed: ${allowedWords(column)}.` });
      return;
    }
    // Names such as area 12 are often typed as numbers.
    const text = typeof cell === "number" && !words ? String(cell) : typeof cell === "string" ? cell.trim() : undefined;
    const value = text === undefined ? undefined : words ? words.get(text.toLowerCase()) : text;
    if (value !== undefined) values[i] = value;
    else
      problems.push({ row, column: name, message: `${shown(cell)} is not allowed; allowed: ${allowedWords(column)}.` });
  };
  // No number is above infinity: every cell of a text column is looked at.
  return { at, above: Infinity, below: -Infinity, whole: false, numbers: NO_NUMBERS, read };
}

function shown(cell: unknown): string {
  if (cell instanceof CellError) return `the error ${cell.code} (${cell.message})`;
  return typeof cell === "string" ? `the text "${cell.slice(0, 40)}"` : String(cell);
}

/** A table as cells: the column names, then the rows. */
export function labelled(names: readonly string[], rows: Iterable<readonly unknown[]>): unknown[][] {
  return [[...names], ...Array.from(rows, (row) => [...row])];
}
