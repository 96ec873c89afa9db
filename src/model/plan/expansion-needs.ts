/** What a cell still needs in a year once steps of the ladder are taken: the arithmetic behind the expansion. */
import * as erlangB from "../blocking/erlang-b";

/** What the expansion needs of one row of the plan. */
export interface NeedRow {
  readonly cell: string;
  readonly year: number;
  readonly scheme: string;
  readonly users: number;
  readonly callTrafficE: number;
  readonly waitingTrafficE: number;
  /** Carriers that the spectrum allows; NaN where nothing limits them. */
  readonly maximumCarriers: number;
  readonly channelsRequired: number;
  readonly carriersRequired: number;
  readonly carriersInstalled: number;
  readonly radiusKm: number;
  readonly radiusNeededKm: number;
  readonly coverageMet: boolean;
}

/**
 * Carriers that each part needs when a cell's load is divided evenly: at least the even share, and enough channels for the
 * divided calls at the blocking that the undivided group had (a smaller group needs more than its share). An estimate from the
 * plan's own columns; the divided cell is to be recomputed as a cell of its own before it is ordered.
 *
 * @param row the undivided cell
 * @param parts sectors or sites that share the load, 1 or more
 */
export function dividedCarriers(row: NeedRow, parts: number): number {
  const { channelsRequired, carriersRequired } = row;
  const trafficE = row.callTrafficE + row.waitingTrafficE;
  if (parts <= 1 || carriersRequired === 0) return carriersRequired;
  const even = Math.ceil(carriersRequired / parts);
  if (trafficE === 0 || channelsRequired === 0) return even;
  const blocking = erlangB.blocking(trafficE, channelsRequired);
  if (!(blocking > 1e-12 && blocking < 1)) return even;
  const channels = erlangB.channels(trafficE / parts, blocking);
  return Math.min(carriersRequired, Math.max(even, Math.ceil((channels * carriersRequired) / channelsRequired)));
}

/**
 * Carriers of the scheme that takes over the users of another: its need grows with its users.
 *
 * @returns undefined where it serves nobody yet, so that nothing can be said
 */
export function carriersAfterMove(target: NeedRow, from: NeedRow): number | undefined {
  if (from.users === 0) return target.carriersRequired;
  if (target.users === 0) return undefined;
  return Math.ceil((target.carriersRequired * (target.users + from.users)) / target.users - 1e-9);
}

/** Whether the reach suffices once sites share the area: each needs the radius of its part. */
export function coveredWith(row: NeedRow, sitesAdded: number): boolean {
  if (row.coverageMet) return true;
  return !Number.isNaN(row.radiusKm) && row.radiusKm >= row.radiusNeededKm / Math.sqrt(1 + sitesAdded);
}
