import { readForecast } from "../../src/workbook/csv/forecast";
import { readPlanFiles } from "../../src/workbook/csv/plan-files";
import { readCsv } from "../../src/workbook/csv/read";
import { SMALL_PLAN } from "../support/small-plan";

const forecast = (text: string): unknown[][] => readForecast(text, "new.csv");

test("a long forecast is read, numbers as numbers", () => {
  expect(forecast("area,year,users\nQuay,2027,10\nQuay,2028,12.5\n")).toEqual([
    ["area", "year", "users"],
    ["Quay", 2027, 10],
    ["Quay", 2028, 12.5],
  ]);
});
test("a wide forecast becomes long", () => {
  expect(forecast("area,2027,2028\nQuay,10,12\n").slice(1)).toEqual([
    ["Quay", 2027, 10],
    ["Quay", 2028, 12],
  ]);
});
test("a byte order mark, semicolons, other line ends and blank lines are taken as they come", () => {
  const same = forecast("area,year,users\nQuay,2027,10\n");
  expect(forecast("\ufeffarea,year,users\r\nQuay,2027,10\r\n\r\n")).toEqual(same);
  expect(forecast("area;year;users\nQuay;2027;10\n")).toEqual(same);
});
test("text that begins like a formula stays text", () => {
  expect(readCsv("name,x\n=1+1,@SUM(A1)\n-5,+x\n", "a.csv").slice(1)).toEqual([
    ["=1+1", "@SUM(A1)"],
    [-5, "+x"],
  ]);
});
test.each([
  ["a wrong heading", "place,year,users\nQuay,2027,10\n", "new.csv lacks the column area"],
  ["a misspelt heading", "area,year,usres\nQuay,2027,10\n", '"usres" looks like users'],
  ["text in a number", "area,year,users\nQuay,2027,many\n", 'new.csv row 2, column users: the text "many"'],
  ["a decimal comma", "area;year;users\nQuay;2027;1,5\n", 'row 2, column users: the text "1,5"'],
  [
    "an area given twice",
    "area,year,users\nQuay,2027,10\nQuay,2027,11\n",
    "new.csv row 3, column area: Quay has year 2027 already in row 2",
  ],
  ["a year that one area lacks", "area,year,users\nA,2027,1\nA,2028,1\nB,2027,1\n", "area B lacks year 2028"],
  ["a year that all lack", "area,year,users\nA,2027,1\nA,2029,1\n", "lacks year 2028 between"],
  ["a missing number", "area,year,users\nA,2027,\n", "new.csv row 2, column users: missing"],
  ["a missing number in wide form", "area,2027,2028\nA,1,\n", "new.csv row 2, column 2028: missing"],
  ["a negative number", "area,year,users\nA,2027,-4\n", "row 2, column users: -4"],
  ["too many cells in a row", "area,year,users\nA,2027,1,5\n", "new.csv row 2: 4 cells but the heading has 3"],
  ["an unclosed quote", 'area,year,users\n"A,2027,1\n', "new.csv row 2"],
  ["nothing", "", "new.csv is empty"],
  ["a heading alone", "area,year,users\n", "no rows"],
  ["no text at all", "PK\u0003\u0004\u0000\u0000", "not a CSV text file"],
])("%s is refused by file, row and column", (_, text, message) => {
  expect(() => forecast(text)).toThrow(message);
});
test("a million rows are refused before anything else is done with them", () => {
  const rows = Array.from({ length: 1_000_000 }, (_, i) => `A${i},2027,1`).join("\n");
  expect(() => forecast(`area,year,users\n${rows}\n`)).toThrow("new.csv has 1000000 rows; at most 200000 are taken.");
});
test("the files of a plan are read together, and a missing one is named with what it holds", () => {
  const tables = readPlanFiles((file) => SMALL_PLAN[file]);
  expect(tables.cells).toHaveLength(4);
  expect(() => readPlanFiles((file) => (file === "radio.csv" ? undefined : SMALL_PLAN[file]))).toThrow("no radio.csv");
  expect(() => readPlanFiles((file) => (file === "radio.csv" ? "x,Narrow\n" : SMALL_PLAN[file]))).toThrow(
    'must be "parameter"',
  );
});
