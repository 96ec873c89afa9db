/** Looks at every cell of the workbook and sorts its errors: where they begin, and where they are passed on. */
import { say, texts } from "../say";
import { stopIfAsked, type Work } from "../work";
import { contains, placeText } from "../workbook/address";
import type { Area, OpenWorkbook, Place } from "../workbook/workbook";
import { isExternal, referencedAreas } from "./references";

export interface ErrorCell {
  readonly place: Place;
  readonly code: string;
  /** Formula of the cell; undefined where another cell's answer fills it. */
  readonly formula: string | undefined;
}

/** A cell where an error begins. */
export interface ErrorRoot extends ErrorCell {
  /** Further cells of its own answer that show an error. */
  readonly spilled: number;
  /** Cells elsewhere that show the same error because they refer to it. */
  readonly passedOn: number;
}

export interface Scan {
  readonly sheets: number;
  readonly cells: number;
  readonly formulas: number;
  /** Formulas that call our functions. */
  readonly own: number;
  /** Formulas that refer to other workbooks. */
  readonly external: number;
  readonly errors: readonly ErrorCell[];
  readonly roots: readonly ErrorRoot[];
}

/** Cells whose origin is asked of the program, at most; more of them are counted as they stand. */
const MOST_ASKED = 2_000;

interface Counts {
  cells: number;
  formulas: number;
  own: number;
  external: number;
}

export async function scanWorkbook(book: OpenWorkbook, namespace: string, work: Work): Promise<Scan> {
  const names = await book.sheetNames();
  const counts: Counts = { cells: 0, formulas: 0, own: 0, external: 0 };
  const errors: ErrorCell[] = [];
  const ours = new RegExp(`\\b${namespace}\\.[A-Z]`, "i");
  for (const [i, sheet] of names.entries()) {
    stopIfAsked(work, texts.work.nothingChanged);
    work.progress(say(texts.check.running, { sheet }), i / names.length);
    const used = await book.usedArea(sheet);
    if (!used) continue;
    const { values, formulas, isError } = await book.read(used, work);
    formulas.forEach((row, r) =>
      row.forEach((cell, c) => {
        if (cell !== "") counts.cells++;
        const formula = typeof cell === "string" && cell.startsWith("=") ? cell : undefined;
        if (formula !== undefined) {
          counts.formulas++;
          if (ours.test(formula)) counts.own++;
          if (isExternal(formula)) counts.external++;
        }
        if (!isError[r]![c]) return;
        const place = { sheet, row: used.row + r, column: used.column + c };
        errors.push({ place, code: String(values[r]![c]), formula });
      }),
    );
  }
  return { sheets: names.length, ...counts, errors, roots: await rootsOf(book, errors) };
}

/** The errors that are not passed on from another one. */
async function rootsOf(book: OpenWorkbook, errors: readonly ErrorCell[]): Promise<ErrorRoot[]> {
  const filled = errors.filter(({ formula }) => formula === undefined).slice(0, MOST_ASKED);
  const parents = filled.length > 0 ? await book.spillParents(filled.map(({ place }) => place)) : [];
  const anchorOf = new Map<ErrorCell, string>();
  const anchors = new Map<string, Place>();
  filled.forEach((error, i) => {
    const parent = parents[i];
    if (!parent) return;
    anchorOf.set(error, placeText(parent));
    anchors.set(placeText(parent), parent);
  });

  const byPlace = new Map(errors.map((error) => [placeText(error.place), error]));
  const origins = new Map<ErrorCell, { spilled: number; passedOn: number }>();
  const origin = (error: ErrorCell): { spilled: number; passedOn: number } => {
    const known = origins.get(error) ?? { spilled: 0, passedOn: 0 };
    origins.set(error, known);
    return known;
  };
  /** One error cell for each answer whose own first cell shows none. */
  const standIns = new Map<string, ErrorCell>();
  for (const error of errors) {
    const anchor = anchorOf.get(error);
    if (anchor === undefined) continue;
    const root = byPlace.get(anchor) ?? standIns.get(anchor) ?? error;
    if (root === error) standIns.set(anchor, error);
    else origin(root).spilled++;
  }

  const passing = new Set<ErrorCell>();
  const sources = sourcesOf(errors);
  for (const error of errors) {
    const source = sources(error);
    if (!source) continue;
    passing.add(error);
    origin(source).passedOn++;
  }
  return errors
    .filter((error) => {
      const anchor = anchorOf.get(error);
      return !passing.has(error) && (anchor === undefined || standIns.get(anchor) === error);
    })
    .map((error) => ({ ...error, spilled: 0, passedOn: 0, ...origins.get(error) }));
}

/** Small areas are looked through cell by cell, large ones error by error. */
const SMALL_AREA = 500;

/** Finds an error of a code within an area. */
function errorFinder(errors: readonly ErrorCell[]): (area: Area, code: string) => ErrorCell | undefined {
  const bySheet = new Map<string, Map<string, ErrorCell>>();
  for (const error of errors) {
    const name = error.place.sheet.toLowerCase();
    const cells = bySheet.get(name) ?? new Map<string, ErrorCell>();
    bySheet.set(name, cells);
    cells.set(`${error.place.row},${error.place.column}`, error);
  }
  return (area, code) => {
    const cells = bySheet.get(area.sheet.toLowerCase());
    if (!cells) return undefined;
    if (area.rows * area.columns > SMALL_AREA) {
      for (const error of cells.values())
        if (error.code === code && contains(area, { ...error.place, sheet: area.sheet })) return error;
      return undefined;
    }
    for (let row = area.row; row < area.row + area.rows; row++) {
      for (let column = area.column; column < area.column + area.columns; column++) {
        const error = cells.get(`${row},${column}`);
        if (error?.code === code) return error;
      }
    }
    return undefined;
  };
}

/** Where an error comes from, if a cell that its formula refers to shows the same one. */
function sourcesOf(errors: readonly ErrorCell[]): (error: ErrorCell) => ErrorCell | undefined {
  const find = errorFinder(errors);
  const known = new Map<ErrorCell, ErrorCell | undefined>();
  const direct = (error: ErrorCell): ErrorCell | undefined => {
    if (error.formula === undefined) return undefined;
    if (!known.has(error)) {
      const areas = referencedAreas(error.formula, error.place.sheet);
      known.set(
        error,
        areas.map((area) => find(area, error.code)).find((found) => found !== undefined),
      );
    }
    return known.get(error);
  };
  return (error) => {
    const seen = new Set<ErrorCell>();
    let source: ErrorCell | undefined;
    for (let next = direct(error); next && !seen.has(next); next = direct(next)) {
      // Cells that refer to each other in a circle have no other origin.
      if (next === error) return undefined;
      seen.add(next);
      source = next;
    }
    return source;
  };
}
