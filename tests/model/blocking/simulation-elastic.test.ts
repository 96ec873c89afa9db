/** Shared links and random access against simulations that know none of the formulas. */
import * as randomAccess from "../../../src/model/blocking/random-access";
import * as sharing from "../../../src/model/blocking/sharing";
import { Clock } from "../../support/simulation/clock";
import { batchMeans, disagreement, type Estimate } from "../../support/simulation/measure";
import { Randomness } from "../../support/simulation/random";
import { SharedLink } from "../../support/simulation/shared-link";

/** Transfers of mean size 1 Mbit. */
function simulate(
  seed: string,
  capacityMbps: number,
  trafficMbps: number,
  peakMbps: number,
  size: (random: Randomness) => number,
): Estimate {
  const clock = new Clock();
  const link = new SharedLink(clock, new Randomness(seed), capacityMbps, peakMbps, trafficMbps, size);
  return batchMeans(clock, 16000 / capacityMbps, () => link.take()).throughput;
}

describe("processor sharing", () => {
  const sizes: [string, (random: Randomness) => number][] = [
    ["exponential", (random) => random.exponential(1)],
    ["equal", () => 1],
    ["very different", (random) => random.hyperexponential(1, 2)],
  ];
  test.each(sizes)("one server, sizes %s", (name, size) => {
    expect(disagreement(sharing.throughput(10, 6.5), simulate(`one ${name}`, 10, 6.5, 10, size))).toBeLessThan(1);
  });
  test.each(sizes)("a peak of a fifth of the capacity, sizes %s", (name, size) => {
    const measured = simulate(`five ${name}`, 10, 8, 2, size);
    expect(disagreement(sharing.throughput(10, 8, 2), measured)).toBeLessThan(1);
    // Neither the peak alone nor the capacity alone explains it.
    expect(disagreement(sharing.throughput(10, 8), measured)).toBeGreaterThan(1);
    expect(disagreement(2, measured)).toBeGreaterThan(1);
  });
  test("a peak above the capacity does not bind", () => {
    const measured = simulate("unbound", 10, 6.5, 20, (random) => random.exponential(1));
    expect(disagreement(sharing.throughput(10, 6.5, 20), measured)).toBeLessThan(1);
  });
  test("capacity for a rate, with a peak of a fourth of it", () => {
    // A whole number of transfers at full rate, where the formula is exact.
    const wanted = sharing.throughput(8, 6, 2);
    const capacity = sharing.capacity(6, wanted, 2);
    expect(
      disagreement(
        wanted,
        simulate("capacity", capacity, 6, 2, (random) => random.exponential(1)),
      ),
    ).toBeLessThan(1);
  });
});

describe("slotted ALOHA", () => {
  test.each([
    [0.4, 1],
    [1.5, 1],
    [10, 54],
    [60, 54],
  ])("%f attempts a slot on %i channels", (attempts, channels) => {
    const clock = new Clock();
    const random = new Randomness(`slotted ${attempts} ${channels}`);
    let chosen = new Map<number, number>();
    let made = 0;
    let alone = 0;
    let slots = 0;
    const attempt = (): void => {
      clock.after(random.exponential(1 / attempts), () => {
        const channel = random.below(channels);
        chosen.set(channel, (chosen.get(channel) ?? 0) + 1);
        made++;
        attempt();
      });
    };
    const slot = (): void => {
      clock.after(1, () => {
        for (const count of chosen.values()) if (count === 1) alone++;
        chosen = new Map();
        slots++;
        slot();
      });
    };
    attempt();
    slot();
    const measured = batchMeans(clock, Math.ceil(8000 / attempts), () => {
      const taken = { success: { over: alone, under: made }, throughput: { over: alone, under: slots } };
      [made, alone, slots] = [0, 0, 0];
      return taken;
    });
    expect(disagreement(randomAccess.success(attempts, channels), measured.success)).toBeLessThan(1);
    expect(disagreement(randomAccess.throughput(attempts, channels), measured.throughput)).toBeLessThan(1);
  });
});
