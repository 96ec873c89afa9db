import { ScaledWeights } from "./scaled-weights";

/** One stream of calls: Pascal above peakedness 1, Poisson at 1, binomial below. */
export interface Stream {
  readonly meanE: number;
  readonly width: number;
  readonly peakedness: number;
}

/**
 * Rate at which a stream calls in each state, per erlang offered and times the weight of the state:
 * y(j) = (q(j) + (z - 1) y(j - d)) / z.
 *
 * L. E. N. Delbrouck, IEEE Transactions on Communications 31 (1983). The ring holds the last d values: the place of y(j) is that
 * of y(j - d).
 */
class CallRate {
  private readonly ring: Float64Array;
  private readonly kept: number;
  private place = 0;

  /** `tilt`: factor by which the weights of all states are multiplied for each unit. */
  constructor(
    private readonly stream: Stream,
    tilt: number,
  ) {
    this.ring = new Float64Array(stream.width);
    this.kept = (stream.peakedness - 1) * tilt ** stream.width;
  }

  /** y(j - d), where j is the state that is to be pushed next. */
  get before(): number {
    return this.ring[this.place]!;
  }

  /** Takes the weight of the next state and returns the rate there. */
  push(weight: number): number {
    const rate = (weight + this.kept * this.ring[this.place]!) / this.stream.peakedness;
    this.ring[this.place] = rate;
    if (++this.place === this.stream.width) this.place = 0;
    return rate;
  }

  scale(factor: number): void {
    for (let i = 0; i < this.ring.length; i++) this.ring[i]! *= factor;
  }
}

/**
 * Weights of the occupied units under streams of any peakedness, normalised: j q(j) = sum of mean d y(j - d)
 * (L. E. N. Delbrouck 1983).
 *
 * Peaky and Poisson streams add positive parts only. A smooth one subtracts, which is harmless while the states asked for
 * hold at most half its sources: the error of y is then passed on with a factor of at most 1.
 *
 * @param units highest state
 * @param streams streams whose calls fit into the units
 * @param tilt factor by which the weights are multiplied for each unit
 */
export function peakyOccupancy(units: number, streams: readonly Stream[], tilt: number): Float64Array {
  const weights = new ScaledWeights(units + 1);
  const { values } = weights;
  const rates = streams.map((stream) => new CallRate(stream, tilt));
  const offered = Float64Array.from(streams, ({ meanE, width }) => meanE * width * tilt ** width);
  for (const rate of rates) rate.push(1);
  for (let state = 1; state <= units; state++) {
    let sum = 0;
    for (let i = 0; i < rates.length; i++) sum += offered[i]! * rates[i]!.before;
    const weight = sum / state;
    values[state] = weight;
    for (let i = 0; i < rates.length; i++) rates[i]!.push(weight);
    if (ScaledWeights.isLarge(weight)) {
      const factor = weights.shrink(state, 1);
      for (const rate of rates) rate.scale(factor);
    }
  }
  return weights.normalised(units);
}

/**
 * Rate of the blocked calls of a stream per erlang offered: the sum of y over the states that leave no room for one.
 *
 * @param weights weights of the states, tilted
 * @param stream the stream
 * @param tilt factor by which the weights are multiplied for each unit
 * @param untilt what turns the weight of each state into a probability
 */
export function blockedRate(weights: Float64Array, stream: Stream, tilt: number, untilt: Float64Array): number {
  const rate = new CallRate(stream, tilt);
  const firstBlocking = weights.length - stream.width;
  let sum = 0;
  for (let state = 0; state < weights.length; state++) {
    const here = rate.push(weights[state]!);
    if (state >= firstBlocking) sum += here * untilt[state]!;
  }
  return sum;
}
