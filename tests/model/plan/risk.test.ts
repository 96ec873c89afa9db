import fc from "fast-check";
import * as erlangB from "../../../src/model/blocking/erlang-b";
import { DomainError, NoAnswerError } from "../../../src/model/errors";
import { cdf } from "../../../src/model/numerics/normal";
import * as risk from "../../../src/model/plan/risk";

test("without an error, or at the median, they are the channels of the traffic itself", () => {
  expect(risk.channels(20, 0, 0.02, 0.99)).toBe(erlangB.channels(20, 0.02));
  expect(risk.channels(20, 0.3, 0.02, 0.5)).toBe(erlangB.channels(20, 0.02));
  expect(risk.channels(0, 0.3, 0.02, 0.9)).toBe(0);
});

test("the channels suffice with the confidence and one fewer does not", () => {
  fc.assert(
    fc.property(
      fc.double({ min: 0.5, max: 300, noNaN: true }),
      fc.double({ min: 0.01, max: 1, noNaN: true }),
      fc.double({ min: 0.01, max: 0.99, noNaN: true }),
      (a, error, confidence) => {
        // Probability that n channels suffice: that the traffic stays below what they may be offered.
        const sufficient = (n: number): number => cdf(Math.log(erlangB.traffic(n, 0.02) / a) / Math.log1p(error));
        const n = risk.channels(a, error, 0.02, confidence);
        expect(sufficient(n)).toBeGreaterThanOrEqual(confidence - 1e-12);
        if (n > 0) expect(sufficient(n - 1)).toBeLessThan(confidence + 1e-12);
      },
    ),
    { seed: 41 },
  );
});

test("outside the domain, and beyond what is counted", () => {
  expect(() => risk.channels(10, -0.1, 0.02, 0.9)).toThrow(DomainError);
  expect(() => risk.channels(10, 0.1, 0.02, 1)).toThrow(DomainError);
  expect(() => risk.channels(1e9, 1, 0.02, 0.9)).toThrow(NoAnswerError);
});
