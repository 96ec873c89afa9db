import { nonNegative, positive } from "../../src/model/domain";
import { CellError } from "../../src/sheet/cell-error";
import { labelled, readTable, type Schema } from "../../src/sheet/table";

const schema: Schema = {
  area: { kind: "text" },
  year: { kind: "number", domain: positive },
  users: { kind: "number", domain: nonNegative },
  kind: { kind: "choice", words: ["call", "data"], optional: true, fallback: "call" },
  errorPerYear: { kind: "number", domain: nonNegative, optional: true, fallback: 0.1 },
};

function refusal(cells: unknown[][]): string {
  try {
    readTable(cells, "Demand", schema);
  } catch (thrown) {
    expect(thrown).toBeInstanceOf(CellError);
    return (thrown as CellError).message;
  }
  throw new Error("the table was accepted");
}

const heading = ["users", "area", "year"];

test("columns are found by name in any order and case, extra columns ignored, defaults filled", () => {
  const table = readTable(
    [
      ["note", "Users", "AREA", "year"],
      ["mine", 5, "Quay", 2027],
    ],
    "Demand",
    schema,
  );
  expect(table.count).toBe(1);
  expect(table.texts("area")).toEqual(["Quay"]);
  expect([...table.numbers("users")]).toEqual([5]);
  expect(table.texts("kind")).toEqual(["call"]);
  expect([...table.numbers("errorPerYear")]).toEqual([0.1]);
  expect(table.problems).toEqual([]);
});
test("blank rows are dropped, as null, empty text or all 0, and row numbers stay those of the range", () => {
  const rows = [heading, [5, "A", 2027], [null, null, null], ["", "", ""], [0, 0, 0], [6, "B", 2028]];
  expect(readTable(rows, "Demand", schema).rowNumbers).toEqual([2, 6]);
});
test("users of 0 are data", () => {
  const table = readTable([heading, [0, "A", 2027]], "Demand", schema);
  expect([...table.numbers("users")]).toEqual([0]);
  expect(table.problems).toEqual([]);
});
test("a wrong cell is a problem that names table, row and column, and leaves the other rows", () => {
  const table = readTable(
    [heading, [5, "A", 2027], ["many", "B", 2027], [-1, "C", 2027], [7, "D", null]],
    "Demand",
    schema,
  );
  expect(table.count).toBe(4);
  expect(table.problems.map((problem) => problem.message)).toEqual([
    'Demand row 3, column users: the text "many" is not allowed; allowed: a number of at least 0.',
    "Demand row 4, column users: -1 is not allowed; allowed: a number of at least 0.",
    "Demand row 5, column year: missing; allowed: a number above 0.",
  ]);
  expect(table.numbers("users")[0]).toBe(5);
  expect(table.numbers("users")[1]).toBeNaN();
});
test("names typed as numbers are names", () => {
  expect(readTable([heading, [5, 12, 2027]], "Demand", schema).texts("area")).toEqual(["12"]);
});
test("a missing column is named", () => {
  expect(
    refusal([
      ["area", "year"],
      ["A", 2027],
    ]),
  ).toContain("Demand lacks the column users");
});
test("a heading that nearly matches is reported as misspelt, optional ones too", () => {
  expect(
    refusal([
      [...heading, "errorPerYaer"],
      [1, "A", 2027, 0.2],
    ]),
  ).toContain('"errorPerYaer" looks like errorPerYear');
  expect(
    refusal([
      ["usres", "area", "year"],
      [1, "A", 2027],
    ]),
  ).toContain("looks like users");
});
test("a column given twice is refused", () => {
  expect(
    refusal([
      ["users", "area", "year", "Year"],
      [1, "A", 2027, 2027],
    ]),
  ).toContain("column year twice");
});
test("an empty table says so", () => {
  expect(refusal([[null, null]])).toContain("Demand is empty");
});
test("a table of a million rows is read with one bad row found", () => {
  const rows: unknown[][] = [heading];
  for (let i = 0; i < 1_000_000; i++) rows.push([i, "A", 2027]);
  rows[500_000]![0] = "oops";
  const table = readTable(rows, "Demand", schema);
  expect(table.count).toBe(1_000_000);
  expect(table.problems).toHaveLength(1);
  expect(table.problems[0]!.row).toBe(500_001);
});
test("labelled puts the names first", () => {
  expect(labelled(["a", "b"], [[1, 2]])).toEqual([
    ["a", "b"],
    [1, 2],
  ]);
});
