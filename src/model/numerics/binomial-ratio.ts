import { productError, sumError } from "./exact";
import { logGammaOnePlus, stirlingError } from "./log-gamma";
import { poissonDeviance, type TwoParts } from "./poisson-deviance";

/** Where products are so small that their rounding errors leave the doubles; nothing there depends on those errors. */
const SMALLEST_EXACT = 1e-280;
const NEGLIGIBLE = 1.2e-16;
/** Some 30,000 are needed at the transition of a thousand million trials; a bound all the same. */
const MOST_TERMS = 1e6;

interface Means {
  readonly busy: TwoParts;
  readonly idle: TwoParts;
}

/** trials p and trials (1 - p) for the odds p/(1 - p), to some 30 digits: a probability far from the mean magnifies their error. */
function means(trials: number, odds: number): Means {
  const sum = 1 + odds;
  const sumRest = sumError(1, odds, sum);
  const quotient = (numerator: number, rest: number): TwoParts => {
    const high = numerator / sum;
    if (high < SMALLEST_EXACT) return { high, low: 0 };
    const back = high * sum;
    return { high, low: (numerator - back - productError(high, sum, back) + rest - high * sumRest) / sum };
  };
  const idle = quotient(trials, 0);
  if (odds >= 1) {
    const high = trials - idle.high;
    return { busy: { high, low: sumError(trials, -idle.high, high) - idle.low }, idle };
  }
  const product = trials * odds;
  const rest = product < SMALLEST_EXACT ? 0 : productError(trials, odds, product);
  return { busy: quotient(product, rest), idle };
}

/** Deviance of a value from its mean where both come in two parts: the small parts enter by its derivatives. */
function deviance(value: TwoParts, mean: TwoParts): TwoParts {
  const lead = poissonDeviance(value.high, mean.high);
  if (lead.high === Infinity) return lead;
  const fromMean = mean.low === 0 ? 0 : mean.low - value.high * (mean.low / mean.high);
  const fromValue = value.low === 0 ? 0 : value.low * Math.log(value.high / mean.high);
  return { high: lead.high, low: lead.low + fromMean + fromValue };
}

/**
 * Reciprocal of the binomial probability of n among the trials, for real n from 0 to trials - 1; infinity where beyond the doubles.
 *
 * Saddle-point form: C. Loader, "Fast and accurate computation of binomial probabilities" (2000).
 */
function inverseTerm(trials: number, n: number, odds: number): number {
  const others = trials - n;
  const { busy, idle } = means(trials, odds);
  const first = n < 1 ? belowOne(n, busy.high) : deviance({ high: n, low: 0 }, busy);
  const second = deviance({ high: others, low: sumError(trials, -n, others) }, idle);
  const exponent = first.high + second.high;
  if (exponent > 709) return Infinity;
  const rest = sumError(first.high, second.high, exponent) + first.low + second.low;
  const exponential = Math.exp(exponent);
  const gammas = Math.exp((n < 1 ? 0 : stirlingError(n)) + stirlingError(others) - stirlingError(trials));
  const root = Math.sqrt((n < 1 ? 1 : 2 * Math.PI * n) * (others / trials));
  return root * gammas * (exponential + exponential * rest);
}

/** For n below 1 the saddle point is no help: ln of n! exp(mean) / mean^n as it stands. */
function belowOne(n: number, mean: number): TwoParts {
  return { high: mean - n * Math.log(mean) + logGammaOnePlus(n), low: 0 };
}

/**
 * Continued fraction of the incomplete beta function: B_x(a, b) over x^a (1 - x)^b.
 *
 * A. R. DiDonato, A. H. Morris, "Significant digit computation of the incomplete beta function ratios", ACM TOMS 18 (1992),
 * equation 9. All parts are positive up to order b, since it is used for `lambda` >= 0 only. Lentz's forward evaluation: its factors
 * lose nothing over the thousands of orders that the transition of many trials takes, where Steed's sum loses four digits.
 * The caller gives lambda = a - (a + b) x, since it cancels, and y = 1 - x.
 */
function betaFraction(a: number, b: number, x: number, y: number, lambda: number): number {
  let fraction = (a * (lambda + 1)) / (a + 1);
  let upper = fraction;
  let lower = 0;
  for (let n = 1; n < MOST_TERMS; n++) {
    const c = a + 2 * n - 1;
    const pair = n * (b - n) * x;
    const alpha = ((a + n - 1) / c) * ((a + b + n - 1) / c) * pair * x;
    const beta = n + pair / c + ((a + n) / (c + 2)) * (lambda + 1 + n * (1 + y));
    lower = 1 / (beta + alpha * lower);
    upper = beta + alpha / upper;
    const change = upper * lower;
    fraction *= change;
    if (Math.abs(change - 1) < NEGLIGIBLE) break;
  }
  return 1 / fraction;
}

/**
 * Sum of the binomial terms from 0 to n over the term at n, continued to real trials and n:
 *
 *   (s - n) times the integral of (1 - t)^(s - n - 1) (1 + t/odds)^n over t from 0 to 1  =  2F1(1, -n; s - n + 1; -1/odds).
 *
 * For whole n it is the sum over k of C(s, k) odds^k, over C(s, n) odds^n. The integral is an incomplete beta function; of its two
 * sides the smaller one is taken from the continued fraction, so that neither tail loses digits.
 *
 * @param trials s, at least 0
 * @param n at least 0 and below trials + 1
 * @param odds success over failure, above 0
 * @returns at least 1; infinity where beyond the doubles
 */
export function sumOverTerm(trials: number, n: number, odds: number): number {
  // Below the doubles' range of 1/n the answer is 1 to all digits.
  if (n < SMALLEST_EXACT) return 1;
  const others = trials - n;
  const othersRest = sumError(trials, -n, others);
  const y = 1 / (1 + odds);
  const x = odds * y;
  // Near the last term one trial more gives parameters for which everything below is quick; all parts are positive.
  if (others < 1) {
    const free = others + 1 + othersRest;
    return x + ((y * (trials + 1)) / free) * sumOverTerm(trials + 1, n, odds);
  }
  const weighted = others * odds;
  const weightedRest = weighted < SMALLEST_EXACT ? 0 : productError(others, odds, weighted) + othersRest * odds;
  const difference = weighted - n;
  const lead = difference - 1;
  const lambda =
    (lead + (sumError(weighted, -n, difference) + sumError(difference, -1, lead) + weightedRest)) / (1 + odds);
  // Below the mean: terms fall from n downwards.
  if (lambda >= 0) return others * x * betaFraction(others, n + 1, y, x, lambda);
  const whole = inverseTerm(trials, n, odds);
  if (whole === Infinity) return whole;
  return whole - others * x * betaFraction(n + 1, others, x, y, -lambda);
}
