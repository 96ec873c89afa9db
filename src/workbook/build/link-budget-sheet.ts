/** A link budget line by line, both directions, before and at the planned load. */
import type { Book } from "../engine/library";
import type { FunctionTable } from "../function-table";
import { HEADING_ROW } from "./input-sheet";
import { putFormula, putLabel, putLineInput, type LineInput } from "./line-sheet";
import { fitHeight, locked, printed, putHeading, putNote, putTitle } from "./look";
import { SHEETS } from "./sheet-names";

interface InputLine {
  readonly label: string;
  readonly up: number | string;
  readonly down: number | string;
  readonly input: Omit<LineInput, "value">;
  readonly note: string;
}

interface ResultLine {
  readonly label: string;
  /** Formula with the column as "@". */
  readonly formula: string;
  readonly format: string;
  readonly note: string;
}

const db = (low: number, high: number): Omit<LineInput, "value"> => ({ format: "0.0", low, high });

const INPUTS: readonly InputLine[] = [
  {
    label: "Radiated power EIRP of the user's channel, dBm",
    up: 23,
    down: 44,
    input: db(-50, 100),
    note: "Transmitter, cable and antenna together. The licence states what may be radiated.",
  },
  {
    label: "Receiver bandwidth, MHz",
    up: 3.84,
    down: 3.84,
    input: { format: "0.000", low: 0.001, high: 1000 },
    note: "Of the noise: the chip rate for CDMA, the channel for the others.",
  },
  {
    label: "Noise figure of the receiver, dB",
    up: 4,
    down: 8,
    input: db(0, 30),
    note: "Usually 2 to 5 at a base station, 7 to 10 at a mobile.",
  },
  { label: "Required Eb/N0, dB", up: 5, down: 7, input: db(-20, 40), note: "Of the most demanding service." },
  {
    label: "Bit rate, kbit/s",
    up: 12.2,
    down: 12.2,
    input: { format: "0.0", low: 0.001, high: 1e6 },
    note: "Of the same service.",
  },
  {
    label: "Antenna gains not in the EIRP, dB",
    up: 16,
    down: 0,
    input: db(-20, 60),
    note: "Of the receiving side, and of diversity.",
  },
  {
    label: "Losses, dB",
    up: 10,
    down: 10,
    input: db(0, 100),
    note: "Cables of the receiver, body, building or vehicle.",
  },
  { label: "Shadowing deviation, dB", up: 7, down: 7, input: db(0, 20), note: "Usually 6 to 10." },
  {
    label: "Share of the area to be covered",
    up: 0.95,
    down: 0.95,
    input: { format: "0 %", low: 0.5, high: 0.999 },
    note: "Usually 90 % to 98 %.",
  },
  {
    label: "Path-loss exponent",
    up: 3.6,
    down: 3.6,
    input: { format: "0.0", low: 2, high: 6 },
    note: "For the share of the area; usually 3 to 4.",
  },
  {
    label: "Planned load",
    up: 0.5,
    down: 0,
    input: { format: "0 %", low: 0, high: 0.95 },
    note: "Noise rise at the receiver: for CDMA the uplink load; 0 where none.",
  },
  {
    label: "Frequency, MHz",
    up: 890,
    down: 890,
    input: { format: "0", low: 150, high: 1500 },
    note: "Range of Hata's model.",
  },
  {
    label: "Height of the base antenna, m",
    up: 40,
    down: 40,
    input: { format: "0", low: 30, high: 200 },
    note: "Range of Hata's model.",
  },
  {
    label: "Height of the mobile antenna, m",
    up: 1.5,
    down: 1.5,
    input: { format: "0.0", low: 1, high: 10 },
    note: "Range of Hata's model.",
  },
  {
    label: "Environment",
    up: "suburban",
    down: "suburban",
    input: { words: ["urban", "large city", "suburban", "open"] },
    note: "Of Hata's model.",
  },
];

const FIRST_INPUT = HEADING_ROW + 1;
const FIRST_RESULT = FIRST_INPUT + INPUTS.length + 1;

/** Address of an input by its place in the list, with "@" for the column. */
const input = (index: number): string => `@${FIRST_INPUT + index}`;
const result = (index: number): string => `@${FIRST_RESULT + index}`;

const RESULTS: readonly ResultLine[] = [
  {
    label: "Noise floor, dBm",
    formula: `CAP.NOISE.FLOOR(${input(1)},${input(2)})`,
    format: "0.00",
    note: "CAP.NOISE.FLOOR",
  },
  {
    label: "Required SINR, dB",
    formula: `CAP.SINR.FROMEBN0(${input(3)},${input(1)},${input(4)})`,
    format: "0.00",
    note: "CAP.SINR.FROMEBN0",
  },
  {
    label: "Sensitivity, dBm",
    formula: `CAP.LINK.SENSITIVITY(CAP.NOISE.FLOOR(${input(1)},${input(2)}),CAP.SINR.FROMEBN0(${input(3)},${input(1)},${input(4)}))`,
    format: "0.00",
    note: "CAP.LINK.SENSITIVITY of the two lines above",
  },
  {
    label: "Shadowing margin, dB",
    formula: `CAP.SHADOWING.MARGIN(CAP.SHADOWING.EDGE(${input(8)},${input(7)},${input(9)}),${input(7)})`,
    format: "0.00",
    note: "CAP.SHADOWING.EDGE for the share of the area, then CAP.SHADOWING.MARGIN",
  },
  {
    label: "Interference margin at the planned load, dB",
    formula: `CAP.MARGIN.FROMLOAD(${input(10)})`,
    format: "0.00",
    note: "CAP.MARGIN.FROMLOAD",
  },
  {
    label: "Largest path loss without load, dB",
    formula: `CAP.LINK.MAXLOSS(${input(0)},${result(2)},${input(5)},${input(6)},${result(3)})`,
    format: "0.00",
    note: "CAP.LINK.MAXLOSS",
  },
  {
    label: "Largest path loss at the planned load, dB",
    formula: `CAP.LINK.MAXLOSS(${input(0)},${result(2)},${input(5)},${input(6)},${result(3)}+${result(4)})`,
    format: "0.00",
    note: "CAP.LINK.MAXLOSS with both margins",
  },
  {
    label: "Radius without load, km",
    formula: `CAP.RANGE.HATA(${result(5)},${input(11)},${input(12)},${input(13)},${input(14)})`,
    format: "0.000",
    note: "CAP.RANGE.HATA",
  },
  {
    label: "Radius at the planned load, km",
    formula: `CAP.RANGE.HATA(${result(6)},${input(11)},${input(12)},${input(13)},${input(14)})`,
    format: "0.000",
    note: "CAP.RANGE.HATA: the cell breathes",
  },
];

const WIDTHS = [50, 16, 16, 78];
const CAUTION =
  "Caution: planning figures only. What may be radiated on a live site is governed by the local licence and by exposure limits; masts and antennas by building and safety regulation. Leave both to licensed practice.";

export async function addLinkBudget(book: Book, functions: FunctionTable): Promise<void> {
  const sheet = book.addWorksheet(SHEETS.linkBudget, { views: [{ state: "frozen", ySplit: HEADING_ROW }] } as never);
  putTitle(
    sheet,
    "Link budget",
    "How far a cell reaches, line by line; the numbers are examples to be replaced by those of the site.",
  );
  WIDTHS.forEach((width, i) => (sheet.getColumn(i + 1).width = width));
  putNote(sheet.getCell(3, 1), CAUTION, true);
  sheet.mergeCells("A3:D3");
  fitHeight(
    sheet,
    3,
    CAUTION,
    WIDTHS.reduce((sum, width) => sum + width, 0),
  );
  ["line", "uplink", "downlink", "note, or the function that computes it"].forEach((name, i) =>
    putHeading(sheet.getCell(HEADING_ROW, i + 1), name),
  );
  INPUTS.forEach(({ label, up, down, input: kind, note }, i) => {
    const row = FIRST_INPUT + i;
    putLabel(sheet.getCell(row, 1), label);
    putLineInput(sheet, sheet.getCell(row, 2), label, { ...kind, value: up });
    putLineInput(sheet, sheet.getCell(row, 3), label, { ...kind, value: down });
    putLabel(sheet.getCell(row, 4), note);
  });
  RESULTS.forEach(({ label, formula, format, note }, i) => {
    const row = FIRST_RESULT + i;
    putLabel(sheet.getCell(row, 1), label);
    putFormula(sheet.getCell(row, 2), `=${formula.replaceAll("@", "B")}`, functions, format);
    putFormula(sheet.getCell(row, 3), `=${formula.replaceAll("@", "C")}`, functions, format);
    putLabel(sheet.getCell(row, 4), note);
  });
  const verdict = FIRST_RESULT + RESULTS.length + 1;
  const loaded = FIRST_RESULT + RESULTS.length - 1;
  putNote(sheet.getCell(verdict, 1), "Radius of the cell at the planned load, km", true);
  putFormula(sheet.getCell(verdict, 2), `=MIN(B${loaded},C${loaded})`, functions, "0.000");
  putFormula(sheet.getCell(verdict, 3), `=IF(B${loaded}<=C${loaded},"uplink limits","downlink limits")`, functions);
  putNote(sheet.getCell(verdict + 1, 1), "Shrinks by load to this share of the radius without", true);
  putFormula(sheet.getCell(verdict + 1, 2), `=B${verdict}/MIN(B${loaded - 1},C${loaded - 1})`, functions, "0 %");
  printed(sheet, HEADING_ROW, 1);
  await locked(sheet);
}
