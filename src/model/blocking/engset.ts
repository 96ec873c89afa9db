/** Engset's model: a finite number of sources, each calling only while idle; blocked calls leave. */
import { domain, requireIn, shareBelowOne } from "../domain";
import { sumOverTerm } from "../numerics/binomial-ratio";
import { upperQuantile } from "../numerics/normal";
import { smallestWhole } from "../numerics/root";
import { blockingTarget } from "./erlang-b";

export const sourceCount = domain(1, 1e9, "a number of sources from 1 to 1,000,000,000");
export const idleSourceTraffic = domain(0, 1e16, "traffic per idle source from 0 to 1e16 erlang");
export const groupSize = domain(0, 1e9, "a number of channels from 0 to 1,000,000,000");

/** Up to this many channels a whole number goes by the recursion: as quick as anything, and exact where the answer is a short fraction. */
const RECURSION_TO = 32;

/** Time congestion for any real number of sources of at least 0, unchecked. */
function congestionOf(sources: number, trafficPerIdleSourceE: number, channels: number): number {
  if (channels >= sources + 1) return 0;
  if (trafficPerIdleSourceE === 0) return channels === 0 ? 1 : 0;
  if (channels > RECURSION_TO || !Number.isInteger(channels)) {
    // With hardly a channel rounding may take the quotient above 1.
    return Math.min(1, 1 / sumOverTerm(sources, channels, trafficPerIdleSourceE));
  }
  let congestion = 1;
  for (let n = 1; n <= channels; n++) {
    const weighted = (sources - n + 1) * trafficPerIdleSourceE * congestion;
    congestion = weighted / (n + weighted);
  }
  return congestion;
}

function check(sources: number, trafficPerIdleSourceE: number, channels: number): void {
  requireIn(sourceCount, "sources", sources);
  requireIn(idleSourceTraffic, "trafficPerIdleSourceE", trafficPerIdleSourceE);
  requireIn(groupSize, "channels", channels);
}

/**
 * Time congestion E: the share of time in which all channels are busy.
 *
 * E = C(S, N) b^N / sum of C(S, k) b^k, k = 0 to N; continued to real N by
 * 1/E = (S - N) times the integral of (1 - t)^(S - N - 1) (1 + t/b)^N over t from 0 to 1 = 2F1(1, -N; S - N + 1; -1/b),
 * the form of P. Azimzadeh, T. Carpenter, "Fast Engset computation", Operations Research Letters 44 (2016), which as S grows with
 * S b held becomes the continued Erlang B. It obeys the recursion E(N) = w/(N + w), w = (S - N + 1) b E(N - 1), at any N,
 * ends at E(S) = (b/(1+b))^S and reaches 0 at N = S + 1.
 *
 * @param sources S, 1 to 1e9
 * @param trafficPerIdleSourceE b, erlang per idle source: calls per hour of an idle source times the holding time in hours
 * @param channels N, at least 0, may be fractional
 * @returns probability
 */
export function timeCongestion(sources: number, trafficPerIdleSourceE: number, channels: number): number {
  check(sources, trafficPerIdleSourceE, channels);
  return congestionOf(sources, trafficPerIdleSourceE, channels);
}

/**
 * Call congestion B: the share of calls that are blocked. A source that calls sees the others only: E with S - 1 sources.
 *
 * @param sources S, 1 to 1e9
 * @param trafficPerIdleSourceE b, erlang per idle source
 * @param channels N, at least 0, may be fractional
 * @returns probability; 0 where every source has a channel
 */
export function callCongestion(sources: number, trafficPerIdleSourceE: number, channels: number): number {
  check(sources, trafficPerIdleSourceE, channels);
  return congestionOf(sources - 1, trafficPerIdleSourceE, channels);
}

/**
 * Traffic congestion C: the share of the offered traffic S b/(1+b) that is not carried, E (S - N)/S.
 *
 * @param sources S, 1 to 1e9
 * @param trafficPerIdleSourceE b, erlang per idle source
 * @param channels N, at least 0, may be fractional
 * @returns share; 0 where every source has a channel
 */
export function trafficCongestion(sources: number, trafficPerIdleSourceE: number, channels: number): number {
  check(sources, trafficPerIdleSourceE, channels);
  if (channels >= sources) return 0;
  return (congestionOf(sources, trafficPerIdleSourceE, channels) * (sources - channels)) / sources;
}

/**
 * Smallest whole number of channels that keeps the call congestion at the target or below.
 *
 * Call congestion falls with every channel, and each trial costs the same at any size, so the search starts where the normal
 * distribution puts the answer and halves from there.
 *
 * @param sources S, 1 to 1e9
 * @param trafficPerIdleSourceE b, erlang per idle source
 * @param blocking largest call congestion, 1e-300 to below 1
 * @returns channels, at most the sources
 */
export function channels(sources: number, trafficPerIdleSourceE: number, blocking: number): number {
  requireIn(sourceCount, "sources", sources);
  requireIn(idleSourceTraffic, "trafficPerIdleSourceE", trafficPerIdleSourceE);
  requireIn(blockingTarget, "blocking", blocking);
  const others = sources - 1;
  const idle = 1 / (1 + trafficPerIdleSourceE);
  const mean = others * trafficPerIdleSourceE * idle;
  const spread = Math.sqrt(mean * idle);
  // Blocking is about the density over the spread, so that blocking times spread is about the tail beyond the channels.
  const guess = mean * (1 - blocking) + upperQuantile(Math.min(blocking * (1 + spread), 0.5)) * spread;
  // With a channel for each source no call is blocked, so there is always an answer.
  return smallestWhole(
    (n) => congestionOf(others, trafficPerIdleSourceE, n) <= blocking,
    0,
    Math.ceil(sources),
    guess,
  )!;
}

/**
 * Traffic of an idle source from the traffic of a source: a/(1 - a).
 *
 * A source that carries a erlang when never blocked is idle for a share 1 - a of the time, and calls only then.
 *
 * @param trafficPerSourceE a, erlang per source, at least 0 and below 1
 * @returns erlang per idle source
 */
export function idleTraffic(trafficPerSourceE: number): number {
  requireIn(shareBelowOne, "trafficPerSourceE", trafficPerSourceE);
  return trafficPerSourceE / (1 - trafficPerSourceE);
}
