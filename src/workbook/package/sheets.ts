/** Sheets of a package: where each is stored, adding one, and making a new one's cells. */
import { CellError } from "../../sheet/cell-error";
import { addressOf } from "../address";
import { WorkbookFailure } from "../failure";
import type { Package } from "./archive";
import { attribute, escapeXml, tags } from "./xml";

const WORKBOOK = "xl/workbook.xml";
const RELATIONS = "xl/_rels/workbook.xml.rels";
const TYPES = "[Content_Types].xml";

export interface SheetPart {
  readonly name: string;
  readonly part: string;
}

/** Sheets in the order of their tabs. */
export function sheetParts(file: Package): SheetPart[] {
  const targets = new Map(
    tags(file.text(RELATIONS), "Relationship").map((tag) => [attribute(tag, "Id"), attribute(tag, "Target")]),
  );
  return tags(file.text(WORKBOOK), "sheet").flatMap((tag) => {
    const target = targets.get(attribute(tag, "r:id"));
    const name = attribute(tag, "name");
    if (name === undefined || target === undefined) return [];
    return [{ name, part: target.startsWith("/") ? target.slice(1) : `xl/${target}` }];
  });
}

export function partOf(file: Package, sheet: string): string {
  const found = sheetParts(file).find(({ name }) => name === sheet);
  if (!found) throw new WorkbookFailure(`the workbook has no sheet named ${sheet}.`);
  return found.part;
}

/** A cell as XML; texts are kept inline, so that no other part changes. */
export function cellXml(address: string, value: unknown, attributes = "", formula = ""): string {
  const open = `<c r="${address}"${attributes}`;
  if (value === null || value === undefined || value === "") {
    return formula === "" ? `${open}/>` : `${open} t="str">${formula}<v></v></c>`;
  }
  if (typeof value === "number") return `${open}>${formula}<v>${value}</v></c>`;
  if (typeof value === "boolean") return `${open} t="b">${formula}<v>${Number(value)}</v></c>`;
  if (value instanceof CellError) return `${open} t="e">${formula}<v>${escapeXml(value.code)}</v></c>`;
  const text = escapeXml(String(value));
  if (formula !== "") return `${open} t="str">${formula}<v>${text}</v></c>`;
  return `${open} t="inlineStr"><is><t xml:space="preserve">${text}</t></is></c>`;
}

/** Rows of plain values as sheet data. */
export function rowsXml(rows: readonly (readonly unknown[])[]): string {
  return rows
    .map(
      (row, r) => `<row r="${r + 1}">${row.map((value, c) => cellXml(addressOf(r + 1, c + 1), value)).join("")}</row>`,
    )
    .join("");
}

/** Adds a sheet of plain values as the last tab, its columns so wide. */
export function addSheet(
  file: Package,
  name: string,
  rows: readonly (readonly unknown[])[],
  widths: readonly number[],
): void {
  let number = 1;
  while (file.has(`xl/worksheets/sheet${number}.xml`)) number++;
  const part = `xl/worksheets/sheet${number}.xml`;
  const relations = file.text(RELATIONS);
  let id = 1;
  while (relations.includes(`"rIdAdded${id}"`)) id++;
  const columns = widths
    .map((width, i) => `<col min="${i + 1}" max="${i + 1}" width="${width}" customWidth="1"/>`)
    .join("");
  file.set(
    part,
    `<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n<worksheet xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main"><sheetViews><sheetView workbookViewId="0"><pane ySplit="1" topLeftCell="A2" activePane="bottomLeft" state="frozen"/></sheetView></sheetViews>${columns ? `<cols>${columns}</cols>` : ""}<sheetData>${rowsXml(rows)}</sheetData></worksheet>`,
  );
  const kind = "http://schemas.openxmlformats.org/officeDocument/2006/relationships/worksheet";
  file.set(
    RELATIONS,
    relations.replace(
      "</Relationships>",
      `<Relationship Id="rIdAdded${id}" Type="${kind}" Target="worksheets/sheet${number}.xml"/></Relationships>`,
    ),
  );
  const type = "application/vnd.openxmlformats-officedocument.spreadsheetml.worksheet+xml";
  file.set(
    TYPES,
    file.text(TYPES).replace("</Types>", `<Override PartName="/${part}" ContentType="${type}"/></Types>`),
  );
  const workbook = file.text(WORKBOOK);
  const ids = tags(workbook, "sheet").map((tag) => Number(attribute(tag, "sheetId") ?? 0));
  const sheetId = Math.max(0, ...ids) + 1;
  const relationship = 'xmlns:r="http://schemas.openxmlformats.org/officeDocument/2006/relationships" ';
  const prefix = workbook.includes("xmlns:r=") ? "" : relationship;
  file.set(
    WORKBOOK,
    workbook.replace(
      "</sheets>",
      `<sheet ${prefix}name="${escapeXml(name)}" sheetId="${sheetId}" r:id="rIdAdded${id}"/></sheets>`,
    ),
  );
}
