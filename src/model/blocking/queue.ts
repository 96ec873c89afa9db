import { domain, requireIn } from "../domain";
import { blockingOf } from "./erlang-b-formula";
import { channelCount, waitingTraffic } from "./waiting-domains";

/** Waiting places; more of them than this is a queue without limit for any purpose. */
export const waitingPlaces = domain(0, 1e9, "a whole number of waiting places from 0 to 1,000,000,000", {
  whole: true,
});

/** So few places are added one by one: exact where the closed form would lose a bit. */
const FEW_PLACES = 64;

function check(trafficE: number, channels: number, places: number): void {
  requireIn(waitingTraffic, "trafficE", trafficE);
  requireIn(channelCount, "channels", channels);
  requireIn(waitingPlaces, "places", places);
}

/**
 * The two sums behind a finite queue, in units of the chance that all servers are busy and nobody waits, and scaled by the
 * larger of 1 and rho^K so that neither end leaves the doubles: accepted = 1 + rho + ... + rho^(K - 1), last = rho^K.
 */
function queueSums(
  trafficE: number,
  channels: number,
  places: number,
): { accepted: number; last: number; unit: number } {
  // Near 1 the logarithm keeps its digits through the difference, elsewhere through the quotient.
  const rho = trafficE / channels;
  const logRho = rho > 0.5 && rho < 2 ? Math.log1p((trafficE - channels) / channels) : Math.log(rho);
  const exponent = places * logRho;
  if (trafficE <= channels) {
    const accepted = geometric(rho, logRho, exponent, places);
    return { accepted, last: Math.exp(exponent), unit: 1 };
  }
  // Over load the sum is taken from its largest term downwards.
  const inverse = channels / trafficE;
  const accepted = inverse * geometric(inverse, -logRho, -exponent, places);
  return { accepted, last: 1, unit: Math.exp(-exponent) };
}

/** 1 + r + ... + r^(count - 1) for r of at most 1. */
function geometric(r: number, logR: number, exponent: number, count: number): number {
  if (count <= FEW_PLACES) {
    let sum = 0;
    for (let k = 0; k < count; k++) sum = sum * r + 1;
    return sum;
  }
  return logR === 0 ? count : Math.expm1(exponent) / Math.expm1(logR);
}

/**
 * Loss of a group with a finite waiting room (M/M/N/N+K): the chance that an arrival finds all servers and places taken.
 *
 * @param trafficE offered traffic, erlang
 * @param channels number of channels, above 0
 * @param places waiting places
 * @returns probability
 */
export function lost(trafficE: number, channels: number, places: number): number {
  check(trafficE, channels, places);
  if (trafficE === 0) return 0;
  const blocking = blockingOf(trafficE, channels);
  const { accepted, last, unit } = queueSums(trafficE, channels, places);
  // Sum over states: (1 - B) below all busy, B (1 + ... + rho^K) from there on.
  return (blocking * last) / ((1 - blocking) * unit + blocking * (accepted + last));
}

/**
 * Chance that a call which is accepted must wait, in a group with a finite waiting room (M/M/N/N+K).
 *
 * @param trafficE offered traffic, erlang
 * @param channels number of channels, above 0
 * @param places waiting places
 * @returns probability
 */
export function delayed(trafficE: number, channels: number, places: number): number {
  check(trafficE, channels, places);
  if (trafficE === 0 || places === 0) return 0;
  const blocking = blockingOf(trafficE, channels);
  const { accepted, unit } = queueSums(trafficE, channels, places);
  return (blocking * accepted) / ((1 - blocking) * unit + blocking * accepted);
}
