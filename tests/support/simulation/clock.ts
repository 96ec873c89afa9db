interface Event {
  readonly time: number;
  readonly order: number;
  readonly action: () => void;
  cancelled: boolean;
}

export interface Appointment {
  cancel(): void;
}

/** Event list of a simulation: actions in the order of their times, equal times in the order they were made. */
export class Clock {
  now = 0;
  private readonly heap: Event[] = [];
  private made = 0;

  /** Calls `action` once the given time has passed. */
  after(delay: number, action: () => void): Appointment {
    const event: Event = { time: this.now + delay, order: this.made++, action, cancelled: false };
    this.push(event);
    return {
      cancel: () => {
        event.cancelled = true;
      },
    };
  }

  /** Lets time pass until `end`. */
  runUntil(end: number): void {
    for (let next = this.heap[0]; next && next.time <= end; next = this.heap[0]) {
      this.pop();
      if (next.cancelled) continue;
      this.now = next.time;
      next.action();
    }
    this.now = end;
  }

  private static before(a: Event, b: Event): boolean {
    return a.time < b.time || (a.time === b.time && a.order < b.order);
  }

  private push(event: Event): void {
    const { heap } = this;
    let place = heap.length;
    heap.push(event);
    while (place > 0) {
      const parent = (place - 1) >> 1;
      if (!Clock.before(event, heap[parent]!)) break;
      heap[place] = heap[parent]!;
      place = parent;
    }
    heap[place] = event;
  }

  private pop(): void {
    const { heap } = this;
    const last = heap.pop()!;
    if (heap.length === 0) return;
    let place = 0;
    for (;;) {
      let child = 2 * place + 1;
      if (child >= heap.length) break;
      if (child + 1 < heap.length && Clock.before(heap[child + 1]!, heap[child]!)) child++;
      if (!Clock.before(heap[child]!, last)) break;
      heap[place] = heap[child]!;
      place = child;
    }
    heap[place] = last;
  }
}
