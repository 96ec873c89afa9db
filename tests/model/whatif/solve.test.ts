import fc from "fast-check";
import * as erlangB from "../../../src/model/blocking/erlang-b";
import { DomainError, NoAnswerError } from "../../../src/model/errors";
import { effectOf } from "../../../src/model/whatif/sensitivity";
import { solve } from "../../../src/model/whatif/solve";
import { relativeError } from "../../support/relative-error";

test("finds what the function's own inverse gives", () => {
  fc.assert(
    fc.property(fc.integer({ min: 1, max: 400 }), fc.double({ min: 1e-6, max: 0.5, noNaN: true }), (n, target) => {
      const found = solve((a) => erlangB.blocking(a, n), target, 1e-6, 1000);
      expect(relativeError(found, erlangB.traffic(n, target))).toBeLessThan(1e-11);
    }),
    { seed: 51 },
  );
});
test("falling functions and targets at the ends", () => {
  expect(solve((x) => -x, -3, 0, 10)).toBe(3);
  expect(solve((x) => x * x, 0, 0, 10)).toBe(0);
  expect(solve((x) => x * x, 100, 0, 10)).toBe(10);
  // sin has no zero among the doubles near pi.
  expect(solve(Math.sin, 0, 1, 5)).toBeCloseTo(Math.PI, 14);
});
test("a target that is not bracketed names both end values", () => {
  expect(() => solve((x) => x * x, 200, 1, 10)).toThrow(NoAnswerError);
  expect(() => solve((x) => x * x, 200, 1, 10)).toThrow("1 at low = 1 and 100 at high = 10");
});
test("a step over the target is no answer; a level at the target is", () => {
  expect(() => solve((x) => (x < 2.5 ? 0 : 7), 3, 0, 10)).toThrow("steps over 3 at 2.5");
  const traffic = solve((a) => erlangB.channels(a, 0.02), 15, 1, 50);
  expect(erlangB.channels(traffic, 0.02)).toBe(15);
});
test("where only whole numbers count, the first that reaches the target", () => {
  const whole = (x: number): number => {
    if (!Number.isInteger(x)) throw new DomainError("n", x, "a whole number");
    return erlangB.blocking(10, x);
  };
  expect(solve(whole, 0.02, 0, 100)).toBe(erlangB.channels(10, 0.02));
  expect(solve(whole, 0.02, 0.5, 100.5)).toBe(erlangB.channels(10, 0.02));
});
test("errors of the function are passed on, and ends must be in order", () => {
  const strict = (x: number): number => {
    if (x > 5) throw new NoAnswerError("no answer above 5");
    return x;
  };
  expect(() => solve(strict, 3, 0, 10)).toThrow("no answer above 5");
  expect(() => solve((x) => x, 3, 10, 0)).toThrow(DomainError);
  expect(() => solve((x) => x, 3, 0, Infinity)).toThrow(DomainError);
});

test("the elasticity of a power is its exponent, up to the square of the change", () => {
  const { elasticity, below, above } = effectOf((x) => 5 * x ** 3, 2, 1e-4);
  expect(elasticity).toBeCloseTo(3, 7);
  expect(below).toEqual({ value: 5 * (2 * (1 - 1e-4)) ** 3 });
  expect(above).toEqual({ value: 5 * (2 * (1 + 1e-4)) ** 3 });
});
test("whole inputs move by at least one; one side alone still tells", () => {
  const whole = (x: number): number => {
    if (!Number.isInteger(x) || x > 8) throw new DomainError("n", x, "a whole number up to 8");
    return 10 * x;
  };
  expect(effectOf(whole, 4, 0.1)).toEqual({ below: { value: 30 }, above: { value: 50 }, elasticity: 1 });
  const edge = effectOf(whole, 8, 0.1);
  expect(edge.elasticity).toBe(1);
  expect(edge.above).toHaveProperty("thrown");
});
