import fc from "fast-check";
import * as engset from "../../../src/model/blocking/engset";
import * as erlangB from "../../../src/model/blocking/erlang-b";
import { DomainError } from "../../../src/model/errors";
import { published, publishedValue, title, type Published } from "../../checks/published";
import reference from "../../fixtures/blocking/engset.json";
import { relativeError } from "../../support/relative-error";

/** The promise is 1e-12; the methods keep within this, so that a lost digit shows. */
const TIGHT = 3e-14;

type Quantity = (sources: number, trafficPerIdleSourceE: number, channels: number) => number;
const quantities: readonly (readonly [string, Quantity, number])[] = [
  ["time congestion", engset.timeCongestion, 3],
  ["call congestion", engset.callCongestion, 4],
  ["traffic congestion", engset.trafficCongestion, 5],
];

describe("50-digit values", () => {
  const { about: _about, columns: _columns, ...regimes } = reference;
  const cases = Object.keys(regimes).flatMap((regime) => quantities.map((quantity) => [regime, ...quantity] as const));

  test.each(cases)("%s: %s", (regime, _name, quantity, column) => {
    const rows: number[][] = regimes[regime as keyof typeof regimes];
    expect(rows.length).toBeGreaterThan(15);
    for (const row of rows) {
      const inputs = [row[0]!, row[1]!, row[2]!] as const;
      const actual = quantity(...inputs);
      const expected = row[column]!;
      if (!(relativeError(actual, expected) < TIGHT)) expect([...inputs, actual]).toEqual([...inputs, expected]);
    }
  });
});

describe("published values", () => {
  const input = (entry: Published, name: string): number => entry.inputs[name] as number;
  const check = (entry: Published, actual: number): void => {
    expect(Math.abs(actual - entry.expected)).toBeLessThanOrEqual(entry.tolerance ?? 0);
  };
  const of = (quantity: string): (readonly [string, Published])[] =>
    published("EN-")
      .filter((entry) => entry.quantity.startsWith(quantity) && "n_servers" in entry.inputs)
      .filter((entry) => "beta_per_idle_source" in entry.inputs)
      .map((entry) => [title(entry), entry] as const);
  const at = (entry: Published): [number, number, number] => [
    input(entry, "S_sources"),
    input(entry, "beta_per_idle_source"),
    input(entry, "n_servers"),
  ];

  describe.each(quantities)("%s", (name, quantity) => {
    test.each(of(name))("%s", (_, entry) => check(entry, quantity(...at(entry))));
  });
  test.each(published("EN-22", "EN-23").map((entry) => [title(entry), entry] as const))("%s", (_, entry) => {
    const perSource = input(entry, "A_total_offered_erlang") / input(entry, "S_sources");
    const [sources, channels] = [input(entry, "S_sources"), input(entry, "n_servers")];
    check(entry, engset.callCongestion(sources, engset.idleTraffic(perSource), channels));
  });
  test(title(publishedValue("EN-21")), () => {
    const entry = publishedValue("EN-21");
    // The entry goes from idle to offered; our function goes back.
    expect(relativeError(engset.idleTraffic(entry.expected), input(entry, "beta_per_idle_source"))).toBeLessThan(1e-15);
  });
});

describe("identities", () => {
  const options = { seed: 20261201, numRuns: 300 };
  const sourceNumbers = fc.oneof(
    fc.integer({ min: 1, max: 60 }),
    fc.double({ min: 0, max: 6, noNaN: true }).map((e) => 10 ** e),
  );
  const odds = fc.double({ min: -4, max: 3, noNaN: true }).map((e) => 10 ** e);
  const shares = fc.double({ min: 0, max: 1, noNaN: true });

  test("the three congestions are those of one model: C = E (S - N)/S and B = C (1 + b)/(1 + b C)", () => {
    fc.assert(
      fc.property(sourceNumbers, odds, shares, (sources, b, part) => {
        const channels = part * sources;
        const c = engset.trafficCongestion(sources, b, channels);
        expect(
          relativeError(c, (engset.timeCongestion(sources, b, channels) * (sources - channels)) / sources),
        ).toBeLessThan(TIGHT);
        // Blocked calls over all calls, from the mean number of idle sources.
        const call = engset.callCongestion(sources, b, channels);
        if (c > 1e-290) expect(relativeError(call, (c * (1 + b)) / (1 + b * c))).toBeLessThan(TIGHT);
      }),
      options,
    );
  });

  test("whole and fractional channels obey the recursion over channels", () => {
    fc.assert(
      fc.property(sourceNumbers, odds, shares, (sources, b, part) => {
        const channels = 1 + part * (sources - 1);
        const before = engset.timeCongestion(sources, b, channels - 1);
        const weighted = (sources - channels + 1) * b * before;
        const here = engset.timeCongestion(sources, b, channels);
        // channels - 1 may round, which the recursion magnifies by the steepness of E in N.
        if (here > 1e-290) expect(relativeError(here, weighted / (channels + weighted))).toBeLessThan(1e-12);
      }),
      options,
    );
  });

  test("with many sources it is Erlang B, at whole and at fractional channels", () => {
    for (const [traffic, channels] of [
      [10, 15],
      [10, 7.5],
      [0.5, 0.25],
      [40, 52.3],
    ] as const) {
      const sources = 1e9;
      const limit = erlangB.blocking(traffic, channels);
      const finite = engset.timeCongestion(sources, traffic / sources, channels);
      // The two differ by terms of the order channels^2/sources.
      expect(relativeError(finite, limit)).toBeLessThan((4 * channels * channels + 40) / sources);
      expect(finite).not.toBe(limit);
    }
  });

  test("congestion falls with channels and rises with traffic and sources", () => {
    fc.assert(
      fc.property(sourceNumbers, odds, shares, shares, (sources, b, part, step) => {
        const channels = part * sources;
        for (const [, quantity] of quantities) {
          const here = quantity(sources, b, channels);
          expect(quantity(sources, b, channels + step)).toBeLessThanOrEqual(here * (1 + TIGHT));
          expect(quantity(sources, b * (1 + step), channels)).toBeGreaterThanOrEqual(here * (1 - TIGHT));
          expect(quantity(sources + step, b, channels)).toBeGreaterThanOrEqual(here * (1 - TIGHT));
        }
      }),
      options,
    );
  });

  test("the number of channels meets the target and one fewer misses it", () => {
    const targets = fc.double({ min: -250, max: -0.001, noNaN: true }).map((e) => 10 ** e);
    const many = fc.double({ min: 0, max: 9, noNaN: true }).map((e) => Math.round(10 ** e));
    fc.assert(
      fc.property(many, odds, targets, (sources, b, target) => {
        const found = engset.channels(sources, b, target);
        expect(Number.isInteger(found) && found <= sources).toBe(true);
        expect(engset.callCongestion(sources, b, found)).toBeLessThanOrEqual(target);
        if (found > 0) expect(engset.callCongestion(sources, b, found - 1)).toBeGreaterThan(target);
      }),
      options,
    );
  });
});

describe("edges", () => {
  test("a channel for each source: nothing is blocked, yet all may be busy", () => {
    expect(engset.callCongestion(5, 0.25, 5)).toBe(0);
    expect(engset.trafficCongestion(5, 0.25, 5)).toBe(0);
    expect(relativeError(engset.timeCongestion(5, 0.25, 5), 0.2 ** 5)).toBeLessThan(1e-15);
    expect(engset.timeCongestion(5, 0.25, 6)).toBe(0);
    expect(engset.timeCongestion(5, 0.25, 1e9)).toBe(0);
  });
  test("no channels, no traffic", () => {
    expect(engset.timeCongestion(5, 0.25, 0)).toBe(1);
    expect(engset.callCongestion(1, 0.25, 0)).toBe(1);
    expect(engset.timeCongestion(5, 0, 2)).toBe(0);
    expect(engset.timeCongestion(5, 0, 0.5)).toBe(0);
    expect(engset.channels(5, 0, 0.01)).toBe(1);
    expect(engset.idleTraffic(0)).toBe(0);
  });
  test("one idle source is never blocked on one channel", () => {
    expect(engset.callCongestion(1, 100, 1)).toBe(0);
    expect(engset.channels(1, 100, 0.01)).toBe(1);
  });
  test("a hair of a channel is no channel", () => {
    expect(engset.timeCongestion(5, 0.25, 1e-310)).toBe(1);
    expect(relativeError(engset.timeCongestion(5, 0.25, 1e-12), 1)).toBeLessThan(1e-10);
  });
  test.each([
    ["sources", () => engset.timeCongestion(0, 0.1, 1)],
    ["sources", () => engset.callCongestion(2e9, 0.1, 1)],
    ["trafficPerIdleSourceE", () => engset.timeCongestion(5, -0.1, 1)],
    ["trafficPerIdleSourceE", () => engset.trafficCongestion(5, NaN, 1)],
    ["channels", () => engset.timeCongestion(5, 0.1, -1)],
    ["channels", () => engset.timeCongestion(5, 0.1, Infinity)],
    ["blocking", () => engset.channels(5, 0.1, 0)],
    ["blocking", () => engset.channels(5, 0.1, 1)],
    ["trafficPerSourceE", () => engset.idleTraffic(1)],
  ])("bad input names %s", (parameter, call) => {
    expect(call).toThrow(DomainError);
    expect(call).toThrow(parameter);
  });
});
