import fc from "fast-check";
import * as nearFar from "../../../src/model/codes/near-far";
import * as timing from "../../../src/model/codes/timing";
import { published, publishedValue, title, type Published } from "../../checks/published";
import { relativeError } from "../../support/relative-error";

/** Bit and timing-advance step of a 13 MHz clock divided by 48, in microseconds (3GPP TS 45.010). */
const GSM_BIT_US = 48 / 13;
/** Some sources compute with 3e8 m/s. */
const exactOver3e8 = 299_792_458 / 3e8;

function within({ expected, tolerance }: Published, actual: number): void {
  expect(Math.abs(actual - expected)).toBeLessThanOrEqual(tolerance!);
}

function check(id: string, actual: (inputs: Record<string, number>) => number): void {
  const entry = publishedValue(id);
  test(title(entry), () => within(entry, actual(entry.inputs as Record<string, number>)));
}

describe("published values", () => {
  check("TT-05", ({ bit_us }) => 1000 * timing.radius(0, 1, bit_us));
  check("TT-06", ({ TA, bit_us }) => (1000 * timing.radius(0, TA, bit_us)) / exactOver3e8);
  check("TT-08", ({ TA }) => 1000 * timing.radius(0, TA, GSM_BIT_US));
  check("TT-09", ({ guard_bits }) => 1000 * timing.radius(guard_bits! * GSM_BIT_US));
  check("TT-13", ({ guard_bits }) => timing.radius((guard_bits! * 40_000) / 1944) / exactOver3e8);
  check("TT-21", ({ guard_bits, rate_kbps }) => timing.radius((1000 * guard_bits!) / rate_kbps!));
  // LTE and NR: Ts = 1/30.72 us, a step is 16 Ts, in NR divided by 2^mu.
  check("TT-41", ({ TA_step_Ts }) => 1000 * timing.radius(0, 1, TA_step_Ts! / 30.72));
  check("TT-42", ({ TA_max }) => timing.radius(0, TA_max, 16 / 30.72));
  for (const { id } of published("TT-44"))
    check(id, ({ TA_max, mu }) => timing.radius(0, TA_max, 16 / 30.72 / 2 ** mu!));
  check("TT-50", ({ TCP_Ts, TSEQ_Ts, total_Ts }) => {
    const guardTs = Math.min(TCP_Ts!, total_Ts! - TCP_Ts! - TSEQ_Ts!);
    return timing.radius(guardTs / 30.72) / exactOver3e8;
  });
  check("CD-31", ({ d1_m, d2_m, n }) => nearFar.range(d1_m! / 1000, d2_m! / 1000, n!));
});

describe("common practice", () => {
  test("63 steps of 48/13 us reach about 35 km", () => {
    expect(timing.radius(0, 63, GSM_BIT_US)).toBeCloseTo(34.87, 2);
  });

  test("a guard of 8.25 bits alone, without timing advance, reaches about 4.6 km", () => {
    expect(timing.radius(8.25 * GSM_BIT_US)).toBeCloseTo(4.566, 3);
  });

  test("timing advance keeps bursts in their slots all over the cell: what is left over fits into the guard", () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 34.8, noNaN: true }), (distanceKm) => {
        const late = timing.guard(distanceKm);
        const steps = timing.steps(distanceKm, GSM_BIT_US);
        expect(steps).toBeLessThanOrEqual(63);
        expect(Math.abs(late - steps * GSM_BIT_US)).toBeLessThanOrEqual(GSM_BIT_US / 2 + 1e-9);
        // Without it, bursts from beyond the reach of the guard alone run into the next slot.
        if (distanceKm > timing.radius(8.25 * GSM_BIT_US)) expect(late).toBeGreaterThan(8.25 * GSM_BIT_US);
      }),
      { seed: 1 },
    );
  });
});

describe("what must hold", () => {
  const km = fc.double({ min: 1e-6, max: 1e6, noNaN: true });

  test("guard and radius undo each other", () => {
    fc.assert(
      fc.property(km, (radius) => {
        expect(relativeError(timing.radius(timing.guard(radius)), radius)).toBeLessThan(1e-15);
      }),
      { seed: 2 },
    );
  });

  test("steps are whole and nearest", () => {
    fc.assert(
      fc.property(km, fc.double({ min: 0.01, max: 100, noNaN: true }), (distance, step) => {
        const steps = timing.steps(distance, step);
        expect(Number.isInteger(steps)).toBe(true);
        expect(Math.abs(steps - timing.guard(distance) / step)).toBeLessThanOrEqual(0.5);
      }),
      { seed: 3 },
    );
  });

  test("efficiency: all guard leaves nothing, no guard and no overhead everything", () => {
    expect(timing.efficiency(577, 577)).toBe(0);
    expect(timing.efficiency(577, 0)).toBe(1);
    expect(timing.efficiency(577, 0, 0.25)).toBe(0.75);
    expect(timing.efficiency(500, 100, 0.5)).toBe(0.4);
  });

  test("errors name the parameter", () => {
    expect(() => timing.radius(-1)).toThrow("guardTimeUs is -1; allowed: a time from 0 to 1E+9 us.");
    expect(() => timing.radius(0, 1.5, 1)).toThrow("advanceSteps is 1.5");
    expect(() => timing.steps(1, 0)).toThrow("stepUs is 0");
    expect(() => timing.efficiency(500, 501)).toThrow(
      "guardUs is 501; allowed: a guard time up to the slot of 500 us.",
    );
    expect(() => timing.guard(-1)).toThrow("radiusKm is -1");
  });
});

describe("near and far", () => {
  test("a single user has the processing gain over noise", () => {
    expect(nearFar.sinr(-100, 1, 30, 21, -90)).toBe(11);
  });

  test("others as strong: the gain is shared; 20 dB stronger: a hundredfold interference", () => {
    expect(nearFar.sinr(0, 11, 0, 10, -900)).toBeCloseTo(0, 12);
    expect(nearFar.sinr(0, 11, 20, 10, -900)).toBeCloseTo(-20, 12);
  });

  test("a farthest user nearer than the nearest is refused", () => {
    expect(() => nearFar.range(2, 1, 4)).toThrow("farKm is 1; allowed: a distance of at least nearKm, 2.");
    expect(nearFar.range(2, 2, 4)).toBe(0);
    expect(() => nearFar.sinr(-100, 0, 0, 21, -100)).toThrow("users is 0");
  });
});
