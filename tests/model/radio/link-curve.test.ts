import fc from "fast-check";
import * as rate from "../../../src/model/radio/link-curve";
import { published, publishedValue, title } from "../../checks/published";
import reference from "../../fixtures/radio/coverage-and-loss.json";
import { relativeError } from "../../support/relative-error";

const TR_36942 = /^OF-S(1|3|7|8|9|11)$/;

describe("published values", () => {
  test.each(
    published("OF-S")
      .filter(({ id }) => TR_36942.test(id))
      .map((entry) => [title(entry), entry] as const),
  )("%s", (_, { inputs, expected, tolerance }) => {
    const { SINR_dB, alpha } = inputs as { SINR_dB: number; alpha: number };
    const maximum = alpha === 0.6 ? 4.4 : 2;
    expect(Math.abs(rate.attenuated(1, SINR_dB, alpha, -10, maximum) - expected)).toBeLessThanOrEqual(tolerance!);
  });

  test.each(["OF-S12", "OF-S13"].map((id) => [title(publishedValue(id)), publishedValue(id)] as const))(
    "%s",
    (_, { inputs, expected, tolerance }) => {
      const { alpha, Thr_max } = inputs as { alpha: number; Thr_max: number };
      const found = rate.requiredSinr(1, 1000 * Thr_max, alpha, -10, Thr_max);
      expect(Math.abs(found - expected)).toBeLessThanOrEqual(tolerance!);
    },
  );

  test(title(publishedValue("MD-01")), () => {
    // Eb/N0 = SINR / spectral efficiency, as that goes to 0.
    const bpsHz = 1e-12;
    const ebN0 = rate.requiredSinr(1, 1000 * bpsHz, 1, -1000, 1) - 10 * Math.log10(bpsHz);
    expect(Math.abs(ebN0 - publishedValue("MD-01").expected)).toBeLessThan(1e-10);
  });

  test(title(publishedValue("MD-02")), () => {
    const ebN0 = rate.requiredSinr(1, 2000, 1, -1000, 4) - 10 * Math.log10(2);
    expect(Math.abs(ebN0 - publishedValue("MD-02").expected)).toBeLessThan(publishedValue("MD-02").tolerance!);
  });

  test(title(publishedValue("MD-03")), () => {
    const { inputs, expected, tolerance } = publishedValue("MD-03");
    const { C_bps, B_Hz } = inputs as { C_bps: number; B_Hz: number };
    expect(Math.abs(rate.requiredSinr(B_Hz / 1e6, C_bps / 1e3, 1, -1000, 4.4) - expected)).toBeLessThan(tolerance!);
  });
});

describe("against 50 digits", () => {
  test("Shannon's bound, down to -100 dB", () => {
    for (const [args, expected] of reference.shannon as [[number, number], number][]) {
      expect(relativeError(rate.shannon(...args), expected)).toBeLessThan(1e-14);
    }
  });

  test("the SINR of a rate", () => {
    for (const [[w, r, a], expected] of reference.requiredSinr as [[number, number, number], number][]) {
      expect(relativeError(rate.requiredSinr(w, r, a, -1000, 100), expected)).toBeLessThan(1e-14);
    }
  });
});

describe("the link curve", () => {
  test("jumps at its minimum, which is served, and is flat from its maximum on", () => {
    expect(rate.attenuated(1, -10.000001)).toBe(0);
    expect(rate.attenuated(1, -10)).toBeCloseTo(0.0825, 4);
    expect(rate.attenuated(1, 22.05)).toBe(4.4);
    expect(rate.attenuated(20, 1000)).toBe(88);
  });

  test("lies below Shannon's bound for every attenuation up to 1, and never falls", () => {
    const db = fc.double({ min: -60, max: 60, noNaN: true });
    fc.assert(
      fc.property(db, fc.double({ min: 0.01, max: 1, noNaN: true }), (sinr, attenuation) => {
        const here = rate.attenuated(5, sinr, attenuation);
        expect(here).toBeLessThanOrEqual(rate.shannon(5, sinr));
        expect(rate.attenuated(5, sinr + 0.5, attenuation)).toBeGreaterThanOrEqual(here);
      }),
      { seed: 7 },
    );
  });

  test("rate and required SINR undo each other", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -9.9, max: 22, noNaN: true }),
        fc.double({ min: 0.01, max: 100, noNaN: true }),
        (sinr, w) => {
          const back = rate.requiredSinr(w, 1000 * rate.attenuated(w, sinr));
          expect(back).toBeCloseTo(sinr, 11);
        },
      ),
      { seed: 8 },
    );
  });

  test("a rate below that of the minimum needs the minimum", () => {
    expect(rate.requiredSinr(10, 1)).toBe(-10);
  });

  test("the maximum itself has an answer, anything above has none and the message says what was asked", () => {
    for (const w of [0.3, 1.4, 7, 19.8]) expect(rate.requiredSinr(w, w * 4.4 * 1000)).toBeCloseTo(22.0485, 4);
    expect(() => rate.requiredSinr(10, 44_001)).toThrow(
      "44001 kbit/s in 10 MHz needs 4.4001 bit/s/Hz, more than the maximum of 4.4.",
    );
  });

  test("far above any real link the inverse stays finite", () => {
    expect(rate.requiredSinr(1, 100_000, 0.01, -10, 100)).toBeCloseTo(10_000 * 10 * Math.log10(2), 6);
  });

  test.each([
    [() => rate.shannon(0, 3), "bandwidthMHz is 0; allowed: a bandwidth from 1E-9 to 1E+9 MHz."],
    [() => rate.shannon(1, NaN), "sinrDb is NaN"],
    [() => rate.attenuated(1, 3, 0), "attenuation is 0; allowed: a factor from 0.01 to 10."],
    [() => rate.attenuated(1, 3, 1, -1001), "minimumDb is -1001"],
    [() => rate.attenuated(1, 3, 1, -10, 0), "maximumBpsHz is 0"],
    [() => rate.requiredSinr(1, -5), "bitRateKbps is -5"],
  ])("bad input %# is named", (call, message) => {
    expect(call).toThrow(message);
  });
});
