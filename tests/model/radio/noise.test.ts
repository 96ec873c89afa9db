import fc from "fast-check";
import { DomainError } from "../../../src/model/errors";
import * as noise from "../../../src/model/radio/noise";
import { published, publishedValue, title } from "../../checks/published";

/** Printed with k = 1.38e-23; the sources' own constant is 0.002 dB below the exact one. */
const ROUNDED_BOLTZMANN_DB = 10 * Math.log10(1.38e-23 / 1.380649e-23);

function within(entry: { expected: number; tolerance?: number }, actual: number): void {
  expect(Math.abs(actual - entry.expected)).toBeLessThanOrEqual(entry.tolerance!);
}

describe("noise floor beside published values", () => {
  const floors = published("LB-0", "LB-1").filter(({ inputs }) => "B_Hz" in inputs && "T_K" in inputs);
  test("the list is the expected one", () => {
    expect(floors.map(({ id }) => id)).toEqual(
      ["04", "05", "06", "08", "09", "10", "11", "12", "14"].map((number) => `LB-${number}`),
    );
  });
  test.each(floors.map((entry) => [title(entry), entry] as const))("%s", (_, entry) => {
    const { B_Hz, NF_dB, T_K } = entry.inputs as Record<string, number>;
    within(entry, noise.floor(B_Hz! / 1e6, NF_dB ?? 0, T_K));
  });

  test(title(publishedValue("LB-01")), () => within(publishedValue("LB-01"), noise.floor(1e-6, 0) - 30));
  test(title(publishedValue("LB-02")), () => within(publishedValue("LB-02"), noise.floor(1e-6, 0)));
  test(title(publishedValue("LB-03")), () => within(publishedValue("LB-03"), noise.floor(1e-6, 0, 293)));

  test(title(publishedValue("LB-18")), () => {
    const { expected } = publishedValue("LB-18");
    const { NF_dB, T0_K } = publishedValue("LB-18").inputs as Record<string, number>;
    // A noise figure is that much temperature more at the input.
    expect(noise.floor(1, NF_dB!, T0_K)).toBeCloseTo(noise.floor(1, 0, T0_K! + expected), 9);
  });

  test(title(publishedValue("LB-17")), () => {
    const entry = publishedValue("LB-17");
    const { F_linear, T0_K, Tant_K, B_Hz } = entry.inputs as Record<string, number>;
    // The source adds the noise temperature of the antenna to that of the receiver: T0 (F - 1) over 290 K is a figure again.
    const total = 1 + (Tant_K! + (F_linear! - 1) * T0_K!) / T0_K!;
    within(entry, noise.floor(B_Hz! / 1e6, 10 * Math.log10(total), T0_K) + ROUNDED_BOLTZMANN_DB);
  });

  test(title(publishedValue("LB-21")), () => {
    const entry = publishedValue("LB-21");
    const { B_Hz, NF_dB } = entry.inputs as Record<string, number>;
    const received = publishedValue("LB-20").expected;
    within(entry, received - noise.floor(B_Hz! / 1e6, NF_dB!) - ROUNDED_BOLTZMANN_DB);
  });
});

describe("cascade", () => {
  test.each(published("LB-15", "LB-16").map((entry) => [title(entry), entry] as const))("%s", (_, entry) => {
    const stages = entry.inputs["stages"] as unknown as { NF_dB: number; G_dB: number }[];
    within(
      entry,
      noise.cascade(
        stages.map(({ G_dB }) => G_dB),
        stages.map(({ NF_dB }) => NF_dB),
      ),
    );
  });

  test("a loss before the receiver adds its full value", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 60, noNaN: true }),
        fc.double({ min: 0, max: 20, noNaN: true }),
        (loss, nf) => {
          expect(noise.cascade([-loss, 0], [loss, nf])).toBeCloseTo(loss + nf, 10);
        },
      ),
      { seed: 1 },
    );
  });

  test("noiseless stages have no noise figure, and the gain of the last stage does not matter", () => {
    expect(noise.cascade([10, 20], [0, 0])).toBe(0);
    expect(noise.cascade([10, -900], [1, 2])).toBe(noise.cascade([10, 900], [1, 2]));
  });

  test("a chain of losses beyond the range of a double stays finite", () => {
    expect(noise.cascade([-1000, -1000, -1000, -1000, 0], [1, 1, 1, 1, 1])).toBeCloseTo(3994.132, 3);
  });
});

test("errors name the parameter", () => {
  expect(() => noise.floor(0, 5)).toThrow("bandwidthMHz is 0; allowed: a number above 0.");
  expect(() => noise.floor(1, -1)).toThrow("noiseFigureDb is -1; allowed: a noise figure from 0 to 1000 dB.");
  expect(() => noise.floor(1, 5, 0)).toThrow("temperatureK is 0");
  expect(() => noise.cascade([1], [1, 2])).toThrow(DomainError);
  expect(() => noise.cascade([], [])).toThrow(DomainError);
});

test("the widest inputs give a number", () => {
  expect(noise.floor(Number.MAX_VALUE, 1000, Number.MAX_VALUE)).toBeLessThan(1e4);
  expect(noise.floor(Number.MIN_VALUE, 0, 1e-290)).toBeGreaterThan(-1e4);
});
