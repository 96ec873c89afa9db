import type { Clock } from "./clock";
import { Level, type Ratio } from "./measure";
import type { Randomness } from "./random";

/** Who calls, and how. Times are in mean holding times. */
export type Calls =
  | { readonly kind: "poisson"; readonly rate: number }
  /** Each source calls at the rate while it is free; a blocked one is free again at once. */
  | { readonly kind: "sources"; readonly count: number; readonly rate: number }
  /** Calls at a rate of their own, and while a call lasts it brings others at its rate: a branching stream. */
  | { readonly kind: "branching"; readonly rate: number; readonly perCall: number };

export interface StreamOfCalls {
  readonly calls: Calls;
  /** Units of a call; 1 where left out. */
  readonly width?: number;
  /** Units that must be free beside those of the call when it is admitted. */
  readonly reserved?: number;
  /** A holding time of mean 1; exponential where left out. */
  readonly holding?: (random: Randomness) => number;
  /** Share of blocked calls that are tried again, and the mean time until then. */
  readonly retry?: { readonly share: number; readonly after: number };
  /** Where blocked calls go. */
  readonly overflowTo?: Group;
}

interface Counts {
  attempts: number;
  blocked: number;
}

/** A group of units that calls of several streams take and give back; calls that find too few free ones are lost. */
export class Group {
  private busy = 0;
  private readonly busyUnits: Level;
  private readonly squares: Level;
  private readonly streams: { stream: StreamOfCalls; counts: Counts; inProgress: Level; shut: Level }[] = [];
  private since: number;

  constructor(
    private readonly clock: Clock,
    private readonly random: Randomness,
    private readonly units: number,
  ) {
    this.busyUnits = new Level(clock);
    this.squares = new Level(clock);
    this.since = clock.now;
  }

  /** Adds a stream and starts its calls; streams that only overflow to this group are added with none of their own. */
  add(stream: StreamOfCalls): number {
    const index = this.streams.length;
    this.streams.push({
      stream,
      counts: { attempts: 0, blocked: 0 },
      inProgress: new Level(this.clock),
      shut: new Level(this.clock),
    });
    this.noteState();
    const { calls } = stream;
    if (calls.kind === "sources") {
      for (let source = 0; source < calls.count; source++) this.sourceCalls(index, calls.rate);
    } else if (calls.rate > 0) this.nextArrival(index, calls.rate);
    return index;
  }

  /** One call of a stream; `ended` is called when it is over, or at once where it is blocked. */
  offer(index: number, ended?: () => void): void {
    const { stream, counts, inProgress } = this.streams[index]!;
    const width = stream.width ?? 1;
    counts.attempts++;
    if (this.isShut(stream)) {
      counts.blocked++;
      if (stream.retry && this.random.chance(stream.retry.share)) {
        this.clock.after(this.random.exponential(stream.retry.after), () => this.offer(index));
      }
      stream.overflowTo?.offer(0);
      ended?.();
      return;
    }
    this.occupy(width);
    inProgress.value++;
    let over = false;
    const { calls } = stream;
    if (calls.kind === "branching") {
      const branch = (): void => {
        this.clock.after(this.random.exponential(1 / calls.perCall), () => {
          if (over) return;
          this.offer(index);
          branch();
        });
      };
      branch();
    }
    const holding = stream.holding ?? ((random: Randomness) => random.exponential(1));
    this.clock.after(holding(this.random), () => {
      over = true;
      this.occupy(-width);
      inProgress.value--;
      ended?.();
    });
  }

  /** What was measured since the last call: congestions and carried traffic of each stream, moments of the busy units. */
  take(): Record<string, Ratio> {
    const time = this.clock.now - this.since;
    this.since = this.clock.now;
    const measured: Record<string, Ratio> = {
      busy: { over: this.busyUnits.take(), under: time },
      busySquared: { over: this.squares.take(), under: time },
    };
    this.streams.forEach(({ counts, inProgress, shut }, i) => {
      measured[`call${i}`] = { over: counts.blocked, under: counts.attempts };
      measured[`offered${i}`] = { over: counts.attempts, under: time };
      measured[`lost${i}`] = { over: counts.blocked, under: time };
      measured[`time${i}`] = { over: shut.take(), under: time };
      measured[`carried${i}`] = { over: inProgress.take(), under: time };
      counts.attempts = 0;
      counts.blocked = 0;
    });
    return measured;
  }

  private occupy(width: number): void {
    this.busy += width;
    this.busyUnits.value = this.busy;
    this.squares.value = this.busy * this.busy;
    this.noteState();
  }

  private isShut(stream: StreamOfCalls): boolean {
    return this.busy + (stream.width ?? 1) + (stream.reserved ?? 0) > this.units;
  }

  private noteState(): void {
    for (const { stream, shut } of this.streams) shut.value = this.isShut(stream) ? 1 : 0;
  }

  private nextArrival(index: number, rate: number): void {
    this.clock.after(this.random.exponential(1 / rate), () => {
      this.offer(index);
      this.nextArrival(index, rate);
    });
  }

  private sourceCalls(index: number, rate: number): void {
    this.clock.after(this.random.exponential(1 / rate), () => {
      this.offer(index, () => this.sourceCalls(index, rate));
    });
  }
}
