/**
 * The saturating curves of a forecast as saturation times a shape, for fitting.
 *
 * Shapes run from 0 to 1 over a time that is scaled to the observations; their two parameters are of order 1.
 */

/** Shape and its slopes by both parameters at one time. */
export type ShapeAt = (first: number, second: number, time: number, out: Float64Array) => void;

/** A curve that can be fitted. */
export interface GrowthCurve {
  readonly shape: ShapeAt;
  /** Starting values that cover what data can show, for times scaled to a span of 1. */
  readonly firstValues: readonly number[];
  readonly secondValues: readonly number[];
  /** Gradient of the logarithm of the rate of growth by both parameters. */
  rateGradient(first: number, second: number): readonly [number, number];
}

/** Values in even steps. */
function steps(from: number, to: number, count: number): number[] {
  return Array.from({ length: count }, (_, i) => from + ((to - from) * i) / (count - 1));
}

/** Parameters: time of the inflexion, logarithm of the rate. */
const logistic: ShapeAt = (midpoint, logRate, time, out) => {
  const rate = Math.exp(logRate);
  const x = rate * (time - midpoint);
  const small = Math.exp(-Math.abs(x));
  const bell = small / (1 + small) ** 2;
  out[0] = x >= 0 ? 1 / (1 + small) : small / (1 + small);
  out[1] = -rate * bell;
  out[2] = x * bell;
};

/** Parameters: time of the inflexion, logarithm of the rate: displacement = exp(rate inflexion). */
const gompertz: ShapeAt = (inflexion, logRate, time, out) => {
  const rate = Math.exp(logRate);
  const x = rate * (time - inflexion);
  const power = Math.exp(-x);
  const value = Math.exp(-power);
  const bell = power < 700 ? power * value : 0;
  out[0] = value;
  out[1] = -rate * bell;
  out[2] = x * bell;
};

/** Parameters: logarithms of innovation and imitation. */
const bass: ShapeAt = (logInnovation, logImitation, time, out) => {
  const p = Math.exp(logInnovation);
  const q = Math.exp(logImitation);
  const exponent = -(p + q) * time;
  const decay = Math.exp(exponent);
  const adopted = -Math.expm1(exponent);
  // Both divided by 1 + (q/p) decay, written so that a tiny p does no harm.
  const denominator = p + q * decay;
  out[0] = (p * adopted) / denominator;
  const bySum = (time * decay * p * (p + q)) / (denominator * denominator);
  const byRatio = (-adopted * decay * p * p) / (denominator * denominator);
  out[1] = p * bySum - (q / p) * byRatio;
  out[2] = q * bySum + (q / p) * byRatio;
};

const byRate = (): readonly [number, number] => [0, 1];

export const GROWTH_CURVES = {
  logistic: {
    shape: logistic,
    firstValues: steps(-1, 4, 26),
    secondValues: steps(Math.log(0.5), Math.log(100), 20),
    rateGradient: byRate,
  },
  gompertz: {
    shape: gompertz,
    firstValues: steps(-1, 4, 26),
    secondValues: steps(Math.log(0.3), Math.log(60), 20),
    rateGradient: byRate,
  },
  bass: {
    shape: bass,
    firstValues: steps(Math.log(1e-5), Math.log(10), 26),
    secondValues: steps(Math.log(0.05), Math.log(100), 20),
    rateGradient: (first, second) => {
      const share = 1 / (1 + Math.exp(second - first));
      return [share, 1 - share];
    },
  },
} satisfies Record<string, GrowthCurve>;
export type GrowthModel = keyof typeof GROWTH_CURVES;
