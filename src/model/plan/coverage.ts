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
import type { Limit } from "./records";
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

/** Path loss of a scheme in one environment, both ways, and where the model's validity ends. */
interface Propagation {
  readonly farthestKm: number;
  range(lossDb: number): number;
  loss(distanceKm: number): number;
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
    return { farthestKm, range: (db) => ranged(db, ...facts, word), loss: (km) => loss(km, ...facts, word) };
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
        range: (db) => range.freeSpace(db, frequency),
        loss: (km) => pathLoss.freeSpace(km, frequency),
      };
    }
    default: {
      const reference = scheme.required("referenceLossDb");
      const exponent = scheme.number("pathLossExponent", 3.5);
      return {
        farthestKm: Infinity,
        range: (db) => range.logDistance(db, reference, exponent),
        loss: (km) => pathLoss.logDistance(km, reference, exponent),
      };
    }
  }
}

interface Receiver {
  readonly bandwidthMHz: number;
  readonly requiredSinrDb: number;
}

/** Bandwidth of the noise and SINR required there, for the most demanding service of a direction. */
function receiver(scheme: Scheme, load: OfferedLoad, direction: "up" | "down"): Receiver | undefined {
  if (scheme.access === "CDMA") return codeReceiver(scheme, load, direction);
  const requiredSinrDb = scheme.required("requiredSinrDb");
  if (scheme.access !== "OFDMA") {
    return { bandwidthMHz: scheme.required("channelSpacingKHz") / KHZ_PER_MHZ, requiredSinrDb };
  }
  const block = scheme.required("blockBandwidthKHz");
  if (direction === "down") return { bandwidthMHz: (scheme.required("blocks") * block) / KHZ_PER_MHZ, requiredSinrDb };
  // A mobile sends on as few blocks as its rate needs, so that its power is not spread.
  const kbps = Math.max(0, ...streams(load).map(({ upKbps }) => (Number.isNaN(upKbps) ? 0 : upKbps)));
  const perBlock = block * Math.log2(1 + 10 ** (requiredSinrDb / 10));
  const blocks = Math.min(scheme.required("blocks"), Math.max(1, Math.ceil(kbps / perBlock)));
  return { bandwidthMHz: (blocks * block) / KHZ_PER_MHZ, requiredSinrDb };
}

function streams(load: OfferedLoad): OfferedLoad["lost"][number]["service"][] {
  const services = [...load.lost, ...load.waiting].map(({ service }) => service);
  return load.dataService ? [...services, load.dataService] : services;
}

/** Undefined where no service asks for anything. */
function codeReceiver(scheme: Scheme, load: OfferedLoad, direction: "up" | "down"): Receiver | undefined {
  const bandwidthMHz = scheme.required("chipRateMcps");
  const needs = streams(load).map((service) => {
    const kbps = direction === "up" ? service.upKbps : service.downKbps;
    const down = Number.isNaN(service.downlinkEbN0Db) ? service.ebN0Db : service.downlinkEbN0Db;
    return sinr.fromEbN0(direction === "up" ? service.ebN0Db : down, bandwidthMHz, kbps);
  });
  const requiredSinrDb = needs.length > 0 ? Math.max(...needs) : scheme.optional("requiredSinrDb");
  return requiredSinrDb === undefined ? undefined : { bandwidthMHz, requiredSinrDb };
}

function shadowMargin(scheme: Scheme): number {
  const deviationDb = scheme.number("shadowingDb", 0);
  const areaProbability = scheme.optional("areaProbability");
  if (deviationDb === 0 || areaProbability === undefined) return 0;
  const edge = shadowing.edge(areaProbability, deviationDb, scheme.number("pathLossExponent", 3.5));
  return shadowing.margin(edge, deviationDb);
}

/** Margin for interference at the load; undefined where no power would help. */
function interferenceMargin(scheme: Scheme, assessment: Assessment, requiredSinrDb: number): number | undefined {
  if (scheme.access === "CDMA") {
    const load = assessment.uplinkLoad ?? 1;
    return load < 1 ? margin.fromLoad(load) : undefined;
  }
  const exponent = scheme.optional("pathLossExponent");
  const cluster = scheme.optional("clusterSize");
  if (exponent === undefined || cluster === undefined) return 0;
  const edgeSirDb = reuse(cluster, exponent, scheme.number("sectors", 1), 1, undefined, "corner");
  try {
    return margin.neighbourLoad(requiredSinrDb, edgeSirDb, assessment.utilisation);
  } catch (thrown) {
    if (thrown instanceof NoAnswerError) return undefined;
    throw thrown;
  }
}

/**
 * Reach of one direction; undefined below the nearest distance of the model, and its farthest distance where the budget
 * would go beyond: a model is not stretched.
 */
function reachOf(lossDb: number, model: Propagation): number | undefined {
  if (Number.isFinite(model.farthestKm) && lossDb >= model.loss(model.farthestKm)) return model.farthestKm;
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

  constructor(private readonly scheme: Scheme) {
    this.shadowDb = shadowMargin(scheme);
    const guard = scheme.optional("guardTimeUs");
    this.timingKm =
      guard === undefined
        ? Infinity
        : timing.radius(guard, scheme.number("advanceSteps", 0), scheme.number("stepUs", 0));
  }

  private ranged(environment: string): Propagation {
    let found = this.known.get(environment);
    if (!found) {
      found = propagation(this.scheme, environment);
      this.known.set(environment, found);
    }
    return found;
  }

  /** Undefined where there is nothing to reach: no link budget, or no service that asks for anything. */
  reach(environment: string, load: OfferedLoad, assessment: Assessment): Reach | undefined {
    const { scheme } = this;
    const directions: {
      by: "uplink range" | "downlink range";
      eirp: number | undefined;
      at: "up" | "down";
      noiseFigure: number;
    }[] = [
      {
        by: "uplink range",
        at: "up",
        eirp: scheme.optional("uplinkEirpDbm"),
        noiseFigure: scheme.number("noiseFigureDb", 5),
      },
      {
        by: "downlink range",
        at: "down",
        eirp: scheme.optional("eirpDbm"),
        noiseFigure: scheme.number("mobileNoiseFigureDb", scheme.number("noiseFigureDb", 5)),
      },
    ];
    let radiusKm: number | undefined = this.timingKm;
    let by: Reach["by"] = "timing range";
    let interferenceMarginDb = 0;
    let judged = this.timingKm !== Infinity;
    for (const { by: direction, at, eirp, noiseFigure } of directions) {
      if (eirp === undefined) continue;
      const wanted = receiver(scheme, load, at);
      if (!wanted) continue;
      const { bandwidthMHz, requiredSinrDb } = wanted;
      judged = true;
      const interference = interferenceMargin(scheme, assessment, requiredSinrDb);
      if (interference === undefined) return { radiusKm: undefined, interferenceMarginDb, by: direction };
      // CDMA's noise rise is that of the base station's receiver; its downlink is a matter of load.
      const rise = scheme.access === "CDMA" && at === "down" ? 0 : interference;
      interferenceMarginDb = Math.max(interferenceMarginDb, rise);
      const sensitivity = link.sensitivity(noise.floor(bandwidthMHz, noiseFigure), requiredSinrDb);
      const lossDb = link.maxLoss(
        eirp,
        sensitivity,
        scheme.number("gainsDb", 0),
        scheme.number("lossesDb", 0),
        this.shadowDb + rise,
      );
      const reached = reachOf(lossDb, this.ranged(environment));
      if (reached === undefined || radiusKm === undefined || reached < radiusKm) {
        radiusKm = reached;
        by = direction;
        if (reached === undefined) break;
      }
    }
    if (!judged) return undefined;
    return { radiusKm, interferenceMarginDb, by };
  }
}
