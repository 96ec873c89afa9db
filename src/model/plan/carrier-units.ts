/** How carriers of FDMA, TDMA and OFDMA turn into units. */
import { DomainError } from "../errors";
import { wholeCovering, wholeWithin } from "../numerics/whole";
import { cellCapacity } from "../radio/cell-efficiency";
import type { CallStream, OfferedLoad } from "./offered";
import type { Scheme } from "./scheme";
import type { Units } from "./unit-pool";

const KBPS_PER_MBPS = 1000;

function rateOf({ service }: CallStream, direction: "down" | "up"): number {
  const kbps = direction === "down" ? service.downKbps : service.upKbps;
  return Number.isNaN(kbps) ? 0 : kbps;
}

/**
 * Channels or slots of carriers: a call takes one, or its slotsPerCall; control takes some of the cell's.
 *
 * @param scheme FDMA or TDMA
 */
export function channelUnits(scheme: Scheme): Units {
  const slots = scheme.access === "TDMA" ? scheme.required("slotsPerCarrier") : 1;
  const control = scheme.number("controlChannels", scheme.access === "TDMA" ? 1 : 0);
  const mbps = scheme.number("bitRateKbps", 0) / KBPS_PER_MBPS;
  return {
    of: (carriers) => Math.max(0, carriers * slots - control),
    width: ({ service }) => service.slotsPerCall,
    waitingWidth: 1,
    downMbps: mbps,
    upMbps: mbps,
    carriersFor: (units) => (units === 0 ? 0 : Math.ceil((units + control) / slots)),
  };
}

/** Mean efficiency of each direction, bit/s/Hz: stated, or the harmonic mean over the served part of the cell. */
function efficiency(scheme: Scheme, direction: "down" | "up"): number {
  const stated = scheme.optional("spectralEfficiency");
  if (stated !== undefined) return direction === "up" ? scheme.number("uplinkSpectralEfficiency", stated) : stated;
  const [harmonic] = cellCapacity(
    scheme.number("pathLossExponent", 3.5),
    scheme.number("clusterSize", 1),
    scheme.number("sectors", 1),
    scheme.number("load", 1),
    scheme.optional("edgeSnrDb"),
    scheme.number("shadowingDb", 0),
    scheme.number("attenuation", 0.6),
    scheme.number("minimumDb", -10),
    scheme.number("maximumBpsHz", 4.4),
  );
  return direction === "up" ? scheme.number("uplinkSpectralEfficiency", harmonic) : harmonic;
}

/**
 * User data rate of one OFDMA carrier in a direction, Mbit/s: blocks bw eff (1 - overhead) over the cluster; unpaired
 * spectrum by its time share.
 *
 * @param scheme OFDMA
 * @param direction down or up
 */
function carrierMbps(scheme: Scheme, direction: "down" | "up"): number {
  const share = scheme.optional("downlinkTimeShare");
  const time = share === undefined ? 1 : direction === "down" ? share : 1 - share;
  const kHz = scheme.required("blocks") * scheme.required("blockBandwidthKHz");
  const usable = (1 - scheme.number("overheadShare", 0.25)) / scheme.number("clusterSize", 1);
  return (kHz * efficiency(scheme, direction) * usable * time) / KBPS_PER_MBPS;
}

/** User data rate of one carrier, kbit/s. */
export interface CarrierKbps {
  readonly down: number;
  readonly up: number;
}

/**
 * Both rates of one OFDMA carrier, which no load changes.
 *
 * @param scheme OFDMA
 */
export function carrierKbps(scheme: Scheme): CarrierKbps {
  return { down: carrierMbps(scheme, "down") * KBPS_PER_MBPS, up: carrierMbps(scheme, "up") * KBPS_PER_MBPS };
}

/**
 * Units of an OFDMA cell: bearers of the narrowest call, in the direction that fills first; a wider call takes as many as
 * its rate needs. Without calls the unit is the whole carrier's kbit/s.
 *
 * @param scheme OFDMA
 * @param load offered load, whose rates give the unit
 * @param capacity rates of one carrier
 */
export function bearerUnits(scheme: Scheme, load: OfferedLoad, capacity: CarrierKbps): Units {
  const streams = load.waiting.length === 0 ? load.lost : [...load.lost, ...load.waiting];
  for (const stream of streams) {
    if (rateOf(stream, "down") + rateOf(stream, "up") > 0) continue;
    const name = stream.service.service;
    throw new DomainError(
      `Services downKbps of ${name}`,
      undefined,
      `the rate of a call, which ${scheme.name} (OFDMA) needs`,
    );
  }
  let upE = 0;
  let downE = 0;
  for (const stream of streams) {
    upE += stream.trafficE * rateOf(stream, "up");
    downE += stream.trafficE * rateOf(stream, "down");
  }
  const tight = upE / capacity.up > downE / capacity.down ? "up" : "down";
  let narrowest = Infinity;
  for (const stream of streams) {
    const kbps = rateOf(stream, tight);
    if (kbps > 0 && kbps < narrowest) narrowest = kbps;
  }
  const unitKbps = narrowest < Infinity ? narrowest : capacity[tight] / UNITS_WITHOUT_CALLS;
  const perCarrier = capacity[tight] / unitKbps;
  const width = (stream: CallStream): number => Math.max(1, wholeCovering(rateOf(stream, tight) / unitKbps));
  return {
    of: (carriers) => wholeWithin(carriers * perCarrier),
    width,
    waitingWidth: load.waiting.reduce((most, stream) => Math.max(most, width(stream)), 1),
    downMbps: capacity.down / perCarrier / KBPS_PER_MBPS,
    upMbps: capacity.up / perCarrier / KBPS_PER_MBPS,
    carriersFor: (units) => wholeCovering(units / perCarrier),
  };
}

/** A cell with data alone is counted in hundredths of a carrier. */
const UNITS_WITHOUT_CALLS = 100;
