/** Shared groups and cells against a simulation of calls, which knows none of the formulas. Times are in mean holding times. */
import * as handover from "../../../src/model/blocking/handover";
import * as multiservice from "../../../src/model/blocking/multiservice";
import { Clock } from "../../support/simulation/clock";
import { Group, type StreamOfCalls } from "../../support/simulation/loss-group";
import { batchMeans, disagreement, type Estimate } from "../../support/simulation/measure";
import { Randomness } from "../../support/simulation/random";

function simulate(
  seed: string,
  units: number,
  streams: readonly StreamOfCalls[],
  batchTime = 500,
): Record<string, Estimate> {
  const clock = new Clock();
  const group = new Group(clock, new Randomness(seed), units);
  for (const stream of streams) group.add(stream);
  return batchMeans(clock, batchTime, () => group.take());
}

const poisson = (rate: number, width: number, reserved = 0): StreamOfCalls => ({
  calls: { kind: "poisson", rate },
  width,
  reserved,
});

describe("services on shared units", () => {
  const [traffic, width] = [
    [10, 3, 1],
    [1, 3, 8],
  ] as const;

  test("blocking and utilisation, holding times of any distribution", () => {
    const holdings = [undefined, () => 1, (random: Randomness) => random.hyperexponential(1, 2)];
    const streams = traffic.map((a, i) => ({
      ...poisson(a, width[i]!),
      ...(holdings[i] ? { holding: holdings[i] } : {}),
    }));
    const measured = simulate("kaufman-roberts", 32, streams, 1500);
    multiservice.blocking(32, traffic, width).forEach((blocking, i) => {
      expect(disagreement(blocking, measured[`call${i}`]!)).toBeLessThan(1);
      expect(disagreement(blocking, measured[`time${i}`]!)).toBeLessThan(1);
    });
    expect(disagreement(32 * multiservice.utilisation(32, traffic, width), measured.busy!, 0.01)).toBeLessThan(1);
  });

  test("units for a target: enough, and one fewer misses one", () => {
    const targets = [0.02, 0.05, 0.1];
    const needed = multiservice.units(traffic, width, targets);
    const meets = (units: number, seed: string): boolean => {
      const measured = simulate(
        seed,
        units,
        traffic.map((a, i) => poisson(a, width[i]!)),
        1200,
      );
      return targets.every((target, i) => measured[`call${i}`]!.mean <= target);
    };
    expect(meets(needed, "enough")).toBe(true);
    expect(meets(needed - 1, "too few")).toBe(false);
  });

  test("reservation is exact where all calls are equally wide", () => {
    const measured = simulate("reserved, equal", 16, [poisson(10, 1, 2), poisson(4, 1, 1), poisson(3, 1)], 900);
    multiservice.blocking(16, [10, 4, 3], [1, 1, 1], [2, 1, 0]).forEach((blocking, i) => {
      expect(disagreement(blocking, measured[`call${i}`]!, 0.04)).toBeLessThan(1);
    });
  });

  test("reservation between wide and narrow calls: Roberts' approximation is within a tenth", () => {
    const measured = simulate("reserved", 32, [poisson(10, 1, 7), poisson(3, 3, 5), poisson(1, 8)], 1000);
    const none = multiservice.blocking(32, traffic, width);
    multiservice.blocking(32, traffic, width, [7, 5, 0]).forEach((blocking, i) => {
      expect(disagreement(blocking, measured[`call${i}`]!, 0.04, 0.1)).toBeLessThan(1);
      // What it leaves out is far larger.
      expect(disagreement(none[i]!, measured[`call${i}`]!, 0.2, 0.1)).toBeGreaterThan(1);
    });
  });
});

describe("smooth, Poisson and peaky streams together", () => {
  // Sources: mean S b/(1+b), peakedness 1/(1+b). Branching: mean c/(1-b), peakedness 1/(1-b), c calls of their own per holding time.
  const cases: [string, number, [StreamOfCalls["calls"], number][]][] = [
    [
      "few sources",
      12,
      [
        [{ kind: "sources", count: 8, rate: 0.5 }, 1],
        [{ kind: "poisson", rate: 2 }, 2],
        [{ kind: "branching", rate: 1, perCall: 0.5 }, 1],
      ],
    ],
    [
      "many sources",
      10,
      [
        [{ kind: "sources", count: 40, rate: 0.1 }, 1],
        [{ kind: "branching", rate: 0.6, perCall: 0.4 }, 2],
      ],
    ],
    [
      "sources alone",
      9,
      [
        [{ kind: "sources", count: 6, rate: 1 }, 2],
        [{ kind: "sources", count: 5, rate: 2 }, 1],
      ],
    ],
  ];
  test.each(cases)("%s: time, call and traffic congestion", (name, units, streams) => {
    const measured = simulate(
      `peaky ${name}`,
      units,
      streams.map(([calls, width]) => ({ calls, width })),
      1500,
    );
    const mean = streams.map(([calls]) =>
      calls.kind === "poisson"
        ? calls.rate
        : calls.kind === "sources"
          ? (calls.count * calls.rate) / (1 + calls.rate)
          : calls.rate / (1 - calls.perCall),
    );
    const peakedness = streams.map(([calls]) =>
      calls.kind === "poisson" ? 1 : calls.kind === "sources" ? 1 / (1 + calls.rate) : 1 / (1 - calls.perCall),
    );
    multiservice
      .peaky(
        units,
        mean,
        streams.map(([, width]) => width),
        peakedness,
      )
      .forEach(([time, call, lost], i) => {
        expect(disagreement(time, measured[`time${i}`]!)).toBeLessThan(1);
        expect(disagreement(call, measured[`call${i}`]!)).toBeLessThan(1);
        const carried = measured[`carried${i}`]!;
        expect(
          disagreement(
            lost,
            { mean: 1 - carried.mean / mean[i]!, standardError: carried.standardError / mean[i]! },
            0.2,
          ),
        ).toBeLessThan(1);
      });
  });

  test("a fractional number of sources: one source more, less busy", () => {
    // Mean 1.3 and peakedness 0.3: p + q = 1.3 and p^2 + q^2 = 1.3 x 0.7 for the two sources.
    const p = (1.3 + Math.sqrt(2 * 0.91 - 1.69)) / 2;
    const odds = [p / (1 - p), (1.3 - p) / (p - 0.3)];
    const streams: StreamOfCalls[] = [
      ...odds.map((rate): StreamOfCalls => ({ calls: { kind: "sources", count: 1, rate } })),
      { calls: { kind: "poisson", rate: 1 } },
    ];
    const measured = simulate("fraction", 3, streams, 2500);
    const [smooth, other] = multiservice.peaky(3, [1.3, 1], [1, 1], [0.3, 1]);
    expect(disagreement(other![0], measured.call2!)).toBeLessThan(1);
    const lostCalls =
      (measured.lost0!.mean + measured.lost1!.mean) / (measured.offered0!.mean + measured.offered1!.mean);
    expect(Math.abs(lostCalls / smooth![1] - 1)).toBeLessThan(0.02);
    const carried = measured.carried0!.mean + measured.carried1!.mean;
    expect(Math.abs((1.3 - carried) / 1.3 / smooth![2] - 1)).toBeLessThan(0.05);
  });
});

describe("handovers", () => {
  test("guard channels: new calls blocked, handovers failed", () => {
    const measured = simulate("guard", 14, [poisson(9, 1, 2), poisson(3, 1)], 1500);
    const [blocked, failed] = handover.blocking(9, 3, 14, 2);
    expect(disagreement(blocked, measured.call0!)).toBeLessThan(1);
    expect(disagreement(failed, measured.call1!, 0.04)).toBeLessThan(1);
  });

  test("guard count: enough, and one fewer too few", () => {
    const needed = handover.guard(9, 3, 14, 0.01);
    const failed = (guard: number): number =>
      simulate(`guard ${guard}`, 14, [poisson(9, 1, guard), poisson(3, 1)], 800).call1!.mean;
    expect(failed(needed)).toBeLessThan(0.01);
    expect(failed(needed - 1)).toBeGreaterThan(0.01);
  });

  test("traffic of handovers and channel holding time, from calls that wander through a ring of cells", () => {
    const [cells, callsPerS, holdingS, dwellS] = [12, 0.08, 100, 40];
    const clock = new Clock();
    const random = new Randomness("wandering");
    let handedOver = 0;
    let stays = 0;
    let staying = 0;
    let handedOverTime = 0;
    const stay = (cell: number, callEnds: number, byHandover: boolean): void => {
      const arrived = clock.now;
      const leaves = clock.now + random.exponential(dwellS);
      clock.after(Math.min(callEnds, leaves) - clock.now, () => {
        stays++;
        staying += clock.now - arrived;
        if (byHandover && cell === 0) handedOverTime += clock.now - arrived;
        if (leaves >= callEnds) return;
        handedOver++;
        stay((cell + (random.chance(0.5) ? 1 : cells - 1)) % cells, callEnds, true);
      });
    };
    const arrive = (cell: number): void => {
      clock.after(random.exponential(1 / callsPerS), () => {
        stay(cell, clock.now + random.exponential(holdingS), false);
        arrive(cell);
      });
    };
    for (let cell = 0; cell < cells; cell++) arrive(cell);
    const measured = batchMeans(clock, 3000, () => {
      const taken = {
        holding: { over: staying, under: stays },
        handoverE: { over: handedOverTime, under: 3000 },
        perCall: { over: handedOver, under: stays - handedOver },
      };
      [handedOver, stays, staying, handedOverTime] = [0, 0, 0, 0];
      return taken;
    });
    // New calls hold their first channel for the shorter of two exponential times.
    const newE = callsPerS / (1 / holdingS + 1 / dwellS);
    const [handoverE, channelHoldingS] = handover.traffic(newE, holdingS, dwellS);
    expect(disagreement(channelHoldingS, measured.holding)).toBeLessThan(1);
    expect(disagreement(handoverE, measured.handoverE)).toBeLessThan(1);
    expect(disagreement(handoverE / newE, measured.perCall)).toBeLessThan(1);
  });
});
