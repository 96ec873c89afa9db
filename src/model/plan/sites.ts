import { positive, requireIn } from "../domain";
import { amount } from "../traffic/traffic";
import { sites as sitesFor } from "../radio/cell";

/**
 * Sites that an area needs: the larger of what coverage and what capacity ask for.
 *
 * @param areaKm2 area, km2
 * @param radiusKm radius of a site, km
 * @param trafficE offered traffic of the area, erlang
 * @param trafficPerSiteE traffic that one site carries at its target, erlang
 * @param sectors sectors of a site
 * @returns sites, and which need decides
 */
export function sites(
  areaKm2: number,
  radiusKm: number,
  trafficE: number,
  trafficPerSiteE: number,
  sectors = 1,
): [number, "coverage" | "capacity"] {
  requireIn(amount, "trafficE", trafficE);
  requireIn(positive, "trafficPerSiteE", trafficPerSiteE);
  const coverage = sitesFor(areaKm2, radiusKm, sectors);
  const capacity = Math.ceil(trafficE / trafficPerSiteE);
  return capacity > coverage ? [capacity, "capacity"] : [coverage, "coverage"];
}
