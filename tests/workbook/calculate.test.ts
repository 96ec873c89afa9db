/** The guards around the engine: each of its silent failures was seen, and must not come back. */
import { functionTable } from "../../functions/generated/function-table";
import { CellError } from "../../src/sheet/cell-error";
import { calculate, type Outcome } from "../../src/workbook/engine/calculate";
import { loadBook, newBook, writeBook, type Book } from "../../src/workbook/engine/library";
import { findCircle, type FormulaNode } from "../../src/workbook/engine/references";
import { WorkbookFailure } from "../../src/workbook/failure";
import { toStored, toWritten } from "../../src/workbook/stored-names";

type Cells = Readonly<Record<string, unknown>>;

function put(book: Book, sheet: string, cells: Cells): void {
  const target = book.getWorksheet(sheet) ?? book.addWorksheet(sheet);
  for (const [address, content] of Object.entries(cells)) {
    target.getCell(address).value = (
      typeof content === "string" && content.startsWith("=") ? { formula: toStored(content, functionTable) } : content
    ) as never;
  }
}

function spill(book: Book, sheet: string, address: string, formula: string, ref = address): void {
  const cell = book.getWorksheet(sheet)!.getCell(address);
  cell.value = { formula: toStored(formula, functionTable), shareType: "array", ref, isDynamicArray: true } as never;
}

/** Saved, loaded and calculated, as a file is. */
async function outcomeOf(book: Book): Promise<Outcome> {
  return calculate(await loadBook(await writeBook(book)), functionTable);
}

function value(outcome: Outcome, sheet: string, row: number, column: number): unknown {
  return outcome.cells.get(sheet)?.get(`${row},${column}`)?.value;
}

test("a function in the host's stored form gives a value, a range of it spills with its reference", async () => {
  const book = newBook();
  put(book, "In", { A1: 10, A2: 20, A3: 30 });
  put(book, "Out", { D1: "=CAP.ERLANGB.CHANNELS(In!A1,0.01)" });
  spill(book, "Out", "A1", "=CAP.ERLANGB.CHANNELS(In!A1:A3,0.01)");
  const outcome = await outcomeOf(book);
  expect(value(outcome, "Out", 1, 4)).toBe(18);
  expect([1, 2, 3].map((row) => value(outcome, "Out", row, 1))).toEqual([18, 30, 42]);
  expect(outcome.cells.get("Out")!.get("1,1")!.ref).toBe("A1:A3");
});

test("an old value never survives: a formula that gives an error shows the error", async () => {
  const book = newBook();
  put(book, "S", { A1: { formula: "NOSUCHFUNCTION(1)", result: 5 } });
  const answer = value(await outcomeOf(book), "S", 1, 1);
  expect(answer).toBeInstanceOf(CellError);
  expect((answer as CellError).code).toBe("#NAME?");
});

test("a function of another add-in is refused by sheet, cell and name", async () => {
  const book = newBook();
  put(book, "S", { B7: { formula: "_xldudf_OTHER_THING(1)", result: 5 } });
  await expect(outcomeOf(book)).rejects.toThrow(
    new WorkbookFailure("sheet S, cell B7: the function OTHER.THING belongs to another add-in."),
  );
});

test("the ghosts of an old spill are no obstacle, and those that the new one does not reach are emptied", async () => {
  const book = newBook();
  put(book, "S", { A1: 10, A2: 20, C1: 99, C2: 99, C3: 99, C4: 99 });
  spill(book, "S", "C1", "=CAP.ERLANGB.CHANNELS(A1:A2,0.01)", "C1:C4");
  const outcome = await outcomeOf(book);
  expect([1, 2, 3, 4].map((row) => value(outcome, "S", row, 3))).toEqual([18, 30, null, null]);
  expect(outcome.cells.get("S")!.get("1,3")!.ref).toBe("C1:C2");
});

test("a spill reference follows the spill", async () => {
  const book = newBook();
  put(book, "S", { A1: 10, A2: 20, A3: 30 });
  spill(book, "S", "C1", "=CAP.ERLANGB.CHANNELS(A1:A3,0.01)");
  put(book, "S", { E1: { formula: "SUM(_xlfn.ANCHORARRAY(C1))" }, E2: { formula: "SUM(_xlfn.ANCHORARRAY(S!$C$1))" } });
  const outcome = await outcomeOf(book);
  expect([1, 2].map((row) => value(outcome, "S", row, 5))).toEqual([90, 90]);
});

test("whole columns see all of a new spill, also in columns that its first cell is not in", async () => {
  const book = newBook();
  put(book, "A", { A1: "=SUM(B!A:A)", A2: "=SUM(B!B:B)", A3: "=COUNT(B!$A:$B)" });
  book.addWorksheet("B");
  spill(book, "B", "A1", "=CAP.OVERFLOW.EQUIVALENT({10;10},{20;20})");
  const outcome = await outcomeOf(book);
  expect(value(outcome, "A", 1, 1)).toBeCloseTo(2 * 25.484585615656826, 8);
  expect(value(outcome, "A", 2, 1)).toBeCloseTo(2 * 16.80136612617, 8);
  expect(value(outcome, "A", 3, 1)).toBe(4);
});

test("circles are refused, directly, through others, and through a spill", async () => {
  const direct = newBook();
  put(direct, "S", { A1: "=A1+1" });
  await expect(outcomeOf(direct)).rejects.toThrow("S!A1");
  const through = newBook();
  put(through, "S", { A1: "=B1", B1: "=SUM(C1:C3)", C2: "=A1" });
  await expect(outcomeOf(through)).rejects.toThrow("depend on themselves");
  const spilled = newBook();
  put(spilled, "S", { A1: 1, A2: "=C2" });
  spill(spilled, "S", "C1", "=CAP.POWER.DB(A1:A2)", "C1:C2");
  await expect(outcomeOf(spilled)).rejects.toThrow("depend on themselves");
});

test("a long chain of sums is no circle and no stack overflow", () => {
  const nodes = Array.from({ length: 20_000 }, (_, i): FormulaNode => {
    const place = { sheet: "S", top: i + 1, bottom: i + 1, left: 1, right: 1 };
    return { ...place, formula: i === 0 ? "1" : `A${i}+1` };
  });
  expect(findCircle(nodes.slice(0, 3000), new Map())).toEqual([]);
});

test("more formulas than the engine can hold are refused, not left without a word", async () => {
  const book = newBook();
  const sheet = book.addWorksheet("S");
  for (let row = 1; row <= 10_001; row++) sheet.getCell(row, 2).value = { formula: `A${row}+1` };
  await expect(outcomeOf(book)).rejects.toThrow("10001 different formulas");
});

test("errors of our functions reach other cells as errors, with their messages reported", async () => {
  const book = newBook();
  put(book, "S", {
    A1: "=CAP.ERLANGC.WAIT(12,10,5)",
    A2: "=A1+1",
    A3: "=ISERROR(A1)",
    A4: "=CAP.ERLANGB.BLOCKING(A1,5)",
  });
  const outcome = await outcomeOf(book);
  expect((value(outcome, "S", 1, 1) as CellError).code).toBe("#N/A");
  expect((value(outcome, "S", 2, 1) as CellError).code).toBe("#N/A");
  expect(value(outcome, "S", 3, 1)).toBe(true);
  expect((value(outcome, "S", 4, 1) as CellError).code).toBe("#N/A");
  expect(outcome.messages.some(({ message }) => message.includes("never settles"))).toBe(true);
});

test("the normal distribution is exact where the engine's own is off by 1e-7", async () => {
  const book = newBook();
  put(book, "S", {
    A1: "=NORM.S.DIST(-6,TRUE)",
    A2: "=NORM.S.INV(0.975)",
    A3: "=NORM.DIST(3,1,2,TRUE)",
    A4: "=ERF(0.5)",
    A5: "=NORM.INV(0.9,10,2)",
  });
  const outcome = await outcomeOf(book);
  // 50-digit values (mpmath 1.2.1).
  const exact = [9.8658764503769814e-10, 1.959963984540054, 0.84134474606854293, 0.52049987781304654, 12.5631031310892];
  exact.forEach((expected, i) =>
    expect(Math.abs((value(outcome, "S", i + 1, 1) as number) / expected - 1)).toBeLessThan(1e-13),
  );
});

test("names in formulas are written and stored forms of each other, texts left alone", () => {
  const written = '=CAP.ERLANGB.BLOCKING(A1,15)&"CAP.ERLANGB.BLOCKING("&SUM(Plan!$A$5#)';
  const stored = '_xldudf_CAP_ERLANGB_BLOCKING(A1,15)&"CAP.ERLANGB.BLOCKING("&SUM(_xlfn.ANCHORARRAY(Plan!$A$5))';
  expect(toStored("=CAP.ERLANGB.BLOCKING(A1,15)", functionTable)).toBe("_xldudf_CAP_ERLANGB_BLOCKING(A1,15)");
  expect(toWritten(stored, functionTable)).toBe(written);
});
