/**
 * A small workbook in memory: values, formulas that are one call of our functions or one reference, spills, names,
 * protection. Formulas of other kinds keep the value that they were stored with.
 */
import { parseCall, type Argument } from "../../../src/pane/formula";
import { areaOf, placeText } from "../../../src/pane/workbook/address";
import type { Area, Place } from "../../../src/pane/workbook/workbook";
import type { RegisteredFunction } from "../../../src/sheet/registry";

export type Scalar = string | number | boolean;

export interface ErrorValue {
  readonly error: string;
}

export interface Cell {
  value: Scalar | ErrorValue;
  formula?: string;
  /** Place of the formula whose answer fills this cell. */
  parent?: string;
}

export const isErrorValue = (value: unknown): value is ErrorValue =>
  typeof value === "object" && value !== null && "error" in value;

export class Sheet {
  readonly cells = new Map<string, Cell>();
  isProtected = false;
  password = false;
  hasChart = false;
  /** Cells that stay writable under protection. */
  unlocked: Area | undefined;

  constructor(public name: string) {}

  at(row: number, column: number): Cell | undefined {
    return this.cells.get(`${row},${column}`);
  }

  put(row: number, column: number, cell: Cell): void {
    this.cells.set(`${row},${column}`, cell);
  }

  clear(row: number, column: number): void {
    this.cells.delete(`${row},${column}`);
  }

  used(): Area | undefined {
    const places = [...this.cells].filter(([, cell]) => cell.value !== "" || cell.formula !== undefined);
    if (places.length === 0) return undefined;
    const rows = places.map(([key]) => Number(key.split(",")[0]));
    const columns = places.map(([key]) => Number(key.split(",")[1]));
    const bounds = (all: number[]): [number, number] => [
      all.reduce((a, b) => Math.min(a, b)),
      all.reduce((a, b) => Math.max(a, b)),
    ];
    const [top, bottom] = bounds(rows);
    const [left, right] = bounds(columns);
    return { sheet: this.name, row: top, column: left, rows: bottom - top + 1, columns: right - left + 1 };
  }
}

type Functions = Readonly<Record<string, RegisteredFunction>>;

/** Passes until nothing changes any more, at most. */
const MOST_PASSES = 10;

export class Book {
  sheets: Sheet[] = [];
  readonly names = new Map<string, Area>();
  selection: Area;
  /** Workbooks that were opened from here. */
  readonly opened: string[] = [];
  /** Errors that our functions are to show instead of an answer, for trying what the pane makes of them. */
  broken: string | undefined;

  constructor(
    readonly functions: Functions,
    readonly namespace = "CAP",
  ) {
    this.addSheet("Sheet1");
    this.selection = { sheet: "Sheet1", row: 0, column: 0, rows: 1, columns: 1 };
  }

  addSheet(name: string): Sheet {
    if (this.find(name)) throw new Error(`a sheet named ${name} is there already`);
    const sheet = new Sheet(name);
    this.sheets.push(sheet);
    return sheet;
  }

  find(name: string): Sheet | undefined {
    return this.sheets.find((sheet) => sheet.name.toLowerCase() === name.toLowerCase());
  }

  sheet(name: string): Sheet {
    const found = this.find(name);
    if (!found) throw new Error(`there is no sheet ${name}`);
    return found;
  }

  /** Cells as plain content: formulas as text, errors as their code. */
  content(area: Area): Scalar[][] {
    const sheet = this.sheet(area.sheet);
    return Array.from({ length: area.rows }, (_, r) =>
      Array.from({ length: area.columns }, (_, c) => {
        const cell = sheet.at(area.row + r, area.column + c);
        return cell?.formula ?? shown(cell?.value ?? "");
      }),
    );
  }

  /** What a person would read in a cell. */
  read(sheet: string, row: number, column: number): Scalar {
    return shown(this.sheet(sheet).at(row, column)?.value ?? "");
  }

  /** Fills cells from a corner on, formulas being texts that begin with "=". */
  fill(sheetName: string, row: number, column: number, rows: readonly (readonly (Scalar | null)[])[]): void {
    const sheet = this.find(sheetName) ?? this.addSheet(sheetName);
    rows.forEach((line, r) =>
      line.forEach((content, c) => {
        if (typeof content === "string" && content.startsWith("="))
          sheet.put(row + r, column + c, { value: "", formula: content });
        else if (content !== null && content !== "") sheet.put(row + r, column + c, { value: content });
      }),
    );
  }

  recalculate(): void {
    for (let pass = 0; pass < MOST_PASSES; pass++) {
      let changed = false;
      for (const sheet of this.sheets) {
        for (const [key, cell] of [...sheet.cells]) {
          if (cell.formula === undefined) continue;
          const [row, column] = key.split(",").map(Number) as [number, number];
          changed = this.calculate(sheet, row, column, cell) || changed;
        }
      }
      if (!changed) return;
    }
  }

  /** Computes one formula; true where its answer is new. */
  private calculate(sheet: Sheet, row: number, column: number, cell: Cell): boolean {
    const answer = this.evaluate(cell.formula!, sheet.name);
    if (!answer) return false;
    const place = placeText({ sheet: sheet.name, row, column });
    const before = JSON.stringify(
      this.spill(place, sheet)
        .map(([, old]) => old.value)
        .concat(cell.value as never),
    );
    for (const [key] of this.spill(place, sheet)) sheet.cells.delete(key);
    const blocked = answer.some((line, r) =>
      line.some((_, c) => (r > 0 || c > 0) && sheet.at(row + r, column + c) !== undefined),
    );
    if (blocked) cell.value = { error: "#SPILL!" };
    else {
      cell.value = answer[0]![0]!;
      answer.forEach((line, r) =>
        line.forEach((value, c) => {
          if (r > 0 || c > 0) sheet.put(row + r, column + c, { value, parent: place });
        }),
      );
    }
    return (
      before !==
      JSON.stringify(
        this.spill(place, sheet)
          .map(([, now]) => now.value)
          .concat(cell.value as never),
      )
    );
  }

  /** Cells that a formula's answer fills beside its own. */
  spill(place: string, sheet: Sheet): [string, Cell][] {
    return [...sheet.cells].filter(([, cell]) => cell.parent === place);
  }

  spilledArea(place: Place): Area | undefined {
    const sheet = this.sheet(place.sheet);
    const keys = this.spill(placeText(place), sheet).map(([key]) => key.split(",").map(Number));
    if (keys.length === 0) return undefined;
    const rows = Math.max(...keys.map(([row]) => row!)) - place.row + 1;
    return { ...place, rows, columns: Math.max(...keys.map(([, column]) => column!)) - place.column + 1 };
  }

  private evaluate(formula: string, sheet: string): (Scalar | ErrorValue)[][] | undefined {
    const reference = areaOf(sheet, formula.slice(1));
    if (reference) return this.values(reference);
    const call = parseCall(formula);
    if (!call?.name.startsWith(`${this.namespace}.`)) {
      return /^=CAP(DEV)?\./.test(formula) ? [[{ error: "#NAME?" }]] : undefined;
    }
    if (this.broken !== undefined) return [[{ error: this.broken }]];
    const entry = this.functions[call.name.slice(this.namespace.length + 1)];
    if (!entry) return [[{ error: "#NAME?" }]];
    const args: ((Scalar | ErrorValue | null)[][] | null)[] = [];
    for (const argument of call.args) {
      const cells = this.argument(argument, sheet);
      if (cells === undefined) return undefined;
      args.push(cells);
    }
    while (args.length < entry.parameters.length) args.push(null);
    const failed = args.flatMap((arg) => arg?.flat() ?? []).find(isErrorValue);
    if (failed) return [[failed]];
    return entry.call(args).map((line) => line.map(asValue));
  }

  private values(area: Area): (Scalar | ErrorValue)[][] {
    const sheet = this.sheet(area.sheet);
    return Array.from({ length: area.rows }, (_, r) =>
      Array.from({ length: area.columns }, (_, c) => sheet.at(area.row + r, area.column + c)?.value ?? ""),
    );
  }

  /** Cells of an argument; undefined for one that is not computed here. */
  private argument(argument: Argument, sheet: string): (Scalar | ErrorValue | null)[][] | null | undefined {
    if (argument.kind === "value") return argument.value === null ? null : [[argument.value]];
    if (argument.kind === "array") return argument.rows.map((row) => [...row]);
    if (argument.kind === "other") return this.evaluate(`=${argument.text}`, sheet);
    const direct = areaOf(argument.sheet ?? sheet, argument.range);
    const area = direct ? (argument.spill ? this.spilledArea(direct) : direct) : this.names.get(argument.range);
    if (!area) return [[{ error: "#NAME?" }]];
    return this.values(area).map((line) => line.map((value) => (value === "" ? null : value)));
  }
}

export function shown(value: Scalar | ErrorValue): Scalar {
  return isErrorValue(value) ? value.error : value;
}

/** An answer's cell; our errors are objects with a code, here as everywhere outside the program. */
function asValue(cell: unknown): Scalar | ErrorValue {
  if (typeof cell === "object" && cell !== null && "code" in cell) return { error: String(cell.code) };
  return (cell ?? "") as Scalar;
}
