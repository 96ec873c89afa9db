/** A function value of 0 or a bracket of this relative width ends a search. */
const RELATIVE_WIDTH = 2 ** -52;
const MOST_STEPS = 400;

/** Ends of an interval at which a function has opposite signs. */
export interface Bracket {
  readonly low: number;
  readonly high: number;
  readonly atLow: number;
  readonly atHigh: number;
}

/**
 * Root of a continuous function inside a bracket, to the last bits of a double.
 *
 * R. P. Brent, "Algorithms for Minimization without Derivatives" (1973), chapter 4: inverse quadratic and secant steps, held by bisection.
 *
 * @param f continuous on [low, high]
 * @param low end with a value of one sign (or 0)
 * @param high end with a value of the opposite sign (or 0)
 * @throws RangeError where the signs agree: callers bracket first
 */
export function root(f: (x: number) => number, low: number, high: number): number {
  return rootIn(f, { low, high, atLow: f(low), atHigh: f(high) });
}

/** As `root`, where the values at the ends are known already. */
export function rootIn(f: (x: number) => number, bracket: Bracket): number {
  let { low: a, high: b, atLow: fa, atHigh: fb } = bracket;
  if (fa === 0) return a;
  if (fb === 0) return b;
  if (!(fa > 0 !== fb > 0)) throw new RangeError(`no change of sign between ${a} and ${b}`);
  let c = a;
  let fc = fa;
  let step = b - a;
  let stepBefore = step;
  for (let count = 0; count < MOST_STEPS; count++) {
    if (fb > 0 === fc > 0) {
      c = a;
      fc = fa;
      step = stepBefore = b - a;
    }
    if (Math.abs(fc) < Math.abs(fb)) {
      a = b;
      b = c;
      c = a;
      fa = fb;
      fb = fc;
      fc = fa;
    }
    const tolerance = 0.5 * RELATIVE_WIDTH * Math.abs(b) + Number.MIN_VALUE;
    const half = 0.5 * (c - b);
    if (Math.abs(half) <= tolerance || fb === 0) return b;
    if (Math.abs(stepBefore) >= tolerance && Math.abs(fa) > Math.abs(fb)) {
      const s = fb / fa;
      let p: number;
      let q: number;
      if (a === c) {
        p = 2 * half * s;
        q = 1 - s;
      } else {
        const t = fa / fc;
        const r = fb / fc;
        p = s * (2 * half * t * (t - r) - (b - a) * (r - 1));
        q = (t - 1) * (r - 1) * (s - 1);
      }
      if (p > 0) q = -q;
      else p = -p;
      if (2 * p < Math.min(3 * half * q - Math.abs(tolerance * q), Math.abs(stepBefore * q))) {
        stepBefore = step;
        step = p / q;
      } else {
        step = stepBefore = half;
      }
    } else {
      step = stepBefore = half;
    }
    a = b;
    fa = fb;
    b += Math.abs(step) > tolerance ? step : Math.sign(half) * tolerance;
    fb = f(b);
  }
  return b;
}

/**
 * Widens an interval geometrically until the function changes sign, starting from a guess above 0.
 *
 * @param f continuous for x above 0
 * @param guess where to start, above 0
 * @param lowest lower end of the domain: the search stays within it
 * @param highest upper end of the domain
 * @returns the bracket, or undefined where the domain holds no change of sign between its ends
 */
export function bracketAround(
  f: (x: number) => number,
  guess: number,
  lowest: number,
  highest: number,
): Bracket | undefined {
  let low = Math.min(Math.max(guess, lowest), highest);
  let high = low;
  let atLow = f(low);
  let atHigh = atLow;
  for (let factor = 1.125; atLow > 0 === atHigh > 0 && atLow !== 0 && atHigh !== 0; factor *= factor) {
    if (low === lowest && high === highest) return undefined;
    if (low > lowest) {
      low = Math.max(low / factor, lowest);
      atLow = f(low);
    }
    if (high < highest && atLow > 0 === atHigh > 0) {
      high = Math.min(high * factor, highest);
      atHigh = f(high);
    }
  }
  return { low, high, atLow, atHigh };
}

/**
 * Smallest whole number for which a condition holds that stays true once it is true.
 *
 * Gallops from the guess, then halves: about 2 log2 of the guess's error, whatever the size of the answer.
 *
 * @param holds false below some whole number, true from there on
 * @param lowest first number that counts
 * @param highest last number that counts
 * @param guess where to start looking
 * @returns the number, or undefined where the condition fails at `highest`
 */
export function smallestWhole(
  holds: (whole: number) => boolean,
  lowest: number,
  highest: number,
  guess: number = lowest,
): number | undefined {
  const start = Math.min(Math.max(Math.round(guess), lowest), highest);
  let low: number;
  let high: number;
  if (holds(start)) {
    high = start;
    low = start;
    for (let step = 1; high > lowest; step *= 2) {
      low = Math.max(high - step, lowest);
      if (!holds(low)) break;
      high = low;
    }
    if (high === lowest) return lowest;
  } else {
    low = start;
    high = start;
    for (let step = 1; low < highest; step *= 2) {
      high = Math.min(low + step, highest);
      if (holds(high)) break;
      low = high;
    }
    if (low === highest) return undefined;
  }
  while (high - low > 1) {
    const middle = low + Math.floor((high - low) / 2);
    if (holds(middle)) high = middle;
    else low = middle;
  }
  return high;
}
