import { fromDecibel, toDecibel } from "../../../src/model/numerics/decibel";
import { relativeError } from "../../support/relative-error";

describe("decibels", () => {
  test.each([
    [0, 1],
    [10, 10],
    [-30, 1e-3],
    [230, 1e23],
    [-1000, 1e-100],
    [1000, 1e100],
    [3, 1.9952623149688796],
    [25.5, 354.8133892335755],
    [-173.9751871942281, 4.003882099999992e-18],
  ])("%d dB is the ratio %d", (db, ratio) => {
    expect(relativeError(fromDecibel(db), ratio)).toBeLessThan(5e-16);
  });

  test("whole tens are exact", () => {
    for (let tens = -100; tens <= 100; tens++) expect(fromDecibel(10 * tens)).toBe(Number(`1e${tens}`));
  });

  test("go back", () => {
    for (let db = -200; db <= 200; db += 0.37) expect(toDecibel(fromDecibel(db))).toBeCloseTo(db, 12);
  });
});
