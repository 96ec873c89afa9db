import { domain, requireIn } from "../domain";
import { DomainError, NoAnswerError } from "../errors";
import { rootIn, smallestWhole } from "../numerics/root";

/** A function of one unknown. It throws where it has no answer. */
export type OfOneNumber = (x: number) => number;

/** Values that an unknown may take: their distance stays a number. */
export const searched = domain(-1e300, 1e300, "a number from -1E+300 to 1E+300");

/** A value off the target by more is a step of the function, not rounding. */
const STEP = 1e-6;
/** Share of the end values that is rounding where the target is 0. */
const ROUNDING = 1e-12;
/** Places between the ends at which fractions are tried: golden section, so that they are hardly ever whole. */
const TRIED = [0.38196601125010515, 0.6180339887498949];

/**
 * Value of the unknown at which a function reaches a target.
 *
 * Brent's root search on f - target: any continuous function, up or down. Where the function takes whole numbers alone, the answer is
 * the first one from `low` on that reaches or passes the target.
 *
 * @param f the function; errors that it throws are passed on
 * @param target value to reach
 * @param low end of the interval that is searched
 * @param high its other end, above low
 * @throws NoAnswerError with both end values where the target does not lie between them, or where f steps over it
 */
export function solve(f: OfOneNumber, target: number, low: number, high: number): number {
  requireIn(searched, "target", target);
  requireIn(searched, "low", low);
  requireIn(searched, "high", high);
  if (!(high > low)) throw new DomainError("high", high, `a number above low, which is ${low}`);
  if (takesWholeOnly(f, low, high)) return solveWhole(f, target, Math.ceil(low), Math.floor(high));
  const [atLow, atHigh] = ends(f, target, low, high);
  const x = rootIn((at) => f(at) - target, { low, high, atLow: atLow - target, atHigh: atHigh - target });
  const reached = f(x);
  const allowed = Math.max(
    STEP * Math.max(Math.abs(reached), Math.abs(target)),
    ROUNDING * Math.max(Math.abs(atLow), Math.abs(atHigh)),
  );
  if (Math.abs(reached - target) > allowed) {
    throw new NoAnswerError(`The function steps over ${target} at ${Number(x.toPrecision(12))}.`);
  }
  return x;
}

function ends(f: OfOneNumber, target: number, low: number, high: number): [number, number] {
  const atLow = f(low);
  const atHigh = f(high);
  if (target < Math.min(atLow, atHigh) || target > Math.max(atLow, atHigh)) {
    throw new NoAnswerError(
      `The target ${target} does not lie between the function's ${atLow} at low = ${low} and ${atHigh} at high = ${high}.`,
    );
  }
  return [atLow, atHigh];
}

function answers(f: OfOneNumber, x: number): boolean {
  try {
    return Number.isFinite(f(x));
  } catch {
    return false;
  }
}

function takesWholeOnly(f: OfOneNumber, low: number, high: number): boolean {
  if (Math.floor(high) - Math.ceil(low) < 1) return false;
  return TRIED.every((part) => {
    const x = low + part * (high - low);
    return !answers(f, x) && answers(f, Math.min(Math.max(Math.round(x), Math.ceil(low)), Math.floor(high)));
  });
}

function solveWhole(f: OfOneNumber, target: number, low: number, high: number): number {
  const [atLow, atHigh] = ends(f, target, low, high);
  const isRising = atHigh >= atLow;
  return smallestWhole((x) => (isRising ? f(x) >= target : f(x) <= target), low, high)!;
}
