/** Errors of a workbook: counted, traced to where they begin, and explained. */
import { functionTable } from "../../functions/generated/function-table";
import { textOf } from "../../src/sheet/registry";
import { meaningOf, messagesOf } from "../../src/pane/check/explain";
import { isExternal, referencedAreas } from "../../src/pane/check/references";
import { scanWorkbook, type Scan } from "../../src/pane/check/scan";
import { tryOneFormula } from "../../src/pane/check/self-test";
import { Stopped } from "../../src/pane/work";
import { placeText } from "../../src/pane/workbook/address";
import { OfficeWorkbook } from "../../src/pane/workbook/office-workbook";
import type { OpenWorkbook } from "../../src/pane/workbook/workbook";
import { openProgram, type Behaviour, type Program } from "./office/office";
import { watched } from "./work";

const functions = { functionTable, textOf };
let program: Program;
function open(changes: Partial<Behaviour> = {}): OpenWorkbook {
  program = openProgram(functionTable, changes);
  return new OfficeWorkbook();
}
async function scan(book: OpenWorkbook): Promise<Scan> {
  await book.sheetNames();
  return scanWorkbook(book, "CAP", watched());
}
const where = ({ roots }: Scan): string[] => roots.map(({ place, code }) => `${placeText(place)} ${code}`);

test("a workbook without errors is counted and found clean", async () => {
  const book = open();
  program.book.fill("Sheet1", 0, 0, [
    [10, 15, "=CAP.ERLANGB.BLOCKING(A1,B1)"],
    ["a text", "#N/A is only a text here", "=A1"],
  ]);
  program.book.addSheet("Empty");
  expect(await scan(book)).toMatchObject({
    sheets: 2,
    cells: 6,
    formulas: 2,
    own: 1,
    external: 0,
    errors: [],
    roots: [],
  });
});

test("errors that are passed on are counted at their root, through several cells and sheets", async () => {
  const book = open();
  program.book.fill("Sheet1", 0, 0, [
    [-1, 15, "=CAP.ERLANGB.BLOCKING(A1,B1)", "=C1", "=D1"],
    [10, 15, "=CAP.ERLANGB.BLOCKING(A2,B2)", "=C2"],
  ]);
  program.book.fill("My other", 0, 0, [["=Sheet1!E1"], ["=CAP.ERLANGC.DELAYED(12,10)"]]);
  const result = await scan(book);
  expect(result.errors).toHaveLength(4);
  expect(where(result)).toEqual(["Sheet1!C1 #VALUE!", "'My other'!A2 #N/A"]);
  expect(result.roots.map(({ passedOn }) => passedOn)).toEqual([2, 0]);
});

test("thousands of errors that refer to one another are sorted out quickly", async () => {
  const book = open({ calculates: false });
  const sheet = program.book.sheet("Sheet1");
  const error = { error: "#N/A" };
  for (let row = 0; row < 4000; row++) {
    sheet.put(row, 0, { value: error, formula: row === 0 ? "=CAP.ERLANGC.DELAYED(12,10)" : `=A${row}` });
    sheet.put(row, 1, { value: error, formula: "=SUM(A1:A4000)" });
  }
  const result = await scan(book);
  expect(where(result)).toEqual(["Sheet1!A1 #N/A"]);
  expect(result.roots[0]!.passedOn).toBe(7999);
});

test("cells that an answer fills count at the cell of its formula, also where that one shows no error", async () => {
  const book = open();
  program.book.fill("Sheet1", 0, 0, [[10, null, "=CAP.ERLANGB.CHANNELS(A1:A4,0.01)"], ["x"], [-2], [20]]);
  const result = await scan(book);
  expect(result.errors).toHaveLength(2);
  expect(where(result)).toEqual(["Sheet1!C2 #VALUE!"]);
  expect(result.roots[0]).toMatchObject({ spilled: 1, passedOn: 0, formula: undefined });
  const messages = await messagesOf(book, result.roots[0]!, functions, "CAP");
  expect(messages).toHaveLength(2);
  expect(messages[0]).toContain("trafficE");
  expect(messages[1]).toContain("-2");
});

test("cells that refer to each other in a circle are listed, not followed for ever", async () => {
  const book = open({ calculates: false });
  const sheet = program.book.sheet("Sheet1");
  sheet.put(0, 0, { value: { error: "#N/A" }, formula: "=B1" });
  sheet.put(0, 1, { value: { error: "#N/A" }, formula: "=A1" });
  sheet.put(0, 2, { value: { error: "#N/A" }, formula: "=A1" });
  sheet.put(1, 0, { value: { error: "#N/A" }, formula: "=A2" });
  expect(where(await scan(book))).toEqual(["Sheet1!A1 #N/A", "Sheet1!B1 #N/A", "Sheet1!A2 #N/A"]);
});

describe("messages", () => {
  const messageAt = async (book: OpenWorkbook, formula: string): Promise<string[]> => {
    program.book.fill("Sheet1", 8, 8, [[formula]]);
    const result = await scan(book);
    return messagesOf(book, result.roots[0]!, functions, "CAP");
  };
  test("come from computing the call once more: constants, cells, names, other sheets, spills", async () => {
    const book = open();
    program.book.fill("My data", 0, 0, [[-5]]);
    program.book.names.set("Traffic", { sheet: "My data", row: 0, column: 0, rows: 1, columns: 1 });
    for (const formula of [
      "=CAP.ERLANGB.BLOCKING(-5, 10)",
      "=CAP.ERLANGB.BLOCKING('My data'!$A$1, 10)",
      "=CAP.ERLANGB.BLOCKING(Traffic, 10)",
    ])
      expect(await messageAt(book, formula)).toEqual([expect.stringMatching(/trafficE.*-5/)]);
    program.book.fill("My data", 0, 3, [["=CAP.POWER.RATIO(A9:A10)"]]);
    program.book.fill("My data", 8, 0, [[3], [200]]);
    await book.sheetNames();
    expect(await messageAt(book, "=CAP.ERLANGB.BLOCKING('My data'!D1#, -7)")).toEqual([
      expect.stringMatching(/channels.*-7/),
    ]);
  });
  test("are not made up for formulas of other kinds", async () => {
    const book = open({ calculates: false });
    const put = (formula: string): void =>
      program.book.sheet("Sheet1").put(0, 0, { value: { error: "#VALUE!" }, formula });
    for (const formula of [
      "=CAP.ERLANGB.BLOCKING(A2+1,3)",
      "=SUM(A2)",
      "=CAP.NO.SUCH(1)",
      "=CAP.POWER.DB(1,2,3)",
      "=1+CAP.POWER.DB(1)",
    ]) {
      put(formula);
      const result = await scan(book);
      expect(await messagesOf(book, result.roots[0]!, functions, "CAP")).toEqual([]);
      expect(await messagesOf(book, result.roots[0]!, undefined, "CAP")).toEqual([]);
    }
  });
  test("what a code means is said for every code", () => {
    expect(meaningOf("#NAME?")).toContain("Ctrl+Alt+F9");
    expect(meaningOf("#BUSY!")).toContain("half a minute");
    expect(meaningOf("#FIELD!")).toBe("An error of the spreadsheet program itself.");
  });
});

describe("references in a formula", () => {
  const found = (formula: string): string[] =>
    referencedAreas(formula, "Here").map(
      ({ sheet, row, column, rows, columns }) => `${sheet} ${row},${column} ${rows}x${columns}`,
    );
  test("with and without a sheet, ranges, absolute ones", () => {
    expect(found("=SUM(A1,$B$2:C3,Plan!D4,'My ''own'' sheet'!E5)")).toEqual([
      "Here 0,0 1x1",
      "Here 1,1 2x2",
      "Plan 3,3 1x1",
      "My 'own' sheet 4,4 1x1",
    ]);
  });
  test("not in texts, names or functions", () => {
    expect(found('=LOG10(5)&"A1"&RATE_2&Table1&CAP.X.A1B&A0')).toEqual([]);
  });
  test("other workbooks are told apart", () => {
    expect(isExternal("='[plan.xlsx]Sheet1'!A1")).toBe(true);
    expect(isExternal("=[1]Sheet1!A1+1")).toBe(true);
    expect(isExternal('=A1&"[x]y!"')).toBe(false);
    expect(isExternal("=Table1[users]")).toBe(false);
  });
});

test("a stop ends the check between sheets", async () => {
  const book = open();
  for (let i = 0; i < 5; i++) program.book.fill(`S${i}`, 0, 0, [[i]]);
  const work = watched(2);
  await expect(scanWorkbook(book, "CAP", work)).rejects.toThrow(Stopped);
  expect(work.told).toEqual(["Checking Sheet1 …", "Checking S0 …"]);
});

describe("trying one formula", () => {
  const alone = (): void => expect(program.book.sheets.map(({ name }) => name)).toEqual(["Sheet1"]);
  test("says that the functions answer, and leaves nothing behind", async () => {
    const book = open({ calculation: 30 });
    expect(await tryOneFormula(book, "CAP", watched())).toMatch(
      /^The functions answer \(=CAP\.POWER\.DB\(100\) gave 20 after/,
    );
    alone();
  });
  test("tells an answer of somebody else's function", async () => {
    const book = open();
    program.book.broken = "#VALUE!";
    expect(await tryOneFormula(book, "CAP", watched())).toContain("Another add-in answers to the name CAP");
    alone();
  });
  test("waits for a busy answer, and can be stopped", async () => {
    const book = open();
    program.book.broken = "#BUSY!";
    await expect(tryOneFormula(book, "CAP", watched(2))).rejects.toThrow(Stopped);
    alone();
  });
  test("explains a name that stays unknown", async () => {
    jest.spyOn(performance, "now").mockReturnValueOnce(0).mockReturnValue(16_000);
    const book = open();
    program.book.broken = "#NAME?";
    expect(await tryOneFormula(book, "CAP", watched())).toMatch(
      /still shows #NAME\? after 16\.0 s.*does not know the function/,
    );
    jest.restoreAllMocks();
    alone();
  });
});
