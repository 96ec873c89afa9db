/** What a forecast of users means as traffic: PLAN.DEMAND, and the demand of each service that the plan table shares out. */
import { DomainError } from "../errors";
import * as traffic from "../traffic/traffic";
import type { DemandRow, ServiceRow } from "./records";

/** Busy-hour demand of one service in one area and year. */
export interface ServiceDemand {
  /** Calls in erlang: a group call counts once for every site that it occupies. */
  readonly trafficE: number;
  readonly downMbps: number;
  readonly upMbps: number;
}

const SECONDS_PER_HOUR = 3600;
const BITS_PER_MEGABIT = 1e6;
const BITS_PER_BYTE = 8;

/**
 * Demand of one service by its users, in the network's busy hour.
 *
 * call: users calls h / 3600. group call: the same times sitesPerCall. data: users MB 8 busyHourShare / 3600 each way.
 * message: users messages bytes 8 / 3600 both ways, since a message goes up once and down once. All times coincidence.
 *
 * @param service the service
 * @param users users of the area, of which userShare use the service
 */
export function demandOf(service: ServiceRow, users: number): ServiceDemand {
  const active = users * service.userShare * service.coincidence;
  switch (service.kind) {
    case "call":
      return { trafficE: traffic.calls(active, service.callsPerHour, service.holdingTimeS), downMbps: 0, upMbps: 0 };
    case "group call":
      return {
        trafficE: traffic.group(active, service.callsPerHour, service.holdingTimeS, service.sitesPerCall, 1),
        downMbps: 0,
        upMbps: 0,
      };
    case "data":
      return {
        trafficE: 0,
        downMbps: traffic.data(active, service.downMBPerDay, service.busyHourShare),
        upMbps: traffic.data(active, service.upMBPerDay, service.busyHourShare),
      };
    case "message": {
      const mbps =
        (active * service.messagesPerHour * service.messageBytes * BITS_PER_BYTE) /
        (SECONDS_PER_HOUR * BITS_PER_MEGABIT);
      return { trafficE: 0, downMbps: mbps, upMbps: mbps };
    }
  }
}

/** The services of a year: a row for the year itself goes before the row for all years. */
export class ServiceYears {
  private readonly byYear = new Map<number, ServiceRow[]>();
  private readonly names: string[] = [];
  private readonly rows = new Map<string, Map<number, ServiceRow>>();

  constructor(services: readonly ServiceRow[]) {
    for (const row of services) {
      let years = this.rows.get(row.service);
      if (!years) {
        years = new Map();
        this.rows.set(row.service, years);
        this.names.push(row.service);
      }
      if (years.has(row.year)) {
        const which = Number.isNaN(row.year) ? "for all years" : `for ${row.year}`;
        throw new DomainError("service", row.service, `one row a service ${which}`);
      }
      years.set(row.year, row);
    }
  }

  in(year: number): readonly ServiceRow[] {
    let found = this.byYear.get(year);
    if (!found) {
      found = this.names.flatMap((name) => {
        const years = this.rows.get(name)!;
        const row = years.get(year) ?? years.get(NaN);
        return row ? [row] : [];
      });
      this.byYear.set(year, found);
    }
    return found;
  }
}

/** One row of PLAN.DEMAND. */
export interface DemandResult extends ServiceDemand {
  readonly area: string;
  readonly year: number;
  readonly service: string;
}

/**
 * Demand of every service in every area and year.
 *
 * @param demand forecast of users
 * @param services what users do
 */
export function demandTable(demand: readonly DemandRow[], services: readonly ServiceRow[]): DemandResult[] {
  const years = new ServiceYears(services);
  const rows: DemandResult[] = [];
  for (const { area, year, users } of demand) {
    for (const service of years.in(year)) {
      const { trafficE, downMbps, upMbps } = demandOf(service, users);
      rows.push({ area, year, service: service.service, trafficE, downMbps, upMbps });
    }
  }
  return rows;
}
