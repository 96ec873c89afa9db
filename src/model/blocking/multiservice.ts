/** Services of different widths that share a group of units completely: Kaufman-Roberts, with and without reservation. */
import { domain, requireIn } from "../domain";
import { blockingTarget } from "./erlang-b";
import { occupancy, upperSum } from "./multiservice-recursion";
import { requireForEach, requireServices, requireUnits, reservedUnits, unitCount } from "./multiservice-services";
import { smallestUnits } from "./multiservice-units";

export { reservedUnits, serviceTraffic, serviceWidth, unitCount } from "./multiservice-services";
export { peaky, streamPeakedness } from "./multiservice-peaky";

export const sharedUnits = domain(1, unitCount.high, "a whole number of units from 1 to 100,000", { whole: true });

/**
 * Blocking of each service on shared units.
 *
 * A call of service i is admitted while width + reserved units are free, that is up to units - width - reserved occupied ones.
 * Without reservation the recursion of J. S. Kaufman (1981) and J. W. Roberts (1981) is exact; with it Roberts' recursion (1983)
 * is an approximation which takes calls of a service for absent in the states that its new calls cannot lead to.
 *
 * @param units shared units, 0 to 100,000
 * @param trafficE offered traffic per service in calls, erlang
 * @param width units per call
 * @param reserved units that a service leaves to the others, none where left out
 * @returns probability per service
 */
export function blocking(
  units: number,
  trafficE: readonly number[],
  width: readonly number[],
  reserved: readonly number[] = trafficE.map(() => 0),
): number[] {
  requireServices(trafficE, width);
  requireUnits(units, trafficE.length);
  requireForEach(trafficE, "reserved", reserved);
  for (const kept of reserved) requireIn(reservedUnits, "reserved", kept);
  const probabilities = occupancy(units, trafficE, width, reserved);
  return width.map((w, i) => {
    const lastAdmitting = units - w - reserved[i]!;
    return lastAdmitting < 0 ? 1 : upperSum(probabilities, lastAdmitting + 1);
  });
}

/**
 * Smallest number of units at which the blocking of every service is at or below its target; every smaller number misses at
 * least one of them.
 *
 * @param trafficE offered traffic per service in calls, erlang
 * @param width units per call
 * @param targets largest blocking per service, 1e-300 to below 1
 * @returns units
 * @throws NoAnswerError where more than 100,000 units are needed
 */
export function units(trafficE: readonly number[], width: readonly number[], targets: readonly number[]): number {
  requireServices(trafficE, width);
  requireForEach(trafficE, "blocking", targets);
  for (const target of targets) requireIn(blockingTarget, "blocking", target);
  requireUnits(unitCount.high, trafficE.length);
  return smallestUnits(trafficE, width, targets);
}

/**
 * Mean share of the units that is occupied.
 *
 * @param units shared units, 1 to 100,000
 * @param trafficE offered traffic per service in calls, erlang
 * @param width units per call
 * @returns share from 0 to 1
 */
export function utilisation(units: number, trafficE: readonly number[], width: readonly number[]): number {
  requireServices(trafficE, width);
  requireIn(sharedUnits, "units", units);
  requireUnits(units, trafficE.length);
  const probabilities = occupancy(units, trafficE, width);
  let mean = 0;
  for (let state = units; state > 0; state--) mean += state * probabilities[state]!;
  return mean / units;
}
