import { rateAttenuated, rateCellcapacity, rateCellefficiency, rateRequiredsinr } from "../../functions/rate";
import { CellError } from "../../src/sheet/cell-error";

test("a blank SNR is no noise, which 0 dB is not", () => {
  const left = rateCellefficiency([[3.5]], [[1]], [[1]], [[1]], [[null]])[0]![0] as number;
  const out = rateCellefficiency([[3.5]], [[1]])[0]![0] as number;
  const zero = rateCellefficiency([[3.5]], [[1]], [[1]], [[1]], [[0]])[0]![0] as number;
  expect(left).toBe(out);
  expect(zero).toBeLessThan(left);
});

test("blank optional cells take the defaults of the downlink", () => {
  expect(rateAttenuated([[10]], [[10]], [[""]], [[null]], [[""]])).toEqual(
    rateAttenuated([[10]], [[10]], [[0.6]], [[-10]], [[4.4]]),
  );
});

test("capacity spills two numbers to the right, one row an input row, with headings on request", () => {
  const table = rateCellcapacity(
    [[3.5]],
    [[1], [3], [2], [""]],
    undefined,
    undefined,
    undefined,
    undefined,
    undefined,
    undefined,
    undefined,
    [[true]],
  );
  expect(table[0]).toEqual(["harmonicMeanBpsHz", "shareServed"]);
  expect(table[1]![0]).toBeCloseTo(0.9681, 4);
  expect(table[2]![1]).toBeCloseTo(1, 12);
  const refused = table[3]![0] as CellError;
  expect(refused.code).toBe("#VALUE!");
  expect(refused.message).toContain("clusterSize is 2");
  expect(table[4]).toEqual(["", ""]);
});

test("a row of clusters and a column of exponents make a table", () => {
  const table = rateCellefficiency([[3], [4]], [[1, 3, 7]]);
  expect(table.map((row) => row.length)).toEqual([3, 3]);
  expect(table[1]![2]).toBeGreaterThan(table[0]![2] as number);
});

test("a rate that cannot be had is #N/A with the reason, beside rows that can", () => {
  const [first, second] = rateRequiredsinr([[10]], [[20_000], [60_000]]);
  expect(first![0]).toBeCloseTo(9.58, 2);
  const error = second![0] as CellError;
  expect(error.code).toBe("#N/A");
  expect(error.message).toContain("needs 6 bit/s/Hz, more than the maximum of 4.4");
});
