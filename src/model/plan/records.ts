/** The rows of a plan's tables as the model takes them; NaN stands for an optional number that is left blank. */

export interface DemandRow {
  readonly area: string;
  readonly year: number;
  readonly users: number;
  /** Relative error of the forecast a year ahead, for percentile plans. */
  readonly errorPerYear: number;
}

export const SERVICE_KINDS = ["call", "group call", "data", "message"] as const;
export type ServiceKind = (typeof SERVICE_KINDS)[number];

export interface ServiceRow {
  readonly service: string;
  readonly kind: ServiceKind;
  /** NaN for all years that have no row of their own. */
  readonly year: number;
  readonly userShare: number;
  readonly callsPerHour: number;
  readonly holdingTimeS: number;
  readonly activity: number;
  readonly sitesPerCall: number;
  /** Channels or slots that a call takes on FDMA and TDMA. */
  readonly slotsPerCall: number;
  readonly downMBPerDay: number;
  readonly upMBPerDay: number;
  readonly busyHourShare: number;
  readonly messagesPerHour: number;
  readonly messageBytes: number;
  readonly downKbps: number;
  readonly upKbps: number;
  readonly ebN0Db: number;
  readonly downlinkEbN0Db: number;
  readonly targetBlocking: number;
  readonly targetWaitS: number;
  /** Share of calls or messages that wait no longer than targetWaitS. */
  readonly targetWaitShare: number;
  readonly targetMbps: number;
  readonly coincidence: number;
}

export interface RoutingRow {
  readonly service: string;
  readonly scheme: string;
  readonly year: number;
  readonly share: number;
}

export interface CellRow {
  readonly cell: string;
  readonly site: string;
  readonly area: string;
  readonly shareOfArea: number;
  readonly areaKm2: number;
  readonly environment: string;
}

export interface InstalledRow {
  readonly cell: string;
  readonly scheme: string;
  readonly carriers: number;
  readonly fromYear: number;
  readonly toYear: number;
}

/** Parameters of one scheme by the names of the functions' parameters; texts for the path-loss model and its environment. */
export type RadioColumn = ReadonlyMap<string, number | string>;

export const LIMITS = [
  "nothing",
  "blocking",
  "waiting",
  "throughput",
  "uplink load",
  "downlink load",
  "uplink range",
  "downlink range",
  "timing range",
  "spectrum",
] as const;
export type Limit = (typeof LIMITS)[number];

/** One cell, year and scheme of the plan; undefined where a column does not apply to the scheme. */
export interface PlanRow {
  readonly cell: string;
  readonly site: string;
  readonly area: string;
  readonly year: number;
  readonly scheme: string;
  readonly callTrafficE: number;
  readonly waitingTrafficE: number;
  readonly downMbps: number;
  readonly upMbps: number;
  readonly channelsRequired: number;
  readonly carriersRequired: number;
  readonly carriersInstalled: number;
  readonly blocking: number | undefined;
  readonly worstService: string | undefined;
  readonly waitS: number | undefined;
  readonly throughputMbps: number | undefined;
  readonly uplinkLoad: number | undefined;
  readonly downlinkLoad: number | undefined;
  readonly interferenceMarginDb: number;
  readonly radiusKm: number | undefined;
  readonly radiusNeededKm: number;
  readonly coverageMet: boolean;
  readonly capacityMet: boolean;
  readonly limitedBy: Limit;
  readonly spareShare: number | undefined;
  /** Carriers that the spectrum allows in the cell; undefined where nothing limits them. */
  readonly maximumCarriers: number | undefined;
  /** Users of the cell that this row's share of the services stands for; they add up over the schemes. */
  readonly users: number;
}
