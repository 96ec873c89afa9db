import { positive, shareBelowOne } from "../src/model/domain";
import * as cell from "../src/model/radio/cell";
import { exponent } from "../src/model/radio/path-loss/log-distance";
import { number, optionalNumber, perCell } from "../src/sheet/call";

/**
 * Area that one site covers in a regular network without gaps.
 * @customfunction CELL.AREA
 * @param radiusKm Reach of the site or sector in km, above 0.
 * @param [sectors] Sectors of the site: 1, 2, 3 or 6; 1 if left out.
 * @returns km2 per site.
 * @method 1 and 6 sectors: hexagon around the site, 3 sqrt(3)/2 R^2; 3: three hexagons that meet at the site, 9 sqrt(3)/8 R^2; 2: half a hexagon.
 * @source Geometry of the hexagon; common practice of nominal planning.
 * @assumes Every sector reaches R; terrain and site positions do what the regular pattern asks.
 * @errors #VALUE! for sectors other than 1, 2, 3 and 6.
 * @example =CAP.CELL.AREA(2, 3) is 7.794
 */
export function cellArea(radiusKm: any[][], sectors?: any[][]): any[][] {
  return perCell(cell.area, {
    radiusKm: number(radiusKm, cell.radius),
    sectors: optionalNumber(sectors, cell.sectorsOfArea, 1),
  });
}

/**
 * Smallest number of sites that cover an area.
 * @customfunction CELL.SITES
 * @param areaKm2 Area in km2, above 0.
 * @param radiusKm Reach of the site or sector in km, above 0.
 * @param [sectors] Sectors of the site: 1, 2, 3 or 6; 1 if left out.
 * @returns Number of sites.
 * @method Area over CELL.AREA, rounded up.
 * @source Geometry of the hexagon; common practice of nominal planning.
 * @assumes As CELL.AREA; borders of the area need more.
 * @errors #VALUE! for sectors other than 1, 2, 3 and 6.
 * @example =CAP.CELL.SITES(500, 2, 3) is 65
 */
export function cellSites(areaKm2: any[][], radiusKm: any[][], sectors?: any[][]): any[][] {
  return perCell(cell.sites, {
    areaKm2: number(areaKm2, positive),
    radiusKm: number(radiusKm, cell.radius),
    sectors: optionalNumber(sectors, cell.sectorsOfArea, 1),
  });
}

/**
 * Radius of a CDMA cell under load: interference shrinks it.
 * @customfunction CELL.BREATHING
 * @param unloadedRadiusKm Radius in km without load, above 0.
 * @param load Uplink load factor, 0 to below 1.
 * @param pathLossExponent Path-loss exponent, 0.1 to 100.
 * @returns Radius in km at that load.
 * @method R (1 - load)^(1/n): the noise rise 1/(1 - load) comes off the path loss.
 * @source H. Holma, A. Toskala (eds.), WCDMA for UMTS, chapter on radio network planning (noise rise); common practice.
 * @assumes Uplink of code division. Not on a radius whose link budget already holds an interference margin: that would count it twice.
 * @example =CAP.CELL.BREATHING(2, 0.5, 3.5) is 1.641
 */
export function cellBreathing(unloadedRadiusKm: any[][], load: any[][], pathLossExponent: any[][]): any[][] {
  return perCell(cell.breathing, {
    unloadedRadiusKm: number(unloadedRadiusKm, cell.radius),
    load: number(load, shareBelowOne),
    pathLossExponent: number(pathLossExponent, exponent),
  });
}
