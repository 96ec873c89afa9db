/** Offered load of one cell, year and scheme, sorted by what its users are promised. */
import { DomainError } from "../errors";
import type { Scheme } from "./scheme";
import type { ServiceDemand } from "./demand";
import type { ServiceRow } from "./records";

/** Calls of one service that are lost when blocked, or that wait. */
export interface CallStream {
  readonly service: ServiceRow;
  readonly trafficE: number;
}

export interface OfferedLoad {
  readonly lost: CallStream[];
  readonly waiting: CallStream[];
  /** Elastic load of data services, and of messages where a scheme carries them as data. */
  downMbps: number;
  upMbps: number;
  /** Rate that a transfer must reach on the mean; 0 where nothing is promised. */
  targetMbps: number;
  /** Service that the promised rate comes from. */
  dataService: ServiceRow | undefined;
}

/** A cell without any load. */
export function emptyLoad(): OfferedLoad {
  return { lost: [], waiting: [], downMbps: 0, upMbps: 0, targetMbps: 0, dataService: undefined };
}

const KBPS_PER_MBPS = 1000;

/** Time that a message holds a narrowband channel. */
export function messageTimeS(service: ServiceRow, scheme: Scheme): number {
  return (8 * service.messageBytes) / (KBPS_PER_MBPS * scheme.required("bitRateKbps"));
}

/** Adds a share of a service's demand to the load of a cell. */
export function addLoad(
  load: OfferedLoad,
  service: ServiceRow,
  demand: ServiceDemand,
  share: number,
  scheme: Scheme,
): void {
  if (service.kind === "call" || service.kind === "group call") {
    const trafficE = demand.trafficE * share;
    if (trafficE === 0) return;
    if (!Number.isNaN(service.targetWaitShare)) load.waiting.push({ service, trafficE });
    else if (!Number.isNaN(service.targetBlocking)) load.lost.push({ service, trafficE });
    else
      throw new DomainError(
        `Services target of ${service.service}`,
        undefined,
        "targetBlocking, or targetWaitS with targetWaitShare",
      );
    return;
  }
  const narrowband = scheme.access === "FDMA" || scheme.access === "TDMA";
  if (service.kind === "message" && narrowband) {
    // On a narrowband channel a message is a short call that waits; it takes the channel once, up or down.
    const trafficE = (demand.upMbps * share * KBPS_PER_MBPS) / scheme.required("bitRateKbps");
    if (trafficE > 0) load.waiting.push({ service, trafficE });
    return;
  }
  load.downMbps += demand.downMbps * share;
  load.upMbps += demand.upMbps * share;
  if (service.targetMbps > load.targetMbps && demand.downMbps + demand.upMbps > 0) {
    load.targetMbps = service.targetMbps;
    load.dataService = service;
  }
  load.dataService ??= service;
}

/** Sum of the traffic of streams. */
export function totalTraffic(streams: readonly CallStream[]): number {
  return streams.reduce((sum, { trafficE }) => sum + trafficE, 0);
}
