/** How each column of a plan's tables is shown: what it means to the person who fills it in, its format, its usual range. */

export interface ColumnLook {
  readonly help: string;
  readonly format?: string;
  readonly width?: number;
  /** Allowed range of an input; the prompt states it. */
  readonly range?: readonly [low: number, high: number];
  readonly words?: readonly string[];
}

const SHARE: Pick<ColumnLook, "format" | "range"> = { format: "0.0 %", range: [0, 1] };
const YEAR: Pick<ColumnLook, "format" | "range"> = { format: "0", range: [1900, 2200] };
const DB = "0.0";

export const COLUMNS: Readonly<Record<string, ColumnLook>> = {
  area: { help: "Name of the area, as in the sheet Cells.", width: 22 },
  year: { help: "Year; blank for all years where the heading says so.", width: 8, ...YEAR },
  users: { help: "Users in the area in that year.", format: "#,##0", range: [0, 1e9], width: 11 },
  errorPerYear: {
    help: "Relative error of the forecast a year ahead, usually 3 % to 15 %; for percentile plans.",
    ...SHARE,
  },
  service: { help: "Name of the service, the same in all sheets.", width: 18 },
  kind: { help: "call, group call, data or message.", words: ["call", "group call", "data", "message"], width: 12 },
  userShare: { help: "Share of the users that use the service.", format: "0.0 %", range: [0, 1000] },
  callsPerHour: { help: "Calls of one user in the busy hour, usually 0.3 to 3.", format: "0.00", range: [0, 1e6] },
  holdingTimeS: {
    help: "Mean holding time in seconds, hang time included; usually 10 to 180.",
    format: "0",
    range: [0, 1e6],
  },
  activity: { help: "Share of a call in which the user sends, usually 0.4 to 1.", format: "0.00", range: [0, 1] },
  sitesPerCall: { help: "Mean number of sites that one group call occupies.", format: "0.0", range: [0, 1e6] },
  slotsPerCall: { help: "Channels or slots that a call takes on FDMA and TDMA.", format: "0", range: [1, 1000] },
  downMBPerDay: { help: "Megabytes a user receives in a day.", format: "0.0", range: [0, 1e9] },
  upMBPerDay: { help: "Megabytes a user sends in a day.", format: "0.0", range: [0, 1e9] },
  busyHourShare: { help: "Share of the day in the busy hour, usually 6 % to 15 %.", ...SHARE },
  messagesPerHour: { help: "Messages of one user in the busy hour.", format: "0.0", range: [0, 1e9] },
  messageBytes: { help: "Mean size of a message in bytes.", format: "0", range: [0, 1e9] },
  downKbps: { help: "Bearer rate down in kbit/s.", format: "0.0", range: [0, 1e9] },
  upKbps: { help: "Bearer rate up in kbit/s.", format: "0.0", range: [0, 1e9] },
  ebN0Db: { help: "Eb/N0 required on the uplink in dB (CDMA).", format: DB, range: [-100, 100] },
  downlinkEbN0Db: { help: "Eb/N0 required on the downlink in dB (CDMA).", format: DB, range: [-100, 100] },
  targetBlocking: { help: "Largest share of calls that are lost, usually 0.5 % to 5 %.", ...SHARE },
  targetWaitS: { help: "Longest wait in seconds for calls and messages that queue.", format: "0.0", range: [0, 1e6] },
  targetWaitShare: { help: "Share that waits no longer than targetWaitS, usually 90 % to 99 %.", ...SHARE },
  targetMbps: { help: "Mean rate in Mbit/s that a transfer must reach.", format: "0.00", range: [0, 1e6] },
  coincidence: {
    help: "Share of the service's own peak that falls into the network's busy hour.",
    format: "0.00",
    range: [0, 1],
  },
  scheme: { help: "Name of the scheme, as in the heading of the sheet Radio.", width: 20 },
  share: {
    help: "Share of the service that this scheme carries; shares of a service and year add up to 100 %.",
    ...SHARE,
  },
  cell: { help: "Name of the cell: one sector of one site.", width: 9 },
  site: { help: "Name of the site.", width: 9 },
  shareOfArea: { help: "Share of the area's users in this cell; cells of an area add up to 100 %.", ...SHARE },
  areaKm2: { help: "Area that the cell must cover in km2.", format: "0.0", range: [0, 1e7] },
  environment: { help: "Environment of the path-loss model; for Hata urban, large city, suburban or open.", width: 13 },
  carriers: { help: "Carriers installed.", format: "0", range: [0, 10_000] },
  fromYear: { help: "First year; blank for always.", ...YEAR },
  toYear: { help: "Last year; blank for ever.", ...YEAR },
  step: { help: "Name of the step.", width: 22 },
  fromScheme: { help: "Scheme that the step applies to.", width: 20 },
  toScheme: { help: "Scheme that takes over, for a change of scheme.", width: 20 },
  carriersAdded: { help: "Carriers added to the cell.", format: "0", range: [0, 1000] },
  sectorsAdded: { help: "Sectors added by splitting the cell.", format: "0", range: [0, 5] },
  sitesAdded: { help: "Sites added in the cell's area.", format: "0", range: [0, 100] },
  needsSpectrumMHz: { help: "Spectrum that the step needs in MHz, one direction.", format: "0.0", range: [0, 1e6] },
  requires: { help: "Step that must come before.", width: 20 },
  maxTimes: { help: "How often the step may be taken in one cell.", format: "0", range: [1, 1000] },
  cost: { help: "Cost of the step, in the currency of the plan.", format: "#,##0", range: [0, 1e12] },
  costPerYear: { help: "Running cost a year.", format: "#,##0", range: [0, 1e12] },
  leadTimeMonths: { help: "Months from order to service.", format: "0", range: [0, 600] },
  // Columns of results.
  trafficE: { help: "Offered traffic in erlang.", format: "0.00" },
  callTrafficE: { help: "Offered traffic of calls that are lost when blocked, erlang.", format: "0.00" },
  waitingTrafficE: { help: "Offered traffic of calls and messages that wait, erlang.", format: "0.00" },
  downMbps: { help: "Busy-hour data down, Mbit/s.", format: "0.000" },
  upMbps: { help: "Busy-hour data up, Mbit/s.", format: "0.000" },
  channelsRequired: { help: "Channels (FDMA), slots (TDMA), users (CDMA) or bearers (OFDMA) needed.", format: "0" },
  carriersRequired: { help: "Carriers needed.", format: "0" },
  carriersInstalled: { help: "Carriers installed.", format: "0" },
  blocking: { help: "Blocking of the worst service with what is installed.", format: "0.00 %" },
  worstService: { help: "Service farthest from its target.", width: 15 },
  waitS: { help: "Mean wait in seconds.", format: "0.00" },
  throughputMbps: { help: "Mean rate of a transfer, Mbit/s.", format: "0.00" },
  uplinkLoad: { help: "Uplink load of a carrier (CDMA).", format: "0.0 %" },
  downlinkLoad: { help: "Downlink load of a carrier (CDMA).", format: "0.0 %" },
  interferenceMarginDb: { help: "Interference margin at the load, dB.", format: "0.0" },
  radiusKm: { help: "Reach at the load, km.", format: "0.00" },
  radiusNeededKm: { help: "Reach that the cell's area needs, km.", format: "0.00" },
  coverageMet: { help: "Whether the reach suffices.", width: 10 },
  capacityMet: { help: "Whether every promise is kept with what is installed.", width: 10 },
  limitedBy: { help: "What is missing first.", width: 14 },
  spareShare: { help: "Share of the installed channels that is not needed.", format: "0 %" },
  maximumCarriers: { help: "Carriers that the spectrum allows in the cell.", format: "0" },
  orderBy: { help: "Year and month to order by.", width: 11 },
  inServiceBy: { help: "Year and month of service.", width: 12 },
  cells: { help: "Cells.", format: "0" },
  cellsShort: { help: "Cells with too little capacity in some scheme.", format: "0" },
  cellsUncovered: { help: "Cells with too little reach in some scheme.", format: "0" },
};

const DEFAULT_WIDTH = 13;

export function lookOf(column: string): ColumnLook {
  return COLUMNS[column] ?? { help: "" };
}

export function widthOf(column: string): number {
  return lookOf(column).width ?? Math.max(DEFAULT_WIDTH, Math.min(22, column.length + 2));
}
