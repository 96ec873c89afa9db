/**
 * Calculates a workbook with our functions, guarding against what the engine does silently: old values that survive, old
 * spills in the way, names it does not know, spill references, passes that are not enough, circles, and too many formulas.
 */
import { CellError } from "../../sheet/cell-error";
import { addressOf, parseRange } from "../address";
import { WorkbookFailure } from "../failure";
import type { FunctionTable } from "../function-table";
import { storedCalls } from "../stored-names";
import { runCalculation, type Book, type Cell, type Sheet } from "./library";
import { remembering } from "./memo";
import { engineFunctions } from "./own-functions";
import { areasOf, findCircle, type Area, type FormulaNode } from "./references";

export type Value = number | string | boolean | CellError | null;

/** What one cell holds after the calculation; `ref` for the anchor of a spill. */
export interface Calculated {
  readonly value: Value;
  readonly ref?: string;
}

export interface Outcome {
  /** New values by sheet name and "row,column": formulas, spilled cells, and old spilled cells that are empty now. */
  readonly cells: ReadonlyMap<string, ReadonlyMap<string, Calculated>>;
  /** Errors that our functions gave, with their messages, most frequent first. */
  readonly messages: readonly {
    readonly id: string;
    readonly code: string;
    readonly message: string;
    readonly count: number;
  }[];
  readonly formulas: number;
}

/** The engine's cache of parsed formulas; beyond it formulas stay uncalculated without a word. */
const MOST_DISTINCT_FORMULAS = 10_000;
const MOST_PASSES = 8;
const FORMULA_CELL = 6;

interface Formula {
  readonly sheet: Sheet;
  readonly cell: Cell;
  readonly row: number;
  readonly column: number;
  readonly text: string;
  readonly dynamic: boolean;
  /** Rows and columns that its answer fills. */
  rows: number;
  columns: number;
}

interface CellModel {
  readonly ref?: string;
  readonly shareType?: string;
  readonly isDynamicArray?: boolean;
}

function collect(book: Book): Formula[] {
  const found: Formula[] = [];
  for (const sheet of book.worksheets) {
    sheet.eachRow((row) =>
      row.eachCell((cell) => {
        if ((cell.type as number) !== FORMULA_CELL || !cell.formula) return;
        const model = cell.model as CellModel;
        const range = model.isDynamicArray && model.ref ? parseRange(model.ref) : undefined;
        found.push({
          sheet,
          cell,
          row: Number(cell.row),
          column: Number(cell.col),
          text: cell.formula,
          dynamic: model.isDynamicArray === true,
          rows: range ? range.to.row - range.from.row + 1 : 1,
          columns: range ? range.to.column - range.from.column + 1 : 1,
        });
      }),
    );
  }
  return found;
}

function keyOf(row: number, column: number): string {
  return `${row},${column}`;
}

/** Names that stand for one area. */
function namedAreas(book: Book): Map<string, Area> {
  const names = new Map<string, Area>();
  const entries = (book.definedNames as unknown as { model: { name: string; ranges: string[] }[] }).model ?? [];
  for (const { name, ranges } of entries) {
    const [only] = ranges;
    if (ranges.length !== 1 || only === undefined) continue;
    const match = /^(?:'((?:[^']|'')+)'|([^!]+))!(.+)$/.exec(only);
    const range = match && parseRange(match[3]!);
    if (!range) continue;
    const sheet = match[1]?.replace(/''/g, "'") ?? match[2]!;
    names.set(name.toLowerCase(), {
      sheet,
      top: range.from.row,
      left: range.from.column,
      bottom: range.to.row,
      right: range.to.column,
    });
  }
  return names;
}

function refuse(formulas: readonly Formula[], book: Book, functions: ReadonlyMap<string, unknown>): void {
  const distinct = new Set(formulas.map(({ text }) => text));
  if (distinct.size > MOST_DISTINCT_FORMULAS) {
    throw new WorkbookFailure(
      `the workbook has ${distinct.size} different formulas and at most ${MOST_DISTINCT_FORMULAS} can be calculated here; use spilled formulas, one for a whole column.`,
    );
  }
  for (const { sheet, row, column, text } of formulas) {
    const unknown = storedCalls(text).find((name) => !functions.has(name.toUpperCase()));
    if (unknown) {
      throw new WorkbookFailure(
        `sheet ${sheet.name}, cell ${addressOf(row, column)}: the function ${unknown.replace(/^_xldudf_/, "").replace(/_/g, ".")} belongs to another add-in.`,
      );
    }
  }
  const nodes = formulas.map(({ sheet, row, column, rows, columns, text }): FormulaNode => ({
    sheet: sheet.name,
    top: row,
    left: column,
    bottom: row + rows - 1,
    right: column + columns - 1,
    formula: text,
  }));
  const circle = findCircle(nodes, namedAreas(book));
  if (circle.length > 0) {
    const places = circle.slice(0, 5).map(({ sheet, top, left }) => `${sheet}!${addressOf(top, left)}`);
    throw new WorkbookFailure(`these formulas depend on themselves: ${places.join(", ")}.`);
  }
}

/** Replaces `_xlfn.ANCHORARRAY(Plan!$A$6)` by the range that the anchor fills now; the engine knows no spill references. */
function withoutSpillReferences(formula: Formula, at: ReadonlyMap<string, Formula>): string {
  return formula.text.replace(/_xlfn\.ANCHORARRAY\(([^()]+)\)/g, (whole, reference: string) => {
    const match = /^(?:(?:'((?:[^']|'')+)'|([^!]+))!)?\$?([A-Z]+)\$?(\d+)$/.exec(reference.trim());
    if (!match) return whole;
    const sheet = match[1]?.replace(/''/g, "'") ?? match[2] ?? formula.sheet.name;
    const range = parseRange(`${match[3]}${match[4]}`)!;
    const anchor = at.get(`${sheet.toLowerCase()}!${keyOf(range.from.row, range.from.column)}`);
    const rows = anchor?.rows ?? 1;
    const columns = anchor?.columns ?? 1;
    const last = addressOf(range.from.row + rows - 1, range.from.column + columns - 1);
    return `'${sheet.replace(/'/g, "''")}'!${match[3]}${match[4]}:${last}`;
  });
}

const WHOLE_COLUMNS = /((?:'(?:[^']|'')+'|[A-Za-z_][\w.]*)!)?(\$?[A-Z]{1,3}):(\$?[A-Z]{1,3})(?![\w(.$])/g;

/** Bounds whole-column references by the last row in use; the engine would look only as far as the file reached before. */
function withBoundedColumns(text: string, ownSheet: string, lastRows: ReadonlyMap<string, number>): string {
  return text
    .split(/("(?:[^"]|"")*")/)
    .map((part, i) =>
      i % 2 === 1
        ? part
        : part.replace(WHOLE_COLUMNS, (_, prefix: string | undefined, first: string, last: string) => {
            const sheet = prefix ? prefix.slice(0, -1).replace(/^'|'$/g, "").replace(/''/g, "'") : ownSheet;
            return `${prefix ?? ""}${first}1:${last}${lastRows.get(sheet.toLowerCase()) ?? 1}`;
          }),
    )
    .join("");
}

/**
 * Makes a formula wait for the spills that it reads without their first cell: the engine orders formulas by the cells that
 * they name, and does not know that a spilled cell comes from its anchor.
 */
function waitingForSpills(
  text: string,
  formula: Formula,
  spills: readonly Formula[],
  names: ReadonlyMap<string, Area>,
): string {
  if (spills.length === 0) return text;
  const areas = areasOf(text, formula.sheet.name, names);
  const awaited = spills.filter((spill) => {
    if (spill === formula) return false;
    const sheet = spill.sheet.name.toLowerCase();
    return areas.some((area) => {
      if (area.sheet.toLowerCase() !== sheet) return false;
      const meets =
        area.top < spill.row + spill.rows &&
        area.bottom >= spill.row &&
        area.left < spill.column + spill.columns &&
        area.right >= spill.column;
      const holdsAnchor =
        area.top <= spill.row && area.bottom >= spill.row && area.left <= spill.column && area.right >= spill.column;
      return meets && !holdsAnchor;
    });
  });
  if (awaited.length === 0) return text;
  const anchors = awaited.map(
    ({ sheet, row, column }) => `ROWS('${sheet.name.replace(/'/g, "''")}'!${addressOf(row, column)})`,
  );
  return `IF(${anchors.join("+")}>0,${text})`;
}

/** Last row in use of each sheet, spills included. */
function lastRowsOf(book: Book, formulas: readonly Formula[]): Map<string, number> {
  const rows = new Map(book.worksheets.map((sheet) => [sheet.name.toLowerCase(), Math.max(1, sheet.rowCount)]));
  for (const { sheet, row, rows: height } of formulas) {
    const name = sheet.name.toLowerCase();
    rows.set(name, Math.max(rows.get(name) ?? 1, row + height - 1));
  }
  return rows;
}

/** Empties formula results and the cells that the last spill left, so that nothing old can pass for new. */
function clear(formulas: readonly Formula[]): void {
  const anchors = new Set(formulas.map(({ sheet, row, column }) => `${sheet.name}!${keyOf(row, column)}`));
  for (const formula of formulas) {
    const { sheet, cell, row, column, rows, columns } = formula;
    cell.result = undefined;
    if (!formula.dynamic) continue;
    for (let r = row; r < row + rows; r++) {
      const line = sheet.findRow(r);
      if (!line) continue;
      for (let c = column; c < column + columns; c++) {
        const ghost = line.findCell(c);
        if (!ghost || ghost.value === null || anchors.has(`${sheet.name}!${keyOf(r, c)}`)) continue;
        ghost.value = null;
      }
    }
  }
}

type Extents = Map<string, { rows: number; columns: number }>;

/** One pass; the cells that the engine asks to write tell how far each spill reaches. */
function onePass(book: Book, userFunctions: ReadonlyMap<string, unknown>): Extents {
  const extents: Extents = new Map();
  let at = { sheet: "", row: 0, column: 0 };
  const view = book.worksheets.map((sheet) => ({
    id: sheet.id,
    name: sheet.name,
    get dimensions() {
      return sheet.dimensions;
    },
    eachRow: (...args: Parameters<Sheet["eachRow"]>) => sheet.eachRow(...args),
    getTables: () => sheet.getTables?.() ?? [],
    mergedRegions: (sheet as unknown as { mergedRegions: unknown }).mergedRegions,
    findCell(row: number, column: number) {
      at = { sheet: sheet.name, row, column };
      return sheet.findCell(row, column);
    },
    getCell(row: number, column: number) {
      const key = `${at.sheet.toLowerCase()}!${keyOf(at.row, at.column)}`;
      const extent = extents.get(key) ?? { rows: 1, columns: 1 };
      extent.rows = Math.max(extent.rows, row - at.row + 1);
      extent.columns = Math.max(extent.columns, column - at.column + 1);
      extents.set(key, extent);
      return sheet.getCell(row, column);
    },
  }));
  const workbook = book as unknown as Record<string, unknown>;
  runCalculation({
    worksheets: view,
    getWorksheet: (id: number | string) => view.find((sheet) => sheet.id === id || sheet.name === id),
    definedNames: workbook["definedNames"],
    calcProperties: workbook["calcProperties"],
    properties: workbook["properties"],
    userFunctions,
  });
  return extents;
}

function valueOf(raw: unknown): Value {
  if (raw === null || raw === undefined) return null;
  if (typeof raw === "number") return Number.isFinite(raw) ? raw : new CellError("#NUM!", "not a number");
  if (typeof raw === "string" || typeof raw === "boolean") return raw;
  if (raw instanceof Date) return raw.getTime() / 86_400_000 + 25_569;
  const code = (raw as { error?: string }).error;
  return code === undefined ? null : new CellError(code as CellError["code"], "");
}

/** What one formula answers: the values of the range that it fills, row by row. */
interface Answer {
  readonly rows: number;
  readonly columns: number;
  readonly values: readonly Value[];
}

function answersOf(formulas: readonly Formula[]): Answer[] {
  return formulas.map(({ sheet, cell, row, column, rows, columns, dynamic }) => {
    const values = [valueOf(cell.result)];
    if (!dynamic) return { rows, columns, values };
    for (let r = row; r < row + rows; r++) {
      const line = sheet.findRow(r);
      for (let c = column; c < column + columns; c++) {
        if (r !== row || c !== column) values.push(valueOf(line?.findCell(c)?.value));
      }
    }
    return { rows, columns, values };
  });
}

/** The answers as cells. */
function cellsOf(formulas: readonly Formula[], answers: readonly Answer[]): Map<string, Map<string, Calculated>> {
  const sheets = new Map<string, Map<string, Calculated>>();
  formulas.forEach(({ sheet, row, column, dynamic }, i) => {
    const { rows, columns, values } = answers[i]!;
    let cells = sheets.get(sheet.name);
    if (!cells) {
      cells = new Map();
      sheets.set(sheet.name, cells);
    }
    const ref =
      rows * columns > 1
        ? `${addressOf(row, column)}:${addressOf(row + rows - 1, column + columns - 1)}`
        : addressOf(row, column);
    cells.set(keyOf(row, column), dynamic ? { value: values[0]!, ref } : { value: values[0]! });
    for (let k = 1; k < values.length; k++) {
      cells.set(keyOf(row + Math.floor(k / columns), column + (k % columns)), { value: values[k]! });
    }
  });
  return sheets;
}

function sameValue(a: Value, b: Value): boolean {
  if (a instanceof CellError || b instanceof CellError) {
    return a instanceof CellError && b instanceof CellError && a.code === b.code;
  }
  return a === b;
}

function settled(before: readonly Answer[], after: readonly Answer[]): boolean {
  if (before.length !== after.length) return false;
  return after.every(({ rows, columns, values }, i) => {
    const was = before[i]!;
    return was.rows === rows && was.columns === columns && values.every((value, k) => sameValue(was.values[k]!, value));
  });
}

/**
 * Calculates every formula of the workbook until nothing changes any more.
 *
 * @param book workbook in the engine; its formulas may be rewritten there, so it is not for saving
 * @param functions our functions
 * @throws WorkbookFailure for a circle, a function of another add-in, too many formulas, or values that never settle
 */
export function calculate(book: Book, functions: FunctionTable): Outcome {
  const messages = new Map<string, { id: string; code: string; message: string; count: number }>();
  const userFunctions = engineFunctions(remembering(functions), (id, { code, message }) => {
    const key = `${id} ${code} ${message}`;
    const known = messages.get(key);
    if (known) known.count++;
    else messages.set(key, { id, code, message, count: 1 });
  });
  const formulas = collect(book);
  refuse(formulas, book, userFunctions);
  const at = new Map(
    formulas.map((formula) => [`${formula.sheet.name.toLowerCase()}!${keyOf(formula.row, formula.column)}`, formula]),
  );
  const oldAreas = formulas.map(({ sheet, row, column, rows, columns }) => ({ sheet, row, column, rows, columns }));
  const names = namedAreas(book);
  let before: readonly Answer[] = [];
  for (let pass = 1; ; pass++) {
    if (pass > MOST_PASSES)
      throw new WorkbookFailure("the workbook's values never settle; its formulas change each other.");
    messages.clear();
    clear(formulas);
    const lastRows = lastRowsOf(book, formulas);
    const spills = formulas.filter(({ rows, columns }) => rows * columns > 1);
    for (const formula of formulas) {
      const bounded = withBoundedColumns(withoutSpillReferences(formula, at), formula.sheet.name, lastRows);
      const text = waitingForSpills(bounded, formula, spills, names);
      if (text !== formula.cell.formula)
        formula.cell.value = { ...(formula.cell.value as object), formula: text, result: undefined } as never;
    }
    const extents = onePass(book, userFunctions);
    for (const [key, formula] of at) {
      const extent = formula.dynamic ? extents.get(key) : undefined;
      formula.rows = extent?.rows ?? 1;
      formula.columns = extent?.columns ?? 1;
    }
    const unresolved = formulas.find(({ cell }) => cell.result === undefined);
    if (unresolved) {
      throw new WorkbookFailure(
        `sheet ${unresolved.sheet.name}, cell ${addressOf(unresolved.row, unresolved.column)}: the formula cannot be calculated here.`,
      );
    }
    const after = answersOf(formulas);
    if (settled(before, after)) break;
    before = after;
  }
  const cells = cellsOf(formulas, before);
  // Cells that an old spill filled and the new one does not are empty now.
  for (const { sheet, row, column, rows, columns } of oldAreas) {
    const now = cells.get(sheet.name)!;
    for (let r = row; r < row + rows; r++) {
      for (let c = column; c < column + columns; c++) {
        const key = keyOf(r, c);
        if (!now.has(key)) now.set(key, { value: null });
      }
    }
  }
  return {
    cells,
    messages: [...messages.values()].sort((a, b) => b.count - a.count),
    formulas: formulas.length,
  };
}
