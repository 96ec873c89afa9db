import { upperTail } from "../numerics/normal";
import { logGamma } from "../numerics/complex-log-gamma";

/** exp(-TAIL) is where a sum of terms of order 1 no longer changes. */
const TAIL = 40;
/** A normal variable beyond this many deviations has probability 1e-18. */
const WIDEST = 8.8;

/** Probability that the difference of two normal levels exceeds `x` of its deviations; 0 and 1 where the tail has no digits. */
export function differenceTail(x: number): number {
  return upperTail(Math.max(-40, Math.min(40, x)));
}

/**
 * Probability that the mean of `count` independent lognormals exceeds e^margin times another one, all of median 1:
 * P(ln(S/count) - ln W > margin), ln of each with the same deviation in nepers.
 *
 * By the Mellin transform along Re z = a: the transform of S follows from the Laplace transform of a single lognormal,
 * whose count-th power is that of the sum (W. Feller, "An Introduction to Probability Theory", volume 2, chapter XIII):
 * E[S^z] = z/Gamma(1-z) times the integral of u^(-z-1) (1 - phi(u)^count) over u from 0, for 0 < Re z < 1.
 * E[W^-z] = exp(s^2 z^2/2) makes the inverse transform converge within some fifty points whatever the deviation and the
 * count. u runs along a ray in the complex plane, turned towards the imaginary axis for small deviations, where the integral
 * on the real axis would cancel. All sums are trapezoidal rules on analytic functions, so the error falls
 * exponentially with the number of points (L. N. Trefethen, J. A. C. Weideman, SIAM Review 56 (2014)).
 *
 * @param margin in nepers
 * @param deviation s, above 0
 * @param count of lognormals in the sum, at least 2
 * @returns probability, absolute error below 1e-12 (2e-13 from 1 dB upwards, 1e-11 below 0.1 dB); 0 below 1e-12
 */
export function exceedance(margin: number, deviation: number, count: number): number {
  if (deviation < SMALLEST_DEVIATION) return exceedanceNearNormal(margin, deviation, count);
  // Both logarithms have at most the deviation s, that of the mean lies between 0 and s^2/2.
  const most = Math.SQRT2 * deviation;
  if (margin > 0.5 * deviation * deviation + WIDEST * most) return 0;
  if (margin < -WIDEST * most) return 1;
  const value = inverseTransform(margin, deviation, count);
  return value < 1e-12 ? 0 : Math.min(1, value);
}

const SMALLEST_DEVIATION = 0.02;
const NODES = 7;

/**
 * For deviations below a tenth of a decibel, where rays and steps would become tiny: at a fixed number of deviations the
 * probability is smooth in the deviation and normal at 0, so a polynomial through 0 and six small deviations gives it.
 */
function exceedanceNearNormal(margin: number, deviation: number, count: number): number {
  const x = margin / deviation;
  let sum = 0;
  for (let i = 0; i < NODES; i++) {
    const node = i * SMALLEST_DEVIATION;
    let weight = 1;
    for (let k = 0; k < NODES; k++) {
      if (k !== i) weight *= (deviation / SMALLEST_DEVIATION - k) / (i - k);
    }
    sum += weight * (i === 0 ? differenceTail(x / Math.sqrt(1 + 1 / count)) : exceedance(x * node, node, count));
  }
  return Math.min(1, Math.max(0, sum));
}

const MOST_A = 0.75;
const CONTOURS = 12;

function inverseTransform(margin: number, deviation: number, count: number): number {
  const s2 = deviation * deviation;
  // Fenton's deviation of the sum places the contour near the saddle point; any a from 0 to 1 is exact. A few contours
  // serve all margins, so that a column of margins shares their transforms.
  const sumVariance = Math.log1p(Math.expm1(Math.min(s2, 50)) / count);
  const middle = Math.max(0, (s2 - sumVariance) / 2);
  const least = Math.min(MOST_A, 0.3 / (Math.SQRT2 * deviation));
  const near = Math.min(1, Math.max(0, ((margin - middle) / (s2 + sumVariance) - least) / (MOST_A - least)));
  const a = least + ((MOST_A - least) * Math.round(near * CONTOURS)) / CONTOURS;

  const { stepT, re, im } = remembered(deviation, count, a);
  let sum = 0.5 * re[0]!;
  for (let k = 1; k < re.length; k++) {
    const phase = margin * k * stepT;
    sum += re[k]! * Math.cos(phase) + im[k]! * Math.sin(phase);
  }
  // The rule counts the probability at margins one and more periods lower as well: there it is 1, with weights exp(-a period).
  return (Math.exp(-margin * a) * sum * stepT) / Math.PI - 1 / Math.expm1((a * 2 * Math.PI) / stepT);
}

/** The transform of the ratio over its factor z, along the contour. */
interface Spectrum {
  readonly stepT: number;
  readonly re: Float64Array;
  readonly im: Float64Array;
}

const spectra = new Map<string, Spectrum>();
const MOST_REMEMBERED = 4 * CONTOURS;

function remembered(deviation: number, count: number, a: number): Spectrum {
  const key = `${deviation} ${count} ${a}`;
  let known = spectra.get(key);
  if (!known) {
    known = spectrum(deviation, count, a);
    if (spectra.size >= MOST_REMEMBERED) spectra.clear();
    spectra.set(key, known);
  }
  return known;
}

function spectrum(deviation: number, count: number, a: number): Spectrum {
  const s2 = deviation * deviation;
  const lastT = WIDEST / deviation;
  // Wide enough for all margins that reach this point, and for the tails on either side.
  const stepT = (2 * Math.PI) / (34 * Math.SQRT2 * deviation + s2);
  const points = Math.ceil(lastT / stepT);
  const re = new Float64Array(points);
  const im = new Float64Array(points);
  const ray = transformOnRay(deviation, count, a, lastT);
  for (let k = 0; k < points; k++) {
    const t = k * stepT;
    const value = ray.at(t);
    const gamma = logGamma(1 - a, -t);
    const size = Math.exp(0.5 * s2 * (a * a - t * t) - gamma.re + ray.logScale(t));
    const phase = s2 * a * t - gamma.im;
    re[k] = size * (value.re * Math.cos(phase) - value.im * Math.sin(phase));
    im[k] = size * (value.re * Math.sin(phase) + value.im * Math.cos(phase));
  }
  return { stepT, re, im };
}

/** The integral of e^(-z (v + i angle)) (1 - phi(e^(v + i angle)/count)^count) over all v, for z = a + it. */
interface RayTransform {
  /** The integral without its factor e^(t angle). */
  at(t: number): { re: number; im: number };
  /** Logarithm of that factor. */
  logScale(t: number): number;
}

function transformOnRay(deviation: number, count: number, a: number, lastT: number): RayTransform {
  // Angle between the ray and the (negative) imaginary axis: the cancellation is exp(gap^2/(2 s^2)), at most e^4.5.
  const gap = Math.min(Math.PI / 2, 3 * deviation);
  const angle = gap - Math.PI / 2;
  const worstT = Math.min(lastT, Math.PI / (deviation * deviation));
  const growth = Math.PI * worstT - 0.5 * (deviation * worstT) ** 2;
  const step = Math.min(
    (2 * Math.PI * gap) / TAIL,
    (2 * Math.PI * (Math.PI - gap)) / (TAIL + Math.max(0, growth)),
    0.6 * deviation,
  );
  const logCount = Math.log(count);
  const spread = Math.ceil((WIDEST * deviation) / step);
  const first = -Math.ceil((TAIL + Math.min(0.5 * deviation ** 2, 2 * WIDEST * deviation)) / (1 - a) / step);
  const last = Math.ceil((Math.log(TAIL / Math.sin(gap)) + (WIDEST * deviation) / Math.sqrt(count) + logCount) / step);
  const size = last - first + 1;
  const weights = new Float64Array(2 * spread + 1);
  const lead = step / deviation / Math.sqrt(2 * Math.PI);
  for (let j = -spread; j <= spread; j++) weights[j + spread] = lead * Math.exp(-0.5 * ((j * step) / deviation) ** 2);

  // 1 - exp(-e^(w + i angle)) on the grid that all convolutions share.
  const span = size + 2 * spread;
  const kernelRe = new Float64Array(span);
  const kernelIm = new Float64Array(span);
  const cosine = Math.sin(gap);
  const sine = -Math.cos(gap);
  for (let i = 0; i < span; i++) {
    const u = Math.exp((first - spread + i) * step - logCount);
    // e^(x+iy) - 1 = expm1(x) cos y - 2 sin^2(y/2) + i e^x sin y, without cancellation
    const x = -u * cosine;
    const y = -u * sine;
    const half = Math.sin(0.5 * y);
    kernelRe[i] = -(Math.expm1(x) * Math.cos(y) - 2 * half * half);
    kernelIm[i] = -Math.exp(x) * Math.sin(y);
  }
  const re = new Float64Array(size);
  const im = new Float64Array(size);
  const damping = Math.exp(-a * step);
  for (let i = 0; i < size; i++) {
    let qr = 0;
    let qi = 0;
    for (let j = 0; j < weights.length; j++) {
      qr += weights[j]! * kernelRe[i + j]!;
      qi += weights[j]! * kernelIm[i + j]!;
    }
    const [pr, pi] = atLeastOne(qr, qi, count);
    const scale = step * Math.exp(-a * (first + i) * step);
    re[i] = scale * pr;
    im[i] = scale * pi;
  }
  // Beyond the last point the bracket is 1: a geometric series.
  const beyond = step * Math.exp(-a * last * step) * damping;

  const at = (t: number): { re: number; im: number } => {
    // Horner's rule in w = e^(-i t step), from the far end; the rest of the phase comes last.
    const wr = Math.cos(t * step);
    const wi = -Math.sin(t * step);
    const dr = 1 - damping * wr;
    const di = -damping * wi;
    const norm = beyond / (dr * dr + di * di);
    let sr = norm * dr;
    let si = -norm * di;
    for (let i = size - 1; i >= 0; i--) {
      const next = sr * wr - si * wi + re[i]!;
      si = sr * wi + si * wr + im[i]!;
      sr = next;
    }
    const phase = -t * first * step - a * angle;
    const c = Math.cos(phase);
    const d = Math.sin(phase);
    return { re: sr * c - si * d, im: sr * d + si * c };
  };
  return { at, logScale: (t) => t * angle };
}

/** 1 - (1 - q)^n for complex q, by repeated squaring of the complement, which keeps the digits of a small q. */
function atLeastOne(qr: number, qi: number, n: number): [number, number] {
  let pr = 0;
  let pi = 0;
  for (let left = n; left > 0; left = Math.floor(left / 2)) {
    if (left % 2 === 1) {
      const r = pr + qr - (pr * qr - pi * qi);
      pi = pi + qi - (pr * qi + pi * qr);
      pr = r;
    }
    const r = 2 * qr - (qr * qr - qi * qi);
    qi = 2 * qi - 2 * qr * qi;
    qr = r;
  }
  return [pr, pi];
}
