/** Independent sources of one kind; a source is busy with the given odds when nothing is blocked. */
export interface Sources {
  readonly count: number;
  readonly odds: number;
}

/** So close to a whole number the difference is rounding: 3 erlang at peakedness 0.9 are 30 sources. */
const ROUNDING = 1e-12;

/** Sources of a binomial stream: mean S p and variance S p (1 - p), so that S = mean/(1 - z). */
export function sourceNumber(meanE: number, peakedness: number): number {
  const count = meanE / (1 - peakedness);
  const whole = Math.round(count);
  return Math.abs(count - whole) <= ROUNDING * count ? whole : count;
}

/**
 * Whether no stream of whole calls has a peakedness so small: the number of calls cannot keep closer to a mean between whole
 * numbers than to lie right above and right below it.
 */
export function isTooSmooth(meanE: number, peakedness: number): boolean {
  return peakedness < smallestPeakedness(meanE) * (1 - ROUNDING);
}

/** See `isTooSmooth`. */
export function smallestPeakedness(meanE: number): number {
  const fraction = meanE - Math.floor(meanE);
  return (fraction * (1 - fraction)) / meanE;
}

/**
 * A smooth stream as sources.
 *
 * Where the group has no room for more calls than S, a fractional S does no harm: the free sources S - x are never below 0.
 * Where it has, the weights C(S, x) would turn negative beyond S. The stream is then made of floor(S) equal sources and one that
 * is less often busy, such that mean and peakedness are exactly those asked for.
 *
 * @param meanE mean, erlang
 * @param peakedness variance over mean, below 1
 * @param room calls of the stream that the group holds
 */
export function smoothSources(meanE: number, peakedness: number, room: number): Sources[] {
  const count = sourceNumber(meanE, peakedness);
  if (room <= count || Number.isInteger(count)) return [{ count, odds: (1 - peakedness) / peakedness }];
  const equal = Math.floor(count);
  // equal p + rest = mean, equal p^2 + rest^2 = mean (1 - z).
  const root = Math.sqrt(equal * meanE * Math.max(0, (equal + 1) * (1 - peakedness) - meanE));
  // At the smallest peakedness the equal sources are always busy; a hair less, so that their odds stay a number.
  const busy = Math.min((equal * meanE + root) / (equal * (equal + 1)), 1 - ROUNDING);
  const rest = (meanE - root) / (equal + 1);
  return [
    { count: equal, odds: busy / (1 - busy) },
    { count: 1, odds: rest / (1 - rest) },
  ];
}

/**
 * Probabilities of 0, 1, 2 ... busy sources among those that find room.
 *
 * From the likeliest number outwards, so that nothing leaves the doubles.
 *
 * @param sources how many and how busy
 * @param room calls that the group holds
 */
export function busySources(sources: Sources, room: number): Float64Array {
  const { count, odds } = sources;
  const states = Math.min(Math.floor(count), room) + 1;
  const weights = new Float64Array(states);
  const top = Math.max(0, Math.min(states - 1, Math.floor(((count + 1) * odds) / (1 + odds))));
  weights[top] = 1;
  let sum = 1;
  for (let x = top + 1; x < states; x++) {
    weights[x] = (weights[x - 1]! * (count - x + 1) * odds) / x;
    sum += weights[x]!;
  }
  for (let x = top - 1; x >= 0; x--) {
    weights[x] = (weights[x + 1]! * (x + 1)) / ((count - x) * odds);
    sum += weights[x]!;
  }
  for (let x = 0; x < states; x++) weights[x]! /= sum;
  return weights;
}

/** Weights of occupied units after sources are added: sum over x of their weights times those of the others at j - x width. */
export function convolve(others: Float64Array, busy: Float64Array, width: number): Float64Array {
  const out = new Float64Array(others.length);
  for (let x = 0; x < busy.length; x++) {
    const shift = x * width;
    const weight = busy[x]!;
    for (let state = shift; state < out.length; state++) out[state]! += weight * others[state - shift]!;
  }
  return out;
}
