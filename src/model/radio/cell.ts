import { domain, positive, requireIn, shareBelowOne } from "../domain";
import { DomainError, NoAnswerError } from "../errors";
import { exponent } from "./path-loss/log-distance";

export const sectorsOfArea = domain(1, 6, "1, 2, 3 or 6 sectors", { whole: true });
/** A sphere's worth of cells: keeps squares and quotients finite. */
export const radius = domain(0, 1e5, "a radius above 0 and up to 100 000 km", { openLow: true });

const HEXAGON = (3 * Math.sqrt(3)) / 2;

/** Area of a site in squared radii by number of sectors; the radius is the reach of the site or sector. */
const AREA_FACTORS: Readonly<Record<number, number>> = {
  1: HEXAGON,
  2: HEXAGON / 2,
  // Three hexagons that meet at the site: each has the reach as its longest diagonal.
  3: (3 * HEXAGON) / 4,
  6: HEXAGON,
};

/**
 * Area in km2 that one site covers in a gap-free regular network.
 *
 * Hexagon around the site for 1 and 6 sectors, three hexagons that meet at the site for 3, and half a hexagon for 2 (along
 * roads and railways): common practice of nominal planning.
 *
 * @param radiusKm reach of the site or sector, above 0
 * @param sectors 1, 2, 3 or 6
 */
export function area(radiusKm: number, sectors = 1): number {
  requireIn(radius, "radiusKm", radiusKm);
  const factor = AREA_FACTORS[sectors];
  if (factor === undefined) throw new DomainError("sectors", sectors, sectorsOfArea.words);
  return factor * radiusKm * radiusKm;
}

/**
 * Smallest number of sites whose areas add up to an area.
 *
 * @param areaKm2 above 0
 * @param radiusKm reach of the site or sector, above 0
 * @param sectors 1, 2, 3 or 6
 * @throws NoAnswerError where the number is too large to be counted
 */
export function sites(areaKm2: number, radiusKm: number, sectors = 1): number {
  requireIn(positive, "areaKm2", areaKm2);
  const each = area(radiusKm, sectors);
  const quotient = areaKm2 / each;
  if (!(quotient < Number.MAX_SAFE_INTEGER)) {
    throw new NoAnswerError(`${areaKm2} km2 needs more sites of ${radiusKm} km than can be counted.`);
  }
  const enough = Math.ceil(quotient);
  // The quotient of an area computed as n times a site may lie a rounding above n.
  return enough > 1 && (enough - 1) * each >= areaKm2 ? enough - 1 : enough;
}

/**
 * Radius in km of a CDMA cell under load, whose interference eats into the uplink budget.
 *
 * The noise rise 1/(1 - load) is taken from the path loss: R (1 - load)^(1/n). Not for a radius whose link budget already
 * holds an interference margin, which is the same rise.
 *
 * @param unloadedRadiusKm radius at no load, above 0
 * @param load uplink load factor, 0 to below 1
 * @param pathLossExponent 0.1 to 100
 */
export function breathing(unloadedRadiusKm: number, load: number, pathLossExponent: number): number {
  requireIn(radius, "unloadedRadiusKm", unloadedRadiusKm);
  requireIn(shareBelowOne, "load", load);
  requireIn(exponent, "pathLossExponent", pathLossExponent);
  return unloadedRadiusKm * Math.exp(Math.log1p(-load) / pathLossExponent);
}
