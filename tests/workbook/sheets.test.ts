/** The sheets that stand on their own: every value equals a direct call of the functions. */
import { functionTable } from "../../functions/generated/function-table";
import { CellError } from "../../src/sheet/cell-error";
import { planWorkbook } from "../../src/workbook/build/plan-workbook";
import { readPlanFiles } from "../../src/workbook/csv/plan-files";
import { loadBook, type Book } from "../../src/workbook/engine/library";
import { plainValue } from "../../src/workbook/plan-in-book";
import { SMALL_PLAN } from "../support/small-plan";

let book: Book;
beforeAll(async () => {
  const origin = { version: "0.0.0", time: new Date("2026-12-01T00:00:00Z"), hashes: {}, invented: false };
  const { bytes } = await planWorkbook(
    readPlanFiles((file) => SMALL_PLAN[file]),
    functionTable,
    origin,
  );
  book = await loadBook(bytes);
}, 60_000);

const one = (id: string, ...args: unknown[]): number =>
  functionTable[id]!.call(args.map((value) => [[value]]))[0]![0] as number;

test("no sheet of a small plan holds an error", () => {
  const errors: string[] = [];
  for (const sheet of book.worksheets) {
    sheet.eachRow((row, r) =>
      row.eachCell((cell) => {
        const value = plainValue(sheet, r, Number(cell.col));
        if (value instanceof CellError) errors.push(`${sheet.name}!${cell.address} ${value.code}`);
      }),
    );
  }
  expect(errors).toEqual([]);
});

test("link budget: both directions by the functions it names, and the smaller radius", () => {
  const sheet = book.getWorksheet("Link budget")!;
  const at = (label: string, column: number): any => {
    for (let row = 1; row <= sheet.rowCount; row++) {
      if (String(plainValue(sheet, row, 1)).startsWith(label)) return plainValue(sheet, row, column);
    }
    throw new Error(`no line ${label}`);
  };
  for (const column of [2, 3]) {
    const floor = one("NOISE.FLOOR", at("Receiver bandwidth", column), at("Noise figure", column));
    const sinr = one(
      "SINR.FROMEBN0",
      at("Required Eb/N0", column),
      at("Receiver bandwidth", column),
      at("Bit rate", column),
    );
    const sensitivity = one("LINK.SENSITIVITY", floor, sinr);
    const deviation = at("Shadowing deviation", column);
    const edge = one("SHADOWING.EDGE", at("Share of the area", column), deviation, at("Path-loss exponent", column));
    const shadow = one("SHADOWING.MARGIN", edge, deviation);
    const rise = one("MARGIN.FROMLOAD", at("Planned load", column));
    const reach = (margins: number): number =>
      one(
        "RANGE.HATA",
        one(
          "LINK.MAXLOSS",
          at("Radiated power", column),
          sensitivity,
          at("Antenna gains", column),
          at("Losses", column),
          margins,
        ),
        at("Frequency", column),
        at("Height of the base", column),
        at("Height of the mobile", column),
        at("Environment", column),
      );
    expect(at("Sensitivity", column)).toBe(sensitivity);
    expect(at("Radius without load", column)).toBeCloseTo(reach(shadow), 12);
    expect(at("Radius at the planned load", column)).toBeCloseTo(reach(shadow + rise), 12);
  }
  const radii = [2, 3].map((column) => at("Radius at the planned load", column) as number);
  expect(at("Radius of the cell", 2)).toBe(Math.min(...radii));
  expect(at("Radius of the cell", 3)).toBe(radii[0]! <= radii[1]! ? "uplink limits" : "downlink limits");
  expect(at("Shrinks by load", 2)).toBeLessThanOrEqual(1);
});

test("receiver: each user's ratio for each receiver, from the codes, powers and delays on the sheet", () => {
  const sheet = book.getWorksheet("Receiver")!;
  const rows = Array.from({ length: 8 }, (_, i) => 9 + i);
  const column = (at: number): unknown[][] => rows.map((row) => [plainValue(sheet, row, at)]);
  const codes = rows.map(
    (row) => functionTable["CODE.SEQUENCE"]!.call([[["gold"]], [[31]], [[plainValue(sheet, row, 2)]]])[0]!,
  );
  ["matched", "decorrelating", "mmse", "successive"].forEach((receiver, i) => {
    const expected = functionTable["RECEIVER.SINR"]!.call([
      codes,
      column(3),
      column(4),
      [[plainValue(sheet, 6, 2)]],
      [[receiver]],
    ]);
    expect(column(5 + i)).toEqual(expected);
  });
  expect(sheet.getCharts()).toHaveLength(1);
});
