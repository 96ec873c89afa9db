/** New calls and handovers on one group, with guard channels that only handovers may take. */
import { domain, requireIn } from "../domain";
import { DomainError, NoAnswerError } from "../errors";
import { sumError } from "../numerics/exact";
import { blockingTarget } from "./erlang-b";
import { blockingOf, freeChannels } from "./erlang-b-formula";

export const cellTraffic = domain(0, 1e9, "traffic from 0 to 1,000,000,000 erlang");
export const cellChannels = domain(0, 1e6, "a whole number of channels from 0 to 1,000,000", { whole: true });
export const guardCount = domain(0, 1e6, "a whole number of guard channels from 0 to the channels", { whole: true });
export const durationS = domain(1e-9, 1e9, "a time from 0.000000001 to 1,000,000,000 s");

/**
 * Probability of the highest state when new calls and handovers share `channels` alike: Erlang B of both.
 *
 * Far above the traffic blocking magnifies the rounding of the sum by the number of free channels, its elasticity.
 */
function topState(newTrafficE: number, handoverTrafficE: number, channels: number): number {
  if (channels === 0) return 1;
  const sum = newTrafficE + handoverTrafficE;
  if (sum === 0) return 0;
  const rest = sumError(newTrafficE, handoverTrafficE, sum) / sum;
  const top = blockingOf(sum, channels);
  return rest === 0 ? top : top * (1 + rest * freeChannels(sum, channels));
}

function check(newTrafficE: number, handoverTrafficE: number, channels: number): void {
  requireIn(cellTraffic, "newTrafficE", newTrafficE);
  requireIn(cellTraffic, "handoverTrafficE", handoverTrafficE);
  requireIn(cellChannels, "channels", channels);
}

/**
 * Blocking of new calls and failure of handovers: new calls are admitted while fewer than channels - guard are busy, handovers
 * while any is free.
 *
 * States up to channels - guard are those of Erlang B; from there each state joins by its rate over that of the states below, so
 * that both probabilities are sums and quotients of positive numbers at any depth.
 *
 * @param newTrafficE traffic of new calls, erlang: new calls per s times the mean channel holding time
 * @param handoverTrafficE traffic of handovers into the cell, erlang, in the same mean channel holding time
 * @param channels channels of the cell, 0 to 1,000,000
 * @param guardChannels channels that new calls leave free, at most all
 * @returns blocking of new calls, failure of handovers
 */
export function blocking(
  newTrafficE: number,
  handoverTrafficE: number,
  channels: number,
  guardChannels: number,
): [newCalls: number, handovers: number] {
  check(newTrafficE, handoverTrafficE, channels);
  requireIn(guardCount, "guardChannels", guardChannels);
  if (guardChannels > channels) {
    throw new DomainError("guardChannels", guardChannels, `a whole number from 0 to the ${channels} channels`);
  }
  const shared = channels - guardChannels;
  let failed = topState(newTrafficE, handoverTrafficE, shared);
  let blocked = failed;
  for (let state = shared + 1; state <= channels; state++) {
    const ratio = (handoverTrafficE * failed) / state;
    failed = ratio / (1 + ratio);
    blocked = (blocked + ratio) / (1 + ratio);
  }
  return [blocked, failed];
}

/**
 * Smallest number of guard channels that keeps the failure of handovers at the target or below.
 *
 * One pass over the guard channels: with w_k = N (N - 1) ... (N - k + 1) / Ah^k the reciprocal of the failure is
 * w_0 + ... + w_(g - 1) + w_g / B(N - g), so that one guard channel more costs one product and one Erlang B.
 *
 * @param newTrafficE traffic of new calls, erlang
 * @param handoverTrafficE traffic of handovers, erlang
 * @param channels channels of the cell
 * @param failureTarget largest failure of handovers, 1e-300 to below 1
 * @returns guard channels
 * @throws NoAnswerError where handovers alone fail more often on all channels
 */
export function guard(newTrafficE: number, handoverTrafficE: number, channels: number, failureTarget: number): number {
  check(newTrafficE, handoverTrafficE, channels);
  requireIn(blockingTarget, "failureTarget", failureTarget);
  let sum = 0;
  let weight = 1;
  for (let guarded = 0; guarded <= channels; guarded++) {
    const failure = 1 / (sum + weight / topState(newTrafficE, handoverTrafficE, channels - guarded));
    if (failure <= failureTarget) return guarded;
    if (guarded === 0) requireReachable(handoverTrafficE, channels, failureTarget);
    sum += weight;
    weight *= (channels - guarded) / handoverTrafficE;
  }
  // Rounding alone can bring the search here: all channels guarded is just what the target asks for.
  return channels;
}

function requireReachable(handoverTrafficE: number, channels: number, failureTarget: number): void {
  const least = topState(0, handoverTrafficE, channels);
  if (least > failureTarget) {
    throw new NoAnswerError(
      `With all ${channels} channels kept for handovers a share of ${least} of ${handoverTrafficE} erlang still fails, above the target of ${failureTarget}.`,
    );
  }
}

/**
 * Traffic that handovers bring to a cell and the mean time for which a channel is held, where every cell is like its
 * neighbours: as many calls arrive by handover as leave by it.
 *
 * Exponential call duration h and time in a cell T (D. Hong, S. S. Rappaport 1986): a channel is held for the shorter of
 * what is left of both, h T/(h + T) on average; a call goes on into the next cell with probability h/(h + T), so that it makes h/T
 * handovers, each of which holds a channel as long as a new call does. Blocking is neglected.
 *
 * @param newTrafficE traffic of new calls in the cell where they start, erlang: new calls per s times the mean channel holding time
 * @param holdingTimeS mean duration of a call, s
 * @param dwellTimeS mean time that a user stays in a cell, s
 * @returns traffic of handovers, erlang; mean channel holding time, s
 */
export function traffic(
  newTrafficE: number,
  holdingTimeS: number,
  dwellTimeS: number,
): [handoverE: number, channelHoldingS: number] {
  requireIn(cellTraffic, "newTrafficE", newTrafficE);
  requireIn(durationS, "holdingTimeS", holdingTimeS);
  requireIn(durationS, "dwellTimeS", dwellTimeS);
  return [(newTrafficE * holdingTimeS) / dwellTimeS, holdingTimeS / (1 + holdingTimeS / dwellTimeS)];
}
