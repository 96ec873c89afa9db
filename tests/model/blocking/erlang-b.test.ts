import fc from "fast-check";
import * as erlangB from "../../../src/model/blocking/erlang-b";
import { ESTIMATE_FROM, estimateChannels } from "../../../src/model/blocking/erlang-b-estimate";
import { idleOdds } from "../../../src/model/blocking/erlang-b-formula";
import * as erlangC from "../../../src/model/blocking/erlang-c";
import { DomainError, NoAnswerError } from "../../../src/model/errors";
import { cdf } from "../../../src/model/numerics/normal";
import { published, publishedValue, title, type Published } from "../../checks/published";
import reference from "../../fixtures/blocking/erlang-b.json";
import { relativeError } from "../../support/relative-error";

/** The promise is 1e-12; the methods keep within this, so that a lost digit shows. */
const TIGHT = 3e-14;

/** Numbers spread evenly over the powers of ten. */
const spread = (low: number, high: number): fc.Arbitrary<number> =>
  fc.double({ min: low, max: high, noNaN: true }).map((exponent) => 10 ** exponent);
const traffics = spread(-9, 7);
const groups = fc.oneof(spread(-6, 7), fc.integer({ min: 0, max: 60 }), fc.integer({ min: 0, max: 10_000_000 }));
/** Traffic within some standard deviations of the group, where all methods meet. */
const nearby = fc
  .tuple(spread(-1, 7), fc.double({ min: -9, max: 9, noNaN: true }))
  .map(([n, z]) => [Math.max(n + z * Math.sqrt(n), 1e-3), n] as const);
const targets = fc.oneof(spread(-300, -1), spread(-6, -0.001), fc.double({ min: 0.01, max: 0.99, noNaN: true }));

describe("50-digit values of the defining integral", () => {
  const { about: _about, columns: _columns, ...regimes } = reference;
  const quantities = [
    ["blocking", erlangB.blocking, 2],
    ["carried", erlangB.carried, 3],
    ["improvement", erlangB.improvement, 4],
  ] as const;
  const cases = Object.keys(regimes).flatMap((regime) => quantities.map((quantity) => [regime, ...quantity] as const));

  test.each(cases)("%s: %s", (regime, _name, quantity, column) => {
    const rows = regimes[regime as keyof typeof regimes];
    expect(rows.length).toBeGreaterThan(15);
    for (const row of rows) {
      const actual = quantity(row[0]!, row[1]!);
      if (!(relativeError(actual, row[column]!) < TIGHT))
        expect([row[0], row[1], actual]).toEqual([row[0], row[1], row[column]]);
    }
  });

  test("the inverses give back the traffic", () => {
    for (const rows of Object.values<[number, number, number, number, number, number][]>(regimes as never)) {
      for (const [traffic, channels, blocking, carried, , free] of rows) {
        if (channels === 0) continue;
        // Where a quantity hardly moves with the traffic its last digit is worth more than 1e-12 of it: ask where it does.
        if (blocking > 1e-300 && free > 1e-3) {
          const slack = 1e-15 * Math.max(1, 1 / free, blocking / ((1 - blocking) * free));
          expect(relativeError(erlangB.traffic(channels, blocking), traffic)).toBeLessThan(TIGHT + slack);
        }
        const slope = (1 - blocking * (1 + free)) * (traffic / carried);
        if (slope > 1e-2) expect(relativeError(erlangB.offered(carried, channels), traffic)).toBeLessThan(TIGHT);
      }
    }
  });
});

describe("published values", () => {
  const input = (entry: Published, name: string): number => entry.inputs[name] as number;
  const a = (entry: Published): number => input(entry, "A_offered_erlang");
  const n = (entry: Published): number => input(entry, "N_servers");
  const check = (entry: Published, actual: number): void => {
    expect(Math.abs(actual - entry.expected)).toBeLessThanOrEqual(entry.tolerance ?? 0);
  };
  const of = (start: string): Published[] => published("EB-").filter((entry) => entry.quantity.startsWith(start));

  test.each(of("offered traffic A (erlang)").map((entry) => [title(entry), entry] as const))("%s", (_, entry) =>
    check(entry, erlangB.traffic(n(entry), input(entry, "B_blocking"))),
  );
  test.each(of("blocking probability").map((entry) => [title(entry), entry] as const))("%s", (_, entry) =>
    check(entry, erlangB.blocking(a(entry), n(entry))),
  );
  test.each(of("least integer N").map((entry) => [title(entry), entry] as const))("%s", (_, entry) =>
    check(entry, erlangB.channels(a(entry), input(entry, "B_blocking"))),
  );
  test.each(of("continuous Erlang B").map((entry) => [title(entry), entry] as const))("%s", (_, entry) =>
    check(entry, erlangB.blocking(a(entry), input(entry, "N_real"))),
  );
  test.each(of("improvement function").map((entry) => [title(entry), entry] as const))("%s", (_, entry) =>
    check(entry, erlangB.improvement(a(entry), n(entry))),
  );
  test.each(of("load of last trunk").map((entry) => [title(entry), entry] as const))("%s", (_, entry) =>
    check(entry, erlangB.improvement(a(entry), n(entry) - 1)),
  );
  // Blocking with one channel more or less than a group of which only the blocking is known: the recursion, one step each way.
  test(title(publishedValue("EB-B19")), () => {
    const entry = publishedValue("EB-B19");
    const lost = a(entry) * input(entry, "B_at_20");
    check(entry, lost / (21 + lost));
  });
  test(title(publishedValue("EB-B20")), () => {
    const entry = publishedValue("EB-B20");
    const before = input(entry, "B_at_20");
    check(entry, (20 * before) / (a(entry) * (1 - before)));
  });
  test(title(publishedValue("EB-B25")), () => {
    const entry = publishedValue("EB-B25");
    check(entry, erlangB.carried(a(entry), n(entry)));
  });
  test(title(publishedValue("EB-C11")), () => {
    // The real number of channels is no function of ours; at it, blocking is the target.
    const entry = publishedValue("EB-C11");
    expect(relativeError(erlangB.blocking(a(entry), entry.expected), input(entry, "B_blocking"))).toBeLessThan(1e-10);
  });
  test(title(publishedValue("EB-C12")), () => {
    const entry = publishedValue("EB-C12");
    check(entry, erlangB.traffic(input(entry, "N_real"), input(entry, "B_blocking")));
  });
  test(title(publishedValue("EB-D02")), () => {
    const entry = publishedValue("EB-D02");
    const step = 1e-4;
    const slope =
      (erlangB.blocking(a(entry) + step, n(entry)) - erlangB.blocking(a(entry) - step, n(entry))) / (2 * step);
    expect(relativeError(slope, entry.expected)).toBeLessThan(1e-8);
  });
  test.each(of("dE/dN").map((entry) => [title(entry), entry] as const))("%s", (_, entry) => {
    const step = 1e-4;
    const at = input(entry, "N_real");
    const slope = (erlangB.blocking(a(entry), at + step) - erlangB.blocking(a(entry), at - step)) / (2 * step);
    expect(relativeError(slope, entry.expected)).toBeLessThan(1e-7);
  });
  test(title(publishedValue("EB-D42")), () => {
    const entry = publishedValue("EB-D42");
    check(entry, erlangB.improvement(a(entry), input(entry, "trunk") - 1));
  });
});

describe("identities", () => {
  const options = { seed: 20261201, numRuns: 2000 };

  test("the recursion joins groups that differ by one, whichever method answers each", () => {
    fc.assert(
      fc.property(fc.oneof(nearby, fc.tuple(traffics, groups)), ([a, n]) => {
        const lost = a * erlangB.blocking(a, n);
        fc.pre(lost > 1e-290);
        expect(relativeError(erlangB.blocking(a, n + 1), lost / (n + 1 + lost))).toBeLessThan(TIGHT);
      }),
      options,
    );
  });

  test("carried and lost make up the offered traffic; improvement is what one channel more carries", () => {
    fc.assert(
      fc.property(fc.oneof(nearby, fc.tuple(traffics, groups)), ([a, n]) => {
        const carried = erlangB.carried(a, n);
        expect(relativeError(carried + a * erlangB.blocking(a, n), a)).toBeLessThan(TIGHT);
        expect(carried).toBeLessThanOrEqual(Math.min(a, n) * (1 + TIGHT));
        const gain = erlangB.carried(a, n + 1) - carried;
        expect(Math.abs(erlangB.improvement(a, n) - gain)).toBeLessThan(1e-14 * (a + 1));
      }),
      options,
    );
  });

  test("Erlang C from Erlang B: C = N B / (N - A (1 - B))", () => {
    fc.assert(
      fc.property(fc.oneof(nearby, fc.tuple(traffics, groups)), ([a, n]) => {
        fc.pre(n > 0 && a < n * (1 - 1e-3));
        const b = erlangB.blocking(a, n);
        fc.pre(b > 1e-290);
        expect(relativeError(erlangC.delayed(a, n), (n * b) / (n - a * (1 - b)))).toBeLessThan(1e-12);
      }),
      options,
    );
  });

  test("blocking rises with the traffic and falls with the channels", () => {
    fc.assert(
      fc.property(fc.oneof(nearby, fc.tuple(traffics, groups)), spread(-9, 0.5), ([a, n], part) => {
        const b = erlangB.blocking(a, n);
        expect(erlangB.blocking(a * (1 + part), n)).toBeGreaterThanOrEqual(b * (1 - TIGHT));
        expect(erlangB.blocking(a, n * (1 + part))).toBeLessThanOrEqual(b * (1 + TIGHT));
      }),
      options,
    );
  });

  test("a large group is nearly normal: blocking at N = A approaches sqrt(2 / (pi A))", () => {
    for (const a of [1e4, 1e6, 1e8]) {
      expect(relativeError(1 / erlangB.blocking(a, a), Math.sqrt((Math.PI * a) / 2) + 2 / 3)).toBeLessThan(0.2 / a);
    }
    // One standard deviation above: hazard of the normal distribution.
    const a = 1e8;
    const hazard = Math.exp(-0.5) / Math.sqrt(2 * Math.PI) / cdf(1);
    expect(relativeError(erlangB.blocking(a, a + 1e4), hazard / 1e4)).toBeLessThan(1e-4);
  });

  test("traffic and offered undo blocking and carried", () => {
    fc.assert(
      fc.property(spread(-1, 7), targets, (n, target) => {
        const a = erlangB.traffic(n, target);
        fc.pre(a > 1e-280);
        // One rounding unit of the traffic is this much of the blocking.
        const elasticity = n - erlangB.carried(a, n);
        expect(relativeError(erlangB.blocking(a, n), target)).toBeLessThan(TIGHT + 4e-16 * elasticity);
      }),
      options,
    );
    fc.assert(
      fc.property(spread(-3, 7), fc.double({ min: 1e-9, max: 1 - 1e-12, noNaN: true }), (n, part) => {
        const a = erlangB.offered(part * n, n);
        expect(relativeError(erlangB.carried(a, n), part * n)).toBeLessThan(TIGHT);
      }),
      options,
    );
  });
});

describe("smallest number of channels", () => {
  const options = { seed: 20261202, numRuns: 4000 };
  const isSmallest = (a: number, target: number): boolean => {
    const n = erlangB.channels(a, target);
    return erlangB.blocking(a, n) <= target && (n === 0 || erlangB.blocking(a, n - 1) > target);
  };

  test("it meets the target and one less does not", () => {
    fc.assert(
      fc.property(traffics, targets, (a, target) => isSmallest(a, target)),
      options,
    );
  });

  test("it meets the target and one less does not where a target lies on, just above or just below a group", () => {
    fc.assert(
      fc.property(
        spread(-2, 6),
        fc.double({ min: -3, max: 8, noNaN: true }),
        fc.constantFrom(0, 1, -1, 3, -3),
        (a, z, shift) => {
          const n = Math.max(1, Math.round(a + z * Math.sqrt(a)));
          const target = erlangB.blocking(a, n) * (1 + shift * 1e-15);
          fc.pre(target > 1e-300 && target < 1);
          expect(isSmallest(a, target)).toBe(true);
          if (shift === 0) expect(erlangB.channels(a, target)).toBe(n);
        },
      ),
      options,
    );
  });

  test("it is what the textbook recursion counts", () => {
    const counted = (a: number, target: number): number => {
      let n = 0;
      for (let b = 1; b > target; b = (a * b) / (n + a * b)) n++;
      return n;
    };
    fc.assert(
      fc.property(fc.double({ min: 1e-3, max: 3000, noNaN: true }), spread(-8, -0.1), (a, target) => {
        expect(erlangB.channels(a, target)).toBe(counted(a, target));
      }),
      { seed: 20261203, numRuns: 2000 },
    );
  });

  test("the same answer comes whatever was asked before", () => {
    const asked = fc.sample(fc.tuple(spread(0, 6), fc.constantFrom(0.001, 0.02, 0.37)), { seed: 4, numRuns: 300 });
    const first = asked.map(([a, target]) => erlangB.channels(a, target));
    const sorted = [...asked]
      .sort(([x], [y]) => y - x)
      .map(([a, target]) => [`${a} ${target}`, erlangB.channels(a, target)] as const);
    const bySorted = new Map(sorted);
    expect(asked.map(([a, target]) => bySorted.get(`${a} ${target}`))).toEqual(first);
  });

  test("the estimate is never further off than a third of what it says", () => {
    fc.assert(
      fc.property(
        spread(Math.log10(ESTIMATE_FROM), 8.9),
        fc.double({ min: -23.9, max: 1.9, noNaN: true }),
        (a, height) => {
          const target = Math.exp(height) / Math.sqrt(a);
          fc.pre(target < 1);
          const estimate = { channels: 0, error: 0 };
          estimateChannels(a, target, estimate);
          fc.pre(estimate.error < 0.5);
          const wanted = Math.log1p(-target) - Math.log(target);
          const missAt = (n: number): number => Math.log(idleOdds(a, n)) - wanted;
          const reach = estimate.error / 3;
          expect(missAt(Math.max(0, estimate.channels - reach))).toBeLessThan(0);
          expect(missAt(estimate.channels + reach)).toBeGreaterThan(0);
        },
      ),
      { seed: 20261204, numRuns: 5000 },
    );
  });
});

describe("edges", () => {
  test("no channels block everything, no traffic is never blocked", () => {
    expect(erlangB.blocking(3, 0)).toBe(1);
    expect(erlangB.blocking(0, 0)).toBe(0);
    expect(erlangB.blocking(0, 0.5)).toBe(0);
    expect(erlangB.carried(3, 0)).toBe(0);
    expect(erlangB.carried(0, 7)).toBe(0);
    expect(erlangB.channels(0, 0.01)).toBe(0);
    expect(erlangB.traffic(0, 0.01)).toBe(0);
    expect(erlangB.offered(0, 0)).toBe(0);
    expect(erlangB.improvement(0, 4)).toBe(0);
  });

  test("short fractions come out exactly, and count as met", () => {
    expect(erlangB.blocking(1, 1)).toBe(0.5);
    expect(erlangB.blocking(1, 2)).toBe(0.2);
    expect(erlangB.blocking(1.5, 1)).toBe(0.6);
    expect(erlangB.channels(1, 0.5)).toBe(1);
    expect(erlangB.channels(1, 0.2)).toBe(2);
    expect(erlangB.channels(1.5, 0.6)).toBe(1);
  });

  test("blocking below the smallest number is 0, never an error", () => {
    expect(erlangB.blocking(1, 1e6)).toBe(0);
    expect(erlangB.blocking(1e-9, 1e9)).toBe(0);
    expect(erlangB.blocking(1e-300, 1.01)).toBeGreaterThanOrEqual(0);
    expect(erlangB.improvement(1, 1e6)).toBe(0);
    expect(erlangB.carried(1, 1e6)).toBe(1);
  });

  test("every allowed input has a finite answer", () => {
    const wide = fc.oneof(fc.double({ min: 0, max: Number.MAX_VALUE, noNaN: true }), spread(-320, 308), fc.constant(0));
    const wideGroups = fc.oneof(fc.double({ min: 0, max: 1e9, noNaN: true }), spread(-320, 9), fc.constant(0));
    fc.assert(
      fc.property(wide, wideGroups, targets, (a, n, target) => {
        const b = erlangB.blocking(a, n);
        expect(b >= 0 && b <= 1).toBe(true);
        const values = [erlangB.carried(a, n), erlangB.improvement(a, n), erlangB.traffic(n, target)];
        if (a < n) values.push(erlangB.offered(a, n));
        if (a <= 1e9) values.push(erlangB.channels(a, target));
        for (const value of values) expect(value >= 0 && value < Infinity).toBe(true);
      }),
      { seed: 20261205, numRuns: 4000 },
    );
  });

  test("bad input is refused by name, an impossible measurement has no answer", () => {
    expect(() => erlangB.blocking(-1, 3)).toThrow(new DomainError("trafficE", -1, "a number of at least 0"));
    expect(() => erlangB.blocking(NaN, 3)).toThrow(DomainError);
    expect(() => erlangB.blocking(1, 2e9)).toThrow(/channels is 2000000000/);
    expect(() => erlangB.channels(10, 0)).toThrow(/blocking is 0; allowed: a probability from 1e-300 to below 1/);
    expect(() => erlangB.channels(10, 1)).toThrow(DomainError);
    expect(() => erlangB.traffic(10, 1)).toThrow(DomainError);
    expect(() => erlangB.offered(10, 10)).toThrow(NoAnswerError);
    expect(() => erlangB.offered(10, 10)).toThrow("10 channels cannot carry 10 erlang");
  });
});
