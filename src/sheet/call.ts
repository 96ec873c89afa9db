/** Turns a function of numbers into a function of ranges: the one way from a worksheet call to the model. */
import { allBlank, isBlank, readCell, type Argument } from "./argument";
import { CellError, wrongInput } from "./cell-error";
import { commonShape, type Shape } from "./shape";
import { errorCell, resultCell, type CellValue } from "./to-cell";
import { readWhole, type WholeArguments } from "./whole";

export {
  choice,
  flag,
  grid,
  list,
  number,
  optionalChoice,
  optionalNumber,
  optionalParallel,
  parallel,
  rawRange,
  text,
} from "./argument";

/** Parameters by name, in the order of the function's parameters. */
export type Arguments = Readonly<Record<string, Argument>>;

// The model's functions differ in parameters; the readings above have made each of the right type.
// eslint-disable-next-line @typescript-eslint/no-explicit-any
type Model<Result> = (...values: any[]) => Result;

type Named = readonly (readonly [string, Argument])[];

/** One call: where its scalars vary, and how to compute one place of the result. */
interface Call {
  readonly shape: Shape;
  readonly whole: WholeArguments;
  /** Answers place (r, c), or "" where its inputs are all blank. */
  at<Result>(fn: Model<Result>, r: number, c: number): Result | CellError | "";
}

function prepare(named: Named): Call | CellError {
  const scalars = named.filter(([, argument]) => argument.role === "scalar");
  const shape = commonShape(scalars);
  if (shape instanceof CellError) return shape;
  let whole: WholeArguments;
  try {
    whole = readWhole(named);
  } catch (thrown) {
    return errorCell(thrown);
  }
  const required = scalars.filter(([, argument]) => !argument.optional);
  // A constant beside a range is no cell of the row, so only ranges decide whether a row is blank.
  const ranges = required.filter(([, { cells }]) => cells.length > 1 || cells[0]!.length > 1);
  const deciding = ranges.length > 0 ? ranges : required;
  const zeroIsMissing = deciding.map(([, argument]) => argument.zeroIsMissing);

  const cellAt = ({ cells }: Argument, r: number, c: number): unknown => {
    const row = cells.length === 1 ? cells[0]! : cells[r]!;
    return row.length === 1 ? row[0] : row[c];
  };

  const values: unknown[] = named.map(([name]) => whole.values.get(name));
  const places = named.map(([, argument], i) => (argument.role === "scalar" ? i : -1)).filter((i) => i >= 0);

  /** The careful way: blanks, defaults, and the reason of the first cell that cannot be read. */
  const readSlowly = (r: number, c: number): CellError | "" | undefined => {
    const wholesBlank = whole.values.size === 0 || whole.blank;
    if (deciding.length > 0) {
      const blank = allBlank(
        deciding.map(([, argument]) => cellAt(argument, r, c)),
        zeroIsMissing,
      );
      if (blank && (ranges.length > 0 || wholesBlank)) return "";
    }
    for (const i of places) {
      const [name, argument] = named[i]!;
      const value = readCell(argument, name, cellAt(argument, r, c));
      if (value instanceof CellError) return value;
      values[i] = value;
    }
    return undefined;
  };

  const at = <Result>(fn: Model<Result>, r: number, c: number): Result | CellError | "" => {
    if (whole.blank) {
      if (required.every(([, argument]) => isBlank(cellAt(argument, r, c)) || cellAt(argument, r, c) === 0)) return "";
      const missing = named.find(([name]) => (whole.values.get(name) as unknown[] | undefined)?.length === 0)!;
      return wrongInput(`${missing[0]} is missing; allowed: ${missing[1].words}.`);
    }
    for (const i of places) {
      const argument = named[i]![1];
      const cell = cellAt(argument, r, c);
      if (
        typeof cell === "number" &&
        cell >= argument.low &&
        cell <= argument.high &&
        (!argument.whole || Number.isInteger(cell))
      ) {
        values[i] = cell;
        continue;
      }
      const stop = readSlowly(r, c);
      if (stop !== undefined) return stop;
      break;
    }
    try {
      return fn(...values);
    } catch (thrown) {
      return errorCell(thrown);
    }
  };
  return { shape, whole, at };
}

/** Answers every place of the common shape of the scalar parameters; the result spills. */
export function perCell(fn: Model<number | string | boolean>, args: Arguments): CellValue[][] {
  const named = Object.entries(args);
  const quick = oneVaryingColumn(fn, named);
  if (quick) return quick;
  const call = prepare(named);
  if (call instanceof CellError) return [[call]];
  const { rows, columns } = call.shape;
  const out = new Array<CellValue[]>(rows);
  for (let r = 0; r < rows; r++) {
    const row = new Array<CellValue>(columns);
    for (let c = 0; c < columns; c++) row[c] = resultCell(call.at(fn, r, c));
    out[r] = row;
  }
  return out;
}

/**
 * The long column beside constants, the commonest large call: nothing but the varying cell is looked at.
 * Undefined where the call is of another form.
 */
function oneVaryingColumn(fn: Model<number | string | boolean>, named: Named): CellValue[][] | undefined {
  let varying = -1;
  const values: unknown[] = [];
  for (let i = 0; i < named.length; i++) {
    const [name, argument] = named[i]!;
    if (argument.role !== "scalar") return undefined;
    if (argument.cells.length === 1 && argument.cells[0]!.length === 1) {
      const value = readCell(argument, name, argument.cells[0]![0]);
      if (value instanceof CellError) return undefined;
      values.push(value);
    } else if (varying < 0 && argument.cells[0]!.length === 1) {
      varying = i;
      values.push(undefined);
    } else return undefined;
  }
  if (varying < 0) return undefined;
  const [name, argument] = named[varying]!;
  const { cells, low, high, whole, optional, zeroIsMissing } = argument;
  const [a, b, c] = values;
  const size = named.length;
  const compute = (cell: unknown): unknown => {
    values[varying] = cell;
    return fn(...values);
  };
  const one: (cell: unknown) => unknown =
    size === 1
      ? (cell) => fn(cell)
      : size === 2
        ? varying === 0
          ? (cell) => fn(cell, b)
          : (cell) => fn(a, cell)
        : size === 3
          ? varying === 0
            ? (cell) => fn(cell, b, c)
            : varying === 1
              ? (cell) => fn(a, cell, c)
              : (cell) => fn(a, b, cell)
          : compute;
  const out = new Array<CellValue[]>(cells.length);
  for (let r = 0; r < cells.length; r++) {
    let cell = cells[r]![0];
    if (!(typeof cell === "number" && cell >= low && cell <= high && (!whole || Number.isInteger(cell)))) {
      if (!optional && (isBlank(cell) || (cell === 0 && zeroIsMissing))) {
        out[r] = [""];
        continue;
      }
      cell = readCell(argument, name, cell);
      if (cell instanceof CellError) {
        out[r] = [cell];
        continue;
      }
    }
    try {
      const result = one(cell);
      out[r] = [typeof result === "number" && Number.isFinite(result) ? result : resultCell(result)];
    } catch (thrown) {
      out[r] = [errorCell(thrown)];
    }
  }
  return out;
}

function takeFlag(labels: Argument | undefined): boolean | CellError {
  if (!labels) return false;
  const value = readCell(labels, "labels", labels.cells[0]![0]);
  return value instanceof CellError ? value : Boolean(value);
}

function padded(rows: CellValue[][]): CellValue[][] {
  // A whole column of answers is longer than an argument list may be.
  const width = rows.reduce((widest, row) => Math.max(widest, row.length), 0);
  return rows.map((row) =>
    row.length === width ? row : [...row, ...new Array<CellValue>(width - row.length).fill("")],
  );
}

function transposed(rows: CellValue[][]): CellValue[][] {
  return rows[0]!.map((_, c) => rows.map((row) => row[c]!));
}

/**
 * Several answers for each input row, spilled to the right in the order of the names (downwards where the inputs lie
 * in a row); `labels` puts the names first.
 */
export function perCellRow(
  fn: Model<readonly (number | string | boolean)[]>,
  names: readonly string[],
  args: Arguments,
  labels?: Argument,
): CellValue[][] {
  const named = Object.entries(args);
  const withLabels = takeFlag(labels);
  if (withLabels instanceof CellError) return [[withLabels]];
  const call = prepare(named);
  if (call instanceof CellError) return [[call]];
  const { rows, columns } = call.shape;
  if (rows > 1 && columns > 1) {
    return [
      [wrongInput("Several answers for each input spill beside it, so inputs must lie in one row or one column.")],
    ];
  }
  const out: CellValue[][] = withLabels ? [[...names]] : [];
  for (let k = 0; k < rows * columns; k++) {
    const answer = columns > 1 ? call.at(fn, 0, k) : call.at(fn, k, 0);
    if (answer instanceof CellError) out.push(new Array<CellValue>(Math.max(1, names.length)).fill(answer));
    else if (answer === "") out.push(new Array<CellValue>(Math.max(1, names.length)).fill(""));
    else out.push(answer.map(resultCell));
  }
  const table = padded(out);
  return columns > 1 ? transposed(table) : table;
}

/**
 * One answer (or a row of answers) for each item of the parallel lists, in the place and orientation of the items;
 * blank places stay blank.
 */
export function perItem(
  fn: Model<readonly (number | string | readonly (number | string)[])[]>,
  names: readonly string[],
  args: Arguments,
  labels?: Argument,
): CellValue[][] {
  const named = Object.entries(args);
  const withLabels = takeFlag(labels);
  if (withLabels instanceof CellError) return [[withLabels]];
  const call = prepare(named);
  if (call instanceof CellError) return [[call]];
  if (call.shape.rows * call.shape.columns > 1) {
    return [[wrongInput("The answer already fills a range, so parameters beside the lists must be single cells.")]];
  }
  const answer = call.at(fn, 0, 0);
  if (answer === "" || answer instanceof CellError) return [[answer]];
  const { places, rows, columns } = call.whole;
  if (rows > 1 && columns > 1) {
    return [[wrongInput("The lists must lie in one row or one column.")]];
  }
  const size = rows * columns;
  const blank = new Array<CellValue>(names.length).fill("");
  const lines: CellValue[][] = Array.from({ length: size }, () => blank);
  places.forEach((at, i) => {
    const item = answer[i];
    lines[at] = Array.isArray(item) ? item.map(resultCell) : [resultCell(item)];
  });
  // A whole column of mostly empty cells needs no answer below its last item.
  lines.length = (places[places.length - 1] ?? 0) + 1;
  if (withLabels) lines.unshift([...names]);
  return columns > 1 ? transposed(lines) : lines;
}

/** A function that gives its whole table; scalars beside its ranges are single cells. */
export function wholeTable(fn: Model<readonly (readonly unknown[])[]>, args: Arguments): CellValue[][] {
  const call = prepare(Object.entries(args));
  if (call instanceof CellError) return [[call]];
  if (call.shape.rows * call.shape.columns > 1) {
    return [[wrongInput("The answer is a whole table, so parameters beside its ranges must be single cells.")]];
  }
  const table = call.at(fn, 0, 0);
  if (table === "" || table instanceof CellError) return [[table]];
  if (table.length === 0) return [[""]];
  return padded(table.map((row) => row.map(resultCell)));
}
