import { ScaledWeights } from "./scaled-weights";

/** A service takes part in the recursion for the states `from` to `to`. */
interface Part {
  readonly width: number;
  readonly offered: number;
  readonly from: number;
  readonly to: number;
}

/**
 * Weights of the occupied units, one state after the other: j q(j) = sum of a_i d_i q(j - d_i)
 * (J. S. Kaufman, IEEE Transactions on Communications 29 (1981); J. W. Roberts 1981).
 *
 * With reservation service i leads to no state above units - reserved (J. W. Roberts, ITC 10 (1983)), so it is left out there.
 * All terms are positive: no digit is lost. Between two states at which a service joins or leaves, the inner loop is bare.
 */
export class OccupancyRecursion {
  readonly weights: ScaledWeights;
  private last = 0;
  private readonly parts: readonly Part[];
  private readonly changes: readonly number[];
  private readonly widths: Int32Array;
  private readonly offered: Float64Array;

  /**
   * @param units highest state that will be asked for
   * @param trafficE offered traffic per service, erlang
   * @param width units per call
   * @param reserved units that must stay free after a call of the service is admitted; none where left out
   * @param window how many states from the newest back must stay in one scale
   */
  constructor(
    units: number,
    trafficE: readonly number[],
    width: readonly number[],
    reserved: readonly number[] | undefined,
    private readonly window: number,
  ) {
    this.weights = new ScaledWeights(units + 1);
    this.parts = trafficE
      .map((traffic, i) => ({
        width: width[i]!,
        offered: traffic * width[i]!,
        from: width[i]!,
        to: units - (reserved?.[i] ?? 0),
      }))
      .filter(({ offered, from, to }) => offered > 0 && from <= to);
    const ends = this.parts.flatMap(({ from, to }) => [from, to + 1]);
    this.changes = [...new Set(ends)].sort((a, b) => a - b);
    this.widths = new Int32Array(this.parts.length);
    this.offered = new Float64Array(this.parts.length);
  }

  /**
   * Computes the weights up to a state.
   *
   * @returns the factor by which earlier weights were scaled meanwhile, 1 in most calls
   */
  advance(to: number): number {
    let factor = 1;
    while (this.last < to) {
      const from = this.last + 1;
      const change = this.changes.find((state) => state > from);
      factor *= this.run(from, Math.min(to, (change ?? Infinity) - 1));
    }
    return factor;
  }

  /** The states from `from` to `to`, between which no service joins or leaves. */
  private run(from: number, to: number): number {
    const { widths, offered } = this;
    let count = 0;
    for (const part of this.parts) {
      if (part.from > from || part.to < from) continue;
      widths[count] = part.width;
      offered[count++] = part.offered;
    }
    const values = this.weights.values;
    let factor = 1;
    for (let state = from; state <= to; state++) {
      let sum = 0;
      for (let i = 0; i < count; i++) sum += offered[i]! * values[state - widths[i]!]!;
      const weight = sum / state;
      values[state] = weight;
      if (ScaledWeights.isLarge(weight)) factor *= this.weights.shrink(state, this.window);
    }
    this.last = to;
    return factor;
  }
}

/**
 * Probability of each number of occupied units from 0 to `units`.
 *
 * Probabilities below about 1e-305 may come out as 0.
 */
export function occupancy(
  units: number,
  trafficE: readonly number[],
  width: readonly number[],
  reserved?: readonly number[],
): Float64Array {
  const reach = width.map((w) => Math.min(w, units)).reduce((most, w) => Math.max(most, w), 1);
  const recursion = new OccupancyRecursion(units, trafficE, width, reserved, reach);
  recursion.advance(units);
  return recursion.weights.normalised(units);
}

/** Probability of the states from `from` to the last. */
export function upperSum(probabilities: Float64Array, from: number): number {
  let sum = 0;
  for (let state = from; state < probabilities.length; state++) sum += probabilities[state]!;
  // Rounding may take a sum over nearly all states above 1.
  return Math.min(1, sum);
}
