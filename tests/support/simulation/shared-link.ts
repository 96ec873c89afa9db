import type { Appointment, Clock } from "./clock";
import type { Ratio } from "./measure";
import type { Randomness } from "./random";

interface Transfer {
  readonly since: number;
  readonly size: number;
  /** Service that each transfer present has had when this one is complete. */
  readonly completeAt: number;
}

/** A link whose capacity is divided equally among the transfers in progress, each at most at its peak rate. */
export class SharedLink {
  private readonly transfers: Transfer[] = [];
  /** Service that a transfer present from the start would have had. */
  private served = 0;
  private since: number;
  private next: Appointment | undefined;
  private sizes = 0;
  private durations = 0;

  constructor(
    private readonly clock: Clock,
    private readonly random: Randomness,
    private readonly capacity: number,
    private readonly peak: number,
    private readonly arrivalRate: number,
    private readonly size: (random: Randomness) => number,
  ) {
    this.since = clock.now;
    this.arrive();
  }

  /** Mean size over mean duration of the transfers that ended since the last call. */
  take(): Record<"throughput", Ratio> {
    const throughput = { over: this.sizes, under: this.durations };
    this.sizes = 0;
    this.durations = 0;
    return { throughput };
  }

  private get rate(): number {
    return Math.min(this.peak, this.capacity / this.transfers.length);
  }

  private pass(): void {
    if (this.transfers.length > 0) this.served += this.rate * (this.clock.now - this.since);
    this.since = this.clock.now;
  }

  private arrive(): void {
    this.clock.after(this.random.exponential(1 / this.arrivalRate), () => {
      this.pass();
      const size = this.size(this.random);
      this.transfers.push({ since: this.clock.now, size, completeAt: this.served + size });
      this.plan();
      this.arrive();
    });
  }

  private plan(): void {
    this.next?.cancel();
    if (this.transfers.length === 0) return;
    const first = this.transfers.reduce((least, transfer) =>
      transfer.completeAt < least.completeAt ? transfer : least,
    );
    this.next = this.clock.after(Math.max(0, first.completeAt - this.served) / this.rate, () => {
      this.pass();
      this.served = first.completeAt;
      this.transfers.splice(this.transfers.indexOf(first), 1);
      this.sizes += first.size;
      this.durations += this.clock.now - first.since;
      this.plan();
    });
  }
}
