/** Totals of a plan per year, area or scheme. PLAN.SUMMARY. */
export const GROUPINGS = ["year", "area", "scheme"] as const;
export type Grouping = (typeof GROUPINGS)[number];

/** What a summary needs of a plan row; NaN where a column does not apply. */
export interface SummedRow {
  readonly key: string | number;
  readonly cell: string;
  readonly users: number;
  readonly callTrafficE: number;
  readonly waitingTrafficE: number;
  readonly downMbps: number;
  readonly upMbps: number;
  readonly carriersRequired: number;
  readonly carriersInstalled: number;
  readonly blocking: number;
  readonly capacityMet: boolean;
  readonly coverageMet: boolean;
}

export interface SummaryRow {
  readonly key: string | number;
  readonly users: number;
  readonly callTrafficE: number;
  readonly waitingTrafficE: number;
  readonly downMbps: number;
  readonly upMbps: number;
  readonly cells: number;
  readonly cellsShort: number;
  readonly cellsUncovered: number;
  readonly carriersRequired: number;
  readonly carriersInstalled: number;
  /** Weighted by call traffic, as the calls see it; NaN without calls. */
  readonly blocking: number;
}

interface Totals {
  users: number;
  callTrafficE: number;
  waitingTrafficE: number;
  downMbps: number;
  upMbps: number;
  carriersRequired: number;
  carriersInstalled: number;
  blocked: number;
  latest: string | undefined;
  readonly cells: Set<string>;
  readonly short: Set<string>;
  readonly uncovered: Set<string>;
}

function empty(): Totals {
  return {
    users: 0,
    callTrafficE: 0,
    waitingTrafficE: 0,
    downMbps: 0,
    upMbps: 0,
    carriersRequired: 0,
    carriersInstalled: 0,
    blocked: 0,
    latest: undefined,
    cells: new Set(),
    short: new Set(),
    uncovered: new Set(),
  };
}

/**
 * Sums the rows of equal key, in the order in which the keys first appear.
 *
 * A cell counts once however many schemes it has, and is short where any of them is. Grouped by area or scheme, years add
 * up too: users and erlangs are then sums over the years.
 *
 * @param rows rows of a plan
 */
export function summarise(rows: Iterable<SummedRow>): SummaryRow[] {
  const groups = new Map<string | number, Totals>();
  for (const row of rows) {
    let totals = groups.get(row.key);
    if (!totals) {
      totals = empty();
      groups.set(row.key, totals);
    }
    totals.users += row.users;
    totals.callTrafficE += row.callTrafficE;
    totals.waitingTrafficE += row.waitingTrafficE;
    totals.downMbps += row.downMbps;
    totals.upMbps += row.upMbps;
    totals.carriersRequired += row.carriersRequired;
    totals.carriersInstalled += row.carriersInstalled;
    if (!Number.isNaN(row.blocking)) totals.blocked += row.blocking * row.callTrafficE;
    // The rows of a cell mostly follow each other.
    if (row.cell !== totals.latest) {
      totals.cells.add(row.cell);
      totals.latest = row.cell;
    }
    if (!row.capacityMet) totals.short.add(row.cell);
    if (!row.coverageMet) totals.uncovered.add(row.cell);
  }
  return [...groups].map(([key, totals]) => ({
    key,
    users: totals.users,
    callTrafficE: totals.callTrafficE,
    waitingTrafficE: totals.waitingTrafficE,
    downMbps: totals.downMbps,
    upMbps: totals.upMbps,
    cells: totals.cells.size,
    cellsShort: totals.short.size,
    cellsUncovered: totals.uncovered.size,
    carriersRequired: totals.carriersRequired,
    carriersInstalled: totals.carriersInstalled,
    blocking: totals.callTrafficE > 0 ? totals.blocked / totals.callTrafficE : NaN,
  }));
}
