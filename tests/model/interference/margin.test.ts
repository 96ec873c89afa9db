import fc from "fast-check";
import { NoAnswerError } from "../../../src/model/errors";
import * as margin from "../../../src/model/interference/margin";
import * as sinr from "../../../src/model/interference/sinr";
import { published, title } from "../../checks/published";
import { relativeError } from "../../support/relative-error";

test.each(published("CD-21", "CD-22", "CD-23", "CD-71").map((entry) => [title(entry), entry] as const))(
  "%s",
  (_, { inputs, expected, tolerance }) => {
    expect(Math.abs(margin.fromLoad(inputs["load"] as number) - expected)).toBeLessThanOrEqual(tolerance!);
  },
);

test.each(published("CD-24", "CD-76").map((entry) => [title(entry), entry] as const))(
  "%s",
  (_, { inputs, expected, tolerance }) => {
    expect(Math.abs(margin.toLoad(inputs["noise_rise_dB"] as number) - expected)).toBeLessThanOrEqual(tolerance!);
  },
);

test("load and margin undo each other", () => {
  fc.assert(
    fc.property(fc.double({ min: 1e-300, max: 0.9999, noNaN: true }), (load) => {
      expect(relativeError(margin.toLoad(margin.fromLoad(load)), load)).toBeLessThan(1e-14);
    }),
    { seed: 1 },
  );
  expect(margin.fromLoad(0)).toBe(0);
  expect(margin.toLoad(0)).toBe(0);
});

test("at the pole and above there is no margin, and the message says so", () => {
  expect(() => margin.fromLoad(1)).toThrow(NoAnswerError);
  expect(() => margin.fromLoad(1.3)).toThrow("A load of 1.3 is at or above the pole capacity (1): no margin suffices.");
  expect(() => margin.fromLoad(-0.1)).toThrow("load is -0.1; allowed: a number of at least 0.");
});

test("interference as strong as noise is 3.0103 dB; far below it the rise is nearly I/N", () => {
  expect(margin.fromPowers(-100, -100)).toBeCloseTo(10 * Math.log10(2), 14);
  expect(relativeError(margin.fromPowers(-300, -100), 1e-19 / Math.LN10)).toBeLessThan(1e-14);
  expect(margin.fromPowers(1000, -1000)).toBe(2000);
});

describe("neighbour load", () => {
  test("is what noise must give way so that noise and interference together leave the required SINR", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -10, max: 10, noNaN: true }),
        fc.double({ min: 11, max: 30, noNaN: true }),
        fc.double({ min: 0.01, max: 1, noNaN: true }),
        (required, sir, load) => {
          const rise = margin.neighbourLoad(required, sir, load);
          const noiseDbm = -(required + rise);
          const interferenceDbm = -sir + 10 * Math.log10(load);
          expect(sinr.fromPowers(0, [interferenceDbm], noiseDbm)).toBeCloseTo(required, 10);
        },
      ),
      { seed: 2 },
    );
  });

  test("idle neighbours ask for no margin", () => expect(margin.neighbourLoad(10, 5, 0)).toBe(0));

  test("interference that takes everything has no answer", () => {
    expect(() => margin.neighbourLoad(5, 5, 1)).toThrow(NoAnswerError);
    expect(() => margin.neighbourLoad(10, 5, 0.5)).toThrow(
      "At load 0.5 the neighbours alone leave 8.0103 dB at the edge, not above the required 10 dB: no margin suffices.",
    );
  });
});
