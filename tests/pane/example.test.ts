/** Formulas are taken apart, and every function's example is laid out so that it computes to what the text says. */
import declared from "../../functions/generated/texts.json";
import { functionTable } from "../../functions/generated/function-table";
import { parseCall, splitOutside, written } from "../../src/pane/formula";
import { answerOf, exampleOf, layOut } from "../../src/pane/finder/example";
import { contains } from "../../src/pane/workbook/address";
import { Book } from "./office/book";

describe("a formula as a call", () => {
  test("numbers, texts, flags, blanks, arrays and references", () => {
    expect(
      parseCall('=CAP.X.Y( -1.5e3 , "a, ""b"")", TRUE,, {1,2;3,4}, A1:B$2, \'My sheet\'!$C$3, Table_1, Plan!A5#, 1+1)'),
    ).toEqual({
      name: "CAP.X.Y",
      args: [
        { kind: "value", value: -1500 },
        { kind: "value", value: 'a, "b")' },
        { kind: "value", value: true },
        { kind: "value", value: null },
        {
          kind: "array",
          rows: [
            [1, 2],
            [3, 4],
          ],
        },
        { kind: "reference", sheet: undefined, range: "A1:B2", spill: false },
        { kind: "reference", sheet: "My sheet", range: "C3", spill: false },
        { kind: "reference", sheet: undefined, range: "Table_1", spill: false },
        { kind: "reference", sheet: "Plan", range: "A5", spill: true },
        { kind: "other", text: "1+1" },
      ],
    });
  });
  test("no arguments, and what is not one call", () => {
    expect(parseCall("=NOW()")).toEqual({ name: "NOW", args: [] });
    for (const text of ["", "5", "=A1", "=F(1)+1", "=F(1", "=F(1))", '=F("a)', "=F({1,2)", "=-F(1)"]) {
      expect(parseCall(text)).toBeUndefined();
    }
  });
  test("a ragged or unfinished array is taken as it stands", () => {
    expect(parseCall("=F({1,2;3})")?.args).toEqual([{ kind: "other", text: "{1,2;3}" }]);
    expect(parseCall("=F({1,A1})")?.args).toEqual([{ kind: "other", text: "{1,A1}" }]);
  });
  test("splitting keeps quotes and brackets together", () => {
    expect(splitOutside('a,"b,c",(d,e),{f,g}', ",")).toEqual(["a", '"b,c"', "(d,e)", "{f,g}"]);
  });
  test("constants are written as a formula reads them", () => {
    expect([written(1.5), written('say "no"'), written(true), written(null)]).toEqual([
      "1.5",
      '"say ""no"""',
      "TRUE",
      "",
    ]);
  });
});

test.each(declared.map((text) => [text.id, text] as const))(
  "the example of %s stands in cells and computes",
  (id, text) => {
    const example = exampleOf(text, "CAP")!;
    const answer = answerOf(example, functionTable[id]!)!;
    const layout = layOut(text, example, answer, { sheet: "Sheet1", row: 2, column: 1 }, "CAP", "result");
    const book = new Book(functionTable);
    const sheet = book.sheet("Sheet1");
    for (const { row, column, content } of layout.edits) {
      expect(contains(layout.area, { sheet: "Sheet1", row, column })).toBe(true);
      expect(sheet.at(row, column)).toBeUndefined();
      if (content !== null)
        book.fill("Sheet1", row, column, [[typeof content === "object" ? content.formula : content]]);
    }
    book.recalculate();
    const { row, column } = layout.result;
    const shown = answer.map((line, r) => line.map((_, c) => book.read("Sheet1", row + r, column + c)));
    expect(shown).toEqual(answer.map((line) => line.map((cell) => cell ?? "")));
    for (const key of sheet.cells.keys()) {
      const [r, c] = key.split(",").map(Number) as [number, number];
      expect(contains(layout.area, { sheet: "Sheet1", row: r, column: c })).toBe(true);
    }
  },
);

test("a function without an example has none to lay out", () => {
  expect(exampleOf({ ...declared[0]!, examples: [] }, "CAP")).toBeUndefined();
});
