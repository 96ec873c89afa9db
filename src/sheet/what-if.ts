/** Questions about other functions of the set: solve for an input, vary inputs, see which matters. */
import { DomainError } from "../model/errors";
import { changeRange, effectOf, type Outcome } from "../model/whatif/sensitivity";
import { solve } from "../model/whatif/solve";
import { isBlank } from "./argument";
import { CellError, wrongInput } from "./cell-error";
import { canonicalId, lookup, registeredIds, type RegisteredFunction } from "./registry";
import { closest } from "./spelling";
import { errorCell, type CellValue } from "./to-cell";

export { changeRange };

type Cells = readonly (readonly unknown[])[];
type Inputs = ReadonlyMap<string, readonly unknown[]>;

/** Searching among random or already searched answers has no end. */
const NOT_ASKED = /^(WHATIF|SIMULATE)\./;
/** Cells of one sweep: some functions take milliseconds. */
const MOST_CELLS = 2500;

function functionOf(name: string): RegisteredFunction {
  const id = canonicalId(name);
  if (NOT_ASKED.test(id)) {
    throw new DomainError("functionName", name, "a function with a definite answer, none of WHATIF and SIMULATE");
  }
  const entry = lookup(name);
  if (entry) return entry;
  const near = closest(id, registeredIds());
  throw new DomainError(
    "functionName",
    name,
    near ? `the name of a function of this set, such as ${near}` : "the name of a function of this set",
  );
}

function parameterOf(entry: RegisteredFunction, name: string, where: string): string {
  const names = entry.parameters.map((parameter) => parameter.name);
  const lower = name.trim().toLowerCase();
  const found = names.find((known) => known.toLowerCase() === lower);
  if (found !== undefined) return found;
  throw new DomainError(where, name, `a parameter of ${entry.id}: ${names.join(", ")}`);
}

/** Two columns, name and value; a name on several rows gives the items of a range. */
function readInputs(entry: RegisteredFunction, cells: Cells): Map<string, unknown[]> {
  const inputs = new Map<string, unknown[]>();
  cells.forEach((row, r) => {
    const [label, value] = row;
    if (label instanceof CellError) throw label;
    if (isBlank(label) || label === 0) {
      if (!isBlank(value) && value !== 0) throw wrongInput(`inputs row ${r + 1} has a value without a parameter name.`);
      return;
    }
    if (row.length < 2) throw wrongInput("inputs must have two columns: parameter name and value.");
    const isHeading = r === 0 && /^(parameter|name|input)$/i.test(String(label).trim());
    if (isHeading) return;
    const name = parameterOf(entry, String(label), `inputs row ${r + 1}`);
    if (value instanceof CellError) throw value;
    if (isBlank(value)) return;
    inputs.set(name, [...(inputs.get(name) ?? []), value]);
  });
  return inputs;
}

/** The function's answer: the first of several; what is no number is thrown. */
function answer(entry: RegisteredFunction, inputs: Inputs): number {
  const result = entry.call(
    entry.parameters.map(({ name }) => {
      const items = inputs.get(name);
      return items ? items.map((item) => [item]) : null;
    }),
  )[0]![0];
  if (typeof result === "number") return result;
  if (result instanceof CellError) throw result;
  if (result === "") {
    const missing = entry.parameters.filter(({ name, optional }) => !optional && !inputs.has(name));
    throw wrongInput(`inputs lack ${missing.map(({ name }) => name).join(", ") || "values"} of ${entry.id}.`);
  }
  throw wrongInput(`${entry.id} answers with a text; allowed: a function whose answer is a number.`);
}

function varying(entry: RegisteredFunction, inputs: Inputs, name: string): (value: unknown) => number {
  const changed = new Map(inputs);
  return (value) => {
    changed.set(name, [value]);
    return answer(entry, changed);
  };
}

function requireOne(inputs: Inputs, name: string, where: string): void {
  const items = inputs.get(name);
  if (items && items.length > 1) throw new DomainError(where, name, "a parameter that has one value in inputs");
}

/** CAP.WHATIF.SOLVE: the value of one parameter at which a function reaches a target. */
export function solveFor(
  functionName: string,
  inputs: Cells,
  unknown: string,
  target: number,
  low: number,
  high: number,
): number {
  const entry = functionOf(functionName);
  const given = readInputs(entry, inputs);
  const name = parameterOf(entry, unknown, "unknown");
  requireOne(given, name, "unknown");
  return solve(varying(entry, given, name), target, low, high);
}

/** The cells of a range that hold something, in reading order. */
function filled(cells: Cells): unknown[] {
  return cells.flat().filter((cell) => !isBlank(cell));
}

/** The one text of a range that may be left out. */
function optionalName(cells: Cells): string | undefined {
  const [first] = filled(cells);
  if (first instanceof CellError) throw first;
  return first === undefined || first === 0 ? undefined : String(first);
}

/** CAP.WHATIF.SWEEP: a table of a function's answers over the values of one or two parameters. */
export function sweepTable(
  functionName: string,
  inputs: Cells,
  varied: string,
  values: Cells,
  varied2: Cells,
  values2: Cells,
): unknown[][] {
  const entry = functionOf(functionName);
  const given = readInputs(entry, inputs);
  const first = axis(entry, given, "varied", varied, "values", filled(values));
  const name2 = optionalName(varied2);
  if (name2 === undefined) {
    if (filled(values2).some((value) => value !== 0))
      throw wrongInput("values2 needs varied2, the parameter it varies.");
    requireSize(first.values.length);
    const at = varying(entry, given, first.name);
    return [[first.name, entry.id], ...first.values.map((value) => [value, cellOf(() => at(value))])];
  }
  const second = axis(entry, given, "varied2", name2, "values2", filled(values2));
  if (second.name === first.name) throw new DomainError("varied2", name2, "another parameter than varied");
  requireSize(first.values.length * second.values.length);
  return [
    [`${first.name} / ${second.name}`, ...second.values],
    ...first.values.map((value) => {
      const at = varying(entry, new Map(given).set(first.name, [value]), second.name);
      return [value, ...second.values.map((other) => cellOf(() => at(other)))];
    }),
  ];
}

function axis(
  entry: RegisteredFunction,
  given: Inputs,
  where: string,
  wanted: string,
  whereValues: string,
  values: unknown[],
): { name: string; values: unknown[] } {
  const name = parameterOf(entry, wanted, where);
  requireOne(given, name, where);
  if (values.length === 0) throw wrongInput(`${whereValues} is missing; allowed: a range of values for ${name}.`);
  return { name, values };
}

function requireSize(count: number): void {
  if (count > MOST_CELLS) throw wrongInput(`The table would have ${count} answers; allowed: at most ${MOST_CELLS}.`);
}

function cellOf(compute: () => number): CellValue {
  try {
    return compute();
  } catch (thrown) {
    return errorCell(thrown);
  }
}

/** CAP.WHATIF.SENSITIVITY: what a change of each numeric input does, the strongest first. */
export function sensitivityTable(functionName: string, inputs: Cells, change: number): unknown[][] {
  const entry = functionOf(functionName);
  const given = readInputs(entry, inputs);
  answer(entry, given);
  const rows: { name: string; cells: CellValue[]; strength: number }[] = [];
  for (const [name, items] of given) {
    const [value] = items;
    if (items.length > 1 || typeof value !== "number" || value === 0) continue;
    const { below, above, elasticity } = effectOf(varying(entry, given, name), value, change);
    rows.push({
      name,
      cells: [outcomeCell(below), outcomeCell(above), elasticity ?? ""],
      strength: elasticity === undefined ? -1 : Math.abs(elasticity),
    });
  }
  if (rows.length === 0) throw wrongInput("inputs hold no number other than 0 that could be changed.");
  rows.sort((a, b) => b.strength - a.strength);
  const percent = Number((100 * change).toPrecision(6));
  return [
    ["parameter", `result at -${percent} %`, `result at +${percent} %`, "elasticity"],
    ...rows.map(({ name, cells }) => [name, ...cells]),
  ];
}

function outcomeCell(outcome: Outcome): CellValue {
  return "thrown" in outcome ? errorCell(outcome.thrown) : outcome.value;
}
