import { root } from "./root";

/**
 * Probability that a Student t variable lies within +-sqrt(freedom) tan(angle).
 *
 * Finite sums of positive terms for whole degrees of freedom: Abramowitz and Stegun 26.7.3 (odd) and 26.7.4 (even).
 */
function coverageOfAngle(angle: number, freedom: number): number {
  const sine = Math.sin(angle);
  const cosine = Math.cos(angle);
  const square = cosine * cosine;
  if (freedom % 2 === 0) {
    let term = 1;
    let sum = 1;
    for (let k = 2; k <= freedom - 2; k += 2) sum += term *= (square * (k - 1)) / k;
    return sine * sum;
  }
  if (freedom === 1) return (2 / Math.PI) * angle;
  let term = cosine;
  let sum = cosine;
  for (let k = 3; k <= freedom - 2; k += 2) sum += term *= (square * (k - 1)) / k;
  return (2 / Math.PI) * (angle + sine * sum);
}

/**
 * Half-width of the central interval of Student's t: the value that |t| stays below with the given probability.
 *
 * @param coverage probability, above 0 and up to 0.9999, to which the relative error stays below 1e-12
 * @param freedom degrees of freedom, whole, at least 1; the work grows with them
 */
export function centralQuantile(coverage: number, freedom: number): number {
  const angle = root((x) => coverageOfAngle(x, freedom) - coverage, 0, Math.PI / 2);
  return Math.sqrt(freedom) * Math.tan(angle);
}
