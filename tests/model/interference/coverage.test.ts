import fc from "fast-check";
import { coverage } from "../../../src/model/interference/sinr";
import reference from "../../fixtures/interference/coverage.json";
import { relativeError } from "../../support/relative-error";

const level = fc.double({ min: -40, max: 60, noNaN: true });
const exponent = fc.double({ min: 2.01, max: 10, noNaN: true });

test("both integrals of the theorem by quadrature", () => {
  const errors = reference.rows.map(([args, expected]) => {
    const [required, n, load, snr] = args as [number, number, number, number | null];
    return relativeError(coverage(required, n, load, snr ?? undefined), expected as number);
  });
  expect(Math.max(...errors)).toBeLessThan(1e-13);
});

test("exponent 4 without noise: the closed form of Andrews, Baccelli, Ganti 2011, section III", () => {
  fc.assert(
    fc.property(fc.double({ min: -100, max: 100, noNaN: true }), (db) => {
      const root = 10 ** (db / 20);
      const expected = 1 / (1 + root * (Math.PI / 2 - Math.atan(1 / root)));
      expect(relativeError(coverage(db, 4), expected)).toBeLessThan(1e-13);
    }),
    { seed: 1 },
  );
});

test("noise alone at exponent 4: the Gaussian integral", () => {
  // exp(-x - b x^2) from 0 with b = 16 T/(pi^2 snr) tends to sqrt(pi/b)/2 where noise leaves nothing.
  expect(relativeError(coverage(500, 4, 0, -400), (Math.PI * Math.sqrt(Math.PI)) / 8e45)).toBeLessThan(1e-13);
  expect(coverage(-500, 4, 0, 400)).toBeCloseTo(1, 12);
});

test("coverage falls with target and load, rises with the signal, and stays a probability", () => {
  fc.assert(
    fc.property(level, exponent, fc.double({ min: 0, max: 1, noNaN: true }), level, (required, n, load, snr) => {
      const here = coverage(required, n, load, snr);
      expect(here).toBeGreaterThan(0);
      expect(here).toBeLessThanOrEqual(1);
      expect(coverage(required + 0.1, n, load, snr)).toBeLessThanOrEqual(here);
      expect(coverage(required, n, Math.min(1, load + 0.1), snr)).toBeLessThanOrEqual(here * (1 + 1e-13));
      expect(coverage(required, n, load, snr + 0.1)).toBeGreaterThanOrEqual(here);
      expect(coverage(required, n, load)).toBeGreaterThanOrEqual(here * (1 - 1e-13));
    }),
    { seed: 2 },
  );
});

test("both branches of the interference factor meet at a target of 0 dB", () => {
  for (const n of [2.001, 2.5, 4, 10]) {
    expect(relativeError(coverage(1e-13, n), coverage(-1e-13, n))).toBeLessThan(1e-12);
  }
});

test("the ends of the domain give numbers, an exponent of 2 is refused", () => {
  for (const required of [-1000, 1000]) {
    for (const n of [2 + 1e-9, 10]) {
      for (const snr of [undefined, -1000, 1000]) {
        const here = coverage(required, n, 1, snr);
        expect(here).toBeGreaterThanOrEqual(0);
        expect(here).toBeLessThanOrEqual(1);
      }
    }
  }
  expect(() => coverage(0, 2)).toThrow("pathLossExponent is 2; allowed: a path-loss exponent above 2 and up to 10.");
  expect(() => coverage(0, 4, 1.1)).toThrow("load is 1.1");
});

test("a seeded drop of sites in a disc agrees", () => {
  // 400 sites around the user in the mean: the interference from beyond is below a hundredth of a decibel at exponent 4.
  let state = 12345;
  const random = (): number => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return (state + 0.5) / 2 ** 32;
  };
  const DROPS = 4000;
  let covered = 0;
  for (let drop = 0; drop < DROPS; drop++) {
    // Squared distances of a Poisson field are the points of a Poisson process on the half line.
    let square = 0;
    let signal = 0;
    let interference = 0;
    for (let site = 0; site < 400; site++) {
      square -= Math.log(random());
      const received = -Math.log(random()) / (square * square);
      if (site === 0) signal = received;
      else interference += received;
    }
    if (signal > interference) covered++;
  }
  const expected = coverage(0, 4);
  const deviation = Math.sqrt((expected * (1 - expected)) / DROPS);
  expect(Math.abs(covered / DROPS - expected)).toBeLessThan(3.5 * deviation);
});
