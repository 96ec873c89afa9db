/** Places and areas as people write them. */
import { addressOf, parseRange } from "../../workbook/address";
import type { Area, Place } from "./workbook";

export function quotedSheet(sheet: string): string {
  return /^[\p{L}_][\p{L}\d_]*$/u.test(sheet) && !/^[A-Z]{1,3}\d+$/i.test(sheet)
    ? sheet
    : `'${sheet.replace(/'/g, "''")}'`;
}

/** "A1" or "A1:B2", without the sheet. */
export function localAddress({ row, column, rows, columns }: Area): string {
  const first = addressOf(row + 1, column + 1);
  return rows === 1 && columns === 1 ? first : `${first}:${addressOf(row + rows, column + columns)}`;
}

export function placeText(place: Place): string {
  return `${quotedSheet(place.sheet)}!${addressOf(place.row + 1, place.column + 1)}`;
}

export function areaText(area: Area): string {
  return `${quotedSheet(area.sheet)}!${localAddress(area)}`;
}

/** "=Sheet!$A$1:$B$2" for a name. */
export function absoluteFormula(area: Area): string {
  const corners = localAddress(area).replace(/([A-Z]+)(\d+)/g, "$$$1$$$2");
  return `=${quotedSheet(area.sheet)}!${corners.includes(":") ? corners : `${corners}:${corners}`}`;
}

export function areaOf(sheet: string, range: string): Area | undefined {
  const found = parseRange(range.toUpperCase());
  if (!found) return undefined;
  const { from, to } = found;
  return {
    sheet,
    row: from.row - 1,
    column: from.column - 1,
    rows: to.row - from.row + 1,
    columns: to.column - from.column + 1,
  };
}

export function areaOfCell(place: Place): Area {
  return { ...place, rows: 1, columns: 1 };
}

export function contains(area: Area, place: Place): boolean {
  const row = place.row - area.row;
  const column = place.column - area.column;
  return area.sheet === place.sheet && row >= 0 && row < area.rows && column >= 0 && column < area.columns;
}
