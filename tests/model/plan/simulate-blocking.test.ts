import fc from "fast-check";
import { simulateBlocking } from "../../../functions/simulate";
import * as erlangB from "../../../src/model/blocking/erlang-b";
import { DomainError } from "../../../src/model/errors";
import { DepartureTimes } from "../../../src/model/plan/departure-times";
import { blockedByBatch, blocking, estimateOf, HOLDING_TIMES } from "../../../src/model/plan/simulate-blocking";
import type { CellError } from "../../../src/sheet/cell-error";

describe("against Erlang B, which the simulation does not know", () => {
  const groups: [number, number][] = [
    [0.5, 1],
    [10, 15],
    [40, 40],
    [100, 60],
  ];
  const cases = HOLDING_TIMES.flatMap((holding) => groups.map(([a, n]) => [holding, a, n] as const));
  test.each(cases)("%s holding times, %p erlang on %p channels: twice the half-width holds it", (holding, a, n) => {
    const [estimate, halfWidth] = blocking(a, n, 200_000, 11, holding);
    const exact = erlangB.blocking(a, n);
    expect(Math.abs(estimate - exact)).toBeLessThanOrEqual(2 * halfWidth);
    expect(halfWidth).toBeGreaterThan(0);
    expect(halfWidth).toBeLessThan(0.25 * exact);
  });

  test.each(HOLDING_TIMES)("%s: about 95 of 100 intervals hold the exact value", (holding) => {
    const exact = erlangB.blocking(10, 12);
    let held = 0;
    for (let seed = 0; seed < 100; seed++) {
      const [estimate, halfWidth] = blocking(10, 12, 10_000, seed, holding);
      if (Math.abs(estimate - exact) <= halfWidth) held++;
    }
    // Five standard deviations of a binomial number to the low side.
    expect(held).toBeGreaterThanOrEqual(84);
    expect(held).toBeLessThan(100);
  });

  test("four times the calls halve the interval", () => {
    const [, wide] = blocking(20, 22, 100_000, 3);
    const [, narrow] = blocking(20, 22, 400_000, 3);
    expect(wide / narrow).toBeGreaterThan(1.3);
    expect(wide / narrow).toBeLessThan(3.2);
  });
});

describe("edges", () => {
  test("the same seed gives the same answer, another seed another", () => {
    expect(blocking(10, 12, 20_000, 4)).toEqual(blocking(10, 12, 20_000, 4));
    expect(blocking(10, 12, 20_000, 4)).not.toEqual(blocking(10, 12, 20_000, 5));
  });
  test("no channels block every call", () => {
    expect(blocking(3, 0, 1000, 1)).toEqual([1, 0]);
  });
  test("a blocking that was never seen is below 3 / calls", () => {
    expect(blocking(1, 1000, 60_000, 1)).toEqual([0, 3 / 60_000]);
  });
  test("long gaps between calls cost no digits: with one channel and rare calls blocking is A / (1 + A)", () => {
    const [estimate, halfWidth] = blocking(0.002, 1, 500_000, 9, "constant");
    expect(Math.abs(estimate - 0.002 / 1.002)).toBeLessThanOrEqual(2 * halfWidth);
  });
  test("batches come one after another, as long as they are asked for, and add up to the answer", () => {
    const run = blockedByBatch(10, 12, 4, "exponential", 1000);
    const blocked = Array.from({ length: 20 }, () => run.next().value);
    const { estimate, halfWidth } = estimateOf(blocked, 1000);
    expect(blocking(10, 12, 20_000, 4)).toEqual([estimate, halfWidth]);
    expect(run.next().value).toBeGreaterThan(0);
  });
  test("the estimate is the mean of the batches with Student's t", () => {
    // Two batches: t of one degree of freedom at 95 % is 12.7062 (tables), the standard error of 10 and 20 is 5.
    const { estimate, halfWidth } = estimateOf([10, 20], 100);
    expect(estimate).toBeCloseTo(0.15, 14);
    expect(halfWidth).toBeCloseTo(0.635310236808735, 12);
  });
  test.each<[string, () => unknown, string]>([
    ["traffic 0", () => blocking(0, 1, 1000, 1), "trafficE"],
    ["too much traffic", () => blocking(10_001, 1, 2e6, 1), "trafficE"],
    ["half a channel", () => blocking(1, 1.5, 1000, 1), "channels"],
    ["few calls", () => blocking(1, 1, 999, 1), "calls"],
    ["too many calls", () => blocking(1, 1, 2_000_001, 1), "calls"],
    ["calls that do not outlast the memory", () => blocking(100, 100, 19_999, 1), "at least 20000 calls"],
    ["more traffic than long phases allow", () => blocking(3000, 1, 2e6, 1, "hyperexponential"), "at most 2500 erlang"],
    ["a negative seed", () => blocking(1, 1, 1000, -1), "seed"],
    ["another distribution", () => blocking(1, 1, 1000, 1, "uniform" as "constant"), "holdingTime"],
  ])("%s is refused by name", (_, call, words) => {
    expect(call).toThrow(DomainError);
    expect(call).toThrow(words);
  });
});

test("departures leave in the order of their times", () => {
  fc.assert(
    fc.property(fc.array(fc.double({ min: 0, max: 100, noNaN: true }), { maxLength: 60 }), (ends) => {
      const times = new DepartureTimes(ends.length);
      ends.forEach((end) => times.add(end));
      for (let now = 0; now <= 100; now += 5) {
        times.removeUpTo(now);
        expect(times.size).toBe(ends.filter((end) => end > now).length);
      }
    }),
    { seed: 1964, numRuns: 300 },
  );
});

describe("in the sheet", () => {
  test("spills estimate and half-width, with headings where asked", () => {
    const [headings, values] = simulateBlocking([[10]], [[15]], [[20_000]], [[1]], [["Constant"]], [[true]]);
    expect(headings).toEqual(["estimate", "half-width"]);
    expect(values).toEqual(blocking(10, 15, 20_000, 1, "constant"));
  });
  test("one bad row spoils no other", () => {
    const rows = simulateBlocking([[10], [-1], [null]], [[15]], [[20_000]], [[1]]);
    expect(rows[0]).toEqual(blocking(10, 15, 20_000, 1));
    expect((rows[1]![0] as CellError).code).toBe("#VALUE!");
    expect(rows[2]).toEqual(["", ""]);
  });
});
