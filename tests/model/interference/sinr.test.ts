import fc from "fast-check";
import { NoAnswerError } from "../../../src/model/errors";
import * as sinr from "../../../src/model/interference/sinr";
import { publishedValue, title } from "../../checks/published";

const level = fc.double({ min: -200, max: 50, noNaN: true });

describe("from powers", () => {
  test("without interferers it is signal over noise", () => expect(sinr.fromPowers(-80, [], -100)).toBe(20));

  test("noise acts as one more interferer, and each one makes it worse", () => {
    fc.assert(
      fc.property(level, fc.array(level, { minLength: 1, maxLength: 6 }), level, (signal, interferers, noise) => {
        const ratio = sinr.fromPowers(signal, interferers, noise);
        expect(ratio).toBeCloseTo(sinr.sir(signal, [...interferers, noise]), 10);
        expect(ratio).toBeLessThanOrEqual(sinr.sir(signal, interferers));
      }),
      { seed: 1 },
    );
  });

  test("no interferer at all has no ratio", () => expect(() => sinr.sir(-80, [])).toThrow("interferersDbm"));
});

describe("Eb/N0", () => {
  test.each(["CD-29", "CD-30"].map((id) => [title(publishedValue(id)), publishedValue(id)] as const))(
    "%s",
    (_, { inputs, expected, tolerance }) => {
      const values = inputs as Record<string, number>;
      const width = (values["Rc_cps"] ?? values["W_cps"])! / 1e6;
      expect(Math.abs(sinr.ebN0(0, width, values["R_bps"]! / 1000) - expected)).toBeLessThanOrEqual(tolerance!);
    },
  );

  test("there and back", () => {
    fc.assert(
      fc.property(level, fc.double({ min: 1e-3, max: 1e3, noNaN: true }), (x, width) => {
        expect(sinr.fromEbN0(sinr.ebN0(x, width, 12.2), width, 12.2)).toBeCloseTo(x, 10);
      }),
      { seed: 2 },
    );
  });
});

describe("code division", () => {
  const fraction = fc.double({ min: 0, max: 1, noNaN: true });

  test(title(publishedValue("CD-01")), () => {
    const { W_Hz, R_bps, EbN0_linear } = publishedValue("CD-01").inputs as Record<string, number>;
    const users = publishedValue("CD-01").expected;
    expect(sinr.uplink(users, W_Hz! / 1e6, R_bps! / 1000, 1, 0)).toBeCloseTo(10 * Math.log10(EbN0_linear!), 9);
  });

  test("interference alone: K users split the processing gain", () => {
    expect(sinr.uplink(101, 3.84, 38.4, 1, 0)).toBeCloseTo(0, 12);
  });

  test("orthogonality and a receiver's efficiency act alike on the own cell", () => {
    fc.assert(
      fc.property(fc.integer({ min: 2, max: 500 }), fraction, fraction, (users, share, other) => {
        const up = sinr.uplink(users, 3.84, 12.2, 0.6, other, 3, share);
        expect(up).toBe(sinr.downlink(users, 3.84, 12.2, 0.6, other, share, 3));
        expect(up).toBeGreaterThanOrEqual(sinr.uplink(users, 3.84, 12.2, 0.6, other, 3));
      }),
      { seed: 3 },
    );
  });

  test("a single user without other cells has noise alone, or no limit", () => {
    expect(sinr.uplink(1, 3.84, 3.84, 1, 0, -20)).toBeCloseTo(10, 12);
    expect(() => sinr.uplink(1, 3.84, 12.2, 1, 0)).toThrow(NoAnswerError);
    expect(() => sinr.downlink(50, 3.84, 12.2, 1, 0, 1)).toThrow(NoAnswerError);
    expect(() => sinr.uplink(0, 3.84, 12.2, 1, 0)).toThrow("users is 0");
  });
});
