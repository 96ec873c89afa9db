import { domain, nonNegative, positive, probability, requireIn } from "../domain";
import { NoAnswerError } from "../errors";
import { quantile } from "../numerics/normal";

/** Times in years (or any unit that the rates share). */
export const time = domain(-1e4, 1e4, "a time from -10,000 to 10,000");
export const level = domain(0, 1e15, "a level from 0 to 1E+15");
export const growth = domain(-1, 100, "a growth above -1, up to 100", { openLow: true });
export const rate = domain(0, 1000, "a rate above 0, up to 1000", { openLow: true });
export const horizon = domain(0, 1000, "a number of years from 0 to 1000");

function finite(value: number, what: string): number {
  if (!Number.isFinite(value)) throw new NoAnswerError(`The ${what} lies beyond the numbers that a cell can hold.`);
  return value;
}

/**
 * Level after years of constant growth: start (1 + g)^t.
 *
 * @param start level at time 0
 * @param growthPerYear growth as a fraction
 * @param years time since the start
 */
export function compound(start: number, growthPerYear: number, years: number): number {
  requireIn(level, "start", start);
  requireIn(growth, "growthPerYear", growthPerYear);
  requireIn(time, "years", years);
  return finite(start * Math.exp(years * Math.log1p(growthPerYear)), "level");
}

/**
 * Logistic growth: S / (1 + exp(-k (t - m))).
 *
 * @param saturation level in the long run
 * @param midpoint time at which half of it is reached
 * @param steepness k
 * @param at time
 */
export function logistic(saturation: number, midpoint: number, steepness: number, at: number): number {
  requireIn(level, "saturation", saturation);
  requireIn(time, "midpoint", midpoint);
  requireIn(rate, "steepness", steepness);
  requireIn(time, "time", at);
  return saturation / (1 + Math.exp(-steepness * (at - midpoint)));
}

/**
 * Gompertz growth: S exp(-b exp(-c t)).
 *
 * @param saturation level in the long run
 * @param displacement b, above 0
 * @param ratePerYear c
 * @param at time
 */
export function gompertz(saturation: number, displacement: number, ratePerYear: number, at: number): number {
  requireIn(level, "saturation", saturation);
  requireIn(positive, "displacement", displacement);
  requireIn(rate, "rate", ratePerYear);
  requireIn(time, "time", at);
  return saturation * Math.exp(-displacement * Math.exp(-ratePerYear * at));
}

/**
 * Cumulative adopters: M (1 - exp(-(p + q) t)) / (1 + (q/p) exp(-(p + q) t)).
 *
 * F. M. Bass, "A new product growth for model consumer durables", Management Science 15 (1969).
 *
 * @param market number of adopters in the long run
 * @param innovation p, above 0
 * @param imitation q, at least 0
 * @param at time since launch, at least 0
 */
export function bass(market: number, innovation: number, imitation: number, at: number): number {
  requireIn(level, "market", market);
  requireIn(rate, "innovation", innovation);
  requireIn(nonNegative, "imitation", imitation);
  requireIn(horizon, "time", at);
  const exponent = -(innovation + imitation) * at;
  return (-market * Math.expm1(exponent)) / (1 + (imitation / innovation) * Math.exp(exponent));
}

/**
 * Level of a forecast at a percentile: level exp(z ln(1 + e) sqrt(years)), a lognormal error that grows with the root of the
 * horizon.
 *
 * @param median forecast level
 * @param errorPerYear relative error a year ahead
 * @param years horizon
 * @param percentile above 0 and below 1; 0.5 is the forecast itself
 */
export function band(median: number, errorPerYear: number, years: number, percentile: number): number {
  requireIn(level, "level", median);
  requireIn(nonNegative, "errorPerYear", errorPerYear);
  requireIn(horizon, "years", years);
  requireIn(probability, "percentile", percentile);
  return finite(median * Math.exp(quantile(percentile) * Math.log1p(errorPerYear) * Math.sqrt(years)), "level");
}
