/** The tables of a plan as columns: names, domains and defaults, each said once. */
import { count, decibel, domain, nonNegative, positive, positiveCount, probability, share } from "../model/domain";
import { SERVICE_KINDS } from "../model/plan/records";
import type { Column, Schema } from "./table";

const year = domain(1900, 2200, "a whole year from 1900 to 2200", { whole: true });

const numeric = (allowed: Column & { kind: "number" }): Column => allowed;
const required = (allowed: ReturnType<typeof domain>): Column => numeric({ kind: "number", domain: allowed });
const optional = (allowed: ReturnType<typeof domain>, fallback?: number): Column =>
  numeric({ kind: "number", domain: allowed, optional: true, ...(fallback === undefined ? {} : { fallback }) });
const text: Column = { kind: "text" };
const optionalText: Column = { kind: "text", optional: true };

/** An Eb/N0 of exactly 0 dB is taken for an empty cell, which some hosts pass as 0. */
const requiredEbN0: Column = { kind: "number", domain: decibel, optional: true, zeroIsBlank: true };

export const DEMAND = {
  area: text,
  year: required(year),
  users: required(nonNegative),
  errorPerYear: optional(nonNegative),
} satisfies Schema;

export const SERVICES = {
  service: text,
  kind: { kind: "choice", words: SERVICE_KINDS },
  year: optional(year),
  userShare: required(nonNegative),
  callsPerHour: optional(nonNegative, 0),
  holdingTimeS: optional(nonNegative, 0),
  activity: optional(domain(0, 1, "a share above 0, up to 1", { openLow: true }), 1),
  sitesPerCall: optional(positive, 1),
  slotsPerCall: optional(positiveCount, 1),
  downMBPerDay: optional(nonNegative, 0),
  upMBPerDay: optional(nonNegative, 0),
  busyHourShare: optional(share, 0),
  messagesPerHour: optional(nonNegative, 0),
  messageBytes: optional(nonNegative, 0),
  downKbps: optional(positive),
  upKbps: optional(positive),
  ebN0Db: requiredEbN0,
  downlinkEbN0Db: requiredEbN0,
  targetBlocking: optional(probability),
  targetWaitS: optional(nonNegative),
  targetWaitShare: optional(probability),
  targetMbps: optional(nonNegative, 0),
  coincidence: optional(domain(0, 1, "a share above 0, up to 1", { openLow: true }), 1),
} satisfies Schema;

export const ROUTING = {
  service: text,
  scheme: text,
  year: optional(year),
  share: required(share),
} satisfies Schema;

export const CELLS = {
  cell: text,
  site: text,
  area: text,
  shareOfArea: required(share),
  areaKm2: required(positive),
  environment: optionalText,
} satisfies Schema;

export const INSTALLED = {
  cell: text,
  scheme: text,
  carriers: required(count),
  fromYear: optional(year),
  toYear: optional(year),
} satisfies Schema;

export const LADDER = {
  step: text,
  fromScheme: text,
  toScheme: optionalText,
  carriersAdded: optional(count, 0),
  sectorsAdded: optional(count, 0),
  sitesAdded: optional(count, 0),
  needsSpectrumMHz: optional(nonNegative, 0),
  requires: optionalText,
  maxTimes: optional(positiveCount),
  cost: required(nonNegative),
  costPerYear: optional(nonNegative, 0),
  leadTimeMonths: required(nonNegative),
} satisfies Schema;

/** Columns of a plan that other functions read back. */
export const PLAN = {
  cell: text,
  year: required(year),
  scheme: text,
  area: optionalText,
  users: optional(nonNegative, 0),
  callTrafficE: optional(nonNegative, 0),
  waitingTrafficE: optional(nonNegative, 0),
  downMbps: optional(nonNegative, 0),
  upMbps: optional(nonNegative, 0),
  carriersRequired: optional(nonNegative, 0),
  carriersInstalled: optional(nonNegative, 0),
  channelsRequired: optional(nonNegative, 0),
  radiusKm: optional(nonNegative),
  radiusNeededKm: optional(nonNegative, 0),
  blocking: optional(share),
  maximumCarriers: optional(positive),
} satisfies Schema;

const whole = domain(1, 100_000, "a whole number from 1 to 100,000", { whole: true });
const belowOne = domain(0, 1, "a share from 0 to below 1", { openHigh: true });
const insideOne = domain(0, 1, "a share above 0 and below 1", { openLow: true, openHigh: true });

/** Parameters of the radio table that are numbers; a row of another name is the planner's own, or a misspelling. */
export const RADIO_NUMBERS: Readonly<Record<string, ReturnType<typeof domain>>> = {
  bandwidthMHz: positive,
  channelSpacingKHz: positive,
  slotsPerCarrier: whole,
  blocks: positive,
  blockBandwidthKHz: positive,
  chipRateMcps: positive,
  bitRateKbps: positive,
  controlChannels: count,
  clusterSize: whole,
  sectors: domain(1, 6, "1, 2, 3 or 6 sectors", { whole: true }),
  guardKHz: nonNegative,
  overheadShare: belowOne,
  downlinkTimeShare: insideOne,
  spectralEfficiency: positive,
  uplinkSpectralEfficiency: positive,
  pathLossExponent: positive,
  load: share,
  edgeSnrDb: decibel,
  attenuation: positive,
  minimumDb: decibel,
  maximumBpsHz: positive,
  otherCellRatio: nonNegative,
  orthogonality: share,
  loadLimit: insideOne,
  efficiency: share,
  powerControlErrorDb: nonNegative,
  frequencyMHz: positive,
  baseHeightM: positive,
  mobileHeightM: positive,
  referenceLossDb: positive,
  eirpDbm: decibel,
  uplinkEirpDbm: decibel,
  noiseFigureDb: nonNegative,
  mobileNoiseFigureDb: nonNegative,
  gainsDb: decibel,
  lossesDb: decibel,
  shadowingDb: nonNegative,
  areaProbability: probability,
  requiredSinrDb: decibel,
  guardTimeUs: nonNegative,
  advanceSteps: nonNegative,
  stepUs: nonNegative,
  maximumCarriers: whole,
};

/** Parameters of which 0 is rarely meant though it is allowed: an empty cell passed as 0 must not count. */
export const RADIO_ZERO_IS_BLANK: ReadonlySet<string> = new Set([
  "edgeSnrDb",
  "eirpDbm",
  "uplinkEirpDbm",
  "guardTimeUs",
  "mobileNoiseFigureDb",
]);

export const RADIO_TEXTS: readonly string[] = ["access", "scheme", "pathLossModel", "environment", "sight"];
