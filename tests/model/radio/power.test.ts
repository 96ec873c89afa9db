import fc from "fast-check";
import { DomainError } from "../../../src/model/errors";
import { decibelOfOnePlus, decibelSum, ratioMinusOne } from "../../../src/model/numerics/decibel-sum";
import * as power from "../../../src/model/radio/power";
import { relativeError } from "../../support/relative-error";

const level = fc.double({ min: -1000, max: 1000, noNaN: true });

describe("sum of powers", () => {
  test("a single power comes back unchanged", () => {
    fc.assert(
      fc.property(level, (x) => expect(power.sum([x]) === x).toBe(true)),
      { seed: 1 },
    );
  });

  test("two equal powers add 3.0103 dB, ten add 10 dB", () => {
    expect(power.sum([-100, -100]) + 100).toBeCloseTo(10 * Math.log10(2), 12);
    expect(power.sum(new Array<number>(10).fill(30))).toBeCloseTo(40, 12);
  });

  test("the order does not matter and a further power never lowers the sum", () => {
    fc.assert(
      fc.property(fc.array(level, { minLength: 1, maxLength: 8 }), level, (levels, more) => {
        const sum = power.sum(levels);
        expect(Math.abs(power.sum([...levels].reverse()) - sum)).toBeLessThan(1e-12);
        expect(power.sum([...levels, more])).toBeGreaterThanOrEqual(sum);
      }),
      { seed: 2 },
    );
  });

  test("the widest levels stay finite", () => {
    expect(power.sum([1000, -1000])).toBe(1000);
    expect(power.sum([-1000, -1000])).toBeCloseTo(-996.9897, 4);
  });

  test("no powers, or one outside the domain, is an error that names the parameter", () => {
    expect(() => power.sum([])).toThrow(DomainError);
    expect(() => power.sum([0, 1001])).toThrow("powersDbm is 1001; allowed: a decibel value from -1000 to 1000.");
  });

  test("no power at all is minus infinity for those who add it up inside the model", () => {
    expect(decibelSum([])).toBe(-Infinity);
    expect(decibelSum([-Infinity, -3])).toBe(-3);
  });
});

test("decibel and ratio undo each other", () => {
  fc.assert(
    fc.property(level, (x) => {
      expect(Math.abs(power.db(power.ratio(x)) - x)).toBeLessThan(1e-12 * Math.max(1, Math.abs(x)));
    }),
    { seed: 3 },
  );
});

test("small shares keep their digits", () => {
  expect(relativeError(decibelOfOnePlus(1e-20), 1e-19 / Math.LN10)).toBeLessThan(1e-15);
  expect(relativeError(ratioMinusOne(1e-20), 1e-21 * Math.LN10)).toBeLessThan(1e-15);
});

test("a ratio of 0 or below is refused", () => {
  expect(() => power.db(0)).toThrow(DomainError);
  expect(() => power.db(-1)).toThrow(DomainError);
  expect(() => power.ratio(1001)).toThrow(DomainError);
});
