import fc from "fast-check";
import * as normal from "../../../src/model/numerics/normal";
import * as pathLoss from "../../../src/model/radio/path-loss";
import * as shadowing from "../../../src/model/radio/shadowing";
import { publishedValue, title } from "../../checks/published";
import reference from "../../fixtures/radio/coverage-and-loss.json";
import { relativeError } from "../../support/relative-error";

const within = (id: string, value: number): void => {
  const { expected, tolerance } = publishedValue(id);
  expect(Math.abs(value - expected)).toBeLessThanOrEqual(tolerance!);
};
const inputsOf = (id: string): Record<string, number> => publishedValue(id).inputs as Record<string, number>;
const cases = (...ids: string[]): [string, string][] => ids.map((id) => [title(publishedValue(id)), id]);

describe("published values", () => {
  test.each(cases("CV-10", "CV-11", "CV-13", "CV-14", "CV-16", "CV-17", "CV-38"))("%s", (_, id) => {
    const { edge_probability, sigma_dB, exponent_n } = inputsOf(id);
    within(id, shadowing.area(edge_probability!, sigma_dB!, exponent_n!));
  });

  test.each(cases("CV-20e", "CV-21e", "CV-22e"))("%s", (_, id) => {
    const { area_probability, sigma_dB, exponent_n } = inputsOf(id);
    within(id, shadowing.edge(area_probability!, sigma_dB!, exponent_n!));
  });

  test.each(cases("CV-20m", "CV-21m", "CV-22m"))("%s", (_, id) => {
    const { area_probability, sigma_dB, exponent_n } = inputsOf(id);
    within(id, shadowing.margin(shadowing.edge(area_probability!, sigma_dB!, exponent_n!), sigma_dB!));
  });

  test.each(cases("CV-30", "CV-31", "CV-33"))("%s", (_, id) => {
    const { edge_probability, sigma_dB } = inputsOf(id);
    within(id, shadowing.margin(edge_probability!, sigma_dB!));
  });

  // A published probability of being above a threshold is the one whose margin is the distance to it.
  test.each(cases("CV-34"))("%s", (_, id) => {
    const { mean_dBm, threshold_dBm, sigma_dB } = inputsOf(id);
    expect(shadowing.margin(publishedValue(id).expected, sigma_dB!)).toBeCloseTo(mean_dBm! - threshold_dBm!, 8);
  });

  test.each(cases("CV-37"))("%s", (_, id) => {
    const { P_mean_dBm, threshold_dBm } = inputsOf(id);
    // The deviation in full precision is CV-36; the inputs of CV-37 round it to 6.16 dB.
    const deviation = publishedValue("CV-36").expected;
    expect(shadowing.margin(publishedValue(id).expected, deviation)).toBeCloseTo(P_mean_dBm! - threshold_dBm!, 8);
  });

  test.each(cases("CV-01"))("%s", (_, id) => {
    const { Pt_dBm, Pmin_dBm, K_dB, exponent, d_m, sigma_dB } = inputsOf(id);
    const margin = Pt_dBm! - pathLoss.logDistance(d_m! / 1000, -K_dB!, exponent!, 0.001) - Pmin_dBm!;
    expect(shadowing.margin(1 - publishedValue(id).expected, sigma_dB!)).toBeCloseTo(margin, 8);
  });

  test.each(cases("CV-02", "CV-03"))("%s", (_, id) => {
    const { Pt_dBm, Pmin_dBm, K_dB, exponent, R_m, sigma_dB } = inputsOf(id);
    const margin = Pt_dBm! - pathLoss.logDistance(R_m! / 1000, -K_dB!, exponent!, 0.001) - Pmin_dBm!;
    within(id, shadowing.area(normal.cdf(margin / sigma_dB!), sigma_dB!, exponent!));
  });
});

describe("area against the integral over the cell at 50 digits", () => {
  test("relative error below 1e-12, edge probabilities of 1e-200 included", () => {
    for (const [args, expected] of reference.area as [[number, number, number], number][]) {
      expect(relativeError(shadowing.area(...args), expected)).toBeLessThan(1e-12);
    }
  });
});

const probability = fc.double({ min: 1e-6, max: 1 - 1e-6, noNaN: true });
const deviation = fc.double({ min: 0.5, max: 20, noNaN: true });
const exponent = fc.double({ min: 1.5, max: 6, noNaN: true });

describe("order and limits", () => {
  test("the inverse goes back", () => {
    fc.assert(
      fc.property(probability, deviation, exponent, (p, s, n) => {
        const covered = shadowing.area(p, s, n);
        if (covered > 1 - 1e-9) return;
        expect(relativeError(shadowing.area(shadowing.edge(covered, s, n), s, n), covered)).toBeLessThan(1e-13);
      }),
      { seed: 1 },
    );
  });

  test("more is covered inside than at the edge; more with a better edge, a steeper loss, less shadowing", () => {
    fc.assert(
      fc.property(probability, deviation, exponent, (p, s, n) => {
        const covered = shadowing.area(p, s, n);
        expect(covered).toBeGreaterThanOrEqual(p);
        expect(covered).toBeLessThanOrEqual(1);
        expect(shadowing.area(Math.min(1 - 1e-7, p * 1.01), s, n)).toBeGreaterThanOrEqual(covered * (1 - 1e-15));
        expect(shadowing.area(p, s, 1.01 * n)).toBeGreaterThanOrEqual(covered * (1 - 1e-15));
        expect(shadowing.area(p, 1.01 * s, n)).toBeLessThanOrEqual(covered * (1 + 1e-15));
      }),
      { seed: 2 },
    );
  });

  test("without shadowing all is covered and no margin is needed", () => {
    expect(shadowing.area(0.5, 0, 3.5)).toBe(1);
    expect(shadowing.margin(0.99, 0)).toBe(0);
    expect(1 - shadowing.area(0.5, 1e-9, 3.5)).toBeCloseTo(0, 9);
  });

  test("with boundless shadowing inside is as the edge", () => {
    expect(shadowing.area(0.9, 100, 0.1)).toBeCloseTo(0.9, 3);
  });

  test("half the places at the edge need no margin, fewer need less than none", () => {
    expect(shadowing.margin(0.5, 8)).toBe(0);
    expect(shadowing.margin(0.25, 8)).toBeCloseTo(-shadowing.margin(0.75, 8), 12);
  });

  test("a covered share next to 1 has an edge probability below 1", () => {
    const edge = shadowing.edge(1 - 2 ** -53, 8, 4);
    expect(edge).toBeLessThan(1);
    expect(shadowing.margin(edge, 8)).toBeGreaterThan(60);
  });
});

test.each([
  [() => shadowing.margin(1, 8), "edgeProbability is 1; allowed: a probability above 0 and below 1."],
  [() => shadowing.margin(0.9, -1), "shadowingDb is -1; allowed: a standard deviation from 0 to 100 dB."],
  [() => shadowing.area(0.9, 8, 0), "pathLossExponent is 0"],
  [() => shadowing.edge(0.9, 0, 4), "shadowingDb is 0; allowed: a standard deviation above 0 and up to 100 dB."],
  [() => shadowing.edge(0.5, 0.1, 4), "leaves more than 0.5 of the area covered at any edge probability above 1e-300"],
])("bad input %# is named", (call, message) => {
  expect(call).toThrow(message);
});
