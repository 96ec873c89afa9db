import { count, domain, requireIn, requireOneOf } from "../domain";
import { DomainError } from "../errors";
import { fromSeed, type RandomSource } from "../numerics/random";
import { centralQuantile } from "../numerics/student-t";
import { DepartureTimes } from "./departure-times";

export const simulatedTraffic = domain(0, 1e4, "traffic above 0, up to 10,000 erlang", { openLow: true });
export const simulatedChannels = domain(0, 1e5, "a whole number of channels from 0 to 100,000", { whole: true });
/** Two million calls take some tenths of a second. */
export const simulatedCalls = domain(1000, 2e6, "a whole number of calls from 1,000 to 2,000,000", { whole: true });
export const seedRange = count;

export const HOLDING_TIMES = ["exponential", "constant", "hyperexponential"] as const;
export type HoldingTime = (typeof HOLDING_TIMES)[number];

const BATCHES = 20;
const CONFIDENCE = 0.95;
/** Two phases with balanced means whose squared coefficient of variation is 4: probability of the shorter one. */
const SHORT_SHARE = 0.5 * (1 + Math.sqrt(3 / 5));
/** Mean holding times after which a group has forgotten its state; the long phases of the hyperexponential last longer. */
const MEMORY: Readonly<Record<HoldingTime, number>> = { constant: 10, exponential: 10, hyperexponential: 40 };

/** Holding times of mean 1. */
const DRAW: Readonly<Record<HoldingTime, (random: RandomSource) => number>> = {
  constant: () => 1,
  exponential: (random) => random.exponential(),
  hyperexponential: (random) => {
    const chosen = random.uniform() < SHORT_SHARE ? SHORT_SHARE : 1 - SHORT_SHARE;
    return random.exponential() / (2 * chosen);
  },
};

/**
 * Blocked calls of one batch after another, event by event and without end: the caller stops.
 *
 * Poisson calls to a group that starts empty; blocked calls leave. What arrives while the group may still remember its start is
 * not counted. Time is in mean holding times.
 *
 * @param trafficE offered traffic, erlang
 * @param channels number of channels
 * @param seed start of the random numbers
 * @param holdingTime distribution of the holding time
 * @param callsPerBatch calls of a batch
 */
export function* blockedByBatch(
  trafficE: number,
  channels: number,
  seed: number,
  holdingTime: HoldingTime,
  callsPerBatch: number,
): Generator<number, never> {
  const random = fromSeed(seed);
  const draw = DRAW[holdingTime];
  const busy = new DepartureTimes(channels);
  let now = 0;
  const blockedOf = (calls: number): number => {
    let blocked = 0;
    for (let i = 0; i < calls; i++) {
      now += random.exponential() / trafficE;
      busy.removeUpTo(now);
      // The clock of an idle group may start anew: after long gaps it would have no digits left for holding times.
      if (busy.size === 0) now = 0;
      if (busy.size === channels) blocked++;
      else busy.add(now + draw(random));
    }
    return blocked;
  };
  blockedOf(Math.ceil(MEMORY[holdingTime] * trafficE));
  for (;;) yield blockedOf(callsPerBatch);
}

/** A blocking with the half-width of its 95 % confidence interval. */
export interface BlockingEstimate {
  readonly estimate: number;
  readonly halfWidth: number;
}

/**
 * Estimate from batch means with Student's t: A. M. Law, "Simulation Modeling and Analysis", chapter on output analysis.
 *
 * Where no call was blocked the interval ends at 3 / calls, which is 95 % in the limit (the rule of three).
 *
 * @param blocked blocked calls of each batch, at least two batches
 * @param callsPerBatch calls of a batch
 */
export function estimateOf(blocked: readonly number[], callsPerBatch: number): BlockingEstimate {
  const batches = blocked.length;
  const total = blocked.reduce((sum, value) => sum + value, 0);
  if (total === 0) return { estimate: 0, halfWidth: 3 / (batches * callsPerBatch) };
  const mean = total / batches;
  const squares = blocked.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  const error = Math.sqrt(squares / ((batches - 1) * batches));
  return {
    estimate: mean / callsPerBatch,
    halfWidth: (centralQuantile(CONFIDENCE, batches - 1) * error) / callsPerBatch,
  };
}

/**
 * Blocking of a group by event simulation, an independent check of a formula.
 *
 * @param trafficE offered traffic, erlang
 * @param channels number of channels
 * @param calls calls that are counted, in 20 batches (rounded up to a multiple)
 * @param seed start of the random numbers: the same seed gives the same answer
 * @param holdingTime distribution of the holding time
 * @returns estimate and half-width of its 95 % confidence interval
 */
export function blocking(
  trafficE: number,
  channels: number,
  calls: number,
  seed: number,
  holdingTime: HoldingTime = "exponential",
): [estimate: number, halfWidth: number] {
  requireIn(simulatedTraffic, "trafficE", trafficE);
  requireIn(simulatedChannels, "channels", channels);
  requireIn(simulatedCalls, "calls", calls);
  requireIn(seedRange, "seed", seed);
  requireOneOf(HOLDING_TIMES, "holdingTime", holdingTime);
  const fewest = Math.ceil(BATCHES * MEMORY[holdingTime] * trafficE);
  if (calls < fewest) {
    const span = `${BATCHES} batches of ${MEMORY[holdingTime]} mean holding times`;
    if (fewest > simulatedCalls.high) {
      const most = simulatedCalls.high / (BATCHES * MEMORY[holdingTime]);
      throw new DomainError("trafficE", trafficE, `at most ${most} erlang with ${holdingTime} holding times (${span})`);
    }
    throw new DomainError("calls", calls, `at least ${fewest} calls at ${trafficE} erlang, which fill ${span}`);
  }
  const callsPerBatch = Math.ceil(calls / BATCHES);
  const run = blockedByBatch(trafficE, channels, seed, holdingTime, callsPerBatch);
  const { estimate, halfWidth } = estimateOf(
    Array.from({ length: BATCHES }, () => run.next().value),
    callsPerBatch,
  );
  return [estimate, halfWidth];
}
