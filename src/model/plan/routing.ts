/** Which scheme carries which share of a service in a year. */
import { DomainError } from "../errors";
import type { RoutingRow } from "./records";

export interface Route {
  readonly scheme: string;
  readonly share: number;
}

const ROUNDING = 1e-9;

/** Shares by service and year; a row of the year itself goes before rows for all years. */
export class Routing {
  private readonly always = new Map<string, Route[]>();
  private readonly inYear = new Map<string, Map<number, Route[]>>();
  private readonly checked = new Set<string>();

  constructor(rows: readonly RoutingRow[]) {
    for (const { service, scheme, year, share } of rows) {
      const route = { scheme, share };
      if (Number.isNaN(year)) this.always.set(service, [...(this.always.get(service) ?? []), route]);
      else {
        const years = this.inYear.get(service) ?? new Map<number, Route[]>();
        years.set(year, [...(years.get(year) ?? []), route]);
        this.inYear.set(service, years);
      }
    }
  }

  /**
   * Routes of a service in a year.
   *
   * @throws DomainError where they are missing or their shares do not add up to 1
   */
  of(service: string, year: number): readonly Route[] {
    const routes = this.inYear.get(service)?.get(year) ?? this.always.get(service) ?? [];
    const key = `${service} in ${year}`;
    if (!this.checked.has(key)) {
      const sum = routes.reduce((total, { share }) => total + share, 0);
      if (Math.abs(sum - 1) > ROUNDING) {
        throw new DomainError(`Routing shares of ${key}`, sum, "shares that add up to 1");
      }
      this.checked.add(key);
    }
    return routes;
  }
}
