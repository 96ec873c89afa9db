import {
  cholesky,
  inverseFromCholesky,
  negativeTransposedProduct,
  solveLower,
  subtractSquares,
  transpose,
} from "../numerics/dense";

/** Windows of 2^60 symbols: what has not settled there never will. */
const MOST_DOUBLINGS = 60;

/** What an observer learns at each window: the block of the inverse that belongs to the symbol in the middle. */
export interface Window {
  /** The middle block of the inverse of (diagonal + matrix). */
  readonly inverse: Float64Array;
  /** The matrix that it is the inverse of, without the diagonal: what all other symbols leave of it. */
  readonly reduced: Float64Array;
}

/**
 * The middle block of the inverse of an endless symmetric block matrix with the same three blocks in every row: next^T, same plus
 * diagonal, next.
 *
 * Cyclic reduction (G. H. Golub, C. F. Van Loan, "Matrix Computations", section 4.5.4): striking out every second symbol leaves a
 * matrix of the same form, so the windows seen from the middle have 1, 3, 7, 15, ... symbols, each at the cost of a few
 * products of blocks, and what is left of `next` falls with the square of itself.
 *
 * @param size rows of a block
 * @param same block on the diagonal; not changed
 * @param next block after it; not changed
 * @param diagonal added to the diagonal of `same`, kept apart so that small entries of `same` keep their digits
 * @param look called after each doubling; true ends the search
 * @param pivotFloor pivots must lie above it
 * @returns "settled", "singular" where a pivot vanishes, or "endless" where `look` never agrees
 */
export function endlessInverse(
  size: number,
  same: Float64Array,
  next: Float64Array,
  diagonal: number,
  look: (window: Window) => boolean,
  pivotFloor = 0,
): "settled" | "singular" | "endless" {
  const reduced = Float64Array.from(same);
  let ahead: Float64Array = Float64Array.from(next);
  for (let doubling = 0; doubling <= MOST_DOUBLINGS; doubling++) {
    const lower = Float64Array.from(reduced);
    for (let i = 0; i < size; i++) lower[i * size + i]! += diagonal;
    if (!cholesky(lower, size, pivotFloor)) return "singular";
    const done = look({ inverse: inverseFromCholesky(lower, size), reduced });
    if (done || ahead.every((value) => value === 0)) return "settled";
    const back = transpose(ahead, size);
    solveLower(lower, ahead, size);
    solveLower(lower, back, size);
    subtractSquares(reduced, ahead, back, size);
    ahead = negativeTransposedProduct(back, ahead, size);
  }
  return "endless";
}
