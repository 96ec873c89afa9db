import fc from "fast-check";
import * as erlangC from "../../../src/model/blocking/erlang-c";
import * as sharing from "../../../src/model/blocking/sharing";
import { DomainError, NoAnswerError } from "../../../src/model/errors";
import { publishedValue, title } from "../../checks/published";
import reference from "../../fixtures/blocking/sharing.json";
import { relativeError } from "../../support/relative-error";

/** The promise is 1e-12. */
const TIGHT = 2e-15;

describe("50-digit values", () => {
  test("throughput", () => {
    expect(reference.throughput.rows.length).toBeGreaterThan(50);
    for (const [capacity, traffic, peak, expected] of reference.throughput.rows as [number, number, number, number][]) {
      const actual = sharing.throughput(capacity, traffic, peak);
      if (!(relativeError(actual, expected) < TIGHT))
        expect([capacity, traffic, peak, actual]).toEqual([capacity, traffic, peak, expected]);
    }
  });
  test("capacity", () => {
    expect(reference.capacity.rows.length).toBeGreaterThan(50);
    for (const [traffic, rate, peak, expected] of reference.capacity.rows as [number, number, number, number][]) {
      const actual = sharing.capacity(traffic, rate, peak);
      if (!(relativeError(actual, expected) < TIGHT))
        expect([traffic, rate, peak, actual]).toEqual([traffic, rate, peak, expected]);
    }
  });
});

describe("published values", () => {
  const at = (id: string): { inputs: Record<string, number>; check: (actual: number) => void } => {
    const entry = publishedValue(id);
    return {
      inputs: entry.inputs as Readonly<Record<string, number>>,
      check: (actual) => expect(Math.abs(actual - entry.expected)).toBeLessThanOrEqual(entry.tolerance!),
    };
  };
  test(title(publishedValue("PS-01")), () => {
    const { inputs, check } = at("PS-01");
    const capacity = inputs.capacity_bps! / 1e6;
    check(inputs.file_bits! / 1e6 / sharing.throughput(capacity, capacity * inputs.rho!));
  });
  test(title(publishedValue("PS-02")), () => {
    const { inputs, check } = at("PS-02");
    const capacity = inputs.capacity_bps! / 1e6;
    check(sharing.throughput(capacity, capacity * inputs.rho!) * 1e6);
  });
  test.each(["PS-04", "PS-05"].map((id) => [title(publishedValue(id)), id]))("%s", (_, id) => {
    const { inputs, check } = at(id);
    const r = inputs.R_parallel_full_rate!;
    check(1 / sharing.throughput(r, r * inputs.rho!, 1));
  });
  test(title(publishedValue("PS-07")), () => {
    const { inputs, check } = at("PS-07");
    const capacity = inputs.capacity_bps! / 1e6;
    check(inputs.file_bits! / 1e6 / sharing.throughput(capacity, capacity * inputs.rho!, inputs.peak_rate_bps! / 1e6));
  });
  test(title(publishedValue("PS-08")), () => {
    const { inputs, check } = at("PS-08");
    const peak = inputs.peak_rate_bps! / 1e6;
    check(sharing.capacity(inputs.offered_bps! / 1e6, peak / inputs.f_target!, peak) * 1e6);
  });
});

describe("identities", () => {
  const options = { seed: 20261201, numRuns: 300 };
  const rate = fc.double({ min: -2, max: 4, noNaN: true }).map((e) => 10 ** e);
  const share = fc.double({ min: 0, max: 0.999, noNaN: true });

  test("the delay factor is that of Erlang C", () => {
    fc.assert(
      fc.property(rate, share, fc.double({ min: 1.001, max: 400, noNaN: true }), (capacity, load, r) => {
        const peak = capacity / r;
        const traffic = capacity * load;
        const waiting = erlangC.delayed(traffic / peak, capacity / peak);
        const expected = peak / (1 + waiting / ((capacity - traffic) / peak));
        expect(relativeError(sharing.throughput(capacity, traffic, peak), expected)).toBeLessThan(1e-13);
      }),
      options,
    );
  });

  test("a peak at or above the capacity does not bind; one below costs rate", () => {
    fc.assert(
      fc.property(rate, share, fc.double({ min: 0.01, max: 3, noNaN: true }), (capacity, load, ratio) => {
        const traffic = capacity * load;
        const alone = sharing.throughput(capacity, traffic);
        const limited = sharing.throughput(capacity, traffic, capacity * ratio);
        if (ratio >= 1) expect(limited).toBe(alone);
        else {
          expect(limited).toBeLessThanOrEqual(Math.min(alone, capacity * ratio) * (1 + TIGHT));
          // Never less than when a transfer in service alone ran at the peak and waited as on one server.
          expect(limited).toBeGreaterThanOrEqual((capacity * ratio * alone) / (capacity * ratio + alone) / (1 + TIGHT));
        }
      }),
      options,
    );
  });

  test("throughput rises with capacity and with the peak, and falls with traffic", () => {
    fc.assert(
      fc.property(rate, share, rate, fc.double({ min: 1, max: 2, noNaN: true }), (capacity, load, peak, step) => {
        const traffic = capacity * load;
        const here = sharing.throughput(capacity, traffic, peak);
        expect(sharing.throughput(capacity * step, traffic, peak)).toBeGreaterThanOrEqual(here * (1 - TIGHT));
        expect(sharing.throughput(capacity, traffic, peak * step)).toBeGreaterThanOrEqual(here * (1 - TIGHT));
        expect(sharing.throughput(capacity, traffic / step, peak)).toBeGreaterThanOrEqual(here * (1 - TIGHT));
      }),
      options,
    );
  });

  test("capacity gives back the throughput", () => {
    fc.assert(
      fc.property(rate, rate, fc.double({ min: 0.001, max: 0.9999, noNaN: true }), (traffic, peak, part) => {
        const wanted = peak * part;
        const capacity = sharing.capacity(traffic, wanted, peak);
        // The capacity is known to its last bit, of which the spare part may be a small one.
        const bit = capacity / (capacity - traffic);
        expect(relativeError(sharing.throughput(capacity, traffic, peak), wanted)).toBeLessThan(1e-15 * (4 + bit));
        expect(relativeError(sharing.throughput(traffic + wanted, traffic), wanted)).toBeLessThan(
          1e-15 * (4 + (traffic + wanted) / wanted),
        );
      }),
      options,
    );
  });
});

describe("edges", () => {
  test("an empty link gives the peak, or all of it", () => {
    expect(sharing.throughput(10, 0)).toBe(10);
    expect(sharing.throughput(10, 0, 3)).toBe(3);
    expect(sharing.throughput(10, 0, 30)).toBe(10);
    expect(sharing.capacity(0, 5)).toBe(5);
    expect(sharing.capacity(0, 5, 6)).toBe(5);
  });
  test("extremes stay numbers", () => {
    // 1e18 transfers at full rate: a fifth of them wait, for a thousand millionth of their time.
    expect(relativeError(sharing.throughput(1e9, 1e9 - 1, 1e-9), 1e-9 / (1 + 0.22e-9))).toBeLessThan(1e-11);
    expect(sharing.throughput(1e9, 0.5e9, 1e-300)).toBe(1e-300);
    expect(sharing.throughput(1, 1 - 2 ** -53, 1e-12)).toBeGreaterThan(0);
    expect(sharing.capacity(1e9, 1e-300, 2e-300)).toBe(1e9);
    expect(sharing.capacity(3, 1e-3, 1e-3 * (1 + 2 ** -52))).toBeGreaterThan(3.3);
  });
  test("no answer says the numbers", () => {
    expect(() => sharing.throughput(10, 10)).toThrow(NoAnswerError);
    expect(() => sharing.throughput(10, 12, 2)).toThrow("12 Mbit/s of traffic is not below the capacity of 10 Mbit/s");
    expect(() => sharing.capacity(10, 2, 2)).toThrow(NoAnswerError);
    expect(() => sharing.capacity(10, 3, 2)).toThrow("peak is 2 Mbit/s");
  });
  test.each([
    ["capacityMbps", () => sharing.throughput(0, 1)],
    ["trafficMbps", () => sharing.throughput(1, -1)],
    ["peakMbps", () => sharing.throughput(1, 0.5, 0)],
    ["trafficMbps", () => sharing.capacity(NaN, 1)],
    ["throughputMbps", () => sharing.capacity(1, 0)],
    ["peakMbps", () => sharing.capacity(1, 1, -1)],
  ])("bad input names %s", (parameter, call) => {
    expect(call).toThrow(DomainError);
    expect(call).toThrow(parameter);
  });
});
