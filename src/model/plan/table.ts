/** The plan: every cell, year and scheme with what it needs, what it has, and what its users see. PLAN.TABLE. */
import { DomainError, NoAnswerError } from "../errors";
import { smallestWhole } from "../numerics/root";
import { carriersPerSector } from "../schemes/spectrum";
import * as forecast from "../traffic/forecast";
import type { Assessment, Capacity } from "./assessment";
import { bearerUnits, carrierKbps, channelUnits } from "./carrier-units";
import { Coverage, radiusNeeded, type Reach } from "./coverage";
import { demandOf, ServiceYears, type ServiceDemand } from "./demand";
import { LoadPool, ServiceLoads } from "./load-pool";
import { addLoad, emptyLoad, totalTraffic, type OfferedLoad } from "./offered";
import type { CellRow, DemandRow, InstalledRow, Limit, PlanRow, RadioColumn, RoutingRow, ServiceRow } from "./records";
import { Routing } from "./routing";
import { Scheme } from "./scheme";
import { UnitPool } from "./unit-pool";
import { waitingGroup } from "./waiting";

/** The tables that a plan is computed from. */
export interface PlanInputs {
  readonly cells: readonly CellRow[];
  readonly demand: readonly DemandRow[];
  readonly services: readonly ServiceRow[];
  readonly routing: readonly RoutingRow[];
  /** Parameters by scheme, in the order of the table. */
  readonly radio: ReadonlyMap<string, RadioColumn>;
  readonly installed: readonly InstalledRow[];
}

const MEDIAN = 0.5;
/** More carriers than this in one cell are a mistake in the inputs. */
const MOST_CARRIERS = 10_000;
const SHARE_ROUNDING = 1e-6;

/** Facts of a scheme that hold for the whole plan. */
interface PlannedScheme {
  readonly scheme: Scheme;
  readonly coverage: Coverage;
  readonly sectors: number;
  readonly maximumCarriers: number;
  readonly capacityOf: (load: OfferedLoad) => Capacity;
}

function plannedScheme(name: string, column: RadioColumn): PlannedScheme {
  const scheme = new Scheme(name, column);
  return {
    scheme,
    coverage: new Coverage(scheme),
    sectors: scheme.number("sectors", 1),
    maximumCarriers: maximum(scheme),
    capacityOf: capacities(scheme),
  };
}

/** Carriers that the spectrum allows in one cell: stated, or what the cluster leaves of the bandwidth. */
function maximum(scheme: Scheme): number {
  const stated = scheme.optional("maximumCarriers");
  if (stated !== undefined) return stated;
  const bandwidthMHz = scheme.optional("bandwidthMHz");
  const spacingKHz = scheme.optional("channelSpacingKHz");
  if (bandwidthMHz === undefined || spacingKHz === undefined || scheme.access === "OFDMA") return Infinity;
  const sectors = scheme.number("sectors", 1);
  return carriersPerSector(
    bandwidthMHz,
    spacingKHz,
    scheme.number("clusterSize", 1),
    sectors,
    scheme.number("guardKHz", 0),
  );
}

/** Capacity under a load; what no load changes is worked out once, for the first cell that carries the scheme. */
function capacities(scheme: Scheme): (load: OfferedLoad) => Capacity {
  if (scheme.access === "CDMA") {
    const loads = new ServiceLoads(scheme);
    return (load) => new LoadPool(scheme, load, loads);
  }
  if (scheme.access === "OFDMA") {
    let carrier: ReturnType<typeof carrierKbps> | undefined;
    return (load) => {
      carrier ??= carrierKbps(scheme);
      return new UnitPool(bearerUnits(scheme, load, carrier), load, waitingGroup(load.waiting, scheme));
    };
  }
  let units: ReturnType<typeof channelUnits> | undefined;
  return (load) => {
    units ??= channelUnits(scheme);
    return new UnitPool(units, load, waitingGroup(load.waiting, scheme));
  };
}

/** Smallest number of carriers with which every promise is kept. */
function carriersRequired(assess: (carriers: number) => Assessment, guess: number, load: OfferedLoad): number {
  if (load.lost.length + load.waiting.length === 0 && load.downMbps + load.upMbps === 0) return 0;
  const found = smallestWhole((carriers) => assess(carriers).limit === "nothing", 0, MOST_CARRIERS, guess);
  if (found === undefined) {
    throw new NoAnswerError(
      `More than ${MOST_CARRIERS} carriers would be needed in one cell; check demand and radio facts.`,
    );
  }
  return found;
}

/** Carriers installed by cell and scheme, year by year. */
class InstalledCarriers {
  private readonly rows = new Map<string, Map<string, InstalledRow[]>>();

  constructor(installed: readonly InstalledRow[]) {
    for (const row of installed) {
      const schemes = this.rows.get(row.cell) ?? new Map<string, InstalledRow[]>();
      schemes.set(row.scheme, [...(schemes.get(row.scheme) ?? []), row]);
      this.rows.set(row.cell, schemes);
    }
  }

  in(cell: string, scheme: string, year: number): number {
    const rows = this.rows.get(cell)?.get(scheme);
    if (!rows) return 0;
    let sum = 0;
    for (const { carriers, fromYear, toYear } of rows) {
      if ((Number.isNaN(fromYear) || year >= fromYear) && (Number.isNaN(toYear) || year <= toYear)) sum += carriers;
    }
    return sum;
  }
}

function usersAt({ users, errorPerYear }: DemandRow, years: number, percentile: number): number {
  if (percentile === MEDIAN) return users;
  return forecast.band(users, Number.isNaN(errorPerYear) ? 0 : errorPerYear, years, percentile);
}

function checkShares(cells: readonly CellRow[]): void {
  const sums = new Map<string, number>();
  for (const { area, shareOfArea } of cells) sums.set(area, (sums.get(area) ?? 0) + shareOfArea);
  for (const [area, sum] of sums) {
    if (Math.abs(sum - 1) > SHARE_ROUNDING) {
      throw new DomainError(`Cells shareOfArea of ${area}`, sum, "shares that add up to 1");
    }
  }
}

function checkInstalled({ cells, installed, radio }: PlanInputs): void {
  const known = new Set(cells.map(({ cell }) => cell));
  for (const { cell, scheme } of installed) {
    if (!known.has(cell)) throw new DomainError("Installed cell", cell, "a cell of the Cells table");
    if (!radio.has(scheme)) throw new DomainError("Installed scheme", scheme, "a scheme of the Radio table");
  }
}

/** One service on one scheme in a year, with its demand in the area at hand. */
interface RoutedDemand {
  readonly service: ServiceRow;
  readonly scheme: string;
  readonly share: number;
  readonly demand: ServiceDemand;
}

/** The services that a scheme carries in an area and year: shared by the area's cells. */
interface SchemeDemand {
  readonly planned: PlannedScheme;
  readonly routed: readonly RoutedDemand[];
  /** Share of the area's users that these services stand for. */
  readonly part: number;
}

/** Users by services and routes, as a weight; the sum over schemes gives the whole. */
function weightOf(routed: readonly RoutedDemand[]): number {
  return routed.reduce((sum, { service, share }) => sum + service.userShare * share, 0);
}

/**
 * The rows of the plan, one after the other.
 *
 * @param inputs the six tables
 * @param year one year, or undefined for all of the forecast
 * @param percentile of the forecast; 0.5 is the forecast itself
 */
export function* planRows(inputs: PlanInputs, year?: number, percentile = MEDIAN): Generator<PlanRow, void> {
  const { cells, demand } = inputs;
  checkShares(cells);
  checkInstalled(inputs);
  const services = new ServiceYears(inputs.services);
  const routing = new Routing(inputs.routing);
  const installed = new InstalledCarriers(inputs.installed);
  const schemes = new Map([...inputs.radio].map(([name, column]) => [name, plannedScheme(name, column)]));
  const cellsOf = new Map<string, CellRow[]>();
  for (const cell of cells) {
    const same = cellsOf.get(cell.area);
    if (same) same.push(cell);
    else cellsOf.set(cell.area, [cell]);
  }
  const firstYear = demand.reduce((first, row) => Math.min(first, row.year), Infinity);
  for (const forecastRow of demand) {
    if (year !== undefined && forecastRow.year !== year) continue;
    const users = usersAt(forecastRow, forecastRow.year - firstYear, percentile);
    const routed: RoutedDemand[] = [];
    for (const service of services.in(forecastRow.year)) {
      const found = demandOf(service, users);
      for (const { scheme, share } of routing.of(service.service, forecastRow.year)) {
        if (share > 0) routed.push({ service, scheme, share, demand: found });
      }
    }
    const weight = weightOf(routed);
    const cellsHere = cellsOf.get(forecastRow.area);
    if (!cellsHere) throw new DomainError("Demand area", forecastRow.area, "an area of the Cells table");
    const carried = Array.from(schemes, ([name, planned]): SchemeDemand => {
      const mine = routed.filter(({ scheme }) => scheme === name);
      return { planned, routed: mine, part: weight > 0 ? weightOf(mine) : 0 };
    });
    for (const cell of cellsHere) {
      for (const { planned, routed: mine, part } of carried) {
        const carriers = installed.in(cell.cell, planned.scheme.name, forecastRow.year);
        if (mine.length === 0 && carriers === 0) continue;
        const share = weight > 0 ? (users * cell.shareOfArea * part) / weight : 0;
        yield planRow(cell, forecastRow.year, planned, mine, carriers, share);
      }
    }
    for (const { scheme } of routed) {
      if (!schemes.has(scheme)) throw new DomainError("Routing scheme", scheme, "a scheme of the Radio table");
    }
  }
}

/**
 * The plan table, all rows at once.
 *
 * @param inputs the six tables
 * @param year one year, or undefined for all of the forecast
 * @param percentile of the forecast; 0.5 is the forecast itself
 */
export function planTable(inputs: PlanInputs, year?: number, percentile = MEDIAN): PlanRow[] {
  return [...planRows(inputs, year, percentile)];
}

function planRow(
  cell: CellRow,
  year: number,
  { scheme, coverage, sectors, maximumCarriers, capacityOf }: PlannedScheme,
  routed: readonly RoutedDemand[],
  carriersInstalled: number,
  users: number,
): PlanRow {
  const load = emptyLoad();
  for (const { service, demand, share } of routed) addLoad(load, service, demand, share * cell.shareOfArea, scheme);
  const capacity = capacityOf(load);
  const state = capacity.assess(carriersInstalled);
  // What is installed often is what is looked for, or one beside it.
  const assess = (carriers: number): Assessment => (carriers === carriersInstalled ? state : capacity.assess(carriers));
  const required = carriersRequired(assess, capacity.guess, load);
  const capacityMet = required <= carriersInstalled;
  const needed = radiusNeeded(cell.areaKm2, sectors);
  const reach = coverage.reach(cell.environment, load, state);
  const coverageMet = reach === undefined || (reach.radiusKm !== undefined && reach.radiusKm >= needed);
  const channels = capacity.channels(carriersInstalled);
  return {
    cell: cell.cell,
    site: cell.site,
    area: cell.area,
    year,
    scheme: scheme.name,
    callTrafficE: totalTraffic(load.lost),
    waitingTrafficE: totalTraffic(load.waiting),
    downMbps: load.downMbps,
    upMbps: load.upMbps,
    channelsRequired: capacity.channelsRequired,
    carriersRequired: required,
    carriersInstalled,
    blocking: state.blocking,
    worstService: state.worstService,
    waitS: state.waitS,
    throughputMbps: state.throughputMbps,
    uplinkLoad: state.uplinkLoad,
    downlinkLoad: state.downlinkLoad,
    interferenceMarginDb: reach?.interferenceMarginDb ?? 0,
    radiusKm: reach?.radiusKm,
    radiusNeededKm: needed,
    coverageMet,
    capacityMet,
    limitedBy: limitedBy(capacityMet, required > maximumCarriers, state.limit, coverageMet, reach),
    spareShare: channels > 0 ? 1 - capacity.channelsRequired / channels : undefined,
    maximumCarriers: Number.isFinite(maximumCarriers) ? maximumCarriers : undefined,
    users,
  };
}

/** Spectrum comes first, since no order of equipment mends it; then capacity; then reach. */
function limitedBy(
  capacityMet: boolean,
  noSpectrum: boolean,
  limit: Limit,
  coverageMet: boolean,
  reach?: Reach,
): Limit {
  if (!capacityMet) return noSpectrum ? "spectrum" : limit;
  return coverageMet || !reach ? "nothing" : reach.by;
}
