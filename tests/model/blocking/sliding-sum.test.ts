import fc from "fast-check";
import { SlidingSum } from "../../../src/model/blocking/sliding-sum";
import { relativeError } from "../../support/relative-error";

test("is the sum of the last numbers, over any width and while they fall by hundreds of powers of ten", () => {
  const numbers = fc.array(fc.double({ min: -300, max: 0, noNaN: true }), { minLength: 1, maxLength: 60 });
  fc.assert(
    fc.property(fc.integer({ min: 1, max: 20 }), numbers, fc.boolean(), (width, exponents, falling) => {
      const values = exponents.map((e) => 10 ** e);
      if (falling) values.sort((a, b) => b - a);
      const sliding = new SlidingSum(width);
      values.forEach((value, i) => {
        sliding.push(value);
        const direct = values.slice(Math.max(0, i - width + 1), i + 1).reduceRight((sum, v) => sum + v, 0);
        expect(relativeError(sliding.sum, direct)).toBeLessThan(1e-14);
      });
    }),
    { seed: 20261201, numRuns: 300 },
  );
});

test("scales what is in the window and what follows only by itself", () => {
  const sliding = new SlidingSum(3);
  for (const value of [1, 2, 4, 8]) sliding.push(value);
  sliding.scale(0.5);
  expect(sliding.sum).toBe(7);
  sliding.push(16);
  expect(sliding.sum).toBe(2 + 4 + 16);
  sliding.push(32);
  sliding.push(64);
  expect(sliding.sum).toBe(112);
});
