/** The edits that a new forecast makes in its table, row by row. */
import { WorkbookFailure } from "../../src/workbook/failure";
import { putForecast } from "../../src/workbook/forecast-edit";

const TABLE = [
  ["area", "my note", "year", "users", "errorPerYear"],
  ["Quay", "keep", 2027, 100, 0.05],
  ["Quay", null, 2028, 110, null],
  [null, null, null, null, null],
  ["Old town", "mine", 2027, 50, null],
  [null, null, null, null, null],
];

test("rows are matched by area and year; new ones follow the last filled row, vanished ones lose their numbers only", () => {
  const { edits, rows, matched, added, gone } = putForecast(
    TABLE,
    [
      ["area", "year", "users"],
      ["Quay", 2028, 120],
      ["Quay", 2027, 105],
      ["Harbour", 2027, 40],
    ],
    "here",
  );
  expect({ rows, matched, added, gone }).toEqual({ rows: 6, matched: 2, added: 1, gone: 1 });
  expect(edits).toEqual([
    { row: 2, column: 3, value: 120 },
    { row: 1, column: 3, value: 105 },
    { row: 5, column: 0, value: "Harbour" },
    { row: 5, column: 2, value: 2027 },
    { row: 5, column: 3, value: 40 },
    { row: 4, column: 0, value: null },
    { row: 4, column: 2, value: null },
    { row: 4, column: 3, value: null },
  ]);
});

test("errors of the forecast are replaced where the file gives them", () => {
  const { edits } = putForecast(
    TABLE,
    [
      ["area", "year", "users", "errorPerYear"],
      ["Quay", 2027, 100, 0.08],
      ["Quay", 2028, 110, null],
      ["Old town", 2027, 50, 0.02],
    ],
    "here",
  );
  expect(edits.filter(({ column }) => column === 4)).toEqual([
    { row: 1, column: 4, value: 0.08 },
    { row: 4, column: 4, value: 0.02 },
  ]);
});

test("an area named by a number matches, whether it was typed as text or number", () => {
  const table = [
    ["area", "year", "users"],
    [12, 2027, 5],
  ];
  expect(
    putForecast(
      table,
      [
        ["area", "year", "users"],
        ["12", "2027", 6],
      ],
      "here",
    ),
  ).toMatchObject({
    matched: 1,
    added: 0,
    gone: 0,
  });
});

test("a table without a needed column is refused by name", () => {
  expect(() => putForecast([["area", "year"]], [["area", "year", "users"]], "sheet Forecast row 5")).toThrow(
    new WorkbookFailure("sheet Forecast row 5 has no column users."),
  );
});
