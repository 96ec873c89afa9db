/** Codes, powers and delays of an uplink, and what each receiver makes of them, user by user. */
import { addressOf, columnLetters } from "../address";
import type { Book } from "../engine/library";
import type { FunctionTable } from "../function-table";
import { putLabel, putLineInput } from "./line-sheet";
import { locked, printed, putHeading, putNote, putTitle } from "./look";
import { putSpill } from "./result-sheet";
import { SHEETS } from "./sheet-names";

const FAMILY_ROW = 4;
const LENGTH_ROW = 5;
const NOISE_ROW = 6;
const TABLE_ROW = 9;
const RECEIVERS = ["matched", "decorrelating", "mmse", "successive"];
const FIRST_RECEIVER_COLUMN = 5;
const CHIP_COLUMN = 11;
/** Room for the longest code that the sheet takes. */
const MOST_CHIPS = 127;

/** Invented users: code, received power, delay; one near the base station, one far. */
const USERS: readonly (readonly [code: number, powerDbm: number, delayChips: number])[] = [
  [0, -95, 0],
  [1, -95, 3.5],
  [2, -92, 11],
  [3, -98, 7.25],
  [4, -80, 19],
  [5, -95, 26.5],
  [6, -101, 14],
  [7, -95, 22],
];

export async function addReceiver(book: Book, functions: FunctionTable): Promise<void> {
  const sheet = book.addWorksheet(SHEETS.receiver, { views: [{ showGridLines: false }] });
  putTitle(
    sheet,
    "Receiver",
    "Choose codes, powers and delays of an uplink and see each user's SINR; one near user is enough to spoil the matched filter.",
  );
  [12, 12, 14, 14, 13, 15, 13, 13, 3, 3].forEach((width, i) => (sheet.getColumn(i + 1).width = width));
  putLabel(sheet.getCell(FAMILY_ROW, 1), "code family");
  putLineInput(sheet, sheet.getCell(FAMILY_ROW, 2), "code family", {
    value: "gold",
    words: ["walsh", "ovsf", "maximal", "gold", "kasami"],
  });
  putLabel(sheet.getCell(LENGTH_ROW, 1), "chips a code");
  putLineInput(sheet, sheet.getCell(LENGTH_ROW, 2), "chips a code", {
    value: 31,
    format: "0",
    low: 4,
    high: MOST_CHIPS,
  });
  putLabel(sheet.getCell(NOISE_ROW, 1), "noise, dBm");
  putLineInput(sheet, sheet.getCell(NOISE_ROW, 2), "noise, dBm", { value: -110, format: "0.0", low: -200, high: 0 });
  putNote(sheet.getCell(FAMILY_ROW, 4), "Lengths: walsh, ovsf 2^n; maximal, gold 2^n - 1; kasami 15, 63.");
  sheet.getCell(FAMILY_ROW, 4).alignment = { wrapText: false };
  const headings = ["user", "code index", "power dBm", "delay chips", ...RECEIVERS.map((name) => `${name} dB`)];
  headings.forEach((name, i) => putHeading(sheet.getCell(TABLE_ROW - 1, i + 1), name));
  putHeading(sheet.getCell(TABLE_ROW - 1, CHIP_COLUMN), "chips of the codes");
  sheet.getRow(TABLE_ROW - 1).height = 32;
  const last = TABLE_ROW + USERS.length - 1;
  USERS.forEach(([code, power, delay], i) => {
    const row = TABLE_ROW + i;
    sheet.getCell(row, 1).value = i + 1;
    putLineInput(sheet, sheet.getCell(row, 2), "code index", { value: code, format: "0", low: 0, high: 1023 });
    putLineInput(sheet, sheet.getCell(row, 3), "power dBm", { value: power, format: "0.0", low: -200, high: 0 });
    putLineInput(sheet, sheet.getCell(row, 4), "delay chips", {
      value: delay,
      format: "0.00",
      low: 0,
      high: MOST_CHIPS,
    });
    putSpill(sheet, row, CHIP_COLUMN, `=CAP.CODE.SEQUENCE($B$${FAMILY_ROW},$B$${LENGTH_ROW},B${row})`, functions);
  });
  const chips = `$${columnLetters(CHIP_COLUMN)}$${TABLE_ROW}:$${columnLetters(CHIP_COLUMN + MOST_CHIPS - 1)}$${last}`;
  RECEIVERS.forEach((receiver, i) => {
    const column = FIRST_RECEIVER_COLUMN + i;
    const range = (letter: string): string => `$${letter}$${TABLE_ROW}:$${letter}$${last}`;
    putSpill(
      sheet,
      TABLE_ROW,
      column,
      `=CAP.RECEIVER.SINR(${chips},${range("C")},${range("D")},$B$${NOISE_ROW},"${receiver}")`,
      functions,
    );
    for (let row = TABLE_ROW; row <= last; row++) sheet.getCell(row, column).numFmt = "0.00";
  });
  for (let i = 0; i < MOST_CHIPS; i++) sheet.getColumn(CHIP_COLUMN + i).width = i === 0 ? 18 : 3.5;
  sheet.addColumnChart(
    {
      title: "SINR of each user, dB",
      series: RECEIVERS.map((name, i) => ({
        name,
        categories: `${SHEETS.receiver}!$A$${TABLE_ROW}:$A$${last}`,
        values: `${SHEETS.receiver}!$${columnLetters(FIRST_RECEIVER_COLUMN + i)}$${TABLE_ROW}:$${columnLetters(FIRST_RECEIVER_COLUMN + i)}$${last}`,
      })),
      showLegend: true,
      legendPosition: "b",
    } as never,
    `A${last + 2}:H${last + 20}`,
  );
  printed(sheet, TABLE_ROW - 1, 1);
  sheet.pageSetup.printArea = `A1:${addressOf(last + 21, 8)}`;
  await locked(sheet);
}
