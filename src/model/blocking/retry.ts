import { domain, requireIn, share } from "../domain";
import { NoAnswerError } from "../errors";
import { bracketAround, rootIn } from "../numerics/root";
import { blockingOf, carriedOf, freeChannels } from "./erlang-b-formula";

export const firstTraffic = domain(0, 1e6, "traffic from 0 to 1,000,000 erlang");
export const retryChannels = domain(0, 1e7, "a number of channels from 0 to 10,000,000");

/** Even a share one rounding unit below 1 settles below this. */
const MOST_OFFERED = 1e25;

/**
 * Offered traffic with repeated attempts: every blocked call is tried again with the retry share, so that
 * A = A0 + r A B(A) (the extended Erlang B model).
 *
 * A - r A B(A) = (1 - r) A + r carried(A) rises with A in positive parts, so the root is unique and keeps its digits.
 *
 * @param firstTrafficE traffic of first attempts, erlang
 * @param channels number of channels
 * @param retryShare share of blocked attempts that are repeated
 * @returns erlang, repeats included
 * @throws NoAnswerError where every blocked call is repeated and the channels cannot carry the first attempts
 */
export function offered(firstTrafficE: number, channels: number, retryShare: number): number {
  requireIn(firstTraffic, "firstTrafficE", firstTrafficE);
  requireIn(retryChannels, "channels", channels);
  requireIn(share, "retryShare", retryShare);
  if (firstTrafficE === 0 || retryShare === 0) return firstTrafficE;
  if (channels === 0 && retryShare < 1) return firstTrafficE / (1 - retryShare);
  // Where the first attempts alone nearly fill the group, the free channels keep the digits that the carried traffic loses.
  const spare = channels - firstTrafficE;
  const excess =
    Math.abs(spare) < 0.5 * channels
      ? (a: number): number => (1 - retryShare) * a * blockingOf(a, channels) - freeChannels(a, channels) + spare
      : (a: number): number => (1 - retryShare) * a + retryShare * carriedOf(a, channels) - firstTrafficE;
  // Where blocking is below a rounding unit the first attempts are the answer.
  if (excess(firstTrafficE) >= 0) return firstTrafficE;
  const endless = retryShare === 1 && firstTrafficE >= channels;
  const bracket = endless ? undefined : bracketAround(excess, firstTrafficE, firstTrafficE, MOST_OFFERED);
  if (!bracket) {
    throw new NoAnswerError(
      `Repeated attempts never settle: ${firstTrafficE} erlang of first attempts on ${channels} channels with a retry share of ${retryShare}.`,
    );
  }
  return rootIn(excess, bracket);
}

/**
 * Blocking of an attempt when blocked calls are tried again: Erlang B at the traffic with repeats.
 *
 * @param firstTrafficE traffic of first attempts, erlang
 * @param channels number of channels
 * @param retryShare share of blocked attempts that are repeated
 * @returns probability
 */
export function blocking(firstTrafficE: number, channels: number, retryShare: number): number {
  return blockingOf(offered(firstTrafficE, channels, retryShare), channels);
}
