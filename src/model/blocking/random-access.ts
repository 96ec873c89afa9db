/** Slotted ALOHA on one or several channels (preambles): an attempt succeeds when it is alone on its channel in its slot. */
import { nonNegative, positiveCount, requireIn } from "../domain";

function successOf(attemptsPerSlot: number, channels: number): number {
  return Math.exp(-attemptsPerSlot / channels);
}

/**
 * Probability that an attempt meets no other one: exp(-G/n) (L. G. Roberts 1975), Poisson attempts, each on a channel at random.
 *
 * @param attemptsPerSlot mean attempts in a slot on all channels together, repeats included
 * @param channels channels to choose from, at least 1
 * @returns probability
 */
export function success(attemptsPerSlot: number, channels = 1): number {
  requireIn(nonNegative, "attemptsPerSlot", attemptsPerSlot);
  requireIn(positiveCount, "channels", channels);
  return successOf(attemptsPerSlot, channels);
}

/**
 * Mean successful attempts in a slot: G exp(-G/n). Largest at G = n, where it is n/e.
 *
 * @param attemptsPerSlot mean attempts in a slot on all channels together, repeats included
 * @param channels channels to choose from, at least 1
 * @returns successes per slot on all channels together
 */
export function throughput(attemptsPerSlot: number, channels = 1): number {
  requireIn(nonNegative, "attemptsPerSlot", attemptsPerSlot);
  requireIn(positiveCount, "channels", channels);
  return attemptsPerSlot * successOf(attemptsPerSlot, channels);
}
