/** Waiting formulas against a simulation of calls, which knows none of them. Times are in seconds. */
import * as abandon from "../../../src/model/blocking/abandon";
import * as erlangC from "../../../src/model/blocking/erlang-c";
import * as message from "../../../src/model/blocking/message";
import * as priority from "../../../src/model/blocking/priority";
import * as queue from "../../../src/model/blocking/queue";
import { Clock } from "../../support/simulation/clock";
import { batchMeans, disagreement, type Estimate } from "../../support/simulation/measure";
import { Randomness } from "../../support/simulation/random";
import { WaitingGroup, type WaitingClass, type WaitingRules } from "../../support/simulation/waiting-group";

function simulate(
  seed: string,
  rules: WaitingRules,
  classes: readonly WaitingClass[],
  batchTime: number,
): Record<string, Estimate> {
  const clock = new Clock();
  const group = new WaitingGroup(clock, new Randomness(seed), rules, classes);
  return batchMeans(clock, batchTime, () => group.take());
}

const exponential = (rate: number, mean: number): WaitingClass => ({
  rate,
  holding: (random) => random.exponential(mean),
});

test("Erlang C: calls that wait, mean wait, calls that wait too long", () => {
  const [traffic, channels, holdingS, waitS] = [6.5, 8, 20, 15];
  const { waited0, wait0, late0 } = simulate(
    "erlang-c",
    { servers: channels, lateAfter: waitS },
    [exponential(traffic / holdingS, holdingS)],
    40000,
  );
  expect(disagreement(erlangC.delayed(traffic, channels), waited0!)).toBeLessThan(1);
  expect(disagreement(erlangC.wait(traffic, channels, holdingS), wait0!, 0.05)).toBeLessThan(1);
  expect(disagreement(erlangC.late(traffic, channels, holdingS, waitS), late0!, 0.05)).toBeLessThan(1);
});

test("Erlang C: channels for a wait, one fewer too few", () => {
  const needed = erlangC.channels(6.5, 20, 15, 0.05);
  const late = (servers: number): Estimate =>
    simulate("c-channels", { servers, lateAfter: 15 }, [exponential(6.5 / 20, 20)], 30000).late0!;
  expect(late(needed).mean).toBeLessThan(0.05);
  expect(late(needed - 1).mean).toBeGreaterThan(0.05);
});

test.each([
  [6.5, 8, 5],
  [9, 8, 4],
])(
  "finite queue, %f erlang on %i channels with %i places: lost, accepted calls that wait",
  (traffic, channels, places) => {
    const { refused0, waited0 } = simulate(
      `queue ${traffic}`,
      { servers: channels, places },
      [exponential(traffic, 1)],
      2000,
    );
    expect(disagreement(queue.lost(traffic, channels, places), refused0!)).toBeLessThan(1);
    expect(disagreement(queue.delayed(traffic, channels, places), waited0!)).toBeLessThan(1);
  },
);

test("priority: mean wait of each of three classes", () => {
  const traffic = [1.5, 2, 1.2];
  const measured = simulate(
    "priority",
    { servers: 6 },
    traffic.map((a) => exponential(a, 1)),
    8000,
  );
  priority.wait(traffic, 6, 1).forEach((wait, i) => {
    expect(disagreement(wait, measured[`wait${i}`]!, 0.06)).toBeLessThan(1);
  });
});

test.each([
  [8, 10, 1, 0.5],
  [12, 10, 1, 2],
])("impatience, %f erlang on %i channels: share that leaves", (traffic, channels, holdingS, patienceS) => {
  const { left0 } = simulate(
    `abandon ${traffic}`,
    { servers: channels, patience: patienceS },
    [exponential(traffic / holdingS, holdingS)],
    2500,
  );
  expect(disagreement(abandon.lost(traffic, channels, holdingS, patienceS), left0!)).toBeLessThan(1);
});

describe("messages on a channel", () => {
  // 125 bytes at 1 kbit/s: one second.
  const perHour = 0.7 * 3600;
  test.each<[number, WaitingClass["holding"]]>([
    [0, () => 1],
    [1, (random) => random.exponential(1)],
    [2, (random) => random.hyperexponential(1, 2)],
  ])("mean delay at size variation %f", (variation, holding) => {
    const { stay0 } = simulate(`message ${variation}`, { servers: 1 }, [{ rate: 0.7, holding }], 12000);
    expect(disagreement(message.delay(perHour, 125, 1, variation), stay0!, 0.05)).toBeLessThan(1);
  });
});
