/**
 * Capacity of a code-division cell: users of the lightest call at the planned load, with soft blocking.
 *
 * Rules: a carrier holds loadLimit times the pole of the service that loads least, in users. Calls share them with their
 * neighbours' load: blocking is Erlang B (Kaufman-Roberts where services load unequally) of A (1 + i) on N (1 + i). Calls
 * and data together keep the uplink load within loadLimit and the downlink load within loadLimit less overheadShare, per
 * carrier. Data takes the load that calls leave, on the mean.
 */
import * as erlangB from "../blocking/erlang-b";
import * as multiservice from "../blocking/multiservice";
import { DomainError } from "../errors";
import * as linkLoad from "../interference/load";
import { smallestWhole } from "../numerics/root";
import { worst, type Assessment, type Capacity } from "./assessment";
import type { OfferedLoad } from "./offered";
import type { ServiceRow } from "./records";
import type { Scheme } from "./scheme";

const KBPS_PER_MBPS = 1000;
const MOST_USERS = 100_000;
/** A cell with data alone is counted in hundredths of a carrier. */
const DATA_UNITS = 100;

/** Load that one user of a service puts on one carrier, per direction. */
interface Loads {
  readonly up: number;
  readonly down: number;
}

function ratesOf(service: ServiceRow): { up: number; down: number } {
  const up = Number.isNaN(service.upKbps) ? service.downKbps : service.upKbps;
  const down = Number.isNaN(service.downKbps) ? service.upKbps : service.downKbps;
  if (Number.isNaN(up)) {
    throw new DomainError(`Services upKbps of ${service.service}`, undefined, "the bearer rate, which CDMA needs");
  }
  return { up, down };
}

function ebN0Of(service: ServiceRow, direction: "up" | "down"): number {
  const down = Number.isNaN(service.downlinkEbN0Db) ? service.ebN0Db : service.downlinkEbN0Db;
  const value = direction === "up" ? service.ebN0Db : down;
  if (Number.isNaN(value)) {
    throw new DomainError(`Services ebN0Db of ${service.service}`, undefined, "the required Eb/N0, which CDMA needs");
  }
  return value;
}

function loadsOf(service: ServiceRow, scheme: Scheme): Loads {
  const rates = ratesOf(service);
  const chipRate = scheme.required("chipRateMcps");
  const other = scheme.required("otherCellRatio");
  const one = [1] as const;
  const spread = scheme.number("powerControlErrorDb", 0);
  const up = linkLoad.uplink(
    [ebN0Of(service, "up")],
    [rates.up],
    [service.activity],
    one,
    chipRate,
    other,
    scheme.number("efficiency", 0),
  );
  const rise = Math.exp(((spread * Math.LN10) / 10) ** 2 / 2);
  const orthogonality = scheme.number("orthogonality", 0.5);
  const down = linkLoad.downlink(
    [ebN0Of(service, "down")],
    [rates.down],
    [service.activity],
    one,
    chipRate,
    other,
    orthogonality,
  );
  return { up: up * rise, down };
}

/** Loads of the services of a scheme, each worked out once. */
export class ServiceLoads {
  private readonly known = new Map<ServiceRow, Loads>();

  constructor(private readonly scheme: Scheme) {}

  of(service: ServiceRow): Loads {
    let loads = this.known.get(service);
    if (!loads) {
      loads = loadsOf(service, this.scheme);
      this.known.set(service, loads);
    }
    return loads;
  }
}

export class LoadPool implements Capacity {
  private readonly limit: number;
  private readonly downLimit: number;
  private readonly otherCellRatio: number;
  /** Users of the lightest call on one carrier, real. */
  private readonly usersPerCarrier: number;
  private readonly widths: number[];
  private readonly soft: number[];
  private readonly targets: number[];
  private readonly names: string[];
  private readonly callLoad: Loads;
  private readonly dataLoad: Loads;
  /** Rate that a load of 1 would give to data, Mbit/s. */
  private readonly dataMbps: Loads | undefined;
  readonly channelsRequired: number;

  constructor(
    scheme: Scheme,
    private readonly load: OfferedLoad,
    serviceLoads: ServiceLoads,
  ) {
    if (load.waiting.length > 0) {
      const name = load.waiting[0]!.service.service;
      throw new DomainError(
        `Services targetWaitS of ${name}`,
        load.waiting[0]!.service.targetWaitS,
        "blank for calls that a CDMA scheme carries",
      );
    }
    this.limit = scheme.number("loadLimit", 0.75);
    this.downLimit = this.limit - scheme.number("overheadShare", 0.2);
    if (this.downLimit <= 0) {
      throw new DomainError(
        `Radio overheadShare of ${scheme.name}`,
        scheme.number("overheadShare", 0.2),
        `less than loadLimit, ${this.limit}`,
      );
    }
    this.otherCellRatio = scheme.required("otherCellRatio");
    const calls = load.lost.map(({ service }) => serviceLoads.of(service));
    const lightest = calls.length > 0 ? Math.min(...calls.map(({ up }) => up)) : this.limit;
    this.usersPerCarrier = this.limit / lightest;
    // The lightest load itself may differ from its own quotient by a rounding.
    this.widths = calls.map(({ up }) => Math.max(1, Math.ceil(up / lightest - 1e-9)));
    this.soft = load.lost.map(({ trafficE }) => trafficE * (1 + this.otherCellRatio));
    this.targets = load.lost.map(({ service }) => service.targetBlocking);
    this.names = load.lost.map(({ service }) => service.service);
    const sum = (direction: keyof Loads): number =>
      load.lost.reduce((total, { trafficE }, i) => total + trafficE * calls[i]![direction], 0);
    this.callLoad = { up: sum("up"), down: sum("down") };
    const data = load.dataService;
    if (data && load.downMbps + load.upMbps > 0) {
      const each = serviceLoads.of(data);
      const rates = ratesOf(data);
      const full = (direction: keyof Loads): number =>
        (rates[direction] * data.activity) / (each[direction] * KBPS_PER_MBPS);
      this.dataMbps = { up: full("up"), down: full("down") };
      this.dataLoad = { up: load.upMbps / this.dataMbps.up, down: load.downMbps / this.dataMbps.down };
    } else this.dataLoad = { up: 0, down: 0 };
    this.channelsRequired = this.required();
  }

  get guess(): number {
    const byLoad = Math.max(
      (this.callLoad.up + this.dataLoad.up) / this.limit,
      (this.callLoad.down + this.dataLoad.down) / this.downLimit,
    );
    const byCalls = this.soft.length === 0 ? this.dataCarriers() : this.channelsRequired / this.usersPerCarrier;
    return Math.ceil(Math.max(byLoad, byCalls));
  }

  /** Carriers, not whole, that data alone would fill, with room for a transfer at its promised rate. */
  private dataCarriers(): number {
    if (!this.dataMbps) return 0;
    const { targetMbps } = this.load;
    const room = (direction: keyof Loads, offered: number): number =>
      offered > 0 ? targetMbps / this.dataMbps![direction] : 0;
    return Math.max(
      (this.dataLoad.up + room("up", this.load.upMbps)) / this.limit,
      (this.dataLoad.down + room("down", this.load.downMbps)) / this.downLimit,
    );
  }

  /** Users of the lightest call at the planned load; hundredths of a carrier where there are no calls. */
  channels(carriers: number): number {
    if (this.soft.length === 0) return carriers * DATA_UNITS;
    return Math.floor(carriers * this.usersPerCarrier);
  }

  private equal(): boolean {
    return this.widths.every((width) => width === this.widths[0]);
  }

  /** Blocking of each call service with so many users at the planned load, real. */
  private blocking(users: number): number[] {
    const softUsers = users * (1 + this.otherCellRatio);
    if (this.equal()) {
      const total = this.soft.reduce((sum, traffic) => sum + traffic, 0);
      const blocking = erlangB.blocking(total, softUsers / (this.widths[0] ?? 1));
      return this.soft.map(() => blocking);
    }
    return multiservice.blocking(Math.floor(softUsers), this.soft, this.widths);
  }

  private required(): number {
    if (this.soft.length === 0) return Math.ceil(DATA_UNITS * this.dataCarriers() - 1e-9);
    const meets = (users: number): boolean => this.blocking(users).every((value, i) => value <= this.targets[i]!);
    const mean = this.load.lost.reduce((sum, { trafficE }, i) => sum + trafficE * this.widths[i]!, 0);
    const most = Math.floor(MOST_USERS / (1 + this.otherCellRatio));
    return smallestWhole(meets, 0, most, Math.ceil(mean + 2 * Math.sqrt(mean))) ?? most + 1;
  }

  assess(carriers: number): Assessment {
    const blocking = this.blocking(carriers * this.usersPerCarrier);
    const calls = blocking.length > 0 ? worst(blocking, this.targets, this.names) : undefined;
    const uplinkLoad = carriers > 0 ? (this.callLoad.up + this.dataLoad.up) / carriers : Infinity;
    const downlinkLoad = carriers > 0 ? (this.callLoad.down + this.dataLoad.down) / carriers : Infinity;
    const throughput = this.throughput(carriers);
    const limit =
      calls && !calls.met
        ? "blocking"
        : throughput !== undefined && !(throughput > 0 && throughput >= this.load.targetMbps)
          ? "throughput"
          : uplinkLoad > this.limit
            ? "uplink load"
            : downlinkLoad > this.downLimit
              ? "downlink load"
              : "nothing";
    return {
      limit,
      blocking: calls?.blocking,
      worstService: calls?.service ?? this.load.dataService?.service,
      waitS: undefined,
      throughputMbps: throughput,
      uplinkLoad: Number.isFinite(uplinkLoad) ? uplinkLoad : undefined,
      downlinkLoad: Number.isFinite(downlinkLoad) ? downlinkLoad : undefined,
      utilisation: Math.min(1, uplinkLoad / this.limit),
    };
  }

  private throughput(carriers: number): number | undefined {
    if (!this.dataMbps) return undefined;
    const up = (carriers * this.limit - this.callLoad.up - this.dataLoad.up) * this.dataMbps.up;
    const down = (carriers * this.downLimit - this.callLoad.down - this.dataLoad.down) * this.dataMbps.down;
    const mbps = Math.min(this.load.upMbps > 0 ? up : Infinity, this.load.downMbps > 0 ? down : Infinity);
    return Math.max(0, mbps);
  }
}
