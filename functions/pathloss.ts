import { decibel } from "../src/model/domain";
import * as cost231 from "../src/model/radio/path-loss/cost231";
import * as freeSpace from "../src/model/radio/path-loss/free-space";
import * as hata from "../src/model/radio/path-loss/hata";
import * as logDistance from "../src/model/radio/path-loss/log-distance";
import * as rural from "../src/model/radio/path-loss/rural-38901";
import * as urban from "../src/model/radio/path-loss/urban-38901";
import { number, optionalChoice, optionalNumber, perCell } from "../src/sheet/call";

/**
 * Path loss in free space.
 * @customfunction PATHLOSS.FREESPACE
 * @param distanceKm Distance in km, above 0.
 * @param frequencyMHz Frequency in MHz, above 0 and up to 1 000 000.
 * @returns Path loss in dB.
 * @method 20 log10(4 pi d f / c) with c = 299 792 458 m/s, a constant of 32.4478 dB for km and MHz where some print 32.4 or 32.44.
 * @source Recommendation ITU-R P.525, free-space basic transmission loss.
 * @assumes Clear path, isotropic antennas, far field.
 * @errors #VALUE! for a distance so short that the formula gives a gain.
 * @example =CAP.PATHLOSS.FREESPACE(2, 900) is 97.55
 */
export function pathlossFreespace(distanceKm: any[][], frequencyMHz: any[][]): any[][] {
  return perCell(freeSpace.loss, {
    distanceKm: number(distanceKm, freeSpace.distance),
    frequencyMHz: number(frequencyMHz, freeSpace.frequency),
  });
}

/**
 * Path loss by the log-distance law.
 * @customfunction PATHLOSS.LOGDISTANCE
 * @param distanceKm Distance in km, above 0.
 * @param referenceLossDb Loss in dB at the reference distance.
 * @param pathLossExponent Path-loss exponent, 0.1 to 100.
 * @param [referenceKm] Reference distance in km, 1 if left out.
 * @returns Median path loss in dB.
 * @method Reference loss + 10 n log10(distance / reference).
 * @source T. S. Rappaport, Wireless Communications, section 4.11; common practice.
 * @assumes One slope on both sides of the reference; how far it holds is known from measurements.
 * @example =CAP.PATHLOSS.LOGDISTANCE(2, 128.1, 3.76) is 139.42
 */
export function pathlossLogdistance(
  distanceKm: any[][],
  referenceLossDb: any[][],
  pathLossExponent: any[][],
  referenceKm?: any[][],
): any[][] {
  return perCell(logDistance.loss, {
    distanceKm: number(distanceKm, logDistance.distance),
    referenceLossDb: number(referenceLossDb, decibel),
    pathLossExponent: number(pathLossExponent, logDistance.exponent),
    referenceKm: optionalNumber(referenceKm, logDistance.distance, 1),
  });
}

/**
 * Path loss by Hata's model of Okumura's measurements.
 * @customfunction PATHLOSS.HATA
 * @param distanceKm Distance in km, 1 to 20.
 * @param frequencyMHz Frequency in MHz, 150 to 1500; in a large city not between 200 and 400.
 * @param baseHeightM Effective height of the base station antenna in m, 30 to 200.
 * @param mobileHeightM Height of the mobile antenna in m, 1 to 10.
 * @param [environment] "urban" (small or medium city), "large city", "suburban" or "open"; "urban" if left out.
 * @returns Median path loss in dB.
 * @method 69.55 + 26.16 log f - 13.82 log hb - a(hm) + (44.9 - 6.55 log hb) log d; large city a = 8.29 log^2(1.54 hm) - 1.1 to 200 MHz, 3.2 log^2(11.75 hm) - 4.97 from 400 MHz; suburban less 2 log^2(f/28) + 5.4; open less 4.78 log^2 f - 18.33 log f + 40.94.
 * @source M. Hata, Empirical formula for propagation loss in land mobile radio services, IEEE Trans. Vehicular Technology 29 (1980); Recommendation ITU-R P.529.
 * @assumes Median loss over quasi-smooth terrain; shadowing comes on top.
 * @errors #VALUE! outside the ranges of the source: the model is not carried beyond them.
 * @example =CAP.PATHLOSS.HATA(5, 450, 50, 1.5) is 139.09
 */
export function pathlossHata(
  distanceKm: any[][],
  frequencyMHz: any[][],
  baseHeightM: any[][],
  mobileHeightM: any[][],
  environment?: any[][],
): any[][] {
  return perCell(hata.loss, {
    distanceKm: number(distanceKm, hata.distance),
    frequencyMHz: number(frequencyMHz, hata.frequency),
    baseHeightM: number(baseHeightM, hata.baseHeight),
    mobileHeightM: number(mobileHeightM, hata.mobileHeight),
    environment: optionalChoice(environment, hata.ENVIRONMENTS, "urban"),
  });
}

/**
 * Path loss by the COST 231 extension of Hata's model.
 * @customfunction PATHLOSS.COST231
 * @param distanceKm Distance in km, 1 to 20.
 * @param frequencyMHz Frequency in MHz, 1500 to 2000.
 * @param baseHeightM Effective height of the base station antenna in m, 30 to 200.
 * @param mobileHeightM Height of the mobile antenna in m, 1 to 10.
 * @param [environment] "city" (medium city, suburban centre) or "metropolitan" (3 dB more); "city" if left out.
 * @returns Median path loss in dB.
 * @method 46.3 + 33.9 log f - 13.82 log hb - a(hm) + (44.9 - 6.55 log hb) log d + C, a(hm) of a medium city, C = 0 or 3 dB.
 * @source COST Action 231, Digital mobile radio towards future generation systems, final report (1999), section 4.4.1.
 * @assumes Median loss, base station above the roofs; shadowing comes on top.
 * @errors #VALUE! outside the ranges of the source: the model is not carried beyond them.
 * @example =CAP.PATHLOSS.COST231(2, 1800, 30, 1.5) is 146.80
 */
export function pathlossCost231(
  distanceKm: any[][],
  frequencyMHz: any[][],
  baseHeightM: any[][],
  mobileHeightM: any[][],
  environment?: any[][],
): any[][] {
  return perCell(cost231.loss, {
    distanceKm: number(distanceKm, cost231.distance),
    frequencyMHz: number(frequencyMHz, cost231.frequency),
    baseHeightM: number(baseHeightM, cost231.baseHeight),
    mobileHeightM: number(mobileHeightM, cost231.mobileHeight),
    environment: optionalChoice(environment, cost231.ENVIRONMENTS, "city"),
  });
}

/**
 * Path loss in an urban macro cell (3GPP UMa).
 * @customfunction PATHLOSS.UMA
 * @param distanceKm Distance along the ground in km, 0.01 to 5.
 * @param frequencyMHz Frequency in MHz, 500 to 100 000.
 * @param baseHeightM Height of the base station antenna in m, 10 to 150; the report has 25.
 * @param mobileHeightM Height of the mobile antenna in m, 1.5 to 22.5.
 * @param [sight] "los" with line of sight, "nlos" without; "nlos" if left out.
 * @returns Median path loss in dB.
 * @method los: 28 + 22 log d3 + 20 log f to the breakpoint 4 (hb - 1)(hm - 1) f / c with c = 3E8 as prescribed, then 28 + 40 log d3 + 20 log f - 9 log(dbp^2 + (hb - hm)^2); nlos: the larger of los and 13.54 + 39.08 log d3 + 20 log f - 0.6 (hm - 1.5); d3 the 3-D distance in m, f in GHz.
 * @source 3GPP TR 38.901 V19.4.0, table 7.4.1-1, UMa.
 * @assumes Environment height 1 m, which the report draws at random for mobiles above 13 m; heights other than 25 m enter the breakpoint and the 3-D distance only. Outdoor loss; shadowing comes on top.
 * @errors #VALUE! outside the ranges of the source: the model is not carried beyond them.
 * @example =CAP.PATHLOSS.UMA(0.5, 3500, 25, 1.5) is 129.92
 */
export function pathlossUma(
  distanceKm: any[][],
  frequencyMHz: any[][],
  baseHeightM: any[][],
  mobileHeightM: any[][],
  sight?: any[][],
): any[][] {
  return perCell(urban.macro.loss, {
    distanceKm: number(distanceKm, urban.distance),
    frequencyMHz: number(frequencyMHz, urban.frequency),
    baseHeightM: number(baseHeightM, urban.macro.baseHeight),
    mobileHeightM: number(mobileHeightM, urban.mobileHeight),
    sight: optionalChoice(sight, urban.SIGHTS, "nlos"),
  });
}

/**
 * Path loss in an urban street canyon (3GPP UMi).
 * @customfunction PATHLOSS.UMI
 * @param distanceKm Distance along the ground in km, 0.01 to 5.
 * @param frequencyMHz Frequency in MHz, 500 to 100 000.
 * @param baseHeightM Height of the base station antenna in m, 3 to 25, below the roofs; the report has 10.
 * @param mobileHeightM Height of the mobile antenna in m, 1.5 to 22.5.
 * @param [sight] "los" with line of sight, "nlos" without; "nlos" if left out.
 * @returns Median path loss in dB.
 * @method los: 32.4 + 21 log d3 + 20 log f to the breakpoint 4 (hb - 1)(hm - 1) f / c with c = 3E8 as prescribed, then 32.4 + 40 log d3 + 20 log f - 9.5 log(dbp^2 + (hb - hm)^2); nlos: the larger of los and 22.4 + 35.3 log d3 + 21.3 log f - 0.3 (hm - 1.5); d3 the 3-D distance in m, f in GHz.
 * @source 3GPP TR 38.901 V19.4.0, table 7.4.1-1, UMi - street canyon.
 * @assumes Heights other than 10 m enter the breakpoint and the 3-D distance only. Outdoor loss; shadowing comes on top.
 * @errors #VALUE! outside the ranges of the source: the model is not carried beyond them.
 * @example =CAP.PATHLOSS.UMI(0.2, 3500, 10, 1.5) is 115.23
 */
export function pathlossUmi(
  distanceKm: any[][],
  frequencyMHz: any[][],
  baseHeightM: any[][],
  mobileHeightM: any[][],
  sight?: any[][],
): any[][] {
  return perCell(urban.micro.loss, {
    distanceKm: number(distanceKm, urban.distance),
    frequencyMHz: number(frequencyMHz, urban.frequency),
    baseHeightM: number(baseHeightM, urban.micro.baseHeight),
    mobileHeightM: number(mobileHeightM, urban.mobileHeight),
    sight: optionalChoice(sight, urban.SIGHTS, "nlos"),
  });
}

/**
 * Path loss in a rural macro cell (3GPP RMa).
 * @customfunction PATHLOSS.RMA
 * @param distanceKm Distance along the ground in km, 0.01 to 10 with "los", to 5 with "nlos".
 * @param frequencyMHz Frequency in MHz, 500 to 30 000.
 * @param baseHeightM Height of the base station antenna in m, 10 to 150.
 * @param mobileHeightM Height of the mobile antenna in m, 1 to 10.
 * @param [sight] "los" with line of sight, "nlos" without; "nlos" if left out.
 * @returns Median path loss in dB.
 * @method los: 20 log(40 pi d3 f / 3) + min(0.03 h^1.72, 10) log d3 - min(0.044 h^1.72, 14.77) + 0.002 log(h) d3 to the breakpoint 2 pi hb hm f / c with c = 3E8 as prescribed, then 40 dB a decade; nlos: the larger of los and the report's second line; street width 20 m, buildings h = 5 m.
 * @source 3GPP TR 38.901 V19.4.0, table 7.4.1-1, RMa.
 * @assumes The report's default street width and building height. Above 7 GHz it rests on a single campaign of measurements. Shadowing comes on top.
 * @errors #VALUE! outside the ranges of the source: the model is not carried beyond them.
 * @example =CAP.PATHLOSS.RMA(2, 700, 35, 1.5) is 128.07
 */
export function pathlossRma(
  distanceKm: any[][],
  frequencyMHz: any[][],
  baseHeightM: any[][],
  mobileHeightM: any[][],
  sight?: any[][],
): any[][] {
  return perCell(rural.loss, {
    distanceKm: number(distanceKm, rural.distance),
    frequencyMHz: number(frequencyMHz, rural.frequency),
    baseHeightM: number(baseHeightM, rural.baseHeight),
    mobileHeightM: number(mobileHeightM, rural.mobileHeight),
    sight: optionalChoice(sight, urban.SIGHTS, "nlos"),
  });
}
