import { decibel, domain, requireIn } from "../../domain";
import { NoAnswerError } from "../../errors";

export const distance = domain(0, 1e9, "a distance above 0 and up to 1e9 km", { openLow: true });
const LARGEST_LOG = Math.log10(distance.high);
const SMALLEST_LOG = -300;
export const exponent = domain(0.1, 100, "a path-loss exponent from 0.1 to 100");

/**
 * Log-distance loss in dB: the loss at a reference distance plus 10 n log10 of the distance ratio.
 *
 * A straight line fitted to measurements (T. S. Rappaport, "Wireless Communications", section 4.11); how far it holds on
 * either side of the reference is the planner's knowledge.
 *
 * @param distanceKm above 0
 * @param referenceLossDb loss at the reference distance
 * @param pathLossExponent 0.1 to 100
 * @param referenceKm above 0
 */
export function loss(distanceKm: number, referenceLossDb: number, pathLossExponent: number, referenceKm = 1): number {
  requireIn(distance, "distanceKm", distanceKm);
  requireIn(decibel, "referenceLossDb", referenceLossDb);
  requireIn(exponent, "pathLossExponent", pathLossExponent);
  requireIn(distance, "referenceKm", referenceKm);
  // A ratio of the two would lose digits only where it leaves the doubles; a difference of logarithms never does.
  return referenceLossDb + 10 * pathLossExponent * (Math.log10(distanceKm) - Math.log10(referenceKm));
}

/**
 * Distance in km of a log-distance loss.
 *
 * @param lossDb -1000 to 1000 dB
 * @param referenceLossDb as in `loss`
 * @param pathLossExponent as in `loss`
 * @param referenceKm as in `loss`
 * @throws NoAnswerError where the distance is no number to work with
 */
export function range(lossDb: number, referenceLossDb: number, pathLossExponent: number, referenceKm = 1): number {
  requireIn(decibel, "lossDb", lossDb);
  requireIn(decibel, "referenceLossDb", referenceLossDb);
  requireIn(exponent, "pathLossExponent", pathLossExponent);
  requireIn(distance, "referenceKm", referenceKm);
  const log = Math.log10(referenceKm) + (lossDb - referenceLossDb) / (10 * pathLossExponent);
  if (log > LARGEST_LOG || log < SMALLEST_LOG) {
    throw new NoAnswerError(`lossDb ${lossDb} is reached at 1e${Math.round(log)} km, outside 1e-300 to 1e9 km.`);
  }
  return referenceKm * Math.pow(10, (lossDb - referenceLossDb) / (10 * pathLossExponent));
}
