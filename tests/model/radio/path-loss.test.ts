import fc from "fast-check";
import * as pathLoss from "../../../src/model/radio/path-loss";
import * as range from "../../../src/model/radio/range";
import { publishedValue, title } from "../../checks/published";
import reference from "../../fixtures/radio/coverage-and-loss.json";
import { relativeError } from "../../support/relative-error";

const within = (id: string, value: number): void => {
  const { expected, tolerance } = publishedValue(id);
  expect(Math.abs(value - expected)).toBeLessThanOrEqual(tolerance!);
};
const inputsOf = (id: string): Record<string, number> => publishedValue(id).inputs as Record<string, number>;
const cases = (...ids: string[]): [string, string][] => ids.map((id) => [title(publishedValue(id)), id]);

/** Published with c = 3e8 m/s, ours with the exact value. */
const ROUND_SPEED_DB = 20 * Math.log10(3e8 / 299792458);

describe("published values", () => {
  test.each(cases("PL-02"))("%s", (_, id) => {
    const { d_km, f_MHz } = inputsOf(id);
    within(id, pathLoss.freeSpace(d_km!, f_MHz!) - ROUND_SPEED_DB);
  });

  test.each(cases("PL-03"))("%s", (_, id) => {
    const { d_km, f_MHz, constant_dB } = inputsOf(id);
    const exactConstant = 20 * Math.log10((4 * Math.PI * 1e9) / 299792458);
    within(id, pathLoss.freeSpace(d_km!, f_MHz!) - exactConstant + constant_dB!);
  });

  test.each(cases("PL-05"))("%s", (_, id) => {
    const { Pt_W, f_Hz, d_m } = inputsOf(id);
    within(id, 10 * Math.log10(Pt_W! * 1000) - pathLoss.freeSpace(d_m! / 1000, f_Hz! / 1e6) + ROUND_SPEED_DB);
  });

  test.each(cases("LB-20"))("%s", (_, id) => {
    const { Pt_dBW, Gt_dBi, Gr_dBi, losses_dB, lambda_m, d_m } = inputsOf(id);
    const loss = pathLoss.freeSpace(d_m! / 1000, 299.792458 / lambda_m!);
    within(id, Pt_dBW! + 30 + Gt_dBi! + Gr_dBi! - losses_dB! - loss);
  });

  test.each([
    ...cases("PL-10", "PL-11", "PL-12", "PL-13").map(([name, id]) => [name, id, "urban"] as const),
    ...cases("PL-16").map(([name, id]) => [name, id, "suburban"] as const),
    ...cases("PL-17").map(([name, id]) => [name, id, "open"] as const),
    ...cases("PL-18").map(([name, id]) => [name, id, "large city"] as const),
  ])("%s", (_, id, environment) => {
    const { d_km, f_MHz, hb_m, hm_m } = inputsOf(id);
    within(id, pathLoss.hata(d_km!, f_MHz!, hb_m!, hm_m!, environment));
  });

  test.each(cases("PL-21"))("%s", (_, id) => {
    const { d_km, f_MHz, hb_m, hm_m } = inputsOf(id);
    within(id, pathLoss.cost231(d_km!, f_MHz!, hb_m!, hm_m!, "metropolitan"));
  });

  // The macro model of TR 36.942 is a log-distance law with 37.6 dB a decade at 15 m above the roofs.
  test.each(cases("PL-27"))("%s", (_, id) => {
    within(id, pathLoss.logDistance(inputsOf(id).R_km!, publishedValue("PL-25").expected, 3.76));
  });

  test.each([
    ...cases("PL-30", "PL-31").map(([name, id]) => [name, id, "uma", "los"] as const),
    ...cases("PL-32").map(([name, id]) => [name, id, "uma", "nlos"] as const),
    ...cases("PL-33").map(([name, id]) => [name, id, "umi", "los"] as const),
    ...cases("PL-35").map(([name, id]) => [name, id, "umi", "nlos"] as const),
    ...cases("PL-37").map(([name, id]) => [name, id, "rma", "los"] as const),
    ...cases("PL-38").map(([name, id]) => [name, id, "rma", "nlos"] as const),
  ])("%s", (_, id, model, sight) => {
    const { d2D_m, fc_GHz, hBS_m, hUT_m } = inputsOf(id);
    within(id, pathLoss[model](d2D_m! / 1000, fc_GHz! * 1000, hBS_m!, hUT_m!, sight));
  });

  test.each(cases("PL-46"))("%s", (_, id) => {
    const { L_ref_dB, d_ref_m, n1, n2, d_bp_m, d_m } = inputsOf(id);
    const atBreakpoint = pathLoss.logDistance(d_bp_m!, L_ref_dB!, n1!, d_ref_m);
    within(id, pathLoss.logDistance(d_m!, atBreakpoint, n2!, d_bp_m));
  });

  test.each(cases("LB-26"))("%s", (_, id) => {
    within(id, range.logDistance(inputsOf(id).Lp_dB!, 133.2, 3.38));
  });

  test.each(cases("CV-39"))("%s", (_, id) => {
    const { Pt_dBm, SNR_dB, N_dBm, L_d0_dB, floor_loss_dB, shadow_dB, exponent } = inputsOf(id);
    const loss = Pt_dBm! - (N_dBm! + SNR_dB!) - floor_loss_dB! - shadow_dB!;
    within(id, range.logDistance(loss, L_d0_dB!, exponent!, 1));
  });
});

describe("against 50 digits", () => {
  test.each(["freeSpace", "hata", "cost231", "uma", "umi", "rma"] as const)("%s", (model) => {
    for (const [args, expected] of reference[model] as [[number, number, number, number, string], number][]) {
      expect(relativeError(pathLoss[model](...args), expected)).toBeLessThan(1e-14);
    }
  });
});

describe("range is the inverse of loss over the whole range of the model", () => {
  test.each(["hata", "cost231", "uma", "umi", "rma"] as const)("%s", (model) => {
    for (const [[distance, ...rest]] of reference[model] as [[number, number, number, number, string], number][]) {
      expect(relativeError(range[model](pathLoss[model](distance, ...rest), ...rest), distance)).toBeLessThan(1e-12);
    }
  });

  test("free space and log-distance, over 20 orders of magnitude", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -3, max: 8.9, noNaN: true }),
        fc.double({ min: 1.5, max: 6, noNaN: true }),
        (log, exponent) => {
          const distance = 10 ** log;
          expect(relativeError(range.freeSpace(pathLoss.freeSpace(distance, 900), 900), distance)).toBeLessThan(1e-13);
          const loss = pathLoss.logDistance(distance, 128.1, exponent);
          expect(relativeError(range.logDistance(loss, 128.1, exponent), distance)).toBeLessThan(1e-12);
        },
      ),
      { seed: 2 },
    );
  });

  test.each([
    ["uma", "los", 25, 0.16],
    ["umi", "los", 10, 0.06],
    ["rma", "los", 35, 1.1],
  ] as const)("%s, %s: right on both sides of its breakpoint", (model, sight, base, breakpointKm) => {
    const mobile = 1.5;
    // 4 (hb - 1)(hm - 1) f / c, and 2 pi hb hm f / c for RMa.
    const frequency =
      model === "rma"
        ? (breakpointKm * 3e5) / (2 * Math.PI * base * mobile)
        : (breakpointKm * 3e5) / (4 * (base - 1) * (mobile - 1));
    for (const factor of [0.9, 0.999999, 1, 1.000001, 1.1]) {
      const distance = breakpointKm * factor;
      const loss = pathLoss[model](distance, frequency, base, mobile, sight);
      expect(relativeError(range[model](loss, frequency, base, mobile, sight), distance)).toBeLessThan(1e-12);
    }
    const slope = (km: number): number =>
      pathLoss[model](1.01 * km, frequency, base, mobile, sight) - pathLoss[model](km, frequency, base, mobile, sight);
    expect(slope(1.02 * breakpointKm) / slope(0.9 * breakpointKm)).toBeGreaterThan(1.6);
  });

  test("the ends of the range come back as they are", () => {
    expect(range.hata(pathLoss.hata(1, 900, 30, 1.5), 900, 30, 1.5)).toBe(1);
    expect(range.hata(pathLoss.hata(20, 900, 30, 1.5), 900, 30, 1.5)).toBe(20);
    expect(range.rma(pathLoss.rma(10, 900, 30, 1.5, "los"), 900, 30, 1.5, "los")).toBe(10);
    expect(range.uma(pathLoss.uma(0.01, 900, 30, 1.5), 900, 30, 1.5)).toBe(0.01);
  });
});

describe("models against each other", () => {
  test("more frequency and more distance always lose more; height at the base station helps Hata", () => {
    const distance = fc.double({ min: 0.011, max: 4.9, noNaN: true });
    const frequency = fc.double({ min: 500, max: 29_000, noNaN: true });
    fc.assert(
      fc.property(distance, frequency, fc.constantFrom("los", "nlos"), (d, f, sight) => {
        for (const model of ["uma", "umi", "rma"] as const) {
          const base = model === "umi" ? 10 : 25;
          const here = pathLoss[model](d, f, base, 1.5, sight);
          expect(pathLoss[model](1.01 * d, f, base, 1.5, sight)).toBeGreaterThan(here);
          // Beyond the breakpoint a frequency moves the breakpoint too: the two nearly cancel.
          if (sight === "nlos") expect(pathLoss[model](d, 1.02 * f, base, 1.5, sight)).toBeGreaterThan(here);
          expect(pathLoss[model](d, f, base, 1.5, "nlos")).toBeGreaterThanOrEqual(
            pathLoss[model](d, f, base, 1.5, "los"),
          );
        }
      }),
      { seed: 3, numRuns: 60 },
    );
    expect(pathLoss.hata(5, 900, 60, 1.5)).toBeLessThan(pathLoss.hata(5, 900, 30, 1.5));
    const open = ["open", "suburban", "urban"].map((environment) => pathLoss.hata(5, 900, 30, 1.5, environment));
    expect(open).toEqual([...open].sort((a, b) => a - b));
  });

  test("every model loses more than free space", () => {
    for (const d of [1, 2, 4]) {
      const free = pathLoss.freeSpace(d, 1500);
      expect(pathLoss.hata(d, 1500, 30, 1.5, "open")).toBeGreaterThan(free);
      expect(pathLoss.cost231(d, 1500, 30, 1.5)).toBeGreaterThan(free);
      for (const model of ["uma", "umi", "rma"] as const) {
        expect(pathLoss[model](d, 1500, model === "umi" ? 10 : 30, 1.5, "los")).toBeGreaterThan(free);
      }
    }
  });

  test("COST 231 carries Hata on: a few tenths of a decibel apart where they meet", () => {
    const meet = pathLoss.cost231(5, 1500, 50, 1.5) - pathLoss.hata(5, 1500, 50, 1.5);
    expect(Math.abs(meet)).toBeLessThan(1.5);
  });
});

describe("no model is used outside its range", () => {
  test.each([
    [() => pathLoss.freeSpace(0, 900), "distanceKm is 0; allowed: a distance above 0 and up to 1e9 km."],
    [() => pathLoss.freeSpace(1e-6, 900), "distanceKm is 0.000001; allowed: at least 0.0000265 km at 900 MHz"],
    [() => pathLoss.logDistance(1, 100, 0), "pathLossExponent is 0"],
    [() => pathLoss.hata(0.9, 900, 30, 1.5), "distanceKm is 0.9; allowed: a distance from 1 to 20 km."],
    [() => pathLoss.hata(2, 149, 30, 1.5), "frequencyMHz is 149; allowed: a frequency from 150 to 1500 MHz."],
    [() => pathLoss.hata(2, 300, 30, 1.5, "large city"), 'allowed: in a "large city" 150 to 200 or 400 to 1500 MHz.'],
    [() => pathLoss.hata(2, 900, 29, 1.5), "baseHeightM is 29; allowed: a base station height from 30 to 200 m."],
    [() => pathLoss.hata(2, 900, 30, 0.9), "mobileHeightM is 0.9; allowed: a mobile height from 1 to 10 m."],
    [() => pathLoss.hata(2, 900, 30, 1.5, "rural"), 'environment is the text "rural"; allowed: "urban", "large city"'],
    [() => pathLoss.cost231(2, 1499, 30, 1.5), "frequencyMHz is 1499; allowed: a frequency from 1500 to 2000 MHz."],
    [() => pathLoss.uma(0.009, 2000, 25, 1.5), "distanceKm is 0.009; allowed: a distance from 0.01 to 5 km."],
    [() => pathLoss.uma(1, 499, 25, 1.5), "frequencyMHz is 499"],
    [() => pathLoss.uma(1, 2000, 9, 1.5), "baseHeightM is 9; allowed: a base station height from 10 to 150 m."],
    [() => pathLoss.uma(1, 2000, 25, 1.4), "mobileHeightM is 1.4"],
    [
      () => pathLoss.umi(1, 2000, 26, 1.5),
      "baseHeightM is 26; allowed: a base station height from 3 to 25 m, below the roofs.",
    ],
    [() => pathLoss.uma(1, 2000, 25, 1.5, "indoor"), 'sight is the text "indoor"; allowed: "los", "nlos".'],
    [
      () => pathLoss.rma(5.1, 2000, 35, 1.5),
      'distanceKm is 5.1; allowed: a distance from 0.01 to 10 km with "los", to 5 km with "nlos".',
    ],
    [() => pathLoss.rma(1, 30_001, 35, 1.5), "frequencyMHz is 30001"],
    [() => range.freeSpace(-1, 900), "lossDb is -1; allowed: a loss from 0 to 1000 dB."],
    [() => range.freeSpace(1000, 900), "lossDb 1000 at 900 MHz is reached at 2.6"],
    [() => range.hata(100, 900, 30, 1.5), "lossDb 100 is outside what the model covers: 126.4"],
    [() => range.hata(200, 900, 30, 1.5), "dB at 20 km."],
    [() => range.umi(200, 3500, 10, 1.5), "lossDb 200 is outside what the model covers"],
    [() => range.logDistance(1000, 0, 0.1), "lossDb 1000 is reached at 1e1000 km, outside 1e-300 to 1e9 km."],
  ])("%#", (call, message) => {
    expect(call).toThrow(message);
  });
});
