import { domain, requireIn } from "../domain";
import { DomainError, NoAnswerError } from "../errors";
import { root } from "../numerics/root";
import { upperSum } from "./multiservice-recursion";
import { requireForEach, requireServices, requireUnits } from "./multiservice-services";
import { blockedRate, peakyOccupancy, type Stream } from "./peaky-recursion";
import {
  busySources,
  convolve,
  isTooSmooth,
  smallestPeakedness,
  smoothSources,
  sourceNumber,
  type Sources,
} from "./smooth-stream";

export const streamPeakedness = domain(0.01, 1000, "a peakedness from 0.01 to 1000");

/** Time, call and traffic congestion. */
export type Congestions = [time: number, call: number, traffic: number];

/** Steps of the recursion, and products of the convolutions, that take below a second. */
const MOST_STEPS = 5e6;
const MOST_PRODUCTS = 4e8;

/** Equal sources of a smooth stream that is convolved with the others. */
interface Part {
  readonly stream: Stream;
  readonly sources: Sources;
  /** Tilted probabilities of the busy sources. */
  readonly weights: Float64Array;
}

/**
 * Whether the units have room for more than half the sources of a smooth stream. The recursion would then subtract nearly equal
 * numbers (beyond all sources even leave negative ones), and there are so few sources that convolving is quick.
 */
function hasFewSources({ meanE, peakedness, width }: Stream, units: number): boolean {
  return peakedness < 1 && 2 * Math.floor(units / width) > sourceNumber(meanE, peakedness);
}

/** Mean occupied units without blocking when every unit in use multiplies the weight of a state by `tilt`. */
function tiltedUnits(streams: readonly Stream[], tilt: number): number {
  return streams.reduce((sum, { meanE, peakedness, width }) => {
    const factor = tilt ** width;
    return sum + (meanE * width * factor) / (peakedness - (peakedness - 1) * factor);
  }, 0);
}

/**
 * Factor per unit that brings an overload down to the units; 1 where there is none.
 *
 * Each stream alone would have its weight far above the units, beyond all doubles below them. Multiplying the weight of every
 * state by a power of its units changes nothing once it is taken out again.
 */
function tiltFor(streams: readonly Stream[], units: number): number {
  if (tiltedUnits(streams, 1) <= units) return 1;
  const excess = (logTilt: number): number => tiltedUnits(streams, Math.exp(logTilt)) - units;
  let low = -1 / units;
  while (excess(low) > 0) low *= 2;
  return Math.exp(root(excess, low, 0));
}

function partsOf(stream: Stream, units: number, tilt: number): Part[] {
  const room = Math.floor(units / stream.width);
  return smoothSources(stream.meanE, stream.peakedness, room).map((sources) => {
    const tilted = { count: sources.count, odds: sources.odds * tilt ** stream.width };
    return { stream, sources, weights: busySources(tilted, room) };
  });
}

function requireShortConvolution(streams: readonly Stream[], units: number): void {
  if (streams.length === 0) return;
  const rounds = Math.ceil(Math.log2(streams.length)) + 1;
  const states = streams.reduce(
    (sum, { meanE, peakedness, width }) => sum + Math.min(sourceNumber(meanE, peakedness), units / width),
    0,
  );
  const most = Math.floor(MOST_PRODUCTS / (rounds * states));
  if (units > most) {
    throw new DomainError("units", units, `at most ${most} beside smooth streams with ${Math.round(states)} sources`);
  }
}

/**
 * Calls `visit` for each part with the weights of all the others. Halving the list makes each part join log2(parts) times
 * instead of once for every other one.
 */
function withoutEach(
  others: Float64Array,
  parts: readonly Part[],
  visit: (part: Part, others: Float64Array) => void,
): void {
  if (parts.length <= 1) {
    if (parts.length === 1) visit(parts[0]!, others);
    return;
  }
  const middle = parts.length >> 1;
  const first = parts.slice(0, middle);
  const second = parts.slice(middle);
  withoutEach(joined(others, second), first, visit);
  withoutEach(joined(others, first), second, visit);
}

function joined(others: Float64Array, parts: readonly Part[]): Float64Array {
  return parts.reduce((weights, part) => convolve(weights, part.weights, part.stream.width), others);
}

/** Calls of a part that are blocked, per holding time: its free sources call at their odds. */
function blockedCalls(others: Float64Array, { stream, sources, weights }: Part, untilt: Float64Array): number {
  const calling = weights.map((weight, x) => weight * (sources.count - x) * sources.odds);
  let sum = 0;
  for (let state = others.length - stream.width; state < others.length; state++) {
    let rate = 0;
    for (let x = 0; x < calling.length && x * stream.width <= state; x++) {
      rate += calling[x]! * others[state - x * stream.width]!;
    }
    sum += rate * untilt[state]!;
  }
  return sum;
}

/** Factors that turn tilted weights into probabilities. */
function untilting(weights: Float64Array, tilt: number): Float64Array {
  const factors = new Float64Array(weights.length);
  let factor = 1;
  let sum = 0;
  for (let state = weights.length - 1; state >= 0; state--) {
    factors[state] = factor;
    sum += weights[state]! * factor;
    factor *= tilt;
  }
  for (let state = 0; state < factors.length; state++) factors[state]! /= sum;
  return factors;
}

function requireStreams(
  units: number,
  trafficE: readonly number[],
  width: readonly number[],
  peakedness: readonly number[],
): void {
  requireServices(trafficE, width);
  requireForEach(trafficE, "peakedness", peakedness);
  requireUnits(units, trafficE.length, MOST_STEPS);
  trafficE.forEach((meanE, i) => {
    const z = peakedness[i]!;
    requireIn(streamPeakedness, "peakedness", z);
    if (meanE > 0 && isTooSmooth(meanE, z)) {
      throw new NoAnswerError(
        `No stream of whole calls with a mean of ${meanE} erlang is as smooth as a peakedness of ${z}; at least ${smallestPeakedness(meanE)} is needed.`,
      );
    }
  });
}

/**
 * Congestion of each service where streams of any peakedness share the units completely.
 *
 * A stream of peakedness z is a Pascal (above 1), Poisson or binomial (below 1) process: product form, so the result is exact. A
 * source or branch that loses a call is free to call again, so that a blocked call costs less or more than one call's traffic:
 * traffic congestion is z times the blocked calls over the mean.
 *
 * @param units shared units, 0 to 100,000
 * @param trafficE mean of each stream in calls, erlang
 * @param width units per call
 * @param peakedness variance over mean of each stream on unlimited units
 * @returns for each stream time, call and traffic congestion
 * @throws NoAnswerError where no stream of whole calls is so smooth
 */
export function peaky(
  units: number,
  trafficE: readonly number[],
  width: readonly number[],
  peakedness: readonly number[],
): Congestions[] {
  requireStreams(units, trafficE, width, peakedness);
  // Without calls there is no variance; a trial call then meets what a Poisson call meets.
  const all = trafficE.map((meanE, i): Stream => ({
    meanE,
    width: width[i]!,
    peakedness: meanE > 0 ? peakedness[i]! : 1,
  }));
  const fitting = all.filter((stream) => stream.width <= units);
  const convolved = fitting.filter((stream) => hasFewSources(stream, units));
  const recursive = fitting.filter((stream) => !hasFewSources(stream, units));
  requireShortConvolution(convolved, units);

  const tilt = tiltFor(fitting, units);
  const base = peakyOccupancy(units, recursive, tilt);
  const parts = convolved.flatMap((stream) => partsOf(stream, units, tilt));
  const total = joined(base, parts);
  const untilt = untilting(total, tilt);
  const probabilities = total.map((weight, state) => weight * untilt[state]!);

  // Blocked calls and the traffic lost with them, both per erlang offered.
  const blocked = new Map(fitting.map((stream) => [stream, { calls: 0, traffic: 0 }]));
  const add = (stream: Stream, calls: number, peakednessOfPart: number): void => {
    const sums = blocked.get(stream)!;
    sums.calls += calls;
    sums.traffic += peakednessOfPart * calls;
  };
  for (const stream of recursive) add(stream, blockedRate(total, stream, tilt, untilt), stream.peakedness);
  withoutEach(base, parts, (part, others) => {
    add(part.stream, blockedCalls(others, part, untilt) / part.stream.meanE, 1 / (1 + part.sources.odds));
  });
  return all.map((stream): Congestions => {
    const sums = blocked.get(stream);
    if (!sums) return [1, 1, 1];
    // Rounding may take a sum over nearly all states above 1.
    const traffic = Math.min(1, sums.traffic);
    return [upperSum(probabilities, units - stream.width + 1), sums.calls / (sums.calls + (1 - traffic)), traffic];
  });
}
