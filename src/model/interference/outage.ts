import { decibel, domain, requireIn, share } from "../domain";
import { differenceTail, exceedance } from "./lognormal-sum";

export const shadowing = domain(0, 100, "a deviation from 0 to 100 dB");
export const interfererCount = domain(1, 1e6, "a whole number from 1 to 1E+6", { whole: true });

const NEPER_PER_DECIBEL = Math.LN10 / 10;

/**
 * Probability that shadowing takes the signal to interference below a target.
 *
 * Wanted signal and interferers are lognormal with one deviation and one correlation between any two of them. What all
 * paths share cancels in the ratio, so that a correlation leaves independent paths of deviation sqrt(1 - correlation) times
 * the given one. One interferer: a normal tail, exact. More: the sum of lognormals without approximation, by quadrature
 * (see `exceedance`), absolute error below 1e-12 (1e-11 for a deviation
 * below 0.1 dB); a result below 1e-12 counts as 0.
 *
 * @param medianDb median wanted power over the sum of the interferers' median powers
 * @param requiredDb target
 * @param shadowingDb deviation of every path, 0 to 100 dB
 * @param interferers number of equal interferers, 1 to 1E+6
 * @param correlation between any two paths, 0 to 1
 */
export function outage(
  medianDb: number,
  requiredDb: number,
  shadowingDb: number,
  interferers: number,
  correlation = 0,
): number {
  requireIn(decibel, "medianDb", medianDb);
  requireIn(decibel, "requiredDb", requiredDb);
  requireIn(shadowing, "shadowingDb", shadowingDb);
  requireIn(interfererCount, "interferers", interferers);
  requireIn(share, "correlation", correlation);
  const marginNeper = (medianDb - requiredDb) * NEPER_PER_DECIBEL;
  const deviation = shadowingDb * Math.sqrt(1 - correlation) * NEPER_PER_DECIBEL;
  if (deviation === 0) return marginNeper < 0 ? 1 : 0;
  if (interferers === 1) return differenceTail(marginNeper / (deviation * Math.SQRT2));
  return exceedance(marginNeper, deviation, interferers);
}
