/** Loss formulas against a simulation of calls, which knows none of them. Times are in mean holding times. */
import * as engset from "../../../src/model/blocking/engset";
import * as erlangB from "../../../src/model/blocking/erlang-b";
import * as overflow from "../../../src/model/blocking/overflow";
import * as peaky from "../../../src/model/blocking/peaky";
import * as retry from "../../../src/model/blocking/retry";
import { Clock } from "../../support/simulation/clock";
import { Group, type StreamOfCalls } from "../../support/simulation/loss-group";
import { batchMeans, disagreement, type Estimate } from "../../support/simulation/measure";
import { Randomness } from "../../support/simulation/random";

/** One group and its streams, measured. */
function simulate(
  seed: string,
  units: number,
  streams: readonly StreamOfCalls[],
  batchTime = 400,
): Record<string, Estimate> {
  const clock = new Clock();
  const group = new Group(clock, new Randomness(seed), units);
  for (const stream of streams) group.add(stream);
  return batchMeans(clock, batchTime, () => group.take());
}

const poisson = (rate: number): StreamOfCalls => ({ calls: { kind: "poisson", rate } });

describe("Erlang B", () => {
  test.each<[string, StreamOfCalls["holding"]]>([
    ["exponential", undefined],
    ["constant", () => 1],
    ["very variable", (random) => random.hyperexponential(1, 2)],
  ])("holding times %s: calls blocked, time blocked, carried traffic", (name, holding) => {
    const { call0, time0, carried0 } = simulate(
      `erlang-b ${name}`,
      25,
      [{ ...poisson(20), ...(holding ? { holding } : {}) }],
      600,
    );
    expect(disagreement(erlangB.blocking(20, 25), call0!, 0.04)).toBeLessThan(1);
    expect(disagreement(erlangB.blocking(20, 25), time0!, 0.04)).toBeLessThan(1);
    expect(disagreement(erlangB.carried(20, 25), carried0!, 0.01)).toBeLessThan(1);
  });

  test("what one channel more carries", () => {
    const [few, more] = [9, 10].map(
      (channels) => simulate(`one more than ${channels}`, channels, [poisson(10)], 600).carried0!,
    );
    const gain = { mean: more!.mean - few!.mean, standardError: Math.hypot(more!.standardError, few!.standardError) };
    expect(disagreement(erlangB.improvement(10, 9), gain, 0.05)).toBeLessThan(1);
  });

  test("offered traffic from the carried traffic that was measured", () => {
    const { carried0 } = simulate("offered", 12, [poisson(14)], 300);
    const offered = erlangB.offered(carried0!.mean, 12);
    // A change of the carried traffic is one of the offered traffic over the share of calls that find a channel at the margin.
    const slope = (erlangB.carried(14.01, 12) - erlangB.carried(13.99, 12)) / 0.02;
    expect(disagreement(14, { mean: offered, standardError: carried0!.standardError / slope })).toBeLessThan(1);
  });
});

describe("Engset", () => {
  test.each([
    [30, 0.25, 8],
    [12, 1.5, 7],
    [60, 0.2, 14],
  ])(
    "%i sources of %f erlang when idle on %i channels: time, call and traffic congestion",
    (sources, rate, channels) => {
      const { time0, call0, carried0 } = simulate(
        `engset ${sources}`,
        channels,
        [{ calls: { kind: "sources", count: sources, rate } }],
        900,
      );
      const offered = (sources * rate) / (1 + rate);
      expect(disagreement(engset.timeCongestion(sources, rate, channels), time0!)).toBeLessThan(1);
      expect(disagreement(engset.callCongestion(sources, rate, channels), call0!)).toBeLessThan(1);
      const lost = { mean: 1 - carried0!.mean / offered, standardError: carried0!.standardError / offered };
      expect(disagreement(engset.trafficCongestion(sources, rate, channels), lost, 0.08)).toBeLessThan(1);
      // The three differ by more than the simulation's error, so that none stands for another.
      expect(disagreement(engset.timeCongestion(sources, rate, channels), call0!)).toBeGreaterThan(1);
    },
  );

  test("traffic of a source and of an idle source", () => {
    const rate = engset.idleTraffic(0.3);
    const { carried0 } = simulate("idle", 10, [{ calls: { kind: "sources", count: 10, rate } }]);
    expect(disagreement(3, carried0!)).toBeLessThan(1);
  });

  test("the number of channels: enough, and one fewer too few", () => {
    const needed = engset.channels(40, 0.2, 0.02);
    const at = (channels: number): Estimate =>
      simulate("channels", channels, [{ calls: { kind: "sources", count: 40, rate: 0.2 } }], 700).call0!;
    expect(at(needed).mean + 4 * at(needed).standardError).toBeLessThan(0.02);
    expect(at(needed - 1).mean - 4 * at(needed - 1).standardError).toBeGreaterThan(0.02);
  });
});

describe("repeated attempts", () => {
  test("tried again long after, when the group has forgotten: blocking and offered traffic with repeats", () => {
    const stream: StreamOfCalls = { ...poisson(18), retry: { share: 0.7, after: 30 } };
    const { call0, offered0 } = simulate("retry", 20, [stream], 900);
    // Repeats come a little bunched even so, which the formula neglects.
    expect(disagreement(retry.blocking(18, 20, 0.7), call0!, 0.03, 0.01)).toBeLessThan(1);
    expect(disagreement(retry.offered(18, 20, 0.7), offered0!, 0.01, 0.002)).toBeLessThan(1);
  });
});

describe("overflow", () => {
  const overflowing = (
    seed: string,
    primaries: readonly (readonly [number, number])[],
    units: number,
  ): Record<string, Estimate> => {
    const clock = new Clock();
    const random = new Randomness(seed);
    const second = new Group(clock, random, units);
    second.add({ calls: { kind: "poisson", rate: 0 } });
    for (const [traffic, channels] of primaries) {
      new Group(clock, random, channels).add({ ...poisson(traffic), overflowTo: second });
    }
    return batchMeans(clock, 1200, () => second.take());
  };

  test("mean, variance and peakedness on an unlimited group", () => {
    const { busy, busySquared } = overflowing("moments", [[15, 12]], 1e6);
    expect(disagreement(overflow.mean(15, 12), busy!)).toBeLessThan(1);
    const variance = {
      mean: busySquared!.mean - busy!.mean ** 2,
      standardError: busySquared!.standardError + 2 * busy!.mean * busy!.standardError,
    };
    expect(disagreement(overflow.variance(15, 12), variance, 0.06)).toBeLessThan(1);
    const peakedness = { mean: variance.mean / busy!.mean, standardError: variance.standardError / busy!.mean };
    expect(disagreement(overflow.peakedness(15, 12), peakedness, 0.06)).toBeLessThan(1);
  });

  test("lost from a second group behind two: equivalent random traffic, Hayward's approximation", () => {
    const primaries = [
      [15, 12],
      [8, 6],
    ] as const;
    const mean = primaries.reduce((sum, [a, n]) => sum + overflow.mean(a, n), 0);
    const variance = primaries.reduce((sum, [a, n]) => sum + overflow.variance(a, n), 0);
    const { call0, lost0 } = overflowing("two groups", primaries, 9);
    // Both methods replace the sum of two overflows by another stream of the same mean and variance.
    expect(disagreement(overflow.lost(mean, variance, 9), lost0!, 0.03, 0.02)).toBeLessThan(1);
    expect(disagreement(peaky.blocking(mean, variance / mean, 9), call0!, 0.03, 0.03)).toBeLessThan(1);
    // Taken for Poisson traffic the loss would be far off.
    expect(disagreement(erlangB.blocking(mean, 9), call0!, 0.03, 0.03)).toBeGreaterThan(1);
  });

  test("channels for a peaky stream", () => {
    const [mean, peakedness] = [overflow.mean(15, 12), overflow.peakedness(15, 12)];
    const needed = peaky.channels(mean, peakedness, 0.02);
    const { call0 } = overflowing("peaky channels", [[15, 12]], needed);
    expect(call0!.mean).toBeLessThan(0.02 * 1.1);
    expect(overflowing("peaky channels", [[15, 12]], needed - 2).call0!.mean).toBeGreaterThan(0.02);
  });
});
