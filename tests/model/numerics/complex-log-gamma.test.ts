import fc from "fast-check";
import { logGamma as complexLogGamma } from "../../../src/model/numerics/complex-log-gamma";
import { logGamma } from "../../../src/model/numerics/log-gamma";

const real = fc.double({ min: 0.05, max: 30, noNaN: true });
const imaginary = fc.double({ min: -60, max: 60, noNaN: true });

test("on the real axis it is the real function", () => {
  fc.assert(
    fc.property(real, (x) => {
      const { re, im } = complexLogGamma(x, 0);
      expect(Math.abs(re - logGamma(x))).toBeLessThan(2e-14 * (1 + Math.abs(logGamma(x))));
      expect(im).toBe(0);
    }),
    { seed: 1 },
  );
});

test("|Gamma(1/2 + it)|^2 = pi / cosh(pi t), DLMF 5.4.4", () => {
  fc.assert(
    fc.property(imaginary, (t) => {
      const expected =
        Math.log(Math.PI) - Math.PI * Math.abs(t) + Math.LN2 - Math.log1p(Math.exp(-2 * Math.PI * Math.abs(t)));
      expect(Math.abs(2 * complexLogGamma(0.5, t).re - expected)).toBeLessThan(2e-13);
    }),
    { seed: 2 },
  );
});

test("Gamma(z + 1) = z Gamma(z), sizes and angles", () => {
  fc.assert(
    fc.property(real, imaginary, (x, y) => {
      const here = complexLogGamma(x, y);
      const next = complexLogGamma(x + 1, y);
      const turn = next.im - here.im - Math.atan2(y, x);
      expect(Math.abs(next.re - here.re - Math.log(Math.hypot(x, y)))).toBeLessThan(3e-13);
      expect(Math.abs(Math.sin(turn / 2))).toBeLessThan(3e-13);
    }),
    { seed: 3 },
  );
});
