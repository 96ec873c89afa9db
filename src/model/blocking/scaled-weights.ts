/** Weights stay below 2^900, so that a few thousand of them, multiplied by traffic, still add up within the doubles. */
const LARGEST = 2 ** 900;
const SHRINK = 2 ** -900;

/**
 * Unnormalised weights of the states 0, 1, 2 ... of a recursion that looks back over a limited number of states.
 *
 * They grow like a power series of the load and would leave the doubles near 700 erlang. Whenever one passes 2^900, those that
 * the recursion can still reach are divided by 2^900 (exactly: it is a power of two); the older ones keep their scale, and which
 * was when is remembered. Nothing is ever scaled up: the peak is at least 1, so that a state of probability above 1e-305 is a
 * normal double.
 */
export class ScaledWeights {
  readonly values: Float64Array;
  /** For each division the first state that it reached; these places rise. */
  private readonly reached: number[] = [];
  private firstKept = 0;

  constructor(states: number) {
    this.values = new Float64Array(states);
    this.values[0] = 1;
  }

  static isLarge(weight: number): boolean {
    return weight > LARGEST;
  }

  /**
   * Divides the reachable weights.
   *
   * @param last the newest state
   * @param window how many states the recursion looks back
   * @returns the factor, for sums that the caller holds in the same scale
   */
  shrink(last: number, window: number): number {
    // Weights that vanish stay 0 and need no second visit: in steep growth that is nearly the whole window.
    let first = Math.max(this.firstKept, last - window + 1);
    this.reached.push(first);
    for (let state = first; state <= last; state++) this.values[state]! *= SHRINK;
    while (this.values[first] === 0) first++;
    this.firstKept = first;
    return SHRINK;
  }

  /** Brings the states 0 to `last` to the scale of the newest and returns their sum. */
  align(last: number): number {
    let factor = 1;
    let sum = 0;
    for (let state = last; state >= 0; state--) {
      while (this.reached.length > 0 && state < this.reached[this.reached.length - 1]!) {
        factor *= SHRINK;
        this.reached.pop();
      }
      const weight = this.values[state]! * factor;
      this.values[state] = weight;
      sum += weight;
    }
    return sum;
  }

  /** The probabilities of the states 0 to `last`. */
  normalised(last: number): Float64Array {
    const sum = this.align(last);
    const probabilities = this.values.subarray(0, last + 1);
    for (let state = 0; state <= last; state++) probabilities[state]! /= sum;
    return probabilities;
  }
}
