import { domain, probability, requireIn } from "../domain";
import { NoAnswerError } from "../errors";
import { gaussian, scaledErfc } from "../numerics/erfc";
import * as normal from "../numerics/normal";
import { root } from "../numerics/root";
import { exponent } from "./path-loss/log-distance";

export const deviation = domain(0, 100, "a standard deviation from 0 to 100 dB");
export const positiveDeviation = domain(0, 100, "a standard deviation above 0 and up to 100 dB", { openLow: true });

/**
 * Shadowing margin in dB that keeps the signal at the cell edge above its threshold with the given probability.
 *
 * Lognormal shadowing around the median: deviation times the normal quantile; negative below one half.
 *
 * @param edgeProbability above 0 and below 1
 * @param shadowingDb standard deviation, 0 to 100 dB
 */
export function margin(edgeProbability: number, shadowingDb: number): number {
  requireIn(probability, "edgeProbability", edgeProbability);
  requireIn(deviation, "shadowingDb", shadowingDb);
  return shadowingDb * normal.quantile(edgeProbability);
}

/**
 * exp(-z^2/2) erfcx(offset + z / sqrt 2): the tail beyond the edge, weighted with the area inside. A negative argument is
 * reflected, where the two factors alone would overflow.
 */
function weightedTail(z: number, offset: number): number {
  const x = offset + z * Math.SQRT1_2;
  if (x >= 0) return gaussian(z, 0.5) * scaledErfc(x);
  return 2 * Math.exp(offset * (offset + Math.SQRT2 * z)) - gaussian(z, 0.5) * scaledErfc(-x);
}

/** Square root of 2 times the shadowing over the slope of the median, both in dB, the slope over a factor e of distance. */
function offsetOf(shadowingDb: number, pathLossExponent: number): number {
  return (Math.SQRT2 * shadowingDb) / (10 * Math.LOG10E * pathLossExponent);
}

/**
 * Share of the area of a round cell where the signal is above its threshold, from the probability at the edge.
 *
 * W. C. Jakes (ed.), "Microwave Mobile Communications" (1974), section 2.5.3 (D. O. Reudink). With z the normal quantile of
 * the edge probability and x = sqrt(2) deviation / (10 n log10 e) the share is
 * P(edge) + exp(-z^2/2) erfcx(x + z / sqrt 2) / 2: the scaled error function erfcx(y) = exp(y^2) erfc(y) keeps every
 * term below 1 where the printed form multiplies exp by erfc and overflows.
 *
 * @param edgeProbability above 0 and below 1; one half has the median on the threshold
 * @param shadowingDb standard deviation, 0 to 100 dB; without shadowing all of the cell is covered
 * @param pathLossExponent 0.1 to 100
 */
export function area(edgeProbability: number, shadowingDb: number, pathLossExponent: number): number {
  requireIn(probability, "edgeProbability", edgeProbability);
  requireIn(deviation, "shadowingDb", shadowingDb);
  requireIn(exponent, "pathLossExponent", pathLossExponent);
  const covered = 0.5 * weightedTail(normal.quantile(edgeProbability), offsetOf(shadowingDb, pathLossExponent));
  return Math.min(1, edgeProbability + covered);
}

/** Edge probabilities below about 1e-300 are no numbers to work with. */
const LOWEST_QUANTILE = -37;
/** Above it the uncovered share is lost beside 1. */
const HIGHEST_QUANTILE = 9;
const LAST_BELOW_ONE = 1 - Number.EPSILON / 2;

/**
 * Probability at the cell edge that gives a share of the area: the inverse of `area`.
 *
 * @param areaProbability share of the area, above 0 and below 1
 * @param shadowingDb standard deviation, above 0 and up to 100 dB
 * @param pathLossExponent 0.1 to 100
 * @throws NoAnswerError where the probability at the edge would be below 1e-300
 */
export function edge(areaProbability: number, shadowingDb: number, pathLossExponent: number): number {
  requireIn(probability, "areaProbability", areaProbability);
  requireIn(positiveDeviation, "shadowingDb", shadowingDb);
  requireIn(exponent, "pathLossExponent", pathLossExponent);
  const offset = offsetOf(shadowingDb, pathLossExponent);
  // Compared by their logarithms, of the smaller of the shares covered and uncovered, so that neither tail loses digits.
  const covered = (z: number): number => Math.log((normal.cdf(z) + 0.5 * weightedTail(z, offset)) / areaProbability);
  const uncovered = (z: number): number =>
    Math.log((normal.upperTail(z) - 0.5 * weightedTail(z, offset)) / (1 - areaProbability));
  const atLow = covered(LOWEST_QUANTILE);
  if (atLow > 0) {
    throw new NoAnswerError(
      `${shadowingDb} dB of shadowing leaves more than ${areaProbability} of the area covered at any edge probability above 1e-300.`,
    );
  }
  const z =
    areaProbability < 0.5
      ? root(covered, LOWEST_QUANTILE, HIGHEST_QUANTILE)
      : root((at) => Math.max(uncovered(at), -1e3), LOWEST_QUANTILE, HIGHEST_QUANTILE);
  return Math.min(normal.cdf(z), LAST_BELOW_ONE);
}
