/** What the services of a shared group may look like, and how they are checked. */
import { domain, requireIn } from "../domain";
import { DomainError } from "../errors";

/** Up to here the rounding of the recursion stays below 1e-12 even where blocking is 1e-300. */
export const unitCount = domain(0, 1e5, "a whole number of units from 0 to 100,000", { whole: true });
export const serviceTraffic = domain(0, 1e9, "traffic from 0 to 1,000,000,000 erlang");
export const serviceWidth = domain(1, 1e9, "a whole number of units from 1 to 1,000,000,000", { whole: true });
export const reservedUnits = domain(0, 1e9, "a whole number of units from 0 to 1,000,000,000", { whole: true });

/** Steps of the recursion that take well below a second. */
const MOST_STEPS = 1e8;

/** Throws unless a list has one value for each service. */
export function requireForEach(trafficE: readonly number[], parameter: string, list: readonly number[]): void {
  if (list.length !== trafficE.length) {
    throw new DomainError(
      `number of ${parameter} values`,
      list.length,
      `${trafficE.length}, one for each value of trafficE`,
    );
  }
}

/** Throws unless every traffic and width is in its domain and there is one width for each traffic. */
export function requireServices(trafficE: readonly number[], width: readonly number[]): void {
  requireForEach(trafficE, "width", width);
  for (const traffic of trafficE) requireIn(serviceTraffic, "trafficE", traffic);
  for (const units of width) requireIn(serviceWidth, "width", units);
}

/** Throws unless the units are a whole number that so many services can be computed for. */
export function requireUnits(units: number, services: number, mostSteps = MOST_STEPS): void {
  requireIn(unitCount, "units", units);
  if (units * services > mostSteps) {
    throw new DomainError("units", units, `at most ${Math.floor(mostSteps / services)} with ${services} services`);
  }
}

/** Units that would be occupied if nothing were ever blocked. */
export function offeredUnits(trafficE: readonly number[], width: readonly number[]): number {
  return trafficE.reduce((sum, traffic, i) => sum + traffic * width[i]!, 0);
}
