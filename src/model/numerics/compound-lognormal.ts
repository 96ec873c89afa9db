import { upperTail } from "./normal";
import { inverseTerm } from "./poisson-ratio";

/** Largest mean count for which the work stays within a fraction of a second. */
export const MOST_MEAN = 1e6;

/** Below this deviation in nepers the sum of a given count is lognormal to better than 1e-7. */
const SMALL_DEVIATION = 0.02;
/** exp(-TAIL) does not count beside a probability. */
const TAIL = 38;
/** A normal variable beyond this many deviations has probability 1e-17. */
const WIDEST = 8.5;

/**
 * Probability that the sum of a Poisson number of independent lognormals of median 1 exceeds a level.
 *
 * The Laplace transform of the sum is exp(-m (1 - phi(u))), phi that of one lognormal (W. Feller, "An Introduction to Probability
 * Theory", volume 2, chapter XIII). It is inverted by the trapezoidal rule (J. Abate, W. Whitt, Queueing Systems 10 (1992)) along
 * a line that bends to the left (J. A. C. Weideman, L. N. Trefethen, Math. Comp. 76 (2007)), as far as phi stays near 1 in size there.
 * Below a deviation of 0.02 nepers the transform hardly decays; there the sum is taken over the count, the sum of each count as
 * the lognormal of the same mean and variance (L. F. Fenton, IRE Trans. Commun. Systems 8 (1960)), skewness and kurtosis of
 * which then agree to the third power of the deviation.
 *
 * @param level above 0
 * @param mean m, mean count, 0 to MOST_MEAN
 * @param deviation of the logarithm of each, nepers, above 0 and up to 5
 * @returns probability, absolute error below 1e-9 (1e-7 for deviations below 0.02 nepers); 0 below 1e-12
 */
export function compoundExceedance(level: number, mean: number, deviation: number): number {
  const some = -Math.expm1(-mean);
  if (mean === 0) return 0;
  // One alone already exceeds so low a level.
  if (Math.log(level) < -WIDEST * deviation) return some;
  const average = mean * Math.exp((deviation * deviation) / 2);
  const variance = mean * Math.exp(2 * deviation * deviation);
  const distance = average - level;
  // Sums of positive parts fall below their mean no more often than this bound of Bernstein's allows.
  if (distance > 0 && distance * distance > 2 * TAIL * variance) return 1;
  if (average < 1e-13 * level) return 0;
  const value = deviation < SMALL_DEVIATION ? byCount(level, mean, deviation) : some - atMost(level, mean, deviation);
  return value < 1e-12 ? 0 : Math.min(1, value);
}

function byCount(level: number, mean: number, deviation: number): number {
  const s2 = deviation * deviation;
  const exceeds = (n: number): number => {
    const spread = Math.log1p(Math.expm1(s2) / n);
    return upperTail((Math.log(level / n) - s2 / 2 + spread / 2) / Math.sqrt(spread));
  };
  const reach = 9 * Math.sqrt(mean) + 40;
  const first = Math.max(1, Math.floor(mean - reach));
  const last = Math.ceil(mean + reach);
  let sum = 0;
  for (let n = first; n <= last; n++) {
    const tail = exceeds(n);
    if (tail > 0) sum += tail / inverseTerm(n, mean);
  }
  return sum;
}

/** The probability that the sum lies above 0 and not above the level. */
function atMost(level: number, mean: number, deviation: number): number {
  // The rule repeats the distribution with this period, weighted exp(-c period) = e^-30.
  const period = 4 * level;
  const c = 30 / period;
  const step = (2 * Math.PI) / period;
  // So little bend that exp(m (|phi| - 1)) stays below 2 on the line.
  const bend = Math.min(0.3, deviation * Math.min(0.7, 1 / Math.sqrt(mean)));
  const phi = lognormalTransform(deviation, Math.min(0.95, 2 * deviation));
  const oneLobe = isOneLobe(phi, mean, deviation);

  let sum = 0;
  for (let k = 0; ; k++) {
    const y = k * step;
    const root = Math.hypot(y, c);
    const re = c - bend * (root - c);
    const slope = (-bend * y) / root;
    phi.at(re, y);
    // exp(m phi) - 1 in polar form: without losing a small phi, and without overflow of a large m.
    const grown = Math.exp(re * level + mean * (phi.re - 1));
    const plain = Math.exp(re * level - mean);
    const half = Math.sin((mean * phi.im) / 2);
    const excess = mean < TAIL ? plain * Math.expm1(mean * phi.re) : grown - plain;
    const partRe = excess - 2 * half * half * grown;
    const partIm = grown * Math.sin(mean * phi.im);
    // Times exp(i y level) (slope + i) / u.
    const square = re * re + y * y;
    const factorRe = (slope * re + y) / square;
    const factorIm = (re - slope * y) / square;
    const cos = Math.cos(y * level);
    const sin = Math.sin(y * level);
    const turnedRe = cos * factorRe - sin * factorIm;
    const turnedIm = cos * factorIm + sin * factorRe;
    const term = partRe * turnedIm + partIm * turnedRe;
    sum += k === 0 ? term / 2 : term;
    const most = oneLobe ? phi.re : Math.hypot(phi.re, phi.im);
    if (re * level + mean * (most - 1) < -TAIL) break;
    if (mean < TAIL && plain * Math.expm1(mean * Math.hypot(phi.re, phi.im)) < 1e-17) break;
  }
  return (sum * step) / Math.PI;
}

/** Whether the transform stays negligible once it has become so, although equal parts would bring it back near u = 2 pi i. */
function isOneLobe(phi: LognormalTransform, mean: number, deviation: number): boolean {
  if (deviation > 0.5 || mean < 4 * TAIL) return deviation > 0.5;
  phi.at(0, 5);
  return mean * (1 - Math.hypot(phi.re, phi.im)) > 2 * TAIL;
}

interface LognormalTransform {
  re: number;
  im: number;
  /** Sets re and im to E[exp(-u X)] for u = x + i y, y of at least 0. */
  at(x: number, y: number): void;
}

/**
 * The transform with the path of the normal variable shifted by -i angle/deviation, which turns exp(-u X) by -angle and so damps
 * it where u is near the imaginary axis, at the cost of weights of size exp(angle^2 / (2 deviation^2)), at most e^2.
 */
function lognormalTransform(deviation: number, angle: number): LognormalTransform {
  const shift = angle / deviation;
  const step = Math.min(0.15, 0.1 / deviation);
  const count = Math.floor(WIDEST / step);
  const size = 2 * count + 1;
  const values = new Float64Array(size);
  const weightRe = new Float64Array(size);
  const weightIm = new Float64Array(size);
  const scale = (step * Math.exp((shift * shift) / 2)) / Math.sqrt(2 * Math.PI);
  for (let i = 0; i < size; i++) {
    const z = (i - count) * step;
    values[i] = Math.exp(deviation * z);
    const weight = scale * Math.exp((-z * z) / 2);
    weightRe[i] = weight * Math.cos(shift * z);
    weightIm[i] = weight * Math.sin(shift * z);
  }
  const cos = Math.cos(angle);
  const sin = Math.sin(angle);
  return {
    re: 0,
    im: 0,
    at(x, y) {
      const damping = x * cos + y * sin;
      const turning = y * cos - x * sin;
      let re = 0;
      let im = 0;
      for (let i = 0; i < size; i++) {
        const value = values[i]!;
        const exponent = damping * value;
        if (exponent > 45) break;
        const decay = Math.exp(-exponent);
        const a = decay * Math.cos(turning * value);
        const b = -decay * Math.sin(turning * value);
        re += weightRe[i]! * a - weightIm[i]! * b;
        im += weightRe[i]! * b + weightIm[i]! * a;
      }
      this.re = re;
      this.im = im;
    },
  };
}
