import fc from "fast-check";
import { blockingOf } from "../../../src/model/blocking/erlang-b-formula";
import * as overflow from "../../../src/model/blocking/overflow";
import * as peaky from "../../../src/model/blocking/peaky";
import { DomainError, NoAnswerError } from "../../../src/model/errors";
import { publishedValue, title } from "../../checks/published";
import reference from "../../fixtures/blocking/overflow.json";
import { relativeError } from "../../support/relative-error";

const { rows } = reference;
const BOUND = 1e-12;

function holds(actual: number, digits: string, bound = BOUND): void {
  expect(relativeError(actual, Number(digits))).toBeLessThanOrEqual(bound);
}

type Moments = [number, number, string, string, string];

describe("against 50 digits", () => {
  test.each(rows.moments as Moments[])("moments of the overflow of %p erlang on %p channels", (a, n, m, v, z) => {
    holds(overflow.mean(a, n), m);
    holds(overflow.variance(a, n), v);
    holds(overflow.peakedness(a, n), z);
  });
  test.each(rows.equivalent as [number, number, string, string][])(
    "equivalent of mean %p, variance %p",
    (m, v, a, n) => {
      const [trafficE, channels] = overflow.equivalent(m, v);
      // Near Poisson the inputs themselves fix the group only to a rounding unit of z over its distance from 1.
      const conditioning = Math.max(1, 1 / Math.abs(v / m - 1));
      holds(trafficE, a, BOUND * conditioning);
      holds(channels, n, BOUND * conditioning);
    },
  );
  test.each(rows.lost as [number, number, number, string][])(
    "lost of mean %p, variance %p on %p channels",
    (m, v, n, digits) => {
      holds(overflow.lost(m, v, n), digits, 1e-11);
    },
  );
  test.each(rows.peaky as [number, number, number, string][])(
    "peaky blocking of mean %p, peakedness %p on %p",
    (m, z, n, digits) => {
      holds(peaky.blocking(m, z, n), digits);
    },
  );
});

describe("published values", () => {
  type Inputs = Record<string, number>;
  const check = (id: string, compute: (inputs: Inputs) => number): void => {
    const entry = publishedValue(id);
    test(title(entry), () => {
      const actual = compute(entry.inputs as Inputs);
      expect(Math.abs(actual - entry.expected)).toBeLessThanOrEqual(
        entry.tolerance ?? 1e-10 * Math.abs(entry.expected),
      );
    });
  };
  const N = "n_servers";
  const A = "A_offered_erlang";
  for (const id of ["OV-01m", "OV-02m", "OV-03m", "OV-04m", "OV-05m", "OV-06m", "OV-07m", "OV-08m", "OV-20"]) {
    check(id, (i) => overflow.mean(i[A]!, i[N]!));
  }
  for (const id of ["OV-01v", "OV-02v", "OV-03v", "OV-04v", "OV-07v", "OV-08v", "OV-09v"]) {
    check(id, (i) => overflow.variance(i[A]!, i[N]!));
  }
  for (const id of [
    "OV-02z",
    "OV-03z",
    "OV-04z",
    "OV-05z",
    "OV-06z",
    "OV-07z",
    "OV-09z",
    "OV-10z",
    "OV-11z",
    "OV-12z",
  ]) {
    check(id, (i) => overflow.peakedness(i[A]!, i[N]!));
  }
  for (const id of ["OV-30a", "OV-31a", "OV-32a", "OV-33a", "OV-34a"]) {
    check(id, (i) => overflow.equivalent(i["M_mean_erlang"]!, i["V_variance"]!)[0]);
  }
  for (const id of ["OV-33n", "OV-34n"]) {
    check(id, (i) => overflow.equivalent(i["M_mean_erlang"]!, i["V_variance"]!)[1]);
  }
  // Two groups overflow to a common one: means and variances add, since the streams are independent.
  const stream = (i: Inputs): [number, number] => [
    overflow.mean(i["A1"]!, i["n1"]!) + overflow.mean(i["A2"]!, i["n2"]!),
    overflow.variance(i["A1"]!, i["n1"]!) + overflow.variance(i["A2"]!, i["n2"]!),
  ];
  const L = "L_overflow_circuits";
  check("OV-41", (i) => stream(i)[1]);
  check("OV-42h", (i) => peaky.blocking(stream(i)[0], stream(i)[1] / stream(i)[0], i[L]!));
  check("OV-43e", (i) => overflow.lost(...stream(i), i[L]!));
  check("OV-43t", (i) => overflow.lost(...stream(i), i[L]!) / stream(i)[0]);
  check("OV-44", (i) => {
    const [m, v] = stream(i);
    let l = 0;
    while (overflow.lost(m, v, l) / m > 0.01) l++;
    return l;
  });
  for (const id of ["OV-50", "OV-51", "OV-52", "OV-53"]) {
    check(id, (i) => peaky.blocking(i["A_mean_erlang"]!, i["Z_peakedness"]!, i[N]!));
  }
});

describe("identities", () => {
  const run = { seed: 19560405, numRuns: 200 };
  const traffic = fc.double({ min: 0.01, max: 5000, noNaN: true });
  const channels = fc.integer({ min: 1, max: 5000 });

  test("the equivalent of an overflow gives back its mean and variance", () => {
    fc.assert(
      fc.property(traffic, fc.double({ min: 0.3, max: 1.5, noNaN: true }), (a, ratio) => {
        const n = Math.ceil(a * ratio);
        const m = overflow.mean(a, n);
        fc.pre(m > 1e-5);
        const v = overflow.variance(a, n);
        const [found, group] = overflow.equivalent(m, v);
        expect(relativeError(overflow.mean(found, group), m)).toBeLessThan(1e-11);
        expect(relativeError(overflow.variance(found, group), v)).toBeLessThan(1e-9);
        expect(relativeError(found, a)).toBeLessThan(1e-8);
      }),
      run,
    );
  });
  test("peakedness is 1 for Poisson and above 1 behind any group", () => {
    expect(overflow.peakedness(12, 0)).toBe(1);
    fc.assert(
      fc.property(traffic, channels, (a, n) => {
        expect(overflow.peakedness(a, n)).toBeGreaterThan(1);
      }),
      run,
    );
  });
  test("a Poisson stream is lost as Erlang B says", () => {
    fc.assert(
      fc.property(traffic, channels, (a, n) => {
        expect(overflow.lost(a, a, n)).toBe(a * blockingOf(a, n));
      }),
      run,
    );
  });
  test("peakier streams lose more on the same group", () => {
    fc.assert(
      fc.property(fc.double({ min: 1, max: 200, noNaN: true }), fc.integer({ min: 1, max: 300 }), (m, n) => {
        const lost = [0.5, 0.9, 1, 1.5, 4, 20].map((z) => overflow.lost(m, m * z, n));
        for (let i = 1; i < lost.length; i++) expect(lost[i]!).toBeGreaterThanOrEqual(lost[i - 1]! * (1 - 1e-9));
      }),
      run,
    );
  });
  test("peaky.channels is minimal", () => {
    fc.assert(
      fc.property(
        traffic,
        fc.double({ min: 0.2, max: 20, noNaN: true }),
        fc.double({ min: 1e-6, max: 0.5, noNaN: true }),
        (m, z, b) => {
          const n = peaky.channels(m, z, b);
          expect(peaky.blocking(m, z, n)).toBeLessThanOrEqual(b);
          if (n > 0) expect(peaky.blocking(m, z, n - 1)).toBeGreaterThan(b);
        },
      ),
      run,
    );
  });
});

describe("edges and bad input", () => {
  test("less variance than any stream of whole calls has no answer", () => {
    expect(() => overflow.equivalent(0.5, 0.2)).toThrow(NoAnswerError);
    expect(() => overflow.equivalent(0.5, 0.2)).toThrow("at least 0.25");
  });
  test.each([
    () => overflow.mean(-1, 2),
    () => overflow.variance(1, -2),
    () => overflow.equivalent(0, 1),
    () => overflow.equivalent(1, 0),
    () => peaky.blocking(1, 0, 2),
    () => peaky.channels(1, 1, 1),
  ])("outside the domain: %#", (call) => {
    expect(call).toThrow(DomainError);
  });
});
