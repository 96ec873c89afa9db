/** The plan: every cell, year and scheme with what it needs, what it has, and what its users see. PLAN.TABLE. */
import { DomainError, NoAnswerError } from "../errors";
import { smallestWhole } from "../numerics/root";
import { carriersPerSector } from "../schemes/spectrum";
import * as forecast from "../traffic/forecast";
import type { Capacity } from "./assessment";
import { bearerUnits, channelUnits } from "./carrier-units";
import { Coverage, radiusNeeded, type Reach } from "./coverage";
import { demandOf, ServiceYears, type ServiceDemand } from "./demand";
import { LoadPool } from "./load-pool";
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
}

function plannedScheme(name: string, column: RadioColumn): PlannedScheme {
  const scheme = new Scheme(name, column);
  return {
    scheme,
    coverage: new Coverage(scheme),
    sectors: scheme.number("sectors", 1),
    maximumCarriers: maximum(scheme),
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

function capacityOf(scheme: Scheme, load: OfferedLoad): Capacity {
  if (scheme.access === "CDMA") return new LoadPool(scheme, load);
  const units = scheme.access === "OFDMA" ? bearerUnits(scheme, load) : channelUnits(scheme);
  return new UnitPool(units, load, waitingGroup(load.waiting, scheme));
}

/** Smallest number of carriers with which every promise is kept. */
function carriersRequired(capacity: Capacity, load: OfferedLoad): number {
  if (load.lost.length + load.waiting.length === 0 && load.downMbps + load.upMbps === 0) return 0;
  const kept = (carriers: number): boolean => capacity.assess(carriers).limit === "nothing";
  const found = smallestWhole(kept, 0, MOST_CARRIERS, capacity.guess);
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
    return rows.reduce(
      (sum, { carriers, fromYear, toYear }) =>
        (Number.isNaN(fromYear) || year >= fromYear) && (Number.isNaN(toYear) || year <= toYear) ? sum + carriers : sum,
      0,
    );
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

/** Services of one area and year with their demand and routes: computed once, shared by the area's cells. */
interface RoutedDemand {
  readonly service: ServiceRow;
  readonly demand: ServiceDemand;
  readonly scheme: string;
  readonly share: number;
}

/**
 * The plan table.
 *
 * @param inputs the six tables
 * @param year one year, or undefined for all of the forecast
 * @param percentile of the forecast; 0.5 is the forecast itself
 */
export function planTable(inputs: PlanInputs, year?: number, percentile = MEDIAN): PlanRow[] {
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
  const rows: PlanRow[] = [];
  for (const forecastRow of demand) {
    if (year !== undefined && forecastRow.year !== year) continue;
    const users = usersAt(forecastRow, forecastRow.year - firstYear, percentile);
    const routed = services.in(forecastRow.year).flatMap((service): RoutedDemand[] => {
      const found = demandOf(service, users);
      return routing
        .of(service.service, forecastRow.year)
        .filter(({ share }) => share > 0)
        .map(({ scheme, share }) => ({ service, demand: found, scheme, share }));
    });
    const weight = routed.reduce((sum, { service, share }) => sum + service.userShare * share, 0);
    const cellsHere = cellsOf.get(forecastRow.area);
    if (!cellsHere) throw new DomainError("Demand area", forecastRow.area, "an area of the Cells table");
    for (const cell of cellsHere) {
      for (const [name, planned] of schemes) {
        const mine = routed.filter(({ scheme }) => scheme === name);
        const carriers = installed.in(cell.cell, name, forecastRow.year);
        if (mine.length === 0 && carriers === 0) continue;
        const part = mine.reduce((sum, { service, share }) => sum + service.userShare * share, 0);
        rows.push({
          ...planRow(cell, forecastRow.year, planned, mine, carriers),
          users: weight > 0 ? (users * cell.shareOfArea * part) / weight : 0,
        });
      }
    }
    for (const { scheme } of routed) {
      if (!schemes.has(scheme)) throw new DomainError("Routing scheme", scheme, "a scheme of the Radio table");
    }
  }
  return rows;
}

function planRow(
  cell: CellRow,
  year: number,
  { scheme, coverage, sectors, maximumCarriers }: PlannedScheme,
  routed: readonly RoutedDemand[],
  carriersInstalled: number,
): Omit<PlanRow, "users"> {
  const load = emptyLoad();
  for (const { service, demand, share } of routed) addLoad(load, service, demand, share * cell.shareOfArea, scheme);
  const capacity = capacityOf(scheme, load);
  const required = carriersRequired(capacity, load);
  const state = capacity.assess(carriersInstalled);
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
