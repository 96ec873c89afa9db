/**
 * Sum of the last `width` numbers of a stream of positive ones, without ever subtracting: where the numbers fall by many powers
 * of ten, taking the oldest out of a running sum would leave nothing but its rounding.
 *
 * The stream is cut into blocks as long as the window. The window is the newest part of the current block, added up as it comes,
 * and the end of the block before, whose sums from each place to its end are made when it is complete.
 */
export class SlidingSum {
  private readonly block: Float64Array;
  private readonly ends: Float64Array;
  private count = 0;
  private current = 0;

  constructor(private readonly width: number) {
    this.block = new Float64Array(width);
    // One place more, so that a complete block adds nothing of the one before.
    this.ends = new Float64Array(width + 1);
  }

  push(value: number): void {
    if (this.count === this.width) {
      for (let i = this.width - 1; i >= 0; i--) this.ends[i] = this.ends[i + 1]! + this.block[i]!;
      this.count = 0;
      this.current = 0;
    }
    this.block[this.count++] = value;
    this.current += value;
  }

  get sum(): number {
    return this.current + this.ends[this.count]!;
  }

  /** Multiplies all numbers so far. */
  scale(factor: number): void {
    this.current *= factor;
    for (let i = 0; i < this.width; i++) {
      this.block[i]! *= factor;
      this.ends[i]! *= factor;
    }
  }
}
