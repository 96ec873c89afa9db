import { allBlank, isBlank, readCell, type Argument } from "./argument";
import { CellError, wrongInput } from "./cell-error";

/** Parameters that are taken whole, read once for the call. */
export interface WholeArguments {
  /** Value per parameter name: a list, a grid or the raw range. */
  readonly values: ReadonlyMap<string, unknown>;
  /** True where there are such parameters and all of them are empty. */
  readonly blank: boolean;
  /** For parallel lists: which place of the range each item came from, and the range's shape. */
  readonly places: readonly number[];
  readonly rows: number;
  readonly columns: number;
}

type Named = readonly (readonly [string, Argument])[];

function place(name: string, index: number, columns: number): string {
  return `${name} row ${Math.floor(index / columns) + 1}, column ${(index % columns) + 1}`;
}

function checked(value: unknown): unknown {
  if (value instanceof CellError) throw value;
  return value;
}

function readList(name: string, argument: Argument): number[] {
  const columns = argument.cells[0]!.length;
  const items: number[] = [];
  argument.cells.forEach((row, r) => {
    for (let c = 0; c < row.length; c++) {
      const cell = row[c];
      if (isBlank(cell) || (cell === 0 && argument.zeroIsMissing)) continue;
      items.push(checked(readCell(argument, name, cell, place(name, r * columns + c, columns))) as number);
    }
  });
  return items;
}

function readGrid(name: string, argument: Argument): number[][] {
  const empty = (cell: unknown): boolean => isBlank(cell) || (cell === 0 && argument.zeroIsMissing);
  let height = argument.cells.length;
  while (height > 0 && argument.cells[height - 1]!.every(empty)) height--;
  const rows = argument.cells.slice(0, height);
  let width = argument.cells[0]!.length;
  while (width > 0 && rows.every((row) => empty(row[width - 1]))) width--;
  return rows.map((row, r) =>
    Array.from(
      { length: width },
      (_, c) => checked(readCell(argument, name, row[c], place(name, r * width + c, width))) as number,
    ),
  );
}

function readParallel(
  named: Named,
): Pick<WholeArguments, "places" | "rows" | "columns"> & { lists: Map<string, number[]> } {
  const long = named.find(([, { cells }]) => cells.length > 1 || cells[0]!.length > 1);
  const rows = long ? long[1].cells.length : 1;
  const columns = long ? long[1].cells[0]!.length : 1;
  const size = rows * columns;
  for (const [name, { cells }] of named) {
    const length = cells.length * cells[0]!.length;
    if (length !== 1 && length !== size) {
      throw wrongInput(`${name} has ${length} cells but ${long![0]} has ${size}; they must match place by place.`);
    }
  }
  const flat = named.map(([, { cells }]) => (cells.length * cells[0]!.length === 1 ? null : cells.flat()));
  // Single cells serve every place, so only ranges decide whether a place is empty.
  const deciding = named.map((_, i) => i).filter((i) => !named[i]![1].optional && (flat[i] !== null || size === 1));
  const zeroIsMissing = deciding.map((i) => named[i]![1].zeroIsMissing);
  const lists = new Map(named.map(([name]) => [name, [] as number[]]));
  const places: number[] = [];
  for (let p = 0; p < size; p++) {
    const cellOf = (i: number): unknown => (flat[i] ? flat[i][p] : named[i]![1].cells[0]![0]);
    if (deciding.length > 0 && allBlank(deciding.map(cellOf), zeroIsMissing)) continue;
    places.push(p);
    named.forEach(([name, argument], i) => {
      const where = flat[i] ? place(name, p, columns) : name;
      lists.get(name)!.push(checked(readCell(argument, name, cellOf(i), where)) as number);
    });
  }
  return { places, rows, columns, lists };
}

/**
 * Reads every parameter that is taken whole.
 *
 * @throws CellError for the first cell that cannot be read
 */
export function readWhole(named: Named): WholeArguments {
  const values = new Map<string, unknown>();
  let whole = 0;
  let empty = 0;
  for (const [name, argument] of named) {
    if (argument.role === "raw") {
      values.set(name, argument.cells);
      continue;
    }
    if (argument.role !== "list" && argument.role !== "grid") continue;
    const items = argument.role === "list" ? readList(name, argument) : readGrid(name, argument);
    values.set(name, items);
    whole++;
    if (items.length === 0) empty++;
  }
  const together = named.filter(([, argument]) => argument.role === "parallel");
  const { places, rows, columns, lists } =
    together.length > 0
      ? readParallel(together)
      : { places: [], rows: 1, columns: 1, lists: new Map<string, number[]>() };
  for (const [name, items] of lists) values.set(name, items);
  if (together.length > 0) {
    whole++;
    if (places.length === 0) empty++;
  }
  const blank = whole > 0 && empty === whole;
  if (!blank) {
    for (const [name, argument] of named) {
      const items = values.get(name);
      if (argument.role !== "raw" && Array.isArray(items) && items.length === 0) {
        throw wrongInput(`${name} is missing; allowed: ${argument.words}.`);
      }
    }
  }
  return { values, blank, places, rows, columns };
}
