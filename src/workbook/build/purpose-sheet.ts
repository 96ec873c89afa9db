import type { Book } from "../engine/library";
import { fitHeight, locked, printed, putNote, putTitle, WARN, FONT } from "./look";
import type { Origin } from "./origin";
import { SHEETS } from "./sheet-names";

const TEXT_WIDTH = 96;

const STEPS: readonly (readonly [string, string])[] = [
  [SHEETS.forecast, "Users of each area, year by year. Start here; replace it whenever the forecast moves."],
  [SHEETS.services, "What users do in the busy hour, and what they are promised: blocking, waiting or rate."],
  [SHEETS.routing, "Which access scheme carries which share of each service, year by year."],
  [SHEETS.radio, "Facts of each scheme: spectrum, channels, codes or blocks, power, path loss."],
  [`${SHEETS.cells}, ${SHEETS.installed}`, "The cells, and what stands in them."],
  [SHEETS.ladder, "Steps by which a cell can grow, with cost and lead time."],
  [SHEETS.traffic, "Result: erlang and Mbit/s of each service, area and year."],
  [SHEETS.plan, "Result: need, stock and quality of every cell, year and scheme, and what is missing first."],
  [SHEETS.expansion, "Result: the cheapest steps for every cell that falls short, with dates to order by and costs."],
  [`${SHEETS.summary}, ${SHEETS.dashboard}`, "Result: totals and charts."],
  [SHEETS.linkBudget, "A link budget line by line, both directions, before and at the planned load."],
  [SHEETS.receiver, "Codes, powers and delays of an uplink, and what each receiver makes of them."],
  [SHEETS.method, "Formula, source and assumptions of every function that the workbook uses."],
  [SHEETS.checks, "Sums that must agree and errors counted. Look here before you trust a number."],
  [SHEETS.changes, "What a new forecast moved."],
];

const CAUTIONS: readonly string[] = [
  "Results are planning figures. Where emergency traffic depends on them, have them reviewed by licensed practice.",
  "Radiated power, masts and towers are governed by local licence, exposure limits and building regulation, not by this workbook.",
  "Without the add-in the numbers stand as they were calculated; hand over a copy made with the command handover.",
];

export async function addPurpose(book: Book, origin: Origin): Promise<void> {
  const sheet = book.addWorksheet(SHEETS.purpose);
  sheet.getColumn(1).width = 24;
  sheet.getColumn(2).width = TEXT_WIDTH;
  putTitle(
    sheet,
    "Radio capacity plan",
    "From a forecast of users to the carriers of every cell, and the year in which each runs out.",
  );
  let row = 4;
  const add = (left: string, right: string, bold = false): void => {
    putNote(sheet.getCell(row, 1), left, true);
    putNote(sheet.getCell(row, 2), right, bold);
    fitHeight(sheet, row, right, TEXT_WIDTH);
    row++;
  };
  if (origin.invented) {
    add(
      "Invented scenario",
      "Every place, name and number of the inputs is made up for demonstration. No real network is described.",
      true,
    );
    sheet.getCell(row - 1, 1).font = { name: FONT, size: 11, bold: true, color: { argb: WARN } };
    row++;
  }
  for (const [i, caution] of CAUTIONS.entries()) add(i === 0 ? "Cautions" : "", caution);
  row++;
  add("Sheets", "in the order of the work", true);
  for (const [name, text] of STEPS) add(name, text);
  row++;
  add(
    "Reading the sheets",
    "Tinted, framed cells are inputs; all else is calculated and locked (without a password). Units are in the headings: E erlang, S seconds, Mbps Mbit/s, Km, Km2, Db. Shares and probabilities are shown in percent.",
  );
  add(
    "Made by",
    `capacity ${origin.version}, ${origin.time.toISOString().slice(0, 16).replace("T", " ")} UTC; hashes of the inputs are in the document properties.`,
  );
  printed(sheet, 1);
  await locked(sheet);
}
