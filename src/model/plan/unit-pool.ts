/**
 * Capacity of a cell whose carriers give whole units: channels (FDMA), slots (TDMA) or bearers of the narrowest service
 * (OFDMA).
 *
 * Rules: calls with a blocking target share the units, dimensioned together (Kaufman-Roberts where widths differ, Erlang B
 * where they do not). Waiting calls and messages have units of their own, set aside first. Elastic data takes what both
 * leave, on the mean over the states: capacity less carried load, and a transfer sees capacity less data traffic
 * (M/G/1 processor sharing).
 */
import * as erlangB from "../blocking/erlang-b";
import * as multiservice from "../blocking/multiservice";
import { smallestWhole } from "../numerics/root";
import { worst, type Assessment, type Capacity } from "./assessment";
import type { CallStream, OfferedLoad } from "./offered";
import { meanWait, type WaitingGroup } from "./waiting";

/** Units of the carriers and what one is worth to data. */
export interface Units {
  /** Whole units that so many carriers give, control taken off. */
  of(carriers: number): number;
  /** Units that a call of the stream takes. */
  width(stream: CallStream): number;
  /** Units of one waiting call. */
  readonly waitingWidth: number;
  /** Data rate of one unit in each direction, Mbit/s. */
  readonly downMbps: number;
  readonly upMbps: number;
  /** Smallest number of carriers with so many units. */
  carriersFor(units: number): number;
}

const MOST_UNITS = 100_000;

export class UnitPool implements Capacity {
  private readonly trafficE: number[];
  private readonly widths: number[];
  private readonly targets: number[];
  private readonly names: string[];
  private readonly equalWidth: number | undefined;
  private readonly totalE: number;
  private readonly waitingUnits: number;
  readonly channelsRequired: number;

  constructor(
    private readonly units: Units,
    private readonly load: OfferedLoad,
    private readonly waiting: WaitingGroup,
  ) {
    this.trafficE = load.lost.map((stream) => stream.trafficE);
    this.widths = load.lost.map((stream) => units.width(stream));
    this.targets = load.lost.map(({ service }) => service.targetBlocking);
    this.names = load.lost.map(({ service }) => service.service);
    this.equalWidth = this.widths.every((width) => width === this.widths[0]) ? this.widths[0] : undefined;
    this.totalE = this.trafficE.reduce((sum, traffic) => sum + traffic, 0);
    this.waitingUnits = waiting.channels * units.waitingWidth;
    this.channelsRequired = this.required();
  }

  get guess(): number {
    return this.units.carriersFor(this.channelsRequired);
  }

  channels(carriers: number): number {
    return this.units.of(carriers);
  }

  private required(): number {
    const calls = this.callUnits();
    const enough = (units: number): boolean => this.dataFits(units);
    const least = calls + this.waitingUnits;
    if (enough(least)) return least;
    return smallestWhole(enough, least, MOST_UNITS, this.unitsWithData()) ?? MOST_UNITS + 1;
  }

  /** Units at which data would have its rate if no call were blocked: where the search for them starts. */
  private unitsWithData(): number {
    const { downMbps, upMbps, targetMbps } = this.load;
    const down = downMbps > 0 ? (downMbps + targetMbps) / this.units.downMbps : 0;
    const up = upMbps > 0 ? (upMbps + targetMbps) / this.units.upMbps : 0;
    const calls = this.trafficE.reduce((sum, traffic, i) => sum + traffic * this.widths[i]!, 0);
    return Math.ceil(calls + this.waiting.trafficE * this.units.waitingWidth + Math.max(down, up));
  }

  private callUnits(): number {
    if (this.trafficE.length === 0) return 0;
    if (this.equalWidth !== undefined) {
      return this.equalWidth * erlangB.channels(this.totalE, Math.min(...this.targets));
    }
    return multiservice.units(this.trafficE, this.widths, this.targets);
  }

  private callBlocking(units: number): number[] {
    if (this.equalWidth !== undefined) {
      const blocking = erlangB.blocking(this.totalE, Math.floor(units / this.equalWidth));
      return this.trafficE.map(() => blocking);
    }
    return multiservice.blocking(units, this.trafficE, this.widths);
  }

  /** Mean units that calls in progress occupy. */
  private busy(blocking: readonly number[]): number {
    return this.trafficE.reduce((sum, traffic, i) => sum + traffic * (1 - blocking[i]!) * this.widths[i]!, 0);
  }

  /** Units for calls once the waiting calls have theirs. */
  private callShare(units: number): number {
    return this.trafficE.length === 0 ? 0 : Math.max(0, units - this.waitingUnits);
  }

  private throughput(units: number, blocking: readonly number[]): { mbps: number; met: boolean } {
    const queue = Math.min(this.waiting.trafficE * this.units.waitingWidth, units);
    const free = units - this.busy(blocking) - queue;
    const down = free * this.units.downMbps - this.load.downMbps;
    const up = free * this.units.upMbps - this.load.upMbps;
    // A direction without data promises nothing.
    const mbps = Math.min(this.load.downMbps > 0 ? down : Infinity, this.load.upMbps > 0 ? up : Infinity);
    return { mbps: Math.max(0, mbps), met: mbps >= this.load.targetMbps && mbps > 0 };
  }

  private hasData(): boolean {
    return this.load.downMbps > 0 || this.load.upMbps > 0;
  }

  private dataFits(units: number): boolean {
    return !this.hasData() || this.throughput(units, this.callBlocking(this.callShare(units))).met;
  }

  assess(carriers: number): Assessment {
    const units = this.units.of(carriers);
    const callUnits = this.callShare(units);
    const blocking = this.callBlocking(callUnits);
    const calls = blocking.length > 0 ? worst(blocking, this.targets, this.names) : undefined;
    const waitingUnits = this.trafficE.length === 0 ? units : Math.min(units, this.waitingUnits);
    const waitS = meanWait(this.waiting, Math.floor(waitingUnits / this.units.waitingWidth));
    const data = this.hasData() ? this.throughput(units, blocking) : undefined;
    const waits = this.waiting.trafficE === 0 || units >= this.waitingUnits;
    const used = this.busy(blocking) + Math.min(units, this.waiting.trafficE * this.units.waitingWidth);
    const dataUse = Math.max(this.load.downMbps / this.units.downMbps || 0, this.load.upMbps / this.units.upMbps || 0);
    return {
      limit: calls && !calls.met ? "blocking" : !waits ? "waiting" : data && !data.met ? "throughput" : "nothing",
      blocking: calls?.blocking,
      worstService: calls?.service ?? this.load.waiting[0]?.service.service ?? this.load.dataService?.service,
      waitS,
      throughputMbps: data?.mbps,
      uplinkLoad: undefined,
      downlinkLoad: undefined,
      utilisation: units > 0 ? Math.min(1, (used + dataUse) / units) : 1,
    };
  }
}
