import { create, randomDependencies } from "mathjs";

/** Random times and choices for simulations, all from one seeded generator: the same seed gives the same run. */
export class Randomness {
  private readonly uniform: () => number;

  constructor(seed: string) {
    const math = create(randomDependencies!, { randomSeed: seed });
    this.uniform = () => math.random();
  }

  /** Exponential time. */
  exponential(mean: number): number {
    // The generator gives numbers from 0 to below 1, so that the logarithm is finite.
    return -mean * Math.log1p(-this.uniform());
  }

  /** One of two exponential times, chosen so that the mean and the coefficient of variation (above 1) are as given. */
  hyperexponential(mean: number, variation: number): number {
    const square = variation * variation;
    const short = 0.5 * (1 + Math.sqrt((square - 1) / (square + 1)));
    const chosen = this.chance(short) ? short : 1 - short;
    return this.exponential(mean / (2 * chosen));
  }

  /** True with the given probability. */
  chance(probability: number): boolean {
    return this.uniform() < probability;
  }

  /** A whole number from 0 to below `count`. */
  below(count: number): number {
    return Math.floor(this.uniform() * count);
  }
}
