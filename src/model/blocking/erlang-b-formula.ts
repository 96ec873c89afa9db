import { below, isFarBelowMean, legendreTail } from "../numerics/poisson-ratio";

/** Up to this many channels a whole number goes by the recursion: as quick as anything, and exact where B is a short fraction. */
const RECURSION_TO = 32;

function isShortRecursion(channels: number): boolean {
  return channels <= RECURSION_TO && Number.isInteger(channels);
}

/**
 * Idle odds (1 - B)/B of Erlang B: the chance that an arriving call finds a channel over the chance that it does not.
 *
 * All other quantities follow without cancellation, for B near 0 as near 1. Infinity where B is below every double.
 * U(N) = (N/A)(1 + U(N - 1)) for whole N; else the Poisson sum below N over the term at N.
 */
export function idleOdds(trafficE: number, channels: number): number {
  if (!isShortRecursion(channels)) return below(channels, trafficE);
  if (channels === 0) return 0;
  let odds = 0;
  for (let n = 1; n <= channels; n++) odds = (n * (1 + odds)) / trafficE;
  return odds;
}

/** Erlang B for any traffic and number of channels of at least 0, unchecked. */
export function blockingOf(trafficE: number, channels: number): number {
  // Where no call arrives none is blocked.
  if (trafficE === 0) return 0;
  if (!isShortRecursion(channels)) return 1 / (1 + below(channels, trafficE));
  let blocking = 1;
  for (let n = 1; n <= channels; n++) {
    const weighted = trafficE * blocking;
    blocking = weighted / (n + weighted);
  }
  return blocking;
}

/**
 * Mean number of free channels, N - A (1 - B). It is also the elasticity of blocking: d ln B / d ln A.
 *
 * Above the traffic both parts are positive; below it they cancel, so that the continued fraction or the idle odds give the difference.
 */
export function freeChannels(trafficE: number, channels: number): number {
  if (trafficE === 0) return channels;
  if (isShortRecursion(channels)) {
    // free(N) = N (1 + free(N - 1)) / (N + A B(N - 1))
    let free = 0;
    let blocking = 1;
    for (let n = 1; n <= channels; n++) {
      const weighted = trafficE * blocking;
      free = (n * (1 + free)) / (n + weighted);
      blocking = weighted / (n + weighted);
    }
    return free;
  }
  if (isFarBelowMean(channels, trafficE)) {
    return channels / (trafficE - channels + 2 + legendreTail(channels, trafficE));
  }
  const odds = below(channels, trafficE);
  if (trafficE <= channels) return channels - trafficE + trafficE / (1 + odds);
  return (channels - (trafficE - channels) * odds) / (1 + odds);
}

/** Carried traffic A (1 - B), also where B is near 1. */
export function carriedOf(trafficE: number, channels: number): number {
  if (trafficE === 0) return 0;
  return trafficE / (1 + 1 / idleOdds(trafficE, channels));
}
