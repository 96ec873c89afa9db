/**
 * Nonlinear least squares for a handful of parameters.
 *
 * Levenberg and Marquardt's method (J. J. Moré, "The Levenberg-Marquardt algorithm: implementation and theory", 1978) on the
 * triangle of an orthogonal factorisation, since normal equations would lose half of the digits of the standard errors.
 */

/** Fills the residuals (observed minus model) and, one array a parameter, the slopes of the model. */
export type Evaluate = (
  parameters: readonly number[],
  residuals: Float64Array,
  slopes: readonly Float64Array[],
) => void;

/** Parameters at the least sum of squares. */
export interface LeastSquares {
  readonly parameters: readonly number[];
  readonly sumOfSquares: number;
  /** Upper triangle R of the slopes, row by row: the inverse of R^T R is the covariance in units of the residual variance. */
  readonly triangle: readonly Float64Array[];
  /** False where slopes depend on each other or no minimum was reached. */
  readonly determined: boolean;
}

const MOST_STEPS = 300;
const RANK_TOLERANCE = 1e-11;
const LARGEST_DAMPING = 1e12;
/** Share of the sum of squares that the next step may still take away at a minimum. */
const STATIONARY = 1e-10;
/** Residuals of this size are rounding of observations of order 1. */
const ROUNDING = 1e-11;

/** Upper triangle of columns by the modified Gram-Schmidt process; the right-hand side turns into Q^T b. Columns are lost. */
function triangleOf(
  columns: readonly Float64Array[],
  rightHandSide: Float64Array,
): { triangle: Float64Array[]; projected: Float64Array } {
  const size = columns.length;
  const triangle = columns.map(() => new Float64Array(size));
  const projected = new Float64Array(size);
  for (let i = 0; i < size; i++) {
    const column = columns[i]!;
    const length = norm(column);
    triangle[i]![i] = length;
    if (length > 0) for (let r = 0; r < column.length; r++) column[r]! /= length;
    for (let j = i + 1; j <= size; j++) {
      const other = j < size ? columns[j]! : rightHandSide;
      let dot = 0;
      for (let r = 0; r < column.length; r++) dot += column[r]! * other[r]!;
      for (let r = 0; r < column.length; r++) other[r]! -= dot * column[r]!;
      if (j < size) triangle[i]![j] = dot;
      else projected[i] = dot;
    }
  }
  return { triangle, projected };
}

function norm(values: Float64Array): number {
  let sum = 0;
  for (const value of values) sum += value * value;
  return Math.sqrt(sum);
}

function backSubstitute(triangle: readonly Float64Array[], right: Float64Array): number[] {
  const size = right.length;
  const solution = new Array<number>(size).fill(0);
  for (let i = size - 1; i >= 0; i--) {
    let sum = right[i]!;
    for (let j = i + 1; j < size; j++) sum -= triangle[i]![j]! * solution[j]!;
    solution[i] = sum / triangle[i]![i]!;
  }
  return solution;
}

/** Minimum of |R step - projected|^2 + damping |D step|^2, D the lengths of the columns. */
function dampedStep(
  triangle: readonly Float64Array[],
  projected: Float64Array,
  scale: readonly number[],
  damping: number,
): number[] {
  if (damping === 0) return backSubstitute(triangle, projected);
  const size = projected.length;
  const columns = scale.map((length, j) => {
    const column = new Float64Array(2 * size);
    for (let i = 0; i <= j; i++) column[i] = triangle[i]![j]!;
    column[size + j] = Math.sqrt(damping) * length;
    return column;
  });
  const right = new Float64Array(2 * size);
  right.set(projected);
  const damped = triangleOf(columns, right);
  return backSubstitute(damped.triangle, damped.projected);
}

function lengthsOfColumns(triangle: readonly Float64Array[]): number[] {
  return triangle.map((_, j) => Math.hypot(...triangle.map((row) => row[j]!)));
}

/**
 * Least squares from a starting point, to the last digits that the residuals hold.
 *
 * @param evaluate the model; observations and parameters should be of order 1 (take logarithms of scales)
 * @param start where to begin
 * @param observations number of residuals
 */
export function leastSquares(evaluate: Evaluate, start: readonly number[], observations: number): LeastSquares {
  const residuals = new Float64Array(observations);
  const slopes = start.map(() => new Float64Array(observations));
  const at = (parameters: readonly number[]): number => {
    evaluate(parameters, residuals, slopes);
    const sum = norm(residuals) ** 2;
    return Number.isFinite(sum) ? sum : Infinity;
  };
  let parameters = [...start];
  let sumOfSquares = at(parameters);
  let factors = triangleOf(slopes, residuals);
  let damping = 1e-3;
  let settled = false;
  for (let count = 0; count < MOST_STEPS && damping < LARGEST_DAMPING; count++) {
    const scale = lengthsOfColumns(factors.triangle).map((length) => length || Number.MIN_VALUE);
    const step = dampedStep(factors.triangle, factors.projected, scale, damping);
    const size = Math.max(...step.map(Math.abs));
    if (!Number.isFinite(size)) {
      damping = Math.max(10 * damping, 1e-12);
      continue;
    }
    const next = parameters.map((value, i) => value + step[i]!);
    const sum = at(next);
    // Below the last digits the sum of squares is noise: there a step counts as taken.
    if (sum <= sumOfSquares || size < 1e-9) {
      parameters = next;
      sumOfSquares = Math.min(sum, sumOfSquares);
      factors = triangleOf(slopes, residuals);
      damping = damping < 1e-10 ? 0 : damping / 10;
      if (size < 1e-15 || (settled && size < 1e-9)) break;
      settled = size < 1e-9 && damping === 0;
    } else {
      damping = Math.max(4 * damping, 1e-12);
    }
  }
  sumOfSquares = at(parameters);
  const { triangle, projected } = triangleOf(slopes, residuals);
  const lengths = lengthsOfColumns(triangle);
  const reducible = norm(projected) ** 2;
  const determined =
    triangle.every((row, i) => row[i]! > RANK_TOLERANCE * lengths[i]!) &&
    (reducible <= STATIONARY * sumOfSquares || reducible <= observations * ROUNDING ** 2);
  return { parameters, sumOfSquares, triangle, determined };
}

/** Squared length of R^-T g: the variance of g^T parameters in units of the residual variance. */
export function leverage(triangle: readonly Float64Array[], gradient: readonly number[]): number {
  const size = gradient.length;
  const solution = new Float64Array(size);
  let sum = 0;
  for (let i = 0; i < size; i++) {
    let value = gradient[i]!;
    for (let j = 0; j < i; j++) value -= triangle[j]![i]! * solution[j]!;
    solution[i] = value / triangle[i]![i]!;
    sum += solution[i]! ** 2;
  }
  return sum;
}
