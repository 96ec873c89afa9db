/** Putting a function into the workbook. */
import declared from "../../functions/generated/texts.json";
import { functionTable } from "../../functions/generated/function-table";
import { PaneFailure } from "../../src/pane/failure";
import { insertExample, insertMethodText } from "../../src/pane/finder/insert";
import { OfficeWorkbook } from "../../src/pane/workbook/office-workbook";
import { openProgram, type Program } from "./office/office";

const textOf = (id: string) => declared.find((text) => text.id === id)!;
let program: Program;
const open = (namespace?: string): OfficeWorkbook => {
  program = openProgram(functionTable, {}, namespace);
  return new OfficeWorkbook();
};

test("the example stands from the selected cell on, and the formula is selected", async () => {
  const book = open();
  program.book.selection = { sheet: "Sheet1", row: 3, column: 2, rows: 2, columns: 2 };
  const told = await insertExample(book, textOf("ERLANGB.BLOCKING"), functionTable["ERLANGB.BLOCKING"]!, "CAP");
  expect(program.book.content({ sheet: "Sheet1", row: 3, column: 2, rows: 2, columns: 3 })).toEqual([
    ["trafficE", "channels", "result"],
    [10, 15, "=CAP.ERLANGB.BLOCKING(C5,D5)"],
  ]);
  expect(program.book.read("Sheet1", 4, 4)).toBeCloseTo(0.0365, 4);
  expect(program.book.selection).toMatchObject({ row: 4, column: 4 });
  expect(told).toBe("=CAP.ERLANGB.BLOCKING(C5,D5) stands in Sheet1!E5; its inputs are to the left.");
});

test("ranges stand below their headings, side by side", async () => {
  const book = open();
  await insertExample(book, textOf("LOAD.UPLINK"), functionTable["LOAD.UPLINK"]!, "CAP");
  expect(program.book.content({ sheet: "Sheet1", row: 0, column: 0, rows: 4, columns: 7 })).toEqual([
    ["ebN0Db", "bitRateKbps", "activity", "users", "chipRateMcps", "otherCellRatio", "result"],
    [5, 12.2, 0.67, 30, 3.84, 0.55, "=CAP.LOAD.UPLINK(A2:A4,B2:B4,C2:C4,D2:D4,E2,F2)"],
    [2, 64, 1, 4, "", "", ""],
    [1.5, 144, 1, 2, "", "", ""],
  ]);
});

test("texts stay texts: nothing is taken for a date, a number or a formula", async () => {
  const book = open();
  await book.write("Sheet1", [
    { row: 0, column: 0, content: "3-4" },
    { row: 1, column: 0, content: "=1+1" },
    { row: 2, column: 0, content: "TRUE" },
    { row: 3, column: 0, content: "March 5" },
    { row: 4, column: 0, content: "0012" },
    { row: 5, column: 0, content: "Old town" },
  ]);
  expect(program.book.content({ sheet: "Sheet1", row: 0, column: 0, rows: 6, columns: 1 }).flat()).toEqual([
    ...["3-4", "=1+1", "TRUE", "March 5", "0012", "Old town"],
  ]);
  expect(program.book.sheet("Sheet1").at(1, 0)?.formula).toBeUndefined();
});

test("cells in use are not written over, the answer's room included", async () => {
  const book = open();
  program.book.fill("Sheet1", 1, 3, [["mine"]]);
  const text = textOf("HANDOVER.BLOCKING");
  await expect(insertExample(book, text, functionTable[text.id]!, "CAP")).rejects.toThrow(
    new PaneFailure("Sheet1!A1:F2 is not empty. Select a cell with room for 2 rows and 6 columns."),
  );
  expect([...program.book.sheet("Sheet1").cells]).toHaveLength(1);
});

test("at the edge of the sheet there is no room", async () => {
  const book = open();
  program.book.selection = { sheet: "Sheet1", row: 1_048_575, column: 0, rows: 1, columns: 1 };
  await expect(insertExample(book, textOf("POWER.DB"), functionTable["POWER.DB"]!, "CAP")).rejects.toThrow(
    "room for 2 rows",
  );
});

test("the method text comes as a formula of this installation's namespace", async () => {
  const book = open("CAPDEV");
  const told = await insertMethodText(book, "ERLANGB.BLOCKING", "CAPDEV");
  expect(program.book.content({ sheet: "Sheet1", row: 0, column: 0, rows: 1, columns: 1 })).toEqual([
    ['=CAPDEV.METHOD.TEXT("ERLANGB.BLOCKING")'],
  ]);
  expect(program.book.read("Sheet1", 0, 0)).toContain("CAP.ERLANGB.BLOCKING(trafficE, channels)");
  expect(told).toContain("CAPDEV.ERLANGB.BLOCKING");
});

test("while a cell is being edited, the program's refusal is said in plain words", async () => {
  const book = open();
  program.behaviour.editing = true;
  await expect(book.sheetNames()).rejects.toThrow(
    new PaneFailure("A cell is being edited. Finish it with Enter or Escape, then try again."),
  );
});

test("large areas are read in pieces that the program allows", async () => {
  const book = open();
  program.book.fill(
    "Sheet1",
    0,
    0,
    Array.from({ length: 3000 }, (_, r) => Array.from({ length: 12 }, (_, c) => r * 12 + c)),
  );
  const area = (await book.usedArea("Sheet1"))!;
  const { values } = await book.read(area);
  expect(values).toHaveLength(3000);
  expect(values[2999]).toEqual(Array.from({ length: 12 }, (_, c) => 2999 * 12 + c));
});

test("a protected sheet is unlocked for a write and locked again; a password is respected", async () => {
  const book = open();
  const sheet = program.book.sheet("Sheet1");
  sheet.isProtected = true;
  await book.write("Sheet1", [{ row: 0, column: 0, content: 1 }]);
  expect([program.book.read("Sheet1", 0, 0), sheet.isProtected]).toEqual([1, true]);
  sheet.password = true;
  await expect(book.write("Sheet1", [{ row: 0, column: 0, content: 2 }])).rejects.toThrow(
    "The sheet Sheet1 is protected with a password.",
  );
  expect(program.book.read("Sheet1", 0, 0)).toBe(1);
});
