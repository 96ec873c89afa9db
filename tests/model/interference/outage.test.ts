import fc from "fast-check";
import { exceedance } from "../../../src/model/interference/lognormal-sum";
import { outage } from "../../../src/model/interference/sinr";
import { cdf, upperTail } from "../../../src/model/numerics/normal";
import reference from "../../fixtures/interference/outage.json";
import { SeededRandom } from "../../support/seeded-random";

const NEPER = Math.LN10 / 10;

describe("against quadrature of other kinds", () => {
  const error = (rows: number[][]): number =>
    Math.max(...rows.map(([m, r, s, n, c, expected]) => Math.abs(outage(m!, r!, s!, n!, c) - expected!)));

  test("two and three interferers, integrated over their levels", () => {
    expect(error(reference.tensor)).toBeLessThan(2e-13);
  });

  test("four to forty interferers, by the density of the sum", () => {
    expect(error(reference.density)).toBeLessThan(3e-13);
  });

  test("a sum of one, where the answer is a normal tail, at any deviation", () => {
    for (const deviation of [0.01, 0.05, 0.3, 0.6, 1.8, 5, 23]) {
      for (const x of [-5, -2, 0, 0.5, 1, 3, 5]) {
        const actual = exceedance(x * deviation * Math.SQRT2, deviation, 1);
        expect(Math.abs(actual - upperTail(x))).toBeLessThan(deviation < 0.02 ? 1e-11 : 1e-12);
      }
    }
  });
});

describe("one interferer", () => {
  test("is exact: two independent normal levels", () => {
    expect(outage(10, 10, 8, 1)).toBe(0.5);
    expect(outage(17, 9, 8, 1)).toBeCloseTo(upperTail(1 / Math.SQRT2), 14);
    // The correlation takes its share of the variance: 1 - 0.5.
    expect(outage(17, 9, 8, 1, 0.5)).toBeCloseTo(upperTail(1), 14);
  });

  test("keeps relative accuracy in the tail", () => {
    expect(outage(200, 0, 8, 1) / upperTail(25 / Math.SQRT2)).toBeCloseTo(1, 12);
  });
});

describe("simulation", () => {
  /** Random levels a run, so that many interferers mean fewer drops. */
  const LEVELS = 1_000_000;

  function dropsOf(count: number): number {
    return Math.floor(LEVELS / (count + 1));
  }

  function simulated(medianDb: number, requiredDb: number, sigma: number, count: number, rho: number): number {
    const drops = dropsOf(count);
    const random = new SeededRandom(count);
    const shared = Math.sqrt(rho) * sigma * NEPER;
    const own = Math.sqrt(1 - rho) * sigma * NEPER;
    const limit = Math.exp((medianDb - requiredDb) * NEPER) * count;
    let below = 0;
    for (let drop = 0; drop < drops; drop++) {
      const common = shared * random.normal();
      const wanted = Math.exp(common + own * random.normal());
      let interference = 0;
      for (let k = 0; k < count; k++) interference += Math.exp(common + own * random.normal());
      if (wanted * limit < interference) below++;
    }
    return below / drops;
  }

  /** Fenton's sum: a lognormal with the mean and variance of the true one (L. F. Fenton, IRE Trans. CS-8, 1960). */
  function fentonWilkinson(medianDb: number, requiredDb: number, sigma: number, count: number): number {
    const s2 = (sigma * NEPER) ** 2;
    const variance = Math.log1p(Math.expm1(s2) / count);
    const mean = (s2 - variance) / 2;
    return upperTail(((medianDb - requiredDb) * NEPER - mean) / Math.sqrt(s2 + variance));
  }

  test.each([
    [16, 9, 8, 6, 0],
    [16, 9, 8, 6, 0.5],
    [20, 9, 10, 2, 0],
    [12, 9, 6, 18, 0.2],
  ])(
    "median %p dB, target %p dB, deviation %p dB, %p interferers, correlation %p",
    (median, required, s, count, rho) => {
      const expected = outage(median, required, s, count, rho);
      const deviation = Math.sqrt((expected * (1 - expected)) / dropsOf(count));
      expect(Math.abs(simulated(median, required, s, count, rho) - expected)).toBeLessThan(3.5 * deviation);
    },
  );

  test("Fenton's approximation is off by fifty times what the simulation allows", () => {
    const deviation = Math.sqrt(0.25 / dropsOf(6));
    expect(Math.abs(fentonWilkinson(16, 9, 12, 6) - outage(16, 9, 12, 6))).toBeGreaterThan(50 * deviation);
    expect(Math.abs(simulated(16, 9, 12, 6, 0) - outage(16, 9, 12, 6))).toBeLessThan(3.5 * deviation);
  });
});

describe("what must hold", () => {
  const sigma = fc.double({ min: 0.5, max: 15, noNaN: true });
  const gap = fc.double({ min: -30, max: 30, noNaN: true });
  const count = fc.integer({ min: 2, max: 60 });
  const SLACK = 1e-12;

  test("outage rises with the target and with the number of equal interferers of the same total", () => {
    fc.assert(
      fc.property(gap, sigma, count, (x, s, n) => {
        const here = outage(x, 0, s, n);
        expect(here).toBeGreaterThanOrEqual(0);
        expect(here).toBeLessThanOrEqual(1);
        expect(outage(x, 0.5, s, n)).toBeGreaterThanOrEqual(here - SLACK);
        // The mean of the levels is at least their geometric mean, whose deviation is that of one over the root of n.
        const neper = x * NEPER;
        const deviation = s * NEPER;
        const geometric = upperTail(neper / (deviation * Math.sqrt(1 + 1 / n)));
        expect(here).toBeGreaterThanOrEqual(geometric - SLACK);
      }),
      { seed: 1, numRuns: 60 },
    );
  });

  test("very many interferers add up to their mean: the wanted signal alone varies", () => {
    const s = 3 * NEPER;
    const expected = cdf((-5 * NEPER + (s * s) / 2) / s);
    expect(Math.abs(outage(5, 0, 3, 1_000_000) - expected)).toBeLessThan(1e-6);
  });

  test("no shadowing, or shadowing that all paths share, leaves the medians", () => {
    expect(outage(9.9, 10, 0, 6)).toBe(1);
    expect(outage(10.1, 10, 0, 6)).toBe(0);
    expect(outage(9.9, 10, 8, 6, 1)).toBe(1);
    expect(outage(10, 10, 8, 6, 1)).toBe(0);
  });

  test("a deviation too small for the transform joins on smoothly", () => {
    const at = (deviationDb: number): number => outage(0.7 * deviationDb, 0, deviationDb, 6);
    const [below, above] = [at(0.0868), at(0.0869)];
    // The slope against the deviation is about a percent for each decibel.
    expect(Math.abs(above - below)).toBeLessThan(1e-5);
    expect(at(1e-9)).toBeCloseTo(upperTail(0.7 / Math.sqrt(7 / 6)), 8);
  });

  test("the ends of the domain give a probability", () => {
    for (const median of [-1000, 0, 1000]) {
      for (const s of [1e-6, 1, 100]) {
        for (const n of [1, 2, 1_000_000]) {
          for (const correlation of [0, 0.999999, 1 - 2 ** -53]) {
            const here = outage(median, 0, s, n, correlation);
            expect(here >= 0 && here <= 1).toBe(true);
          }
        }
      }
    }
  });

  test("errors name the parameter", () => {
    expect(() => outage(10, 9, -1, 6)).toThrow("shadowingDb is -1; allowed: a deviation from 0 to 100 dB.");
    expect(() => outage(10, 9, 8, 2.5)).toThrow("interferers is 2.5");
    expect(() => outage(10, 9, 8, 0)).toThrow("interferers is 0");
    expect(() => outage(10, 9, 8, 6, -0.5)).toThrow("correlation is -0.5");
  });
});
