import { fromSeed, fromState } from "../../../src/model/numerics/random";

const DRAWS = 100_000;

test("xoshiro128** 1.1 gives the words of its definition, as a second program written from it gives them", () => {
  const random = fromState([1, 2, 3, 4]);
  expect(Array.from({ length: 10 }, () => random.bits())).toEqual([
    11520, 0, 5927040, 70819200, 2031721883, 1637235492, 1287239034, 3734860849, 3729100597, 4258142804,
  ]);
});

test("the same seed repeats, any other differs from the first number on", () => {
  const first = (seed: number): string => {
    const random = fromSeed(seed);
    return [random.bits(), random.bits()].join();
  };
  const seeds = [0, 1, 2, 3, 2 ** 31, 2 ** 32, 2 ** 32 + 1, 2 ** 33, 2 ** 53 - 1];
  expect(first(7)).toBe(first(7));
  expect(new Set(seeds.map(first)).size).toBe(seeds.length);
});

test.each([0, 1, 20261201])("seed %p: uniform numbers fill their twentieths evenly (chi-square)", (seed) => {
  const random = fromSeed(seed);
  const cells = new Array<number>(20).fill(0);
  let outside = 0;
  for (let i = 0; i < DRAWS; i++) {
    const value = random.uniform();
    if (!(value > 0 && value < 1)) outside++;
    cells[Math.floor(20 * value)]!++;
  }
  expect(outside).toBe(0);
  const expected = DRAWS / 20;
  const chiSquare = cells.reduce((sum, seen) => sum + (seen - expected) ** 2 / expected, 0);
  // The 99.9 % point of 19 degrees of freedom.
  expect(chiSquare).toBeLessThan(43.82);
});

test("exponential numbers have mean 1, variance 1 and no memory of the one before", () => {
  const random = fromSeed(5);
  let sum = 0;
  let squares = 0;
  let products = 0;
  let before = random.exponential();
  for (let i = 0; i < DRAWS; i++) {
    const value = random.exponential();
    sum += value;
    squares += value * value;
    products += (value - 1) * (before - 1);
    before = value;
  }
  const error = 4 / Math.sqrt(DRAWS);
  expect(Math.abs(sum / DRAWS - 1)).toBeLessThan(error);
  // The second moment is 2, of standard deviation sqrt(20).
  expect(Math.abs(squares / DRAWS - 2)).toBeLessThan(error * Math.sqrt(20));
  expect(Math.abs(products / DRAWS)).toBeLessThan(error);
});
