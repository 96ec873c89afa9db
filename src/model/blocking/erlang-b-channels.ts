import { smallestWhole } from "../numerics/root";
import { ESTIMATE_FROM, estimateChannels, type Estimate } from "./erlang-b-estimate";
import { blockingOf } from "./erlang-b-formula";

/** Blocking by the recursion and by the formula agree to far better than this; closer calls are settled by the formula. */
const CLOSE_CALL = 1e-12;
const MOST_CHANNELS = 2 ** 50;

const estimate: Estimate = { channels: 0, error: 0 };

/** Little traffic needs few channels: the recursion passes them all on its way. */
function channelsByRecursion(trafficE: number, target: number): number {
  let blocking = 1;
  for (let n = 1; ; n++) {
    const weighted = trafficE * blocking;
    blocking = weighted / (n + weighted);
    if (blocking <= target * (1 + CLOSE_CALL)) {
      if (blocking <= target * (1 - CLOSE_CALL) || blockingOf(trafficE, n) <= target) return n;
    }
  }
}

/** Where to begin outside the table of estimates: Newton's method on ln B, with the recursion's last ratio as slope. */
function roughChannels(trafficE: number, target: number): number {
  if (target * Math.sqrt(trafficE) > 1) {
    // Heavy loss: carried traffic A (1 - B) is N less the few free channels, about (1 - B)/B.
    return trafficE * (1 - target) + (1 - target) / target;
  }
  // From the right, where ln B is concave: Bernstein's bound of the Poisson tail.
  const depth = -Math.log(target);
  let channels = trafficE + depth / 3 + Math.sqrt((depth * depth) / 9 + 2 * trafficE * depth);
  for (let step = 0; step < 60; step++) {
    const blocking = blockingOf(trafficE, channels);
    if (blocking === 0) {
      channels = (channels + trafficE) / 2;
      continue;
    }
    const change = Math.log(blocking / target) / Math.log((channels + 1 + trafficE * blocking) / trafficE);
    channels += change;
    if (Math.abs(change) < 0.25) break;
  }
  return channels;
}

/**
 * Smallest whole number of channels with at most the target blocking, unchecked.
 *
 * The estimate decides alone unless a whole number lies within its error; then Erlang B at the whole numbers decides. So the
 * answer is exact, and costs about as much as one logarithm.
 */
export function channelsFor(trafficE: number, target: number): number {
  if (trafficE === 0) return 0;
  if (trafficE < ESTIMATE_FROM) return channelsByRecursion(trafficE, target);
  estimateChannels(trafficE, target, estimate);
  const { channels, error } = estimate;
  let guess = Math.ceil(channels);
  if (error < 0.5) {
    if (guess - channels > error && channels - guess > error - 1 && guess > 0) return guess;
  } else {
    guess = Math.ceil(roughChannels(trafficE, target));
  }
  return smallestWhole((n) => blockingOf(trafficE, n) <= target, 1, MOST_CHANNELS, guess)!;
}
