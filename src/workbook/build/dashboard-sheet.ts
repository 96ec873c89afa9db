import type { Book } from "../engine/library";
import { HEADING_ROW } from "./input-sheet";
import { locked, printed, putTitle } from "./look";
import { SHEETS } from "./sheet-names";

/** Columns of the summary by year. */
const COLUMN = {
  callTraffic: "C",
  waitingTraffic: "D",
  down: "E",
  up: "F",
  short: "H",
  uncovered: "I",
  required: "J",
  installed: "K",
  blocking: "L",
} as const;

export async function addDashboard(book: Book, years: number): Promise<void> {
  const sheet = book.addWorksheet(SHEETS.dashboard, { views: [{ showGridLines: false }] });
  putTitle(sheet, "Dashboard", "The plan by year, drawn from the sheet Summary.");
  const first = HEADING_ROW + 1;
  const last = HEADING_ROW + years;
  const area = (column: string): string => `${SHEETS.summary}!$${column}$${first}:$${column}$${last}`;
  const series = (column: string, name: string): { name: string; categories: string; values: string } => ({
    name,
    categories: area("A"),
    values: area(column),
  });
  const options = (title: string, list: object[]): never =>
    ({ title, series: list, showLegend: true, legendPosition: "b" }) as never;
  sheet.addColumnChart(
    options("Carriers needed and installed", [
      series(COLUMN.required, "needed"),
      series(COLUMN.installed, "installed"),
    ]),
    "A4:H21",
  );
  sheet.addColumnChart(
    options("Cells that fall short", [
      series(COLUMN.short, "too little capacity"),
      series(COLUMN.uncovered, "too little reach"),
    ]),
    "J4:Q21",
  );
  sheet.addLineChart(
    options("Calls in the busy hour, erlang", [
      series(COLUMN.callTraffic, "lost when blocked"),
      series(COLUMN.waitingTraffic, "waiting"),
    ]),
    "A23:H40",
  );
  sheet.addLineChart(
    options("Data in the busy hour, Mbit/s", [series(COLUMN.down, "down"), series(COLUMN.up, "up")]),
    "J23:Q40",
  );
  sheet.addLineChart(
    options("Blocking, weighted by traffic", [series(COLUMN.blocking, "share of calls lost")]),
    "A42:H59",
  );
  printed(sheet, 1, 1);
  await locked(sheet);
}
