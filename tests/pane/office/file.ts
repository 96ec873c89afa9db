/** Reads the sheets of an .xlsx file into the workbook in memory, and writes it as one. */
import type { RegisteredFunction } from "../../../src/sheet/registry";
import { areaOf, localAddress, placeText } from "../../../src/pane/workbook/address";
import { parseAddress } from "../../../src/workbook/address";
import { Package } from "../../../src/workbook/package/archive";
import { cellXml, sheetParts } from "../../../src/workbook/package/sheets";
import { attribute, escapeXml, tags, unescapeXml } from "../../../src/workbook/package/xml";
import { toStored, toWritten } from "../../../src/workbook/stored-names";
import { CellError } from "../../../src/sheet/cell-error";
import { addressOf } from "../../../src/workbook/address";
import { strToU8, zipSync } from "fflate";
import { isErrorValue, type Book, type Cell, type Scalar } from "./book";

export interface Insertion {
  readonly refusesCharts: boolean;
  readonly bringsNames: boolean;
}

export function fromBase64(text: string): Uint8Array {
  return Uint8Array.from(atob(text), (letter) => letter.charCodeAt(0));
}

const CELL = /<c\b([^>]*?)(?:\/>|>(.*?)<\/c>)/gs;

/** Reads every sheet, or some, at the end of the workbook. */
export function insertFile(
  book: Book,
  base64: string,
  only: readonly string[] | undefined,
  { refusesCharts, bringsNames }: Insertion,
  refuseCharts: () => never,
): void {
  const file = Package.open(fromBase64(base64));
  const shared = file.has("xl/sharedStrings.xml") ? sharedTexts(file.text("xl/sharedStrings.xml")) : [];
  const parts = sheetParts(file).filter(({ name }) => !only || only.includes(name));
  if (refusesCharts && parts.some(({ part }) => tags(file.text(part), "drawing").length > 0)) refuseCharts();
  for (const { name, part } of parts) {
    const sheet = book.addSheet(name);
    const xml = file.text(part);
    const spills: [string, string][] = [];
    for (const [, attributes = "", inside = ""] of xml.matchAll(CELL)) {
      const at = parseAddress(attribute(`<c${attributes}>`, "r") ?? "");
      const cell = at && cellOf(attributes, inside, shared, book.functions);
      if (!at || !cell) continue;
      sheet.put(at.row - 1, at.column - 1, cell);
      const ref = /<f\b[^>]*\bref="([^"]*)"/.exec(inside)?.[1];
      if (ref !== undefined) spills.push([ref, placeText({ sheet: name, row: at.row - 1, column: at.column - 1 })]);
    }
    for (const [ref, parent] of spills) {
      const area = areaOf(name, ref)!;
      for (let r = 0; r < area.rows; r++) {
        for (let c = 0; c < area.columns; c++) {
          const cell = sheet.at(area.row + r, area.column + c);
          if (cell && cell.formula === undefined) cell.parent = parent;
        }
      }
    }
    sheet.isProtected = xml.includes("<sheetProtection");
  }
  if (!bringsNames) return;
  const names = /<definedName\b[^>]*name="([^"_][^"]*)"[^>]*>([^<]*)</g;
  for (const [, name = "", formula = ""] of file.text("xl/workbook.xml").matchAll(names)) {
    const [sheet = "", range = ""] = unescapeXml(formula).split("!");
    const area = areaOf(sheet, range.replace(/\$/g, ""));
    if (area) book.names.set(name, area);
  }
}

function sharedTexts(xml: string): string[] {
  return [...xml.matchAll(/<si>(.*?)<\/si>/gs)].map(([, item = ""]) =>
    [...item.matchAll(/<t\b[^>]*>([^<]*)<\/t>/g)].map(([, text = ""]) => unescapeXml(text)).join(""),
  );
}

function cellOf(
  attributes: string,
  inside: string,
  shared: readonly string[],
  functions: Readonly<Record<string, RegisteredFunction>>,
): Cell | undefined {
  const type = attribute(`<c${attributes}>`, "t");
  const raw = unescapeXml(/<v>([^<]*)<\/v>/.exec(inside)?.[1] ?? /<t\b[^>]*>([^<]*)<\/t>/.exec(inside)?.[1] ?? "");
  const stored = /<f\b[^>]*>([^<]*)<\/f>/.exec(inside)?.[1];
  let value: Cell["value"] = raw;
  if (type === "s") value = shared[Number(raw)] ?? "";
  else if (type === "e") value = { error: raw };
  else if (type === "b") value = raw === "1";
  else if (type === undefined && raw !== "") value = Number(raw);
  if (stored === undefined) return value === "" ? undefined : { value };
  return { value, formula: toWritten(unescapeXml(stored), functions) };
}

/** The workbook as a file with formulas and the values that they show. */
export function writeFile(book: Book): Uint8Array {
  const sheets = book.sheets.map(({ name }, i) => ({
    name,
    part: `xl/worksheets/sheet${i + 1}.xml`,
    id: `rId${i + 1}`,
  }));
  const main = "http://schemas.openxmlformats.org/spreadsheetml/2006/main";
  const relationships = "http://schemas.openxmlformats.org/officeDocument/2006/relationships";
  const files: Record<string, string> = {
    "[Content_Types].xml": `<Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types">${sheets
      .map(({ part }) => `<Override PartName="/${part}" ContentType="x"/>`)
      .join("")}</Types>`,
    "xl/workbook.xml": `<workbook xmlns="${main}" xmlns:r="${relationships}"><sheets>${sheets
      .map(({ name, id }, i) => `<sheet name="${escapeXml(name)}" sheetId="${i + 1}" r:id="${id}"/>`)
      .join("")}</sheets></workbook>`,
    "xl/_rels/workbook.xml.rels": `<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships">${sheets
      .map(({ part, id }) => `<Relationship Id="${id}" Type="${relationships}/worksheet" Target="${part.slice(3)}"/>`)
      .join("")}</Relationships>`,
  };
  book.sheets.forEach((sheet, i) => {
    const rows = new Map<number, string[]>();
    for (const [key, cell] of sheet.cells) {
      const [row, column] = key.split(",").map(Number) as [number, number];
      const line = rows.get(row) ?? [];
      rows.set(row, line);
      line.push(stored(book, sheet.name, row, column, cell));
    }
    const body = [...rows]
      .sort(([a], [b]) => a - b)
      .map(([row, cells]) => `<row r="${row + 1}">${cells.join("")}</row>`)
      .join("");
    files[sheets[i]!.part] = `<worksheet xmlns="${main}"><sheetData>${body}</sheetData></worksheet>`;
  });
  return zipSync(Object.fromEntries(Object.entries(files).map(([name, text]) => [name, strToU8(text)])));
}

function stored(book: Book, sheet: string, row: number, column: number, cell: Cell): string {
  const value: Scalar | CellError = isErrorValue(cell.value)
    ? new CellError(cell.value.error as "#N/A", "")
    : cell.value;
  const spilled = book.spilledArea({ sheet, row, column });
  const array = spilled ? ` t="array" ref="${localAddress(spilled)}"` : "";
  const text = cell.formula && escapeXml(toStored(cell.formula, book.functions));
  const formula = text === undefined ? "" : `<f${array}>${text}</f>`;
  return cellXml(addressOf(row + 1, column + 1), value, "", formula);
}
