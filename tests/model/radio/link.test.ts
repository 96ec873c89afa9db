import fc from "fast-check";
import * as link from "../../../src/model/radio/link";
import * as range from "../../../src/model/radio/range";
import { publishedValue, title } from "../../checks/published";

describe("published values", () => {
  test(title(publishedValue("LB-23")), () => {
    const { inputs, expected, tolerance } = publishedValue("LB-23");
    const { N0_dBm_Hz, NF_dB, EbNt_dB, Rc_cps, Bc_Hz } = inputs as Record<string, number>;
    // The source takes chip rate over bandwidth for the processing gain: 0.07 dB of loss.
    const implementation = 0;
    const floor = N0_dBm_Hz! + 10 * Math.log10(Rc_cps!) + NF_dB! + 10 * Math.log10(Rc_cps! / Bc_Hz!);
    expect(Math.abs(link.sensitivity(floor, EbNt_dB!, implementation) - expected)).toBeLessThan(tolerance!);
  });

  test(title(publishedValue("CV-39")), () => {
    const { inputs, expected } = publishedValue("CV-39");
    const { Pt_dBm, SNR_dB, N_dBm, L_d0_dB, floor_loss_dB, shadow_dB, exponent } = inputs as Record<string, number>;
    const loss = link.maxLoss(Pt_dBm!, link.sensitivity(N_dBm!, SNR_dB!), 0, floor_loss_dB, shadow_dB);
    expect(1000 * range.logDistance(loss, L_d0_dB!, exponent!, 0.001)).toBeCloseTo(expected, 8);
  });
});

test("a budget adds up: signal at the receiver less margins is the sensitivity", () => {
  const level = fc.double({ min: -150, max: 80, noNaN: true });
  const part = fc.double({ min: -30, max: 40, noNaN: true });
  fc.assert(
    fc.property(level, level, part, part, part, (eirp, sensitivity, gains, losses, margins) => {
      const loss = link.maxLoss(eirp, sensitivity, gains, losses, margins);
      expect(eirp - loss + gains - losses - margins).toBeCloseTo(sensitivity, 10);
    }),
    { seed: 1 },
  );
});

test("what is left out is 0", () => {
  expect(link.maxLoss(44, -117)).toBe(161);
  expect(link.sensitivity(-127, 8)).toBe(-119);
});

test.each([
  [() => link.sensitivity(NaN, 8), "noiseFloorDbm is NaN"],
  [() => link.sensitivity(-127, 8, -1), "implementationLossDb is -1; allowed: a number of at least 0."],
  [() => link.maxLoss(44, -1001), "sensitivityDbm is -1001"],
  [() => link.maxLoss(44, -117, 0, 0, Infinity), "marginsDb is Infinity"],
])("bad input %# is named", (call, message) => {
  expect(call).toThrow(message);
});
