import fc from "fast-check";
import { DomainError } from "../../../src/model/errors";
import { compoundExceedance } from "../../../src/model/numerics/compound-lognormal";
import { upperTail } from "../../../src/model/numerics/normal";
import { outage } from "../../../src/model/schemes/cdma-outage";
import { relativeError } from "../../support/relative-error";
import { SeededRandom } from "../../support/seeded-random";

/** P(N > n), its terms added one by one on the smaller side. */
function poissonTail(n: number, mean: number): number {
  let term = Math.exp(-mean);
  let head = term;
  for (let k = 1; k <= n; k++) head += term *= mean / k;
  if (n < mean) return 1 - head;
  let tail = 0;
  for (let k = n + 1; k < n + 2000; k++) tail += term *= mean / k;
  return tail;
}

/** W/R = 99 at 0 dB makes the load of one user 1/100. */
const hundredth = (trafficE: number, i: number, limit: number, error?: number): number =>
  outage(trafficE, 0.99, 10, 0, 0.5, i, limit, error);

describe("without power-control error", () => {
  test("the Poisson tail of activity thins the number of users, other cells add to it", () => {
    for (const [a, i, limit] of [
      [60, 0.55, 0.75],
      [100, 0.6, 0.75],
      [200, 0.5, 0.6],
      [10, 0, 0.9],
    ] as const) {
      const expected = poissonTail(Math.round(100 * limit), 0.5 * a * (1 + i));
      expect(relativeError(hundredth(a, i, limit), expected)).toBeLessThan(1e-11);
    }
  });
  test("a load at the limit does not exceed it, a limit below one user fails with the first", () => {
    expect(relativeError(hundredth(2, 0, 0.01), poissonTail(1, 1))).toBeLessThan(1e-13);
    expect(relativeError(hundredth(2, 0, 0.009), -Math.expm1(-1))).toBeLessThan(1e-13);
  });
  test("no traffic, no outage; far too much is certain", () => {
    expect(hundredth(0, 0.5, 0.75)).toBe(0);
    expect(hundredth(0, 0.5, 0.75, 2)).toBe(0);
    expect(hundredth(1e6, 1000, 0.75)).toBe(1);
  });
});

describe("with power-control error", () => {
  test("few users: the sums of one and of two lognormals, by quadrature", () => {
    const mean = 1e-3;
    for (const [level, deviation] of [
      [1.5, 0.1],
      [1.05, 0.02],
      [2, 0.5],
      [10, 1],
      [3, 4.6],
      [0.5, 2],
      [1.1, 0.03],
      [1.9, 0.015],
    ] as const) {
      // Two exceed where the first does, or where the second exceeds the rest; distance of the first from the level is e^t.
      const top = Math.log(level) / deviation;
      let two = upperTail(top);
      const step = 0.002;
      for (let t = -40; t < 4; t += step) {
        const z = top - Math.exp(t);
        const rest = -level * Math.expm1(-deviation * Math.exp(t));
        two += (step * Math.exp(t - (z * z) / 2) * upperTail(Math.log(rest) / deviation)) / Math.sqrt(2 * Math.PI);
      }
      const firstTwo = Math.exp(-mean) * (mean * upperTail(top) + ((mean * mean) / 2) * two);
      const more = compoundExceedance(level, mean, deviation) - firstTwo;
      // Three or more come with probability mean^3/6.
      expect(more).toBeGreaterThan(-1e-11);
      expect(more).toBeLessThan(mean ** 3 / 6 + 1e-11);
    }
  });
  test.each([
    [15, 10, 0.05],
    [15, 10, 0.3],
    [60, 40, 0.58],
    [60, 40, 1.2],
    [5, 2, 0.02],
    [100, 30, 2],
    [1000, 5, 4],
  ])(
    "level %d, mean %d, deviation %d lies within four deviations of 40,000 simulated sums",
    (level, mean, deviation) => {
      const random = new SeededRandom(4);
      const trials = 40_000;
      let hits = 0;
      for (let k = 0; k < trials; k++) {
        let sum = 0;
        for (let time = -Math.log(random.uniform()); time < mean; time -= Math.log(random.uniform())) {
          sum += Math.exp(deviation * random.normal());
        }
        if (sum > level) hits++;
      }
      const p = compoundExceedance(level, mean, deviation);
      expect(Math.abs(hits / trials - p)).toBeLessThan(4 * Math.sqrt((p * (1 - p)) / trials));
    },
  );
  test("the two methods meet at 0.02 nepers, and both meet the Poisson tail as the error vanishes", () => {
    for (const [level, mean] of [
      [75.5, 60],
      [30.2, 20],
      [5.02, 2],
      [1000, 1000],
    ] as const) {
      const slope = compoundExceedance(level, mean, 0.0199) - compoundExceedance(level, mean, 0.0201);
      const next = compoundExceedance(level, mean, 0.0201) - compoundExceedance(level, mean, 0.0203);
      expect(Math.abs(slope - next)).toBeLessThan(3e-6);
    }
    expect(Math.abs(hundredth(80, 0.5, 0.755, 1e-3) - hundredth(80, 0.5, 0.755))).toBeLessThan(1e-9);
  });
  test("large means are near normal", () => {
    const [mean, deviation] = [1e6, 0.5];
    const average = mean * Math.exp(deviation ** 2 / 2);
    const sd = Math.sqrt(mean) * Math.exp(deviation ** 2);
    // Edgeworth's first correction with the skewness e^(4.5 s^2)/e^(3 s^2)/sqrt(m).
    const skewness = Math.exp(1.5 * deviation ** 2) / Math.sqrt(mean);
    for (const x of [-3, -1, 0, 1, 3]) {
      const density = Math.exp((-x * x) / 2) / Math.sqrt(2 * Math.PI);
      const expected = upperTail(x) + (skewness / 6) * (x * x - 1) * density;
      expect(Math.abs(compoundExceedance(average + x * sd, mean, deviation) - expected)).toBeLessThan(3e-6);
    }
  });
  test("outage rises with traffic and falls with the limit", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1, max: 300, noNaN: true }),
        fc.double({ min: 0.1, max: 0.9, noNaN: true }),
        fc.double({ min: 0.1, max: 12, noNaN: true }),
        (a, limit, error) => {
          const here = hundredth(a, 0.5, limit, error);
          expect(hundredth(a * 1.1, 0.5, limit, error)).toBeGreaterThanOrEqual(here - 1e-9);
          expect(hundredth(a, 0.5, limit * 1.05, error)).toBeLessThanOrEqual(here + 1e-9);
        },
      ),
      { seed: 8, numRuns: 25 },
    );
  });
});

test.each([
  () => outage(-1, 3.84, 12.2, 5, 0.5, 0.5),
  () => outage(2e6, 3.84, 12.2, 5, 0.5, 0.5),
  () => outage(60, 3.84, 12.2, 5, 0, 0.5),
  () => outage(60, 3.84, 12.2, 5, 0.5, 0.5, 1),
  () => outage(60, 3.84, 12.2, 5, 0.5, 0.5, 0.75, 21),
  () => outage(1e6, 3.84, 12.2, 5, 1, 0.5, 0.75, 1),
])("outside the domain: %#", (call) => {
  expect(call).toThrow(DomainError);
});
