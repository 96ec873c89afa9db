import { erf, gaussian, scaledErfc } from "./erfc";

const INVERSE_ROOT_TWO_PI = 1 / Math.sqrt(2 * Math.PI);
const ROOT_TWO_PI = Math.sqrt(2 * Math.PI);
const ROOT_HALF_PI = Math.sqrt(Math.PI / 2);

/** Density of the standard normal distribution. */
export function density(z: number): number {
  return INVERSE_ROOT_TWO_PI * gaussian(z, 0.5);
}

/** Probability that a standard normal variable lies above z. Relative error about 5e-16 in either tail. */
export function upperTail(z: number): number {
  if (z < 0) return 1 - upperTail(-z);
  return 0.5 * gaussian(z, 0.5) * scaledErfc(z * Math.SQRT1_2);
}

/** Probability that a standard normal variable lies at or below z. Relative error about 5e-16 in either tail. */
export function cdf(z: number): number {
  return upperTail(-z);
}

/**
 * Value that a standard normal variable stays below with the given probability.
 *
 * @param probability above 0 and below 1; -Infinity and Infinity answer 0 and 1
 */
export function quantile(probability: number): number {
  if (probability > 0.25 && probability < 0.75) return centralQuantile(probability - 0.5);
  return probability < 0.5 ? -upperQuantile(probability) : upperQuantile(1 - probability);
}

/**
 * Value that a standard normal variable exceeds with the given probability: no loss where that probability is tiny.
 *
 * @param probability above 0 and below 1; Infinity and -Infinity answer 0 and 1
 */
export function upperQuantile(probability: number): number {
  if (probability <= 0) return Infinity;
  if (probability > 0.25) return -quantile(probability);
  // Start: Abramowitz and Stegun 26.2.23 (error below 4.5e-4).
  const t = Math.sqrt(-2 * Math.log(probability));
  let z = t - (2.515517 + t * (0.802853 + t * 0.010328)) / (1 + t * (1.432788 + t * (0.189269 + t * 0.001308)));
  // Newton steps on the logarithm of the tail, which is nearly a parabola: two would do, the third is for the last bit.
  const target = Math.log(2 * probability);
  for (let step = 0; step < 3; step++) {
    const scaled = scaledErfc(z * Math.SQRT1_2);
    z += (Math.log(scaled) - target - 0.5 * z * z) * scaled * ROOT_HALF_PI;
  }
  return z;
}

/** Quantile near the median from its distance to one half, which keeps relative accuracy as that goes to 0. */
function centralQuantile(aboveHalf: number): number {
  let z = aboveHalf * ROOT_TWO_PI;
  // Newton from the tangent at the median, improved by Halley's term (density' = -z density).
  for (let step = 0; step < 4; step++) {
    const error = (0.5 * erf(z * Math.SQRT1_2) - aboveHalf) * ROOT_TWO_PI * Math.exp(0.5 * z * z);
    z -= error / (1 + 0.5 * z * error);
  }
  return z;
}
