/** A forecast from CSV: long (area, year, users) or wide (area, then a column for each year). */
import { CellError } from "../../sheet/cell-error";
import { DEMAND } from "../../sheet/plan-schema";
import { readTable, type Schema } from "../../sheet/table";
import { WorkbookFailure } from "../failure";
import { readCsv } from "./read";

const YEAR = /^(19|20|21)\d\d$/;

/** One row for each area and year out of one row for each area. */
function lengthen(cells: unknown[][], file: string): unknown[][] {
  const heading = cells[0]!.map(String);
  const years = heading.flatMap((name, column) => (YEAR.test(name) ? [{ year: Number(name), column }] : []));
  if (years.length === 0) return cells;
  const area = heading.findIndex((name) => name.toLowerCase() === "area");
  const error = heading.findIndex((name) => name.toLowerCase() === "errorperyear");
  if (area < 0) throw new WorkbookFailure(`${file} has years as columns but no column named area.`);
  const rows = cells.slice(1).flatMap((row, r) =>
    years.map(({ year, column }) => {
      if (row[column] === null) throw new WorkbookFailure(`${file} row ${r + 2}, column ${year}: missing.`);
      return [row[area], year, row[column], ...(error < 0 ? [] : [row[error]])];
    }),
  );
  return [["area", "year", "users", ...(error < 0 ? [] : ["errorPerYear"])], ...rows];
}

/** Fails with the first wrong cell of a table. */
export function checkTable(cells: unknown[][], file: string, schema: Schema): ReturnType<typeof readTable> {
  let table;
  try {
    table = readTable(cells, file, schema);
  } catch (thrown) {
    if (thrown instanceof CellError) throw new WorkbookFailure(thrown.message);
    throw thrown;
  }
  const [first] = table.problems;
  if (first) {
    const more = table.problems.length - 1;
    throw new WorkbookFailure(more > 0 ? `${first.message} (${more} more in this file.)` : first.message);
  }
  if (table.count === 0) throw new WorkbookFailure(`${file} has a heading but no rows.`);
  return table;
}

/**
 * Reads and checks a forecast: every area once a year, and the same years for all.
 *
 * @param text content of the file
 * @param file its name, for messages
 * @returns cells in long form: area, year, users and, where given, errorPerYear
 */
export function readForecast(text: string, file: string): unknown[][] {
  const cells = lengthen(readCsv(text, file), file);
  const table = checkTable(cells, file, DEMAND);
  const areas = table.texts("area");
  const years = table.numbers("year");
  const rowOf = new Map<string, number>();
  const yearsOf = new Map<string, Set<number>>();
  areas.forEach((area, i) => {
    const key = JSON.stringify([area, years[i]]);
    const row = table.rowNumbers[i]!;
    const before = rowOf.get(key);
    if (before !== undefined) {
      throw new WorkbookFailure(
        `${file} row ${row}, column area: ${area} has year ${years[i]} already in row ${before}.`,
      );
    }
    rowOf.set(key, row);
    const own = yearsOf.get(area) ?? new Set<number>();
    own.add(years[i]!);
    yearsOf.set(area, own);
  });
  const all = [...new Set(years)].sort((a, b) => a - b);
  for (const [area, own] of yearsOf) {
    const missing = all.find((year) => !own.has(year));
    if (missing !== undefined) {
      throw new WorkbookFailure(`${file}: area ${area} lacks year ${missing}, which other areas have.`);
    }
  }
  for (let i = 1; i < all.length; i++) {
    if (all[i]! - all[i - 1]! > 1)
      throw new WorkbookFailure(`${file} lacks year ${all[i - 1]! + 1} between ${all[i - 1]} and ${all[i]}.`);
  }
  const error = table.present.has("errorPerYear") ? table.numbers("errorPerYear") : undefined;
  const users = table.numbers("users");
  return [
    ["area", "year", "users", ...(error ? ["errorPerYear"] : [])],
    ...areas.map((area, i) => {
      const row: unknown[] = [area, years[i], users[i]];
      if (error) row.push(Number.isNaN(error[i]) ? null : error[i]);
      return row;
    }),
  ];
}
