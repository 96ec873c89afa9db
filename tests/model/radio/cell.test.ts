import fc from "fast-check";
import * as cell from "../../../src/model/radio/cell";
import reference from "../../fixtures/radio/coverage-and-loss.json";
import { relativeError } from "../../support/relative-error";

const radius = fc.double({ min: 1e-3, max: 1e3, noNaN: true });
const sectors = fc.constantFrom(1, 2, 3, 6);

describe("area of a site", () => {
  test("hexagon, half a hexagon, three smaller hexagons", () => {
    expect(cell.area(1)).toBeCloseTo(2.598076211353316, 15);
    expect(cell.area(1, 6)).toBe(cell.area(1));
    expect(cell.area(1, 2)).toBe(cell.area(1) / 2);
    // The sector's reach is the longest diagonal of its own hexagon: three of corner radius R/2.
    expect(relativeError(cell.area(1, 3), 3 * cell.area(0.5))).toBeLessThan(1e-15);
    expect(cell.area(1, 3)).toBeCloseTo((9 * Math.sqrt(3)) / 8, 14);
  });

  test("twice the radius is four times the area", () => {
    fc.assert(
      fc.property(radius, sectors, (r, s) => expect(cell.area(2 * r, s)).toBe(4 * cell.area(r, s))),
      { seed: 1 },
    );
  });
});

describe("sites", () => {
  test("cover the area, and one fewer would not", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-3, max: 1e6, noNaN: true }), radius, sectors, (area, r, s) => {
        const sites = cell.sites(area, r, s);
        expect(sites * cell.area(r, s)).toBeGreaterThanOrEqual(area);
        expect((sites - 1) * cell.area(r, s)).toBeLessThan(area);
      }),
      { seed: 2 },
    );
  });

  test("an area of n sites takes n sites, whatever the rounding of the product", () => {
    for (let n = 1; n <= 200; n++) {
      for (const r of [0.1, 0.3, 1.7, 12.3]) expect(cell.sites(n * cell.area(r, 3), r, 3)).toBe(n);
    }
  });

  test("numbers beyond counting have a message", () => {
    expect(() => cell.sites(1e300, 1)).toThrow("1e+300 km2 needs more sites of 1 km than can be counted.");
  });
});

describe("breathing", () => {
  test("against 50 digits", () => {
    for (const [args, expected] of reference.breathing as [[number, number, number], number][]) {
      expect(relativeError(cell.breathing(...args), expected)).toBeLessThan(1e-14);
    }
  });

  test("no load leaves the radius, half load takes 3 dB of path loss", () => {
    expect(cell.breathing(3, 0, 3.5)).toBe(3);
    expect(10 * 3.5 * Math.log10(3 / cell.breathing(3, 0.5, 3.5))).toBeCloseTo(10 * Math.log10(2), 12);
  });
});

test.each([
  [() => cell.area(0), "radiusKm is 0; allowed: a radius above 0 and up to 100 000 km."],
  [() => cell.area(1, 4), "sectors is 4; allowed: 1, 2, 3 or 6 sectors."],
  [() => cell.sites(0, 1), "areaKm2 is 0"],
  [() => cell.breathing(1, 1, 3), "load is 1; allowed: a share from 0 to below 1."],
  [() => cell.breathing(1, 0.5, 0), "pathLossExponent is 0"],
])("bad input %# is named", (call, message) => {
  expect(call).toThrow(message);
});
