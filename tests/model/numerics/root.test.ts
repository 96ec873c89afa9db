import fc from "fast-check";
import { bracketAround, root, smallestWhole } from "../../../src/model/numerics/root";
import { relativeError } from "../../support/relative-error";

describe("root", () => {
  test.each([
    ["square root of 2", (x: number) => x * x - 2, 0, 2, Math.SQRT2],
    ["a flat triple root", (x: number) => (x - 1) ** 3, -7, 4, 1],
    ["a steep exponential", (x: number) => Math.exp(x) - 1e300, 0, 709, Math.log(1e300)],
    ["a tiny root", (x: number) => x - 1e-200, 0, 1, 1e-200],
    ["a root at an end", (x: number) => x, 0, 1, 0],
  ])("finds %s", (_, f, low, high, expected) => {
    expect(Math.abs(root(f, low, high) - expected)).toBeLessThanOrEqual(4 * 2 ** -52 * Math.abs(expected));
  });

  test("handles a jump by closing in on it", () => {
    expect(root((x) => (x < 1 / 3 ? -1 : 1), 0, 1)).toBeCloseTo(1 / 3, 15);
  });

  test("refuses ends with one sign", () => {
    expect(() => root((x) => x * x + 1, -1, 1)).toThrow(RangeError);
  });

  test("takes few steps on a smooth function", () => {
    let calls = 0;
    root((x) => (calls++, Math.log(x) - 3), 1, 1000);
    expect(calls).toBeLessThan(20);
  });
});

describe("bracketAround", () => {
  test("finds a change of sign far from the guess, on either side", () => {
    for (const at of [1e-250, 3e-5, 0.99, 1.01, 7e8, 1e250]) {
      const bracket = bracketAround((x) => Math.log(x / at), 1, 0, Number.MAX_VALUE)!;
      expect(bracket.low).toBeLessThanOrEqual(at);
      expect(bracket.high).toBeGreaterThanOrEqual(at);
    }
  });

  test("answers undefined where there is none in the domain", () => {
    expect(bracketAround((x) => x + 1, 5, 1, 100)).toBeUndefined();
  });
});

describe("smallestWhole", () => {
  test("finds the first number from any guess, in few looks", () => {
    fc.assert(
      fc.property(fc.nat(1e9), fc.nat(1e9), (answer, guess) => {
        let looks = 0;
        const found = smallestWhole((n) => (looks++, n >= answer), 0, 1e9, guess);
        expect(found).toBe(answer);
        expect(looks).toBeLessThan(2 * Math.log2(Math.abs(answer - guess) + 2) + 4);
      }),
      { seed: 3 },
    );
  });

  test("answers undefined where the condition never holds", () => {
    expect(smallestWhole(() => false, 0, 10)).toBeUndefined();
    expect(smallestWhole(() => false, 0, 10, 10)).toBeUndefined();
    expect(
      relativeError(
        smallestWhole(() => true, 4, 10, 9)!,
        4,
      ),
    ).toBe(0);
  });
});
