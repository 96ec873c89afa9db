import fc from "fast-check";
import { erf, erfc, scaledErfc } from "../../../src/model/numerics/erfc";
import { logGamma, stirlingError } from "../../../src/model/numerics/log-gamma";
import * as normal from "../../../src/model/numerics/normal";
import reference from "../../fixtures/numerics/special-functions.json";
import { relativeError } from "../../support/relative-error";

const EPS = 2 ** -52;

function worst(rows: number[][], f: (x: number) => number): number {
  return Math.max(...rows.map(([x, expected]) => relativeError(f(x!), expected!)));
}

describe("special functions against 50-digit values, in units of the rounding error", () => {
  test.each([
    ["erf", erf, 4],
    ["erfc", erfc, 4],
    ["scaledErfc", scaledErfc, 4],
    ["upperTail", normal.upperTail, 4],
    ["upperQuantile", normal.upperQuantile, 4],
    ["logGamma", logGamma, 8],
  ] as const)("%s stays within %3$s units", (name, f, units) => {
    expect(worst(reference[name], f) / EPS).toBeLessThan(units);
  });

  test("stirlingError: absolute error below 4 units, which is what an exponent needs", () => {
    const errors = reference.stirlingError.map(
      ([x, expected]) => Math.abs(stirlingError(x!) - expected!) / Math.max(1, expected!),
    );
    expect(Math.max(...errors) / EPS).toBeLessThan(4);
  });
});

describe("normal distribution", () => {
  test("the quantile keeps relative accuracy at the median", () => {
    expect(normal.quantile(0.5)).toBe(0);
    expect(relativeError(normal.quantile(0.5 + 2 ** -50), 2 ** -50 * Math.sqrt(2 * Math.PI))).toBeLessThan(4 * EPS);
  });

  test("0 and 1 answer the infinities, and the tail beyond all doubles is 0", () => {
    expect(normal.quantile(0)).toBe(-Infinity);
    expect(normal.quantile(1)).toBe(Infinity);
    expect(normal.upperTail(40)).toBe(0);
    expect(normal.cdf(40)).toBe(1);
  });

  test("quantile and distribution undo each other", () => {
    fc.assert(
      fc.property(fc.double({ min: -8, max: 4, noNaN: true }), (z) => {
        const back = normal.quantile(normal.cdf(z));
        expect(Math.abs(back - z)).toBeLessThan(1e-11);
      }),
      { seed: 1 },
    );
  });

  test("the density is minus the slope of the tail", () => {
    const step = 1e-4;
    for (const z of [-2, 0, 0.7, 3, 8]) {
      const slope = (normal.upperTail(z - step) - normal.upperTail(z + step)) / (2 * step);
      expect(relativeError(slope, normal.density(z))).toBeLessThan(1e-6);
    }
  });
});

test("logGamma follows its recurrence", () => {
  fc.assert(
    fc.property(fc.double({ min: 0.01, max: 500, noNaN: true }), (x) => {
      const difference = logGamma(x + 1) - logGamma(x) - Math.log(x);
      expect(Math.abs(difference)).toBeLessThan(1e-15 * (8 + 4 * logGamma(x + 1)));
    }),
    { seed: 2 },
  );
});
