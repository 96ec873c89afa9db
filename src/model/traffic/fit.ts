import { domain, requireIn, requireOneOf } from "../domain";
import { DomainError, NoAnswerError } from "../errors";
import { centralQuantile } from "../numerics/student-t";
import { horizon, level, time } from "./forecast";
import { fitGrowth } from "./fit-growth";
import { fitLine, type FittedCurve } from "./fit-line";
import { GROWTH_CURVES } from "./growth-curves";

/** Curves that a series can be fitted with. */
export const FIT_MODELS = ["linear", "compound", "logistic", "gompertz", "bass"] as const;
export type FitModel = (typeof FIT_MODELS)[number];

export const confidenceRange = domain(0, 0.9999, "a probability above 0, up to 0.9999", { openLow: true });

/** The search for starting values grows with the observations. */
const MOST_OBSERVATIONS = 1000;

/**
 * Forecast of a series by a curve with a prediction band.
 *
 * Least squares: of the levels for "linear", "logistic", "gompertz" and "bass", of their logarithms for "compound". The band holds a
 * single future observation with the given probability: level -+ t s sqrt(1 + h), t Student's with n - p degrees of freedom, s^2 the
 * residual variance, h = g^T (J^T J)^-1 g (exact for the straight line, the delta method for curves; in logarithms for "compound"). A
 * demand is not negative, so nothing below 0 is forecast.
 *
 * @param times times of the observations; years since launch for "bass"
 * @param observed observed levels
 * @param model "linear", "compound", "logistic", "gompertz" or "bass"
 * @param targetTime time of the forecast
 * @param confidence probability of the band
 * @returns level, low and high
 * @throws NoAnswerError where the observations do not determine the curve
 */
export function fit(
  times: readonly number[],
  observed: readonly number[],
  model: FitModel,
  targetTime: number,
  confidence = 0.8,
): [level: number, low: number, high: number] {
  requireOneOf(FIT_MODELS, "model", model);
  requireIn(model === "bass" ? horizon : time, "targetTimes", targetTime);
  requireIn(confidenceRange, "confidence", confidence);
  const { curve, freedom } = fitted(times, observed, model);
  const { at, error, logarithmic } = curve.predict(targetTime);
  const halfWidth = error === 0 ? 0 : centralQuantile(confidence, freedom) * error;
  const [middle, low, high] = [at, at - halfWidth, at + halfWidth].map((value) =>
    logarithmic ? Math.exp(value) : Math.max(0, value),
  ) as [number, number, number];
  if (!Number.isFinite(high)) throw new NoAnswerError("The forecast lies beyond the numbers that a cell can hold.");
  return [middle, low, high];
}

/** A fitted curve with the degrees of freedom that its residuals leave. */
export interface Fitted {
  readonly curve: FittedCurve;
  readonly freedom: number;
}

let last: { times: readonly number[]; observed: readonly number[]; model: FitModel; result: Fitted } | undefined;

const same = (a: readonly number[], b: readonly number[]): boolean =>
  a === b || (a.length === b.length && a.every((value, i) => value === b[i]));

/**
 * The curve alone, with its parameters as the single forecast functions take them (the displacement of a Gompertz curve is beyond
 * all numbers where times are calendar years). Many targets of one series share one search.
 *
 * @param times times of the observations
 * @param observed observed levels
 * @param model the curve
 */
export function fitted(times: readonly number[], observed: readonly number[], model: FitModel): Fitted {
  if (last && last.model === model && same(last.times, times) && same(last.observed, observed)) return last.result;
  check(times, observed, model);
  const growth = model !== "linear" && model !== "compound";
  const parameters = growth ? 3 : 2;
  if (times.length <= parameters) {
    throw new NoAnswerError(
      `${times.length} observations cannot support the ${parameters} parameters of "${model}" and a band: at least ${parameters + 1} are needed.`,
    );
  }
  const distinct = new Set(times).size;
  if (distinct < parameters) {
    throw new NoAnswerError(`The observations lie at ${distinct} different times; "${model}" needs ${parameters}.`);
  }
  const curve = growth
    ? fitGrowth(times, observed, model, GROWTH_CURVES[model])
    : fitLine(times, observed, model === "compound");
  const result = { curve, freedom: times.length - parameters };
  last = { times: [...times], observed: [...observed], model, result };
  return result;
}

function check(times: readonly number[], observed: readonly number[], model: FitModel): void {
  if (times.length !== observed.length) {
    throw new DomainError("observed", observed.length, `as many values as times, which are ${times.length}`);
  }
  if (times.length > MOST_OBSERVATIONS) {
    throw new DomainError("times", times.length, `at most ${MOST_OBSERVATIONS} observations`);
  }
  for (const value of times) requireIn(model === "bass" ? horizon : time, "times", value);
  for (const value of observed) {
    requireIn(level, "observed", value);
    if (model === "compound" && value === 0) {
      throw new DomainError("observed", value, 'levels above 0 for "compound", whose logarithms are fitted');
    }
  }
}
