/** When the calls in progress end, the earliest first: a binary heap (J. W. J. Williams, Communications of the ACM 7 (1964)). */
export class DepartureTimes {
  private readonly heap: Float64Array;
  private held = 0;

  /** @param most calls that can be in progress at once */
  constructor(most: number) {
    this.heap = new Float64Array(most);
  }

  /** Calls in progress. */
  get size(): number {
    return this.held;
  }

  /** Adds a call that ends at the given time; there must be room. */
  add(end: number): void {
    const { heap } = this;
    let place = this.held++;
    while (place > 0) {
      const parent = (place - 1) >> 1;
      if (heap[parent]! <= end) break;
      heap[place] = heap[parent]!;
      place = parent;
    }
    heap[place] = end;
  }

  /** Ends all calls up to a time. */
  removeUpTo(now: number): void {
    while (this.held > 0 && this.heap[0]! <= now) this.removeFirst();
  }

  private removeFirst(): void {
    const { heap } = this;
    const last = heap[--this.held]!;
    const size = this.held;
    let place = 0;
    for (let child = 1; child < size; child = 2 * place + 1) {
      if (child + 1 < size && heap[child + 1]! < heap[child]!) child++;
      if (heap[child]! >= last) break;
      heap[place] = heap[child]!;
      place = child;
    }
    if (size > 0) heap[place] = last;
  }
}
