import type { Clock } from "./clock";
import type { Ratio } from "./measure";
import type { Randomness } from "./random";

export interface WaitingClass {
  /** Arrivals per unit of time. */
  readonly rate: number;
  readonly holding: (random: Randomness) => number;
}

export interface WaitingRules {
  readonly servers: number;
  /** Waiting places; unlimited where left out. */
  readonly places?: number;
  /** Mean exponential patience of a waiting call; endless where left out. */
  readonly patience?: number;
  /** A wait above this counts as late. */
  readonly lateAfter?: number;
}

interface Waiting {
  readonly start: () => void;
}

interface Counts {
  arrivals: number;
  refused: number;
  waited: number;
  late: number;
  left: number;
  waits: number;
  served: number;
  stays: number;
}

const noCounts = (): Counts => ({
  arrivals: 0,
  refused: 0,
  waited: 0,
  late: 0,
  left: 0,
  waits: 0,
  served: 0,
  stays: 0,
});

/** Servers with a queue for each class, first come first served within a class, the first class first. */
export class WaitingGroup {
  private busy = 0;
  private queued = 0;
  private readonly queues: Waiting[][];
  private counts: Counts[];

  constructor(
    private readonly clock: Clock,
    private readonly random: Randomness,
    private readonly rules: WaitingRules,
    private readonly classes: readonly WaitingClass[],
  ) {
    this.queues = classes.map(() => []);
    this.counts = classes.map(noCounts);
    classes.forEach((_, i) => this.nextArrival(i));
  }

  /** What was measured since the last call, for each class. */
  take(): Record<string, Ratio> {
    const measured: Record<string, Ratio> = {};
    this.counts.forEach((c, i) => {
      const accepted = c.arrivals - c.refused;
      measured[`refused${i}`] = { over: c.refused, under: c.arrivals };
      measured[`waited${i}`] = { over: c.waited, under: accepted };
      measured[`late${i}`] = { over: c.late, under: accepted };
      measured[`left${i}`] = { over: c.left, under: accepted };
      measured[`wait${i}`] = { over: c.waits, under: c.served };
      measured[`stay${i}`] = { over: c.stays, under: c.served };
    });
    this.counts = this.classes.map(noCounts);
    return measured;
  }

  private nextArrival(index: number): void {
    this.clock.after(this.random.exponential(1 / this.classes[index]!.rate), () => {
      this.arrive(index);
      this.nextArrival(index);
    });
  }

  private arrive(index: number): void {
    const { servers, places, patience } = this.rules;
    this.counts[index]!.arrivals++;
    const since = this.clock.now;
    if (this.busy < servers) {
      this.serve(index, since);
      return;
    }
    if (places !== undefined && this.queued >= places) {
      this.counts[index]!.refused++;
      return;
    }
    this.queued++;
    this.counts[index]!.waited++;
    const call: Waiting = { start: () => this.serve(index, since) };
    this.queues[index]!.push(call);
    if (patience !== undefined) {
      this.clock.after(this.random.exponential(patience), () => {
        const queue = this.queues[index]!;
        const place = queue.indexOf(call);
        if (place < 0) return;
        queue.splice(place, 1);
        this.queued--;
        this.counts[index]!.left++;
      });
    }
  }

  private serve(index: number, since: number): void {
    const holding = this.classes[index]!.holding(this.random);
    this.busy++;
    const counts = this.counts[index]!;
    const wait = this.clock.now - since;
    counts.waits += wait;
    counts.served++;
    counts.stays += wait + holding;
    if (this.rules.lateAfter !== undefined && wait > this.rules.lateAfter) counts.late++;
    this.clock.after(holding, () => {
      this.busy--;
      const next = this.queues.find((queue) => queue.length > 0)?.shift();
      if (!next) return;
      this.queued--;
      next.start();
    });
  }
}
