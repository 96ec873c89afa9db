import type { Clock } from "./clock";

/** A quantity that a simulation measures as one sum over another: blocked over all calls, busy time over time. */
export interface Ratio {
  over: number;
  under: number;
}

/** Time integral of a number that changes at events. */
export class Level {
  private level = 0;
  private area = 0;
  private since = 0;

  constructor(private readonly clock: Clock) {}

  get value(): number {
    return this.level;
  }

  set value(value: number) {
    this.area += this.level * (this.clock.now - this.since);
    this.since = this.clock.now;
    this.level = value;
  }

  /** Integral since the last call of this function. */
  take(): number {
    this.value = this.level;
    const area = this.area;
    this.area = 0;
    return area;
  }
}

/** Mean over equal batches of a long run, with its standard error. */
export interface Estimate {
  readonly mean: number;
  readonly standardError: number;
}

const BATCHES = 24;

/**
 * Runs a simulation in batches after a first one that only warms it up.
 *
 * The method of batch means: batches far longer than the memory of the system are nearly independent, so that their spread tells
 * the error of their mean.
 *
 * @param clock event list of the simulation
 * @param batchTime length of a batch
 * @param take gives the ratios gathered since it was last called, and starts anew
 */
export function batchMeans<Names extends string>(
  clock: Clock,
  batchTime: number,
  take: () => Record<Names, Ratio>,
): Record<Names, Estimate> {
  clock.runUntil(batchTime);
  take();
  const batches: Record<Names, Ratio>[] = [];
  for (let batch = 0; batch < BATCHES; batch++) {
    clock.runUntil(clock.now + batchTime);
    batches.push(take());
  }
  const names = Object.keys(batches[0]!) as Names[];
  return Object.fromEntries(names.map((name) => [name, estimate(batches.map((batch) => batch[name]))])) as Record<
    Names,
    Estimate
  >;
}

function estimate(ratios: readonly Ratio[]): Estimate {
  const over = ratios.reduce((sum, ratio) => sum + ratio.over, 0);
  const under = ratios.reduce((sum, ratio) => sum + ratio.under, 0);
  const mean = over / under;
  // Spread of the ratio of two sums: what each batch is off the common ratio.
  const squares = ratios.reduce((sum, ratio) => sum + (ratio.over - mean * ratio.under) ** 2, 0);
  return { mean, standardError: Math.sqrt((squares * ratios.length) / (ratios.length - 1)) / under };
}

/** Four standard errors of 24 batches leave out one true value in two thousand. */
const STANDARD_ERRORS = 4;

/**
 * How far a formula is from a simulation, in units of what chance allows: at most 1 where they agree.
 *
 * @param value what the formula says
 * @param simulated what the simulation found
 * @param precision largest standard error, relative to the value, with which the comparison says anything
 * @param approximation share of the value by which the formula may be off, for methods that approximate
 */
export function disagreement(value: number, simulated: Estimate, precision = 0.03, approximation = 0): number {
  if (!(simulated.standardError < precision * Math.abs(value))) {
    throw new Error(`a simulated ${simulated.mean} within ${simulated.standardError} says too little about ${value}`);
  }
  return (
    Math.abs(simulated.mean - value) / (STANDARD_ERRORS * simulated.standardError + approximation * Math.abs(value))
  );
}
