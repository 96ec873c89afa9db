import { NoAnswerError } from "../errors";
import { leastSquares, leverage, type Evaluate, type LeastSquares } from "../numerics/least-squares";
import { lineThrough, type FittedCurve } from "./fit-line";
import type { GrowthCurve, GrowthModel } from "./growth-curves";

/** Starting points that are followed to their minimum. */
const MOST_STARTS = 4;
/** A saturation this far above every observation is one that the observations say nothing about. */
const FARTHEST_SATURATION = 1000;
/** Residuals of this size, of levels up to 1, are rounding: a line that fits as well leaves no bend. */
const ROUNDING = 1e-11;
/** Relative standard error from which an estimate plus or minus twice its error reaches 0. */
const LARGEST_ERROR = 0.5;

/** The series scaled to levels up to 1 and a time span of 1. */
interface Series {
  readonly times: Float64Array;
  readonly levels: Float64Array;
  readonly origin: number;
  readonly span: number;
  readonly top: number;
}

/**
 * A saturating curve through a series: saturation times a shape with two parameters.
 *
 * The saturation follows from a shape by linear least squares (G. H. Golub, V. Pereyra 1973), so a plane of starting values can be
 * scanned; the best few are followed to the minimum in all three parameters.
 *
 * @param times times of at least four observations
 * @param observed levels
 * @param model name of the curve
 * @param curve the shape
 * @throws NoAnswerError where growth or saturation are not in the observations
 */
export function fitGrowth(
  times: readonly number[],
  observed: readonly number[],
  model: GrowthModel,
  curve: GrowthCurve,
): FittedCurve {
  const top = Math.max(...observed);
  if (top === 0) throw new NoAnswerError("All observations are 0: there is no growth to fit.");
  const first = Math.min(...times);
  // The Bass curve starts at time 0; the others have no origin of their own.
  const origin = model === "bass" ? 0 : first;
  const span = Math.max(...times) - origin;
  const series: Series = {
    times: Float64Array.from(times, (at) => (at - origin) / span),
    levels: Float64Array.from(observed, (value) => value / top),
    origin,
    span,
    top,
  };
  const evaluate = evaluation(series, curve);
  let best: LeastSquares | undefined;
  for (const start of startingPoints(series, curve)) {
    const found = leastSquares(evaluate, start, times.length);
    if (!best || better(found, best)) best = found;
  }
  if (!best) throw noBend(model);
  const { parameters, sumOfSquares, triangle } = best;
  const deviation = Math.sqrt(sumOfSquares / (times.length - 3));
  refuseUndetermined(best, deviation, series, model, curve);
  const [logSaturation, a, b] = parameters as [number, number, number];
  const saturation = Math.exp(logSaturation) * top;
  const out = new Float64Array(3);
  return {
    parameters: named(model, saturation, a, b, series),
    predict: (targetTime) => {
      curve.shape(a, b, (targetTime - origin) / span, out);
      const gradient = [saturation * out[0]!, saturation * out[1]!, saturation * out[2]!];
      const variance = deviation * deviation * (top * top + leverage(triangle, gradient));
      return { at: gradient[0]!, error: Math.sqrt(variance), logarithmic: false };
    },
  };
}

/** Residuals and slopes by the logarithm of the saturation and the two parameters of the shape. */
function evaluation({ times, levels }: Series, curve: GrowthCurve): Evaluate {
  const out = new Float64Array(3);
  return ([logSaturation, a, b], residuals, [bySaturation, byFirst, bySecond]) => {
    const saturation = Math.exp(logSaturation!);
    for (let i = 0; i < times.length; i++) {
      curve.shape(a!, b!, times[i]!, out);
      residuals[i] = levels[i]! - saturation * out[0]!;
      bySaturation![i] = saturation * out[0]!;
      byFirst![i] = saturation * out[1]!;
      bySecond![i] = saturation * out[2]!;
    }
  };
}

function better(a: LeastSquares, b: LeastSquares): boolean {
  return Number.isFinite(a.sumOfSquares) && !(a.sumOfSquares >= b.sumOfSquares);
}

/** The lowest places of the plane of starting values that are not neighbours of a lower one. */
function startingPoints({ times, levels }: Series, curve: GrowthCurve): number[][] {
  const out = new Float64Array(3);
  const places: { row: number; column: number; gain: number; start: number[] }[] = [];
  curve.firstValues.forEach((a, row) => {
    curve.secondValues.forEach((b, column) => {
      let products = 0;
      let squares = 0;
      for (let i = 0; i < times.length; i++) {
        curve.shape(a, b, times[i]!, out);
        products += levels[i]! * out[0]!;
        squares += out[0]! * out[0]!;
      }
      // What the curve explains of the sum of squares.
      const gain = (products * products) / squares;
      // Far above the observations a curve is an exponential one: a search that starts there finds no way back.
      if (gain > 0 && products <= FARTHEST_SATURATION * squares)
        places.push({ row, column, gain, start: [Math.log(products / squares), a, b] });
    });
  });
  places.sort((x, y) => y.gain - x.gain);
  const chosen: typeof places = [];
  for (const place of places) {
    if (chosen.length === MOST_STARTS) break;
    const isNear = chosen.some((c) => Math.abs(c.row - place.row) <= 2 && Math.abs(c.column - place.column) <= 2);
    if (!isNear) chosen.push(place);
  }
  return chosen.map(({ start }) => start);
}

function refuseUndetermined(
  { parameters, sumOfSquares, triangle, determined }: LeastSquares,
  deviation: number,
  { times, levels, top }: Series,
  model: GrowthModel,
  curve: GrowthCurve,
): void {
  const [logSaturation, a, b] = parameters as [number, number, number];
  const ratio = Math.exp(logSaturation);
  const straight = lineThrough(times, levels).residual;
  if (!determined || !(ratio <= FARTHEST_SATURATION) || straight <= sumOfSquares + times.length * ROUNDING ** 2) {
    throw noBend(model);
  }
  const saturationError = deviation * Math.sqrt(leverage(triangle, [1, 0, 0]));
  if (saturationError > LARGEST_ERROR) {
    throw new NoAnswerError(
      `The observations show no saturation: "${model}" puts it at ${short(ratio * top)} with a standard error of ${short(saturationError * ratio * top)}.`,
    );
  }
  const [byFirst, bySecond] = curve.rateGradient(a, b);
  const rateError = deviation * Math.sqrt(leverage(triangle, [0, byFirst, bySecond]));
  if (rateError > LARGEST_ERROR) {
    throw new NoAnswerError(
      `The observations show no growth that stands out from their scatter: the rate of "${model}" has a standard error of ${short(100 * rateError)} %.`,
    );
  }
}

function noBend(model: GrowthModel): NoAnswerError {
  return new NoAnswerError(
    `The observations do not bend as "${model}" does: neither growth nor saturation follows from them. A "linear" or "compound" fit needs less.`,
  );
}

function short(value: number): string {
  return String(Number(value.toPrecision(3)));
}

function named(
  model: GrowthModel,
  saturation: number,
  a: number,
  b: number,
  { origin, span }: Series,
): Record<string, number> {
  if (model === "bass") return { market: saturation, innovation: Math.exp(a) / span, imitation: Math.exp(b) / span };
  const rate = Math.exp(b) / span;
  const inflexion = origin + a * span;
  if (model === "logistic") return { saturation, midpoint: inflexion, steepness: rate };
  return { saturation, displacement: Math.exp(rate * inflexion), rate };
}
