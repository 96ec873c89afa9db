/** The open workbook as the pane sees it; one adapter knows the spreadsheet program behind it. */
import type { Work } from "../work";

/** A cell; rows and columns count from 0. */
export interface Place {
  readonly sheet: string;
  readonly row: number;
  readonly column: number;
}

export interface Area extends Place {
  readonly rows: number;
  readonly columns: number;
}

export interface Cells {
  readonly values: readonly (readonly unknown[])[];
  /** Formulas as text beginning with "=", other cells by their value. */
  readonly formulas: readonly (readonly unknown[])[];
  readonly isError: readonly (readonly boolean[])[];
}

export interface Edit {
  readonly row: number;
  readonly column: number;
  /** A formula, or a value; null empties the cell. */
  readonly content: { readonly formula: string } | string | number | boolean | null;
}

/** What the program at hand can do; older ones lack some. */
export interface Abilities {
  readonly insertSheets: boolean;
  readonly openWorkbook: boolean;
  readonly readFile: boolean;
}

export interface OpenWorkbook {
  readonly can: Abilities;
  sheetNames(): Promise<string[]>;
  selected(): Promise<Place>;
  select(area: Area): Promise<void>;
  /** The part of a sheet that holds values, or undefined where it holds none. */
  usedArea(sheet: string): Promise<Area | undefined>;
  /** Cells of an area, read in pieces where it is large. */
  read(area: Area, work?: Work): Promise<Cells>;
  /** Writes cells of one sheet, lifting a protection without password meanwhile. */
  write(sheet: string, edits: readonly Edit[], work?: Work): Promise<void>;
  namedArea(name: string): Promise<Area | undefined>;
  setNamedArea(name: string, area: Area): Promise<void>;
  /** For each cell the cell whose formula fills it, where there is one. */
  spillParents(places: readonly Place[]): Promise<(Place | undefined)[]>;
  /** The cells that a formula's answer fills. */
  spilledArea(place: Place): Promise<Area | undefined>;
  recalculate(): Promise<void>;
  isCalculated(): Promise<boolean>;
  addSheet(name: string): Promise<void>;
  /** Copies a sheet with its values in place of its formulas, and locks the copy. */
  addValueSheet(source: string, name: string): Promise<void>;
  deleteSheets(names: readonly string[]): Promise<void>;
  /** @param only sheets to insert; all where it is left out */
  insertSheets(file: Uint8Array, only?: readonly string[]): Promise<void>;
  openWorkbook(file: Uint8Array): Promise<void>;
  /** The workbook as a file, with the values it shows now. */
  file(work: Work): Promise<Uint8Array>;
}

/** Thrown where the program refuses sheets with charts. */
export class ChartsRefused extends Error {
  override readonly name = "ChartsRefused";
}
