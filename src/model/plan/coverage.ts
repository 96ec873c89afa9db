/**
 * How far a cell reaches at its load: the smallest of uplink, downlink and timing.
 *
 * Rules: link budget of each direction with given gains and losses, shadowing margin for the share of the area to be
 * covered, and interference margin at the load: the noise rise of CDMA, the loaded neighbours of an orthogonal scheme. Path
 * loss by the model and environment of the cell.
 */
import { NoAnswerError } from "../errors";
import * as margin from "../interference/margin";
import { reuse } from "../interference/reuse";
import * as sinr from "../interference/sinr";
import * as timing from "../codes/timing";
import { area as siteArea } from "../radio/cell";
import * as link from "../radio/link";
import * as noise from "../radio/noise";
import * as pathLoss from "../radio/path-loss";
import * as range from "../radio/range";
import * as shadowing from "../radio/shadowing";
import type { Assessment } from "./assessment";
import type { OfferedLoad } from "./offered";
import type { Limit, ServiceRow } from "./records";
import type { Scheme } from "./scheme";

const KHZ_PER_MHZ = 1000;

export interface Reach {
  readonly radiusKm: number | undefined;
  readonly interferenceMarginDb: number;
  /** What ends the reach. */
  readonly by: Extract<Limit, "uplink range" | "downlink range" | "timing range">;
}

/** Radius that a site needs so that its sectors cover their area. */
export function radiusNeeded(areaKm2: number, sectors: number): number {
  return Math.sqrt((areaKm2 * sectors) / siteArea(1, sectors));
}

/** Path loss of a scheme in one environment turned into distance, up to where the model's validity ends. */
interface Propagation {
  readonly farthestKm: number;
  /** Loss at the farthest distance. */
  readonly farthestDb: number;
  range(lossDb: number): number;
}

type Numbers = readonly [frequencyMHz: number, baseHeightM: number, mobileHeightM: number];

/** Farthest distance of each model's source, km. */
const FARTHEST_KM = { hata: 20, cost231: 20, uma: 5, umi: 5, rma: 10, rmaHidden: 5 } as const;

/** The path-loss model of the scheme, in the environment of the cell. */
function propagation(scheme: Scheme, environment: string): Propagation {
  const model = scheme.text("pathLossModel", "").toLowerCase();
  // A cell may carry an environment of its own where the models differ in what they call theirs.
  const place = environment !== "" ? environment : scheme.text("environment", "");
  const numbers = (): Numbers => [
    scheme.required("frequencyMHz"),
    scheme.required("baseHeightM"),
    scheme.number("mobileHeightM", 1.5),
  ];
  const sight = scheme.text("sight", "nlos");
  const of = (
    farthestKm: number,
    loss: (distanceKm: number, ...rest: [...Numbers, string]) => number,
    ranged: (lossDb: number, ...rest: [...Numbers, string]) => number,
    word: string,
  ): Propagation => {
    const facts = numbers();
    const [frequency, base, mobile] = facts;
    return {
      farthestKm,
      farthestDb: loss(farthestKm, ...facts, word),
      range: (db) => ranged(db, frequency, base, mobile, word),
    };
  };
  switch (model) {
    case "hata":
      return of(FARTHEST_KM.hata, pathLoss.hata, range.hata, place || "urban");
    case "cost231":
      return of(FARTHEST_KM.cost231, pathLoss.cost231, range.cost231, place === "metropolitan" ? place : "city");
    case "uma":
      return of(FARTHEST_KM.uma, pathLoss.uma, range.uma, sight);
    case "umi":
      return of(FARTHEST_KM.umi, pathLoss.umi, range.umi, sight);
    case "rma":
      return of(sight === "los" ? FARTHEST_KM.rma : FARTHEST_KM.rmaHidden, pathLoss.rma, range.rma, sight);
    case "freespace": {
      const frequency = scheme.required("frequencyMHz");
      return {
        farthestKm: Infinity,
        farthestDb: Infinity,
        range: (db) => range.freeSpace(db, frequency),
      };
    }
    default: {
      const reference = scheme.required("referenceLossDb");
      const exponent = scheme.number("pathLossExponent", 3.5);
      return {
        farthestKm: Infinity,
        farthestDb: Infinity,
        range: (db) => range.logDistance(db, reference, exponent),
      };
    }
  }
}

interface Receiver {
  readonly bandwidthMHz: number;
  readonly requiredSinrDb: number;
  readonly sensitivityDbm: number;
}

type Way = "up" | "down";

/** One direction of the link; what no load changes is worked out once. */
class Direction {
  readonly by: "uplink range" | "downlink range";
  /** Undefined where the table gives no power, so that the direction is not judged. */
  readonly eirpDbm: number | undefined;
  private readonly noiseFigureDb: number;
  private readonly codeNeeds = new Map<ServiceRow, number>();
  private kbpsPerBlock = NaN;
  private latest: Receiver | undefined;

  constructor(
    private readonly scheme: Scheme,
    readonly way: Way,
  ) {
    const baseFigure = scheme.number("noiseFigureDb", 5);
    this.by = way === "up" ? "uplink range" : "downlink range";
    this.eirpDbm = scheme.optional(way === "up" ? "uplinkEirpDbm" : "eirpDbm");
    this.noiseFigureDb = way === "up" ? baseFigure : scheme.number("mobileNoiseFigureDb", baseFigure);
  }

  /** Bandwidth of the noise and SINR required there, for the most demanding service; undefined where none asks for anything. */
  receiver(load: OfferedLoad): Receiver | undefined {
    const { scheme } = this;
    if (scheme.access === "CDMA") return this.codeReceiver(load);
    if (scheme.access !== "OFDMA") {
      this.latest ??= this.heard(scheme.required("channelSpacingKHz") / KHZ_PER_MHZ, scheme.required("requiredSinrDb"));
      return this.latest;
    }
    if (this.way === "up") return this.blockReceiver(load);
    this.latest ??= this.heard(
      (scheme.required("blocks") * scheme.required("blockBandwidthKHz")) / KHZ_PER_MHZ,
      scheme.required("requiredSinrDb"),
    );
    return this.latest;
  }

  /** A mobile sends on as few blocks as its rate needs, so that its power is not spread. */
  private blockReceiver(load: OfferedLoad): Receiver {
    const { scheme } = this;
    const requiredSinrDb = scheme.required("requiredSinrDb");
    const block = scheme.required("blockBandwidthKHz");
    if (Number.isNaN(this.kbpsPerBlock)) this.kbpsPerBlock = block * Math.log2(1 + 10 ** (requiredSinrDb / 10));
    let kbps = 0;
    for (const { service } of load.lost) if (service.upKbps > kbps) kbps = service.upKbps;
    for (const { service } of load.waiting) if (service.upKbps > kbps) kbps = service.upKbps;
    if (load.dataService && load.dataService.upKbps > kbps) kbps = load.dataService.upKbps;
    const blocks = Math.min(scheme.required("blocks"), Math.max(1, Math.ceil(kbps / this.kbpsPerBlock)));
    return this.heard((blocks * block) / KHZ_PER_MHZ, requiredSinrDb);
  }

  private codeReceiver(load: OfferedLoad): Receiver | undefined {
    const bandwidthMHz = this.scheme.required("chipRateMcps");
    const services = streams(load);
    const requiredSinrDb =
      services.length > 0
        ? Math.max(...services.map((service) => this.codeNeed(service, bandwidthMHz)))
        : this.scheme.optional("requiredSinrDb");
    return requiredSinrDb === undefined ? undefined : this.heard(bandwidthMHz, requiredSinrDb);
  }

  private codeNeed(service: ServiceRow, bandwidthMHz: number): number {
    let need = this.codeNeeds.get(service);
    if (need === undefined) {
      const down = Number.isNaN(service.downlinkEbN0Db) ? service.ebN0Db : service.downlinkEbN0Db;
      need =
        this.way === "up"
          ? sinr.fromEbN0(service.ebN0Db, bandwidthMHz, service.upKbps)
          : sinr.fromEbN0(down, bandwidthMHz, service.downKbps);
      this.codeNeeds.set(service, need);
    }
    return need;
  }

  /** Cells of a scheme mostly carry the same services, so the latest receiver is nearly always the one asked for. */
  private heard(bandwidthMHz: number, requiredSinrDb: number): Receiver {
    const { latest } = this;
    if (latest?.bandwidthMHz === bandwidthMHz && latest.requiredSinrDb === requiredSinrDb) return latest;
    const sensitivityDbm = link.sensitivity(noise.floor(bandwidthMHz, this.noiseFigureDb), requiredSinrDb);
    this.latest = { bandwidthMHz, requiredSinrDb, sensitivityDbm };
    return this.latest;
  }
}

function streams(load: OfferedLoad): ServiceRow[] {
  const services = [...load.lost, ...load.waiting].map(({ service }) => service);
  return load.dataService ? [...services, load.dataService] : services;
}

function shadowMargin(scheme: Scheme): number {
  const deviationDb = scheme.number("shadowingDb", 0);
  const areaProbability = scheme.optional("areaProbability");
  if (deviationDb === 0 || areaProbability === undefined) return 0;
  const edge = shadowing.edge(areaProbability, deviationDb, scheme.number("pathLossExponent", 3.5));
  return shadowing.margin(edge, deviationDb);
}

/**
 * Reach of one direction; undefined below the nearest distance of the model, and its farthest distance where the budget
 * would go beyond: a model is not stretched.
 */
function reachOf(lossDb: number, model: Propagation): number | undefined {
  if (lossDb >= model.farthestDb) return model.farthestKm;
  try {
    return model.range(lossDb);
  } catch (thrown) {
    if (thrown instanceof NoAnswerError) return undefined;
    throw thrown;
  }
}

/**
 * Coverage of one scheme, the parts that no load changes computed once per environment.
 */
export class Coverage {
  private readonly known = new Map<string, Propagation>();
  private readonly shadowDb: number;
  private readonly timingKm: number;
  private readonly directions: readonly Direction[];
  private readonly gainsDb: number;
  private readonly lossesDb: number;
  /** Signal to interference at the edge with every neighbour at full load; NaN until asked for. */
  private edgeSirDb = NaN;

  constructor(private readonly scheme: Scheme) {
    this.shadowDb = shadowMargin(scheme);
    const guard = scheme.optional("guardTimeUs");
    this.timingKm =
      guard === undefined
        ? Infinity
        : timing.radius(guard, scheme.number("advanceSteps", 0), scheme.number("stepUs", 0));
    this.directions = [new Direction(scheme, "up"), new Direction(scheme, "down")];
    this.gainsDb = scheme.number("gainsDb", 0);
    this.lossesDb = scheme.number("lossesDb", 0);
  }

  private ranged(environment: string): Propagation {
    let found = this.known.get(environment);
    if (!found) {
      found = propagation(this.scheme, environment);
      this.known.set(environment, found);
    }
    return found;
  }

  /** Margin for interference at the load; undefined where no power would help. */
  private interferenceMargin(assessment: Assessment, requiredSinrDb: number): number | undefined {
    const { scheme } = this;
    if (scheme.access === "CDMA") {
      const load = assessment.uplinkLoad ?? 1;
      return load < 1 ? margin.fromLoad(load) : undefined;
    }
    if (Number.isNaN(this.edgeSirDb)) {
      const exponent = scheme.optional("pathLossExponent");
      const cluster = scheme.optional("clusterSize");
      if (exponent === undefined || cluster === undefined) return 0;
      this.edgeSirDb = reuse(cluster, exponent, scheme.number("sectors", 1), 1, undefined, "corner");
    }
    try {
      return margin.neighbourLoad(requiredSinrDb, this.edgeSirDb, assessment.utilisation);
    } catch (thrown) {
      if (thrown instanceof NoAnswerError) return undefined;
      throw thrown;
    }
  }

  /** Undefined where there is nothing to reach: no link budget, or no service that asks for anything. */
  reach(environment: string, load: OfferedLoad, assessment: Assessment): Reach | undefined {
    let radiusKm: number | undefined = this.timingKm;
    let by: Reach["by"] = "timing range";
    let interferenceMarginDb = 0;
    let judged = this.timingKm !== Infinity;
    let tightestDb = Infinity;
    for (const direction of this.directions) {
      if (direction.eirpDbm === undefined) continue;
      const receiver = direction.receiver(load);
      if (!receiver) continue;
      judged = true;
      const interference = this.interferenceMargin(assessment, receiver.requiredSinrDb);
      if (interference === undefined) return { radiusKm: undefined, interferenceMarginDb, by: direction.by };
      // CDMA's noise rise is that of the base station's receiver; its downlink is a matter of load.
      const rise = this.scheme.access === "CDMA" && direction.way === "down" ? 0 : interference;
      interferenceMarginDb = Math.max(interferenceMarginDb, rise);
      const lossDb = link.maxLoss(
        direction.eirpDbm,
        receiver.sensitivityDbm,
        this.gainsDb,
        this.lossesDb,
        this.shadowDb + rise,
      );
      // The range grows with the loss that is borne, so that a direction that bears more never ends the reach.
      if (lossDb >= tightestDb) continue;
      tightestDb = lossDb;
      const reached = reachOf(lossDb, this.ranged(environment));
      if (reached === undefined || radiusKm === undefined || reached < radiusKm) {
        radiusKm = reached;
        by = direction.by;
        if (reached === undefined) break;
      }
    }
    if (!judged) return undefined;
    return { radiusKm, interferenceMarginDb, by };
  }
}
