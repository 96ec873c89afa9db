import { ScaledWeights } from "../../../src/model/blocking/scaled-weights";

test("weights that would leave the doubles come out in proportion", () => {
  // Each state weighs 2^100 times the one before: state 40 is at 2^4000.
  const weights = new ScaledWeights(41);
  const factors: number[] = [];
  for (let state = 1; state <= 40; state++) {
    weights.values[state] = weights.values[state - 1]! * 2 ** 100;
    if (ScaledWeights.isLarge(weights.values[state]!)) factors.push(weights.shrink(state, 3));
  }
  expect(factors.length).toBeGreaterThan(3);
  const probabilities = weights.normalised(40);
  for (let state = 40; state > 30; state--) {
    expect(probabilities[state - 1]! / probabilities[state]!).toBe(2 ** -100);
  }
  expect(probabilities[40]!).toBeCloseTo(1, 15);
  expect(probabilities[0]).toBe(0);
  expect(probabilities.every((p) => p >= 0 && p <= 1)).toBe(true);
});

test("states older than the window are brought to the scale of the newest once", () => {
  const weights = new ScaledWeights(4);
  weights.values.set([1, 2 ** 800, 2 ** 901, 2 ** 902]);
  weights.shrink(2, 2);
  weights.values[3]! *= 2 ** -900;
  expect(weights.align(3)).toBe(4 + 2 + 2 ** -100);
  expect([...weights.values]).toEqual([2 ** -900, 2 ** -100, 2, 4]);
  expect(weights.align(3)).toBe(4 + 2 + 2 ** -100);
});
