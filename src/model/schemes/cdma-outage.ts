import { domain, requireIn } from "../domain";
import { DomainError } from "../errors";
import { bitRate, chipRate, ebN0, otherCellRatio as otherCellRatios, processingGain } from "../interference/domains";
import { compoundExceedance, MOST_MEAN } from "../numerics/compound-lognormal";
import { fromDecibel } from "../numerics/decibel";
import { below, inverseTerm, sumsAbove } from "../numerics/poisson-ratio";
import { wholeWithin } from "../numerics/whole";
import { activityFactor, loadLimitShare, powerControlError } from "./cdma";

export const outageTraffic = domain(0, 1e6, "traffic from 0 to 1,000,000 erlang");

const DECIBEL_PER_NEPER = 10 / Math.LN10;

/** P(N > n) for a Poisson number of some mean; each side of the mean as a sum of positive parts. */
function poissonAbove(n: number, mean: number): number {
  if (mean === 0) return 0;
  const inverse = inverseTerm(n, mean);
  if (n < mean) return inverse === Infinity ? 1 : 1 - (below(n, mean) + 1) / inverse;
  return inverse === Infinity ? 0 : sumsAbove(n, mean).total / inverse;
}

/**
 * Probability that the uplink load exceeds its limit. Active users of the cell and of its neighbours, seen at the cell, are a Poisson
 * number of mean v A (1 + i); each loads the cell with 1/(1 + (W/R)/(Eb/N0)), times a lognormal of median 1 where power control errs.
 *
 * A. M. Viterbi, A. J. Viterbi, "Erlang capacity of a power controlled CDMA system", IEEE J. Select. Areas Commun. 11 (1993).
 *
 * @param trafficE A, offered traffic of the cell, erlang
 * @param chipRateMcps W
 * @param bitRateKbps R
 * @param ebN0Db required Eb/N0
 * @param activity v, share of time that a user sends; it thins the number, not the load of one
 * @param otherCellRatio i, other-cell interference over own-cell power
 * @param loadLimit load not to exceed
 * @param powerControlErrorDb standard deviation of received powers
 * @returns probability: exact without power-control error, else to the absolute error of compoundExceedance
 */
export function outage(
  trafficE: number,
  chipRateMcps: number,
  bitRateKbps: number,
  ebN0Db: number,
  activity: number,
  otherCellRatio: number,
  loadLimit = 0.75,
  powerControlErrorDb = 0,
): number {
  requireIn(outageTraffic, "trafficE", trafficE);
  requireIn(chipRate, "chipRateMcps", chipRateMcps);
  requireIn(bitRate, "bitRateKbps", bitRateKbps);
  requireIn(ebN0, "ebN0Db", ebN0Db);
  requireIn(activityFactor, "activity", activity);
  requireIn(otherCellRatios, "otherCellRatio", otherCellRatio);
  requireIn(loadLimitShare, "loadLimit", loadLimit);
  requireIn(powerControlError, "powerControlErrorDb", powerControlErrorDb);
  const mean = activity * trafficE * (1 + otherCellRatio);
  const users = loadLimit * (1 + processingGain(chipRateMcps, bitRateKbps) / fromDecibel(ebN0Db));
  if (powerControlErrorDb === 0) return poissonAbove(wholeWithin(users), mean);
  if (mean > MOST_MEAN) {
    throw new DomainError(
      "trafficE",
      trafficE,
      "with a power-control error, traffic whose activity x trafficE x (1 + otherCellRatio) is at most 1,000,000",
    );
  }
  return compoundExceedance(users, mean, powerControlErrorDb / DECIBEL_PER_NEPER);
}
