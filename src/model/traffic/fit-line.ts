/** A forecast by a fitted curve at one time, and its standard error as a single observation. */
export interface Prediction {
  readonly at: number;
  readonly error: number;
  /** True where both are of the logarithm of the level. */
  readonly logarithmic: boolean;
}

/** A curve through a series. */
export interface FittedCurve {
  /** Parameters by the names that the single forecast functions use. */
  readonly parameters: Readonly<Record<string, number>>;
  predict(targetTime: number): Prediction;
}

/** A straight line through points, by its centre so that calendar years keep their digits. */
export interface Line {
  readonly centre: number;
  readonly middle: number;
  readonly slope: number;
  /** Sums of squared distances: of the times from their centre, of the values from the line. */
  readonly squares: number;
  readonly residual: number;
}

/**
 * Straight line by least squares.
 *
 * @param times at least two different times
 * @param values a value for each
 */
export function lineThrough(times: ArrayLike<number>, values: ArrayLike<number>): Line {
  const count = times.length;
  let centre = 0;
  let middle = 0;
  for (let i = 0; i < count; i++) {
    centre += times[i]! / count;
    middle += values[i]! / count;
  }
  let squares = 0;
  let products = 0;
  for (let i = 0; i < count; i++) {
    squares += (times[i]! - centre) ** 2;
    products += (times[i]! - centre) * (values[i]! - middle);
  }
  const slope = products / squares;
  let residual = 0;
  for (let i = 0; i < count; i++) residual += (values[i]! - middle - slope * (times[i]! - centre)) ** 2;
  return { centre, middle, slope, squares, residual };
}

/**
 * Straight line through the levels or their logarithms (constant growth) as a forecast.
 *
 * @param times at least three times, two of them different
 * @param observed levels, above 0 where logarithms are taken
 * @param logarithmic whether to fit logarithms
 */
export function fitLine(times: readonly number[], observed: readonly number[], logarithmic: boolean): FittedCurve {
  const { centre, middle, slope, squares, residual } = lineThrough(
    times,
    logarithmic ? observed.map(Math.log) : observed,
  );
  const count = times.length;
  const deviation = Math.sqrt(residual / (count - 2));
  const atZero = middle - slope * centre;
  return {
    parameters: logarithmic ? { start: Math.exp(atZero), growthPerYear: Math.expm1(slope) } : { start: atZero, slope },
    predict: (targetTime) => {
      const distance = targetTime - centre;
      return {
        at: middle + slope * distance,
        error: deviation * Math.sqrt(1 + 1 / count + (distance * distance) / squares),
        logarithmic,
      };
    },
  };
}
