import fc from "fast-check";
import { productError, sumError } from "../../../src/model/numerics/exact";
import { poissonDeviance } from "../../../src/model/numerics/poisson-deviance";
import { below, inverseTerm } from "../../../src/model/numerics/poisson-ratio";
import reference from "../../fixtures/numerics/poisson.json";
import { relativeError } from "../../support/relative-error";

describe("what rounding takes", () => {
  const number = fc.double({ min: -1e15, max: 1e15, noNaN: true }).filter((x) => Math.abs(x) > 1e-6);
  /** A double as a whole multiple of 2^-200, exactly. */
  const scaled = (x: number): bigint => {
    let shift = 0n;
    let value = x;
    while (!Number.isInteger(value)) {
      value *= 2;
      shift += 1n;
    }
    return (BigInt(value) << 200n) >> shift;
  };

  test("from a sum", () => {
    fc.assert(
      fc.property(number, number, (a, b) => {
        const sum = a + b;
        expect(scaled(sum) + scaled(sumError(a, b, sum))).toBe(scaled(a) + scaled(b));
      }),
      { seed: 1 },
    );
  });

  test("from a product", () => {
    fc.assert(
      fc.property(number, number, (a, b) => {
        const product = a * b;
        expect((scaled(product) + scaled(productError(a, b, product))) << 200n).toBe(scaled(a) * scaled(b));
      }),
      { seed: 2 },
    );
  });
});

test("the deviance is right to 1e-14, whatever its size", () => {
  for (const [n, mean, high, low] of reference.deviance as [number, number, number, number][]) {
    const actual = poissonDeviance(n, mean);
    // An exponent of 690 must not cost digits, so the absolute error counts, and the relative one where it is small.
    const error = Math.abs(actual.high - high + (actual.low - low));
    expect(error).toBeLessThan(1e-14 * Math.min(1, high));
  }
  expect(poissonDeviance(1e9, 1).high).toBe(Infinity);
});

test("the inverse term and the sum below against 50-digit values", () => {
  for (const [n, mean, inverse, sum] of reference.terms as [number, number, number, number][]) {
    expect(relativeError(inverseTerm(n, mean), inverse)).toBeLessThan(2e-14);
    expect(relativeError(below(n, mean), sum)).toBeLessThan(2e-14);
  }
});

test("below 1: the sum goes to 0 with n, in proportion", () => {
  for (const mean of [1e-9, 0.3, 1.4, 1.6, 40]) {
    expect(relativeError(below(1e-200, mean) / 1e-200, below(1e-12, mean) / 1e-12)).toBeLessThan(1e-10);
  }
  expect(below(0, 3)).toBe(0);
  expect(below(3, 0)).toBe(Infinity);
  expect(inverseTerm(0, 0)).toBe(1);
});
