import fc from "fast-check";
import { forecastFit } from "../../../functions/forecast";
import { DomainError, NoAnswerError } from "../../../src/model/errors";
import { centralQuantile } from "../../../src/model/numerics/student-t";
import { fit, fitted, type FitModel } from "../../../src/model/traffic/fit";
import * as forecast from "../../../src/model/traffic/forecast";
import type { CellError } from "../../../src/sheet/cell-error";
import reference from "../../fixtures/traffic/fit.json";
import { publishedValue, title } from "../../checks/published";
import { relativeError } from "../../support/relative-error";
import { SeededRandom } from "../../support/seeded-random";

const years = (count: number, from = 0): number[] => Array.from({ length: count }, (_, i) => from + i);

test.each(reference.students)("Student: coverage $coverage, freedom $freedom", ({ coverage, freedom, quantile }) => {
  expect(relativeError(centralQuantile(coverage, freedom), Number(quantile))).toBeLessThan(1e-12);
});

const cases = reference.fits.map((entry, i) => [`${entry.model} ${i}`, entry] as const);
test.each(cases)("level and band agree with 50-digit arithmetic: %s", (_, entry) => {
  const model = entry.model as FitModel;
  entry.targets.forEach((target, k) => {
    const answer = fit(entry.times, entry.observed, model, target, entry.confidence);
    answer.forEach((value, j) => {
      const expected = Math.max(0, Number(entry.answers[k]![j]));
      if (expected === 0) expect(value).toBe(0);
      else expect(relativeError(value, expected)).toBeLessThan(1e-10);
    });
  });
});

const growthOf = publishedValue("FC-35");
test(title(growthOf), () => {
  const { t, y, t_forecast } = growthOf.inputs as unknown as { t: number[]; y: number[]; t_forecast: number };
  const [level] = fit(t, y, "compound", t_forecast);
  expect(Math.abs(level - growthOf.expected)).toBeLessThanOrEqual(growthOf.tolerance!);
});

describe("a series without scatter gives back its parameters", () => {
  const check = (
    times: number[],
    at: (t: number) => number,
    model: FitModel,
    expected: Record<string, number>,
  ): void => {
    const { parameters } = fitted(times, times.map(at), model).curve;
    for (const [name, value] of Object.entries(expected)) {
      expect([name, relativeError(parameters[name]!, value) < 1e-6]).toEqual([name, true]);
    }
  };
  test("logistic", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1, max: 1e9, noNaN: true }),
        fc.double({ min: 2021, max: 2034, noNaN: true }),
        fc.double({ min: 0.25, max: 2, noNaN: true }),
        (saturation, midpoint, steepness) => {
          const at = (t: number): number => forecast.logistic(saturation, midpoint, steepness, t);
          check(years(12, 2020), at, "logistic", { saturation, midpoint, steepness });
        },
      ),
      { seed: 31, numRuns: 60 },
    );
  });
  test("gompertz", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1, max: 1e9, noNaN: true }),
        fc.double({ min: 1, max: 20, noNaN: true }),
        fc.double({ min: 0.1, max: 1, noNaN: true }),
        (saturation, displacement, rate) => {
          const at = (t: number): number => forecast.gompertz(saturation, displacement, rate, t);
          check(years(12), at, "gompertz", { saturation, displacement, rate });
        },
      ),
      { seed: 32, numRuns: 60 },
    );
  });
  test("bass", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1, max: 1e9, noNaN: true }),
        fc.double({ min: 0.001, max: 0.1, noNaN: true }),
        fc.double({ min: 0.1, max: 0.8, noNaN: true }),
        (market, innovation, imitation) => {
          const at = (t: number): number => forecast.bass(market, innovation, imitation, t);
          check(years(12, 1), at, "bass", { market, innovation, imitation });
        },
      ),
      { seed: 33, numRuns: 60 },
    );
  });
  test("linear and compound; the band has no width", () => {
    check(years(5, 2025), (t) => 3 * (t - 2025) + 7, "linear", { slope: 3 });
    check(years(5), (t) => 100 * 1.07 ** t, "compound", { start: 100, growthPerYear: 0.07 });
    const [level, low, high] = fit([0, 1, 2, 3], [10, 20, 40, 80], "compound", 5);
    expect(relativeError(level, 320)).toBeLessThan(1e-13);
    expect(relativeError(low, high)).toBeLessThan(1e-13);
  });
});

test("80 % bands hold about 80 % of future observations", () => {
  const random = new SeededRandom(5);
  const times = years(14, 2015);
  let held = 0;
  const runs = 300;
  for (let run = 0; run < runs; run++) {
    const noisy = (t: number): number => forecast.logistic(500, 2021, 0.6, t) + 8 * random.normal();
    const [, low, high] = fit(
      times,
      times.map((t) => Math.max(0, noisy(t))),
      "logistic",
      2030,
    );
    const future = noisy(2030);
    if (future >= low && future <= high) held++;
  }
  // Three standard deviations of a binomial share.
  expect(Math.abs(held / runs - 0.8)).toBeLessThan(3 * Math.sqrt(0.16 / runs));
});

describe("honest refusal", () => {
  const refuse = (times: number[], observed: number[], model: FitModel): string => {
    try {
      fit(times, observed, model, 20);
    } catch (error) {
      if (error instanceof NoAnswerError) return error.message;
      throw error;
    }
    return "answered";
  };
  test("too few observations, or too few different times", () => {
    expect(refuse([1, 2, 3], [1, 2, 4], "logistic")).toMatch(/3 observations cannot support the 3 parameters/);
    expect(refuse([1, 2], [1, 2], "linear")).toMatch(/at least 3/);
    expect(refuse([1, 1, 2, 2, 2], [1, 2, 3, 4, 5], "gompertz")).toMatch(/2 different times/);
  });
  test.each<FitModel>(["logistic", "gompertz", "bass"])("%s: no curvature", (model) => {
    expect(
      refuse(
        years(10),
        years(10).map((t) => 100 + 3 * t),
        model,
      ),
    ).toMatch(/do not bend/);
    expect(
      refuse(
        years(10),
        years(10).map(() => 100),
        model,
      ),
    ).toMatch(/do not bend/);
    expect(
      refuse(
        years(10),
        years(10).map((t) => 100 * 1.3 ** t),
        model,
      ),
    ).toMatch(/do not bend|no saturation/);
    expect(
      refuse(
        years(10),
        years(10).map(() => 0),
        model,
      ),
    ).toMatch(/All observations are 0/);
  });
  test("growth that scatter hides", () => {
    const random = new SeededRandom(8);
    const noise = years(15).map(() => 100 + 10 * random.normal());
    expect(refuse(years(15), noise, "logistic")).toMatch(/scatter|do not bend|no saturation/);
  });
  test("a saturation that the series does not reach, with its standard error", () => {
    const early = [10, 13.2, 16.7, 22.1, 28.5, 36, 47.2, 60.1];
    expect(refuse(years(8), early, "logistic")).toMatch(/no saturation: .* standard error of|do not bend/);
  });
});

test("outside the domain", () => {
  expect(() => fit([1, 2, 3], [1, 0, 3], "compound", 4)).toThrow(DomainError);
  expect(() => fit([2020, 2021, 2022, 2023], [1, 2, 3, 4], "bass", 2030)).toThrow(DomainError);
  expect(() => fit([1, 2, 3], [1, 2], "linear", 4)).toThrow(DomainError);
  expect(() => fit([1, 2, 3], [1, 2, 3], "cubic" as FitModel, 4)).toThrow(DomainError);
  expect(() => fit(years(1001), years(1001), "linear", 4)).toThrow(/at most 1000/);
});

describe("as a worksheet function", () => {
  const column = (values: (number | string)[]): unknown[][] => values.map((value) => [value]);
  const [times, observed] = [column([0, 1, 2, 3, 4]), column([100, 112, 125, 141, 158])];
  test("a row of three for each target, blank targets stay blank, headings on request", () => {
    const table = forecastFit(times, observed, [["compound"]], column([5, "", 7]), undefined, [[true]]);
    expect(table[0]).toEqual(["level", "low", "high"]);
    expect(table[1]).toEqual(fit([0, 1, 2, 3, 4], [100, 112, 125, 141, 158], "compound", 5));
    expect(table[2]).toEqual(["", "", ""]);
    expect(table[3]![0]).toBeCloseTo(222.566, 3);
  });
  test("a curve that the series does not support is #N/A with the reason", () => {
    const cell = forecastFit(times, column([1, 2, 3, 4, 5]), [["logistic"]], [[6]])[0]![0] as CellError;
    expect(cell.code).toBe("#N/A");
    expect(cell.message).toMatch(/do not bend/);
  });
});

test("any series gives a band around its level, or a reason", () => {
  const level = fc.oneof(
    fc.double({ min: 0, max: 1000, noNaN: true }),
    fc.double({ min: 0, max: 1e15, noNaN: true }),
    fc.constantFrom(0, 1e-300, 1, 1e15),
  );
  const at = fc.oneof(fc.integer({ min: 0, max: 30 }), fc.double({ min: 0, max: 1000, noNaN: true }));
  let answered = 0;
  fc.assert(
    fc.property(
      fc.array(fc.tuple(at, level), { minLength: 3, maxLength: 12 }),
      fc.constantFrom<FitModel>("linear", "compound", "logistic", "gompertz", "bass"),
      at,
      (points, model, target) => {
        try {
          const sorted = points.map(([, y]) => y).sort((a, b) => a - b);
          const answer = fit(
            points.map(([t]) => t),
            sorted,
            model,
            target,
          );
          answered++;
          expect(answer.every((value) => Number.isFinite(value) && value >= 0)).toBe(true);
          expect(answer[1]).toBeLessThanOrEqual(answer[0]);
          expect(answer[2]).toBeGreaterThanOrEqual(answer[0]);
        } catch (error) {
          if (!(error instanceof NoAnswerError || error instanceof DomainError)) throw error;
        }
      },
    ),
    { seed: 34, numRuns: 400 },
  );
  expect(answered).toBeGreaterThan(100);
});
