import { loadUplink } from "../../functions/load";
import { marginFromload, marginNeighbourload } from "../../functions/margin";
import { noiseCascade, noiseFloor } from "../../functions/noise";
import { powerSum } from "../../functions/power";
import { sinrCluster, sinrFrompowers, sinrOutage, sinrReuse, sinrUplink } from "../../functions/sinr";
import type { CellError } from "../../src/sheet/cell-error";

const error = (cell: unknown): string => `${(cell as CellError).code} ${(cell as CellError).message}`;

test("empty cells among the powers do not count, 0 dBm does", () => {
  expect(powerSum([[-10], [null], [""], [-10]])[0]![0]).toBeCloseTo(-6.9897, 4);
  expect(powerSum([[0], [0]])[0]![0]).toBeCloseTo(3.0103, 4);
  expect(error(powerSum([[-10], ["loud"]])[0]![0])).toBe(
    '#VALUE! powersDbm row 2, column 1 is the text "loud"; allowed: a decibel value from -1000 to 1000.',
  );
});

test("a column of signals against one range of interferers gives a column", () => {
  const answers = sinrFrompowers([[-80], [null], [-90]], [[-95, -98]], [[-101]]);
  expect(answers[0]![0]).toBeCloseTo(12.5637, 4);
  expect(answers[1]![0]).toBe("");
  expect(answers[2]![0]).toBeCloseTo(2.5637, 4);
});

test("a blank temperature is 290 K", () => {
  expect(noiseFloor([[0.0125]], [[6]], [[null]])).toEqual(noiseFloor([[0.0125]], [[6]], [[290]]));
});

test("stages belong together place by place", () => {
  expect(error(noiseCascade([[15], [-3]], [[1.5], [3], [7]])[0]![0])).toContain("they must match place by place");
  expect(error(noiseCascade([[15], [null]], [[1.5], [3]])[0]![0])).toContain("gainDb row 2, column 1 is missing");
});

test("a blank snr is interference alone, 0 dB is not", () => {
  expect(sinrReuse([[7]], [[4]], [[null]], [[null]], [[null]])[0]![0]).toBeCloseTo(18.6629, 4);
  expect(sinrReuse([[7]], [[4]], [[null]], [[null]], [[0]])[0]![0]).toBeCloseTo(-0.0587, 4);
  expect(error(sinrUplink([[1]], [[3.84]], [[12.2]], [[0.5]], [[0]])[0]![0])).toMatch(/^#N\/A There is neither/);
});

test("reuse: a row of exponents and a column of clusters make a table; one bad row does not spoil it", () => {
  const table = sinrReuse([[3], [5], [7]], [[3.5, 4]], undefined, undefined, undefined, [["Corner"]]);
  expect(table.map((row) => row.length)).toEqual([2, 2, 2]);
  expect(table[0]![1]).toBeLessThan(table[2]![1] as number);
  expect(error(table[1]![0])).toContain("such as 4 or 7");
});

test("a pole, a target out of reach and interference that takes everything are #N/A", () => {
  const [low, pole] = marginFromload([[0.5], [1]]);
  expect(low![0]).toBeCloseTo(3.0103, 4);
  expect(error(pole![0])).toMatch(/^#N\/A A load of 1 /);
  expect(error(sinrCluster([[300]], [[2]])[0]![0])).toMatch(/^#N\/A /);
  expect(error(marginNeighbourload([[5]], [[5]], [[1]])[0]![0])).toMatch(/^#N\/A /);
});

test("services: one activity for all, an empty place skipped", () => {
  const together = loadUplink(
    [[5], [null], [2]],
    [[12.2], [null], [64]],
    [[1]],
    [[30], [null], [4]],
    [[3.84]],
    [[0.55]],
  );
  const apart = loadUplink([[5], [2]], [[12.2], [64]], [[1], [1]], [[30], [4]], [[3.84]], [[0.55]]);
  expect(together).toEqual(apart);
});

test("outage: whole interferers only", () => {
  expect(error(sinrOutage([[16]], [[9]], [[8]], [[2.5]])[0]![0])).toBe(
    "#VALUE! interferers is 2.5; allowed: a whole number from 1 to 1E+6.",
  );
});
