import fc from "fast-check";
import { integrate, integrateAdaptively, legendre } from "../../../src/model/numerics/quadrature";
import { relativeError } from "../../support/relative-error";

describe("legendre", () => {
  test("has the nodes and weights of 5 points in closed form (DLMF 3.5, table 3.5.2)", () => {
    const { nodes, weights } = legendre(5);
    const outer = Math.sqrt(5 + 2 * Math.sqrt(10 / 7)) / 3;
    const inner = Math.sqrt(5 - 2 * Math.sqrt(10 / 7)) / 3;
    [-outer, -inner, 0, inner, outer].forEach((x, i) => expect(nodes[i]).toBeCloseTo(x, 15));
    const small = (322 - 13 * Math.sqrt(70)) / 900;
    const large = (322 + 13 * Math.sqrt(70)) / 900;
    [small, large, 128 / 225, large, small].forEach((w, i) => expect(weights[i]).toBeCloseTo(w, 14));
  });

  test.each([1, 2, 3, 8, 17, 40, 200])("%d points integrate every even power they should", (points) => {
    for (let degree = 0; degree <= 2 * points - 1; degree += 2) {
      expect(
        relativeError(
          integrate((x) => x ** degree, -1, 1, points),
          2 / (degree + 1),
        ),
      ).toBeLessThan(1e-12);
    }
  });
});

describe("integrateAdaptively", () => {
  test.each([
    ["a smooth function", Math.exp, 0, 1, Math.E - 1],
    ["a kink", (x: number) => Math.abs(x - 1 / 3), 0, 1, 5 / 18],
    ["a jump", (x: number) => (x < 0.1 ? 1 : 3), 0, 1, 2.8],
    ["an infinite slope at the end", Math.sqrt, 0, 1, 2 / 3],
    ["a narrow peak", (x: number) => 1e-4 / ((x - 0.3) ** 2 + 1e-8), 0, 1, Math.atan(7000) + Math.atan(3000)],
  ])("%s", (_, f, low, high, expected) => {
    expect(relativeError(integrateAdaptively(f, low, high), expected)).toBeLessThan(1e-12);
  });

  test("changing the direction changes the sign, and an empty interval is 0", () => {
    fc.assert(
      fc.property(fc.double({ min: -5, max: 5, noNaN: true }), fc.double({ min: -5, max: 5, noNaN: true }), (a, b) => {
        expect(integrateAdaptively(Math.cos, a, b)).toBeCloseTo(Math.sin(b) - Math.sin(a), 12);
        expect(integrateAdaptively(Math.cos, a, a)).toBe(0);
      }),
      { seed: 5 },
    );
  });

  test("stops at the bound of its work", () => {
    let calls = 0;
    integrateAdaptively((x) => (calls++, Math.sin(1 / x)), 1e-9, 1, 1e-15, 50);
    expect(calls).toBeLessThanOrEqual(15 * 100);
  });
});
