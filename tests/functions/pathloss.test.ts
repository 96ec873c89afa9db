import { pathlossHata, pathlossRma } from "../../functions/pathloss";
import { rangeHata, rangeUma } from "../../functions/range";
import { CellError } from "../../src/sheet/cell-error";

const onlyCell = (spill: unknown[][]): CellError => spill[0]![0] as CellError;

test("words are taken in any case, a blank word is the default", () => {
  const urban = pathlossHata([[5]], [[900]], [[30]], [[1.5]]);
  expect(pathlossHata([[5]], [[900]], [[30]], [[1.5]], [["URBAN"]])).toEqual(urban);
  expect(pathlossHata([[5]], [[900]], [[30]], [[1.5]], [[null]])).toEqual(urban);
});

test("environments beside each other, one of them unknown", () => {
  const [row] = pathlossHata([[5]], [[900]], [[30]], [[1.5]], [["open", "suburban", "forest"]]);
  expect(row![0]).toBeLessThan(row![1] as number);
  expect((row![2] as CellError).message).toBe(
    'environment is the text "forest"; allowed: "urban", "large city", "suburban", "open".',
  );
});

test("outside the range of a model the cell says which range, instead of a number", () => {
  const far = onlyCell(pathlossHata([[25]], [[900]], [[30]], [[1.5]]));
  expect(far.code).toBe("#VALUE!");
  expect(far.message).toBe("distanceKm is 25; allowed: a distance from 1 to 20 km.");
  const hidden = onlyCell(pathlossRma([[7]], [[900]], [[30]], [[1.5]], [["nlos"]]));
  expect(hidden.code).toBe("#VALUE!");
  expect(pathlossRma([[7]], [[900]], [[30]], [[1.5]], [["los"]])[0]![0]).toBeGreaterThan(100);
});

test("a loss that no distance of the model has is #N/A with the losses at both ends", () => {
  const error = onlyCell(rangeUma([[190]], [[3500]], [[25]], [[1.5]]));
  expect(error.code).toBe("#N/A");
  expect(error.message).toMatch(/190 is outside what the model covers: [0-9.]+ dB at 0.01 km to [0-9.]+ dB at 5 km/);
});

test("a column of losses filled ahead of its data", () => {
  const column = rangeHata([[140], [""], [145]], [[900]], [[50]], [[1.5]]);
  expect(column[1]).toEqual([""]);
  expect(column[2]![0]).toBeGreaterThan(column[0]![0] as number);
});
