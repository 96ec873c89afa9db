/** Writes values into sheets of a package; formulas, styles and every other part stay as they are. */
import { addressOf, columnNumber } from "../address";
import type { Package } from "./archive";
import { cellXml, sheetParts } from "./sheets";
import { attribute } from "./xml";

/** A new value, and the range that it spills over where it is the anchor of a spill. */
export interface NewValue {
  readonly value: unknown;
  readonly ref?: string;
  /** True for an input cell: a formula that stands there goes. */
  readonly input?: boolean;
}

/** By "row,column". */
export type SheetValues = ReadonlyMap<string, NewValue>;

const CELL = /<c\b([^>]*?)(?:\/>|>(.*?)<\/c>)/gs;
const ROW = /<row\b([^>]*?)(?:\/>|>(.*?)<\/row>)/gs;
const FORMULA = /<f\b[^>]*?(?:\/>|>.*?<\/f>)/s;

interface OldCell {
  readonly attributes: string;
  readonly body: string;
}

function readCells(body: string): Map<number, OldCell> {
  const cells = new Map<number, OldCell>();
  for (const [, attributes = "", content = ""] of body.matchAll(CELL)) {
    const letters = /\sr="([A-Z]+)\d+"/.exec(attributes)?.[1];
    if (letters !== undefined) cells.set(columnNumber(letters), { attributes, body: content });
  }
  return cells;
}

/** Attributes that a cell keeps: all but its address and its type. */
function kept(attributes: string): string {
  return attributes.replace(/\s(?:r|t)="[^"]*"/g, "");
}

function patchedCell(row: number, column: number, old: OldCell | undefined, update: NewValue): string {
  const { value, ref, input } = update;
  let formula = input ? "" : (FORMULA.exec(old?.body ?? "")?.[0] ?? "");
  if (ref !== undefined) formula = formula.replace(/\sref="[^"]*"/, ` ref="${ref}"`);
  let attributes = kept(old?.attributes ?? "");
  if (formula === "") attributes = attributes.replace(/\scm="[^"]*"/, "");
  return cellXml(addressOf(row, column), value, attributes, formula);
}

function patchedRow(row: number, attributes: string, body: string, updates: ReadonlyMap<number, NewValue>): string {
  const cells = readCells(body);
  const columns = [...new Set([...cells.keys(), ...updates.keys()])].sort((a, b) => a - b);
  const content = columns.map((column) => {
    const update = updates.get(column);
    const old = cells.get(column);
    if (update) return patchedCell(row, column, old, update);
    return old!.body === "" ? `<c${old!.attributes}/>` : `<c${old!.attributes}>${old!.body}</c>`;
  });
  // The span of a row is a hint that may no longer hold.
  return `<row${attributes.replace(/\sspans="[^"]*"/, "")}>${content.join("")}</row>`;
}

/** The sheet's XML with new values. */
export function patchSheet(xml: string, values: SheetValues): string {
  const byRow = new Map<number, Map<number, NewValue>>();
  for (const [key, update] of values) {
    const [row = 0, column = 0] = key.split(",").map(Number);
    let columns = byRow.get(row);
    if (!columns) {
      columns = new Map();
      byRow.set(row, columns);
    }
    columns.set(column, update);
  }
  const opened = /<sheetData\b[^>]*?(\/?)>/.exec(xml);
  if (!opened) return xml;
  const start = opened.index;
  const inner = start + opened[0].length;
  const end = opened[1] === "/" ? inner : xml.indexOf("</sheetData>", inner);
  const body = opened[1] === "/" ? "" : xml.slice(inner, end);
  const rows: { number: number; text: string }[] = [];
  const seen = new Set<number>();
  for (const [whole, attributes = "", content = ""] of body.matchAll(ROW)) {
    const number = Number(attribute(attributes, "r"));
    const updates = byRow.get(number);
    seen.add(number);
    rows.push({ number, text: updates ? patchedRow(number, attributes, content, updates) : whole });
  }
  for (const [number, updates] of byRow) {
    if (!seen.has(number)) rows.push({ number, text: patchedRow(number, ` r="${number}"`, "", updates) });
  }
  rows.sort((a, b) => a.number - b.number);
  const after = opened[1] === "/" ? xml.slice(inner) : xml.slice(end + "</sheetData>".length);
  const data = `<sheetData>${rows.map(({ text }) => text).join("")}</sheetData>`;
  return withDimension(xml.slice(0, start), byRow) + data + after;
}

/** The stated extent of a sheet grows with new cells beyond it. */
function withDimension(head: string, updates: ReadonlyMap<number, ReadonlyMap<number, NewValue>>): string {
  return head.replace(/<dimension ref="[A-Z]+\d+(?::([A-Z]+)(\d+))?"\/>/, (whole, letters?: string, row?: string) => {
    let lastColumn = letters ? columnNumber(letters) : 1;
    let lastRow = row ? Number(row) : 1;
    for (const [number, columns] of updates) {
      lastRow = Math.max(lastRow, number);
      for (const column of columns.keys()) lastColumn = Math.max(lastColumn, column);
    }
    return whole.includes(":") || lastRow > 1 ? `<dimension ref="A1:${addressOf(lastRow, lastColumn)}"/>` : whole;
  });
}

/** Writes values into sheets by name. */
export function patchCells(file: Package, sheets: ReadonlyMap<string, SheetValues>): void {
  for (const { name, part } of sheetParts(file)) {
    const values = sheets.get(name);
    if (values && values.size > 0) file.set(part, patchSheet(file.text(part), values));
  }
}
