import fc from "fast-check";
import * as erlangB from "../../../src/model/blocking/erlang-b";
import * as handover from "../../../src/model/blocking/handover";
import * as multiservice from "../../../src/model/blocking/multiservice";
import { DomainError, NoAnswerError } from "../../../src/model/errors";
import { published, publishedValue, title, type Published } from "../../checks/published";
import reference from "../../fixtures/blocking/handover.json";
import { relativeError } from "../../support/relative-error";

/** The promise is 1e-12. */
const TIGHT = 2e-14;

test("50-digit values of the chain, failures down to 1e-195 among them", () => {
  expect(Math.min(...reference.rows.map((row) => row[5]!).filter((failure) => failure > 0))).toBeLessThan(1e-190);
  for (const [newE, handoverE, channels, guard, blocked, failed] of reference.rows as [
    number,
    number,
    number,
    number,
    number,
    number,
  ][]) {
    const actual = handover.blocking(newE, handoverE, channels, guard);
    if (!(relativeError(actual[0], blocked) < TIGHT && relativeError(actual[1], failed) < TIGHT)) {
      expect([newE, handoverE, channels, guard, ...actual]).toEqual([
        newE,
        handoverE,
        channels,
        guard,
        blocked,
        failed,
      ]);
    }
  }
});

describe("published values", () => {
  const input = (entry: Published, name: string): number => entry.inputs[name] as number;
  const check = (entry: Published, actual: number): void => {
    expect(Math.abs(actual - entry.expected)).toBeLessThanOrEqual(entry.tolerance ?? 0);
  };
  const chains = published("GC-").filter(({ inputs }) => "g_guard_channels" in inputs);
  test.each(chains.map((entry) => [title(entry), entry] as const))("%s", (_, entry) => {
    const [blocked, failed] = handover.blocking(
      input(entry, "A_new_erlang"),
      input(entry, "A_handover_erlang"),
      input(entry, "C_channels"),
      input(entry, "g_guard_channels"),
    );
    check(entry, entry.quantity === "new-call blocking" ? blocked : failed);
  });
  test(title(publishedValue("GC-07")), () => {
    const entry = publishedValue("GC-07");
    const cell = [input(entry, "A_new_erlang"), input(entry, "A_handover_erlang"), input(entry, "C_channels")] as const;
    check(entry, handover.guard(...cell, input(entry, "target")));
  });
  test(title(publishedValue("GM-05")), () => {
    const entry = publishedValue("GM-05");
    // Handovers per call: handovers over new calls, which hold a channel equally long.
    check(entry, handover.traffic(1, input(entry, "mean_call_s"), input(entry, "mean_dwell_s"))[0]);
  });
  test(title(publishedValue("GM-06")), () => {
    const entry = publishedValue("GM-06");
    check(entry, handover.traffic(1, input(entry, "mean_call_s"), input(entry, "mean_dwell_s"))[1]);
  });
});

describe("identities", () => {
  const options = { seed: 20261201, numRuns: 200 };
  const traffic = fc.double({ min: -3, max: 3, noNaN: true }).map((e) => 10 ** e);
  const channels = fc.integer({ min: 1, max: 600 });

  test("without guard channels both are Erlang B of the whole traffic", () => {
    fc.assert(
      fc.property(traffic, traffic, channels, (newE, handoverE, n) => {
        const [blocked, failed] = handover.blocking(newE, handoverE, n, 0);
        expect(blocked).toBe(failed);
        const expected = erlangB.blocking(newE + handoverE, n);
        // The plain sum of the traffic is rounded, and blocking magnifies that by the free channels.
        if (expected > 1e-300) expect(relativeError(blocked, expected)).toBeLessThan(TIGHT + n * 2e-16);
      }),
      options,
    );
  });

  test("with all channels guarded, or no new calls, handovers have the cell to themselves", () => {
    fc.assert(
      fc.property(traffic, traffic, channels, (newE, handoverE, n) => {
        const alone = erlangB.blocking(handoverE, n);
        if (alone < 1e-300) return;
        const [blocked, failed] = handover.blocking(newE, handoverE, n, n);
        expect(blocked).toBe(1);
        expect(relativeError(failed, alone)).toBeLessThan(TIGHT);
        expect(relativeError(handover.blocking(0, handoverE, n, n >> 1)[1], alone)).toBeLessThan(TIGHT);
      }),
      options,
    );
  });

  test("guard channels are a reservation between two services of one width", () => {
    fc.assert(
      fc.property(traffic, traffic, channels, fc.nat(), (newE, handoverE, n, seed) => {
        const guard = seed % (n + 1);
        const services = multiservice.blocking(n, [newE, handoverE], [1, 1], [guard, 0]);
        handover.blocking(newE, handoverE, n, guard).forEach((probability, i) => {
          if (probability > 1e-290) expect(relativeError(services[i]!, probability)).toBeLessThan(TIGHT * 5);
        });
      }),
      options,
    );
  });

  test("a guard channel more blocks more new calls and fails fewer handovers", () => {
    fc.assert(
      fc.property(traffic, traffic, channels, fc.nat(), (newE, handoverE, n, seed) => {
        const guard = seed % n;
        const [blocked, failed] = handover.blocking(newE, handoverE, n, guard);
        const [blockedMore, failedLess] = handover.blocking(newE, handoverE, n, guard + 1);
        expect(blockedMore).toBeGreaterThanOrEqual(blocked * (1 - TIGHT));
        expect(failedLess).toBeLessThanOrEqual(failed * (1 + TIGHT));
        expect(failed).toBeLessThanOrEqual(blocked);
      }),
      options,
    );
  });

  test("the guard count meets the target and one fewer misses it", () => {
    const targets = fc.double({ min: -200, max: -0.1, noNaN: true }).map((e) => 10 ** e);
    let answered = 0;
    fc.assert(
      fc.property(traffic, traffic, channels, targets, (newE, handoverE, n, target) => {
        if (erlangB.blocking(handoverE, n) > target) {
          expect(() => handover.guard(newE, handoverE, n, target)).toThrow(NoAnswerError);
          return;
        }
        const guard = handover.guard(newE, handoverE, n, target);
        expect(handover.blocking(newE, handoverE, n, guard)[1]).toBeLessThanOrEqual(target * (1 + TIGHT));
        if (guard > 0)
          expect(handover.blocking(newE, handoverE, n, guard - 1)[1]).toBeGreaterThan(target * (1 - TIGHT));
        if (guard > 0) answered++;
      }),
      options,
    );
    expect(answered).toBeGreaterThan(10);
  });

  test("traffic balances: what comes by handover goes by handover", () => {
    fc.assert(
      fc.property(
        traffic,
        fc.double({ min: 1, max: 1e4, noNaN: true }),
        fc.double({ min: 1, max: 1e4, noNaN: true }),
        (newE, holding, dwell) => {
          const [handoverE, channelHolding] = handover.traffic(newE, holding, dwell);
          const goingOn = holding / (holding + dwell);
          expect(relativeError(handoverE, goingOn * (newE + handoverE))).toBeLessThan(
            1e-15 * (4 + (4 * dwell) / holding),
          );
          expect(relativeError(1 / channelHolding, 1 / holding + 1 / dwell)).toBeLessThan(1e-15);
          // All traffic together is that of whole calls.
          const callsPerS = newE / channelHolding;
          expect(relativeError(newE + handoverE, callsPerS * holding)).toBeLessThan(1e-14);
        },
      ),
      options,
    );
  });
});

describe("edges", () => {
  test("no traffic, no channels", () => {
    expect(handover.blocking(0, 0, 5, 0)).toEqual([0, 0]);
    expect(handover.blocking(0, 0, 5, 5)).toEqual([1, 0]);
    expect(handover.blocking(3, 0, 5, 2)[1]).toBe(0);
    expect(handover.blocking(3, 1, 0, 0)).toEqual([1, 1]);
    expect(handover.guard(3, 0, 5, 0.001)).toBe(1);
    expect(handover.guard(0, 0, 5, 0.001)).toBe(0);
    expect(handover.guard(0, 0, 5, 1e-300)).toBe(0);
    expect(handover.traffic(0, 100, 100)).toEqual([0, 50]);
  });
  test("a large cell takes few guard channels for a failure of 1e-12", () => {
    const guard = handover.guard(9e5, 1e4, 920000, 1e-12);
    expect(handover.blocking(9e5, 1e4, 920000, guard)[1]).toBeLessThanOrEqual(1e-12);
    expect(handover.guard(20, 2, 30, 1e-12)).toBe(11);
    expect(handover.blocking(20, 2, 30, 11)[1]).toBeLessThanOrEqual(1e-12);
    expect(handover.blocking(20, 2, 30, 10)[1]).toBeGreaterThan(1e-12);
  });
  test("says what handovers alone would suffer", () => {
    expect(() => handover.guard(1, 50, 40, 0.01)).toThrow("With all 40 channels");
    expect(() => handover.guard(1, 1, 0, 0.01)).toThrow(NoAnswerError);
  });
  test.each([
    ["newTrafficE", () => handover.blocking(-1, 1, 5, 1)],
    ["handoverTrafficE", () => handover.blocking(1, NaN, 5, 1)],
    ["channels", () => handover.blocking(1, 1, 5.5, 1)],
    ["channels", () => handover.guard(1, 1, 2e6, 0.1)],
    ["guardChannels", () => handover.blocking(1, 1, 5, 6)],
    ["guardChannels", () => handover.blocking(1, 1, 5, -1)],
    ["failureTarget", () => handover.guard(1, 1, 5, 0)],
    ["failureTarget", () => handover.guard(1, 1, 5, 1)],
    ["newTrafficE", () => handover.traffic(-1, 1, 1)],
    ["holdingTimeS", () => handover.traffic(1, 0, 1)],
    ["dwellTimeS", () => handover.traffic(1, 1, 0)],
  ])("bad input names %s", (parameter, call) => {
    expect(call).toThrow(DomainError);
    expect(call).toThrow(parameter);
  });
});
