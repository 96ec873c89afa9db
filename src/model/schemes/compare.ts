import * as erlangB from "../blocking/erlang-b";
import { count, positiveCount, requireIn, share, shareBelowOne, type Domain } from "../domain";
import { DomainError, NoAnswerError } from "../errors";
import { bitRate, chipRate, ebN0, otherCellRatio } from "../interference/domains";
import * as cdma from "./cdma";
import * as fdma from "./fdma";
import * as ofdma from "./ofdma";
import { bandwidth, carrierSpacing, carriersPerSector, guardBand } from "./spectrum";
import { subscribersFor, trafficPerUser } from "./subscribers";
import * as tdma from "./tdma";

/** What a comparison reads: names as in the single functions. */
export const COMPARED_FACTS: Readonly<Record<string, Domain>> = {
  bandwidthMHz: bandwidth,
  bitRateKbps: bitRate,
  trafficPerUserE: trafficPerUser,
  blocking: erlangB.blockingTarget,
  activity: cdma.activityFactor,
  ebN0Db: ebN0,
  downlinkEbN0Db: ebN0,
  guardKHz: guardBand,
  controlChannels: count,
  clusterSize: positiveCount,
  sectors: positiveCount,
  channelSpacingKHz: carrierSpacing,
  carrierSpacingKHz: carrierSpacing,
  slotsPerCarrier: tdma.slotCount,
  chipRateMcps: chipRate,
  codeCarrierSpacingKHz: carrierSpacing,
  otherCellRatio,
  orthogonality: share,
  loadLimit: cdma.loadLimitShare,
  powerControlErrorDb: cdma.powerControlError,
  blockBandwidthKHz: ofdma.blockBandwidth,
  blocks: ofdma.blockCount,
  spectralEfficiency: ofdma.spectralEfficiencyRange,
  overheadShare: shareBelowOne,
};

export const COMPARISON_COLUMNS = ["scheme", "channels", "erlangs", "subscribers", "limitedBy"] as const;
export type ComparisonRow = readonly [
  scheme: string,
  channels: number | "",
  erlangs: number | "",
  subscribers: number | "",
  limitedBy: string,
];

/** Spacing of 5 MHz for 3.84 Mchip/s, where the table names none. */
const SPACING_PER_CHIP_RATE = 5000 / 3.84;

const NEEDED = {
  FDMA: ["channelSpacingKHz", "clusterSize"],
  TDMA: ["carrierSpacingKHz", "slotsPerCarrier", "clusterSize"],
  CDMA: ["chipRateMcps", "bitRateKbps", "ebN0Db", "activity", "otherCellRatio"],
  OFDMA: ["blockBandwidthKHz", "bitRateKbps", "spectralEfficiency"],
} as const;
type SchemeName = keyof typeof NEEDED;
const NEEDED_BY_ALL = ["bandwidthMHz", "trafficPerUserE", "blocking"] as const;

/** Users of a sector at once, the traffic that they may be offered, and what stops more. */
interface Capacity {
  readonly channels: number;
  readonly erlangs: number;
  readonly limitedBy: string;
}

/**
 * The same spectrum, service, blocking, guard and control by every scheme.
 *
 * @param facts numbers by the names of COMPARED_FACTS
 * @returns a row for each of FDMA, TDMA, CDMA and OFDMA; one whose facts are missing names them in its last cell
 */
export function compare(facts: ReadonlyMap<string, number>): ComparisonRow[] {
  for (const [name, value] of facts) {
    const allowed = COMPARED_FACTS[name];
    if (allowed) requireIn(allowed, name, value);
  }
  return (Object.keys(NEEDED) as SchemeName[]).map((scheme) => row(scheme, facts));
}

function row(scheme: SchemeName, facts: ReadonlyMap<string, number>): ComparisonRow {
  const missing: string[] = [...NEEDED_BY_ALL, ...NEEDED[scheme]].filter((name) => !facts.has(name));
  if (scheme === "CDMA" && facts.has("orthogonality") !== facts.has("downlinkEbN0Db")) {
    missing.push(facts.has("orthogonality") ? "downlinkEbN0Db" : "orthogonality");
  }
  if (missing.length > 0) return [scheme, "", "", "", `missing: ${missing.join(", ")}`];
  try {
    const { channels, erlangs, limitedBy } = CAPACITY[scheme](new Facts(facts));
    const subscribers = subscribersFor(erlangs, facts.get("trafficPerUserE")!);
    return [scheme, channels, erlangs, subscribers, channels > 0 ? limitedBy : "no channel is left"];
  } catch (thrown) {
    if (thrown instanceof NoAnswerError) return [scheme, "", "", "", thrown.message];
    throw thrown;
  }
}

/** The facts, with the rules that all schemes share. */
class Facts {
  readonly bandwidthMHz: number;
  readonly sectors: number;
  readonly guardKHz: number;
  readonly control: number;

  constructor(private readonly facts: ReadonlyMap<string, number>) {
    this.bandwidthMHz = this.of("bandwidthMHz");
    this.sectors = this.or("sectors", 1);
    this.guardKHz = this.or("guardKHz", 0);
    this.control = this.or("controlChannels", 0);
  }

  of(name: string): number {
    return this.facts.get(name)!;
  }

  or(name: string, fallback: number): number {
    return this.facts.get(name) ?? fallback;
  }

  has(name: string): boolean {
    return this.facts.has(name);
  }

  /** A group of channels where blocked calls are lost. */
  group(channels: number, limitedBy: string): Capacity {
    return { channels, erlangs: erlangB.traffic(channels, this.of("blocking")), limitedBy };
  }

  /** Whole carriers in the spectrum where every sector uses all of them. */
  everywhere(spacingKHz: number): number {
    return carriersPerSector(this.bandwidthMHz, spacingKHz, 1, 1, this.guardKHz);
  }
}

const CAPACITY: Readonly<Record<SchemeName, (facts: Facts) => Capacity>> = {
  FDMA: (f) => {
    const shared = [f.of("clusterSize"), f.sectors, f.guardKHz, f.control] as const;
    return f.group(fdma.channels(f.bandwidthMHz, f.of("channelSpacingKHz"), ...shared), "frequency channels");
  },
  TDMA: (f) => {
    const shared = [f.of("clusterSize"), f.sectors, f.guardKHz, f.control] as const;
    const carrier = [f.of("carrierSpacingKHz"), f.of("slotsPerCarrier")] as const;
    return f.group(tdma.channels(f.bandwidthMHz, ...carrier, ...shared), "time slots");
  },
  CDMA: codeDivision,
  OFDMA: (f) => {
    const width = f.of("blockBandwidthKHz");
    const fitting = f.everywhere(width);
    const blocks = f.or("blocks", fitting);
    if (blocks > fitting) throw new DomainError("blocks", blocks, `at most the ${fitting} blocks of the same spectrum`);
    if (blocks === 0) return f.group(0, "resource blocks");
    const bearers = ofdma.channels(
      blocks,
      width,
      f.of("bitRateKbps"),
      f.of("spectralEfficiency"),
      f.or("overheadShare", 0.25),
    );
    return f.group(Math.max(0, bearers - f.control), "resource blocks");
  },
};

function codeDivision(f: Facts): Capacity {
  const chips = f.of("chipRateMcps");
  const i = f.of("otherCellRatio");
  const activity = f.of("activity");
  const limit = f.or("loadLimit", 0.75);
  const carriers = f.everywhere(f.or("codeCarrierSpacingKHz", chips * SPACING_PER_CHIP_RATE));
  const link = [chips, f.of("bitRateKbps")] as const;
  const up = limit * cdma.pole(...link, f.of("ebN0Db"), activity, i, f.or("powerControlErrorDb", 0));
  const down = f.has("orthogonality")
    ? cdma.downlinkChannels(
        ...link,
        f.of("downlinkEbN0Db"),
        activity,
        i,
        f.of("orthogonality"),
        limit,
        f.or("overheadShare", 0.2),
      )
    : Infinity;
  // Neighbours' unused load helps the uplink only, so the downlink is a plain group.
  if (down < up) return f.group(Math.max(0, carriers * down - f.control), "downlink power");
  const users = Math.max(0, carriers * up - f.control);
  return {
    channels: Math.floor(users),
    erlangs: cdma.softTraffic(users, i, f.of("blocking")),
    limitedBy: "uplink load",
  };
}
