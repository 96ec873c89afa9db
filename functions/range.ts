import { decibel } from "../src/model/domain";
import * as cost231 from "../src/model/radio/path-loss/cost231";
import * as freeSpace from "../src/model/radio/path-loss/free-space";
import * as hata from "../src/model/radio/path-loss/hata";
import * as logDistance from "../src/model/radio/path-loss/log-distance";
import * as rural from "../src/model/radio/path-loss/rural-38901";
import * as urban from "../src/model/radio/path-loss/urban-38901";
import { number, optionalChoice, optionalNumber, perCell } from "../src/sheet/call";

/**
 * Distance at which the loss of free space is reached: the inverse of PATHLOSS.FREESPACE.
 * @customfunction RANGE.FREESPACE
 * @param lossDb Path loss in dB, 0 to 1000.
 * @param frequencyMHz Frequency in MHz, above 0 and up to 1 000 000.
 * @returns Distance in km.
 * @method 10^(loss/20) c / (4 pi f).
 * @source Recommendation ITU-R P.525, free-space basic transmission loss.
 * @assumes As PATHLOSS.FREESPACE. Licence and exposure limits for the radiated power are local law and govern.
 * @errors #N/A beyond 1E9 km.
 * @example =CAP.RANGE.FREESPACE(120, 900) is 26.5075
 */
export function rangeFreespace(lossDb: any[][], frequencyMHz: any[][]): any[][] {
  return perCell(freeSpace.range, {
    lossDb: number(lossDb, freeSpace.freeSpaceLoss),
    frequencyMHz: number(frequencyMHz, freeSpace.frequency),
  });
}

/**
 * Distance at which a loss is reached by the log-distance law: the inverse of PATHLOSS.LOGDISTANCE.
 * @customfunction RANGE.LOGDISTANCE
 * @param lossDb Path loss in dB.
 * @param referenceLossDb Loss in dB at the reference distance.
 * @param pathLossExponent Path-loss exponent, 0.1 to 100.
 * @param [referenceKm] Reference distance in km, 1 if left out.
 * @returns Distance in km.
 * @method Reference times 10^((loss - reference loss)/(10 n)).
 * @source T. S. Rappaport, Wireless Communications, section 4.11; common practice.
 * @assumes As PATHLOSS.LOGDISTANCE. Licence and exposure limits for the radiated power are local law and govern.
 * @errors #N/A for a distance beyond 1E9 km.
 * @example =CAP.RANGE.LOGDISTANCE(143, 128.1, 3.76) is 2.4904
 */
export function rangeLogdistance(
  lossDb: any[][],
  referenceLossDb: any[][],
  pathLossExponent: any[][],
  referenceKm?: any[][],
): any[][] {
  return perCell(logDistance.range, {
    lossDb: number(lossDb, decibel),
    referenceLossDb: number(referenceLossDb, decibel),
    pathLossExponent: number(pathLossExponent, logDistance.exponent),
    referenceKm: optionalNumber(referenceKm, logDistance.distance, 1),
  });
}

/**
 * Distance at which a loss is reached by Hata's model of Okumura's measurements: the inverse of PATHLOSS.HATA.
 * @customfunction RANGE.HATA
 * @param lossDb Path loss in dB.
 * @param frequencyMHz Frequency in MHz, 150 to 1500; in a large city not between 200 and 400.
 * @param baseHeightM Effective height of the base station antenna in m, 30 to 200.
 * @param mobileHeightM Height of the mobile antenna in m, 1 to 10.
 * @param [environment] "urban" (small or medium city), "large city", "suburban" or "open"; "urban" if left out.
 * @returns Distance in km.
 * @method Root search over the whole range of PATHLOSS.HATA.
 * @source M. Hata, Empirical formula for propagation loss in land mobile radio services, IEEE Trans. Vehicular Technology 29 (1980); Recommendation ITU-R P.529.
 * @assumes As PATHLOSS.HATA. Licence and exposure limits for the radiated power are local law and govern.
 * @errors #VALUE! outside the ranges of the source; #N/A where the loss is not between those at 1 and 20 km; the message gives both.
 * @example =CAP.RANGE.HATA(140, 450, 50, 1.5) is 5.3183
 */
export function rangeHata(
  lossDb: any[][],
  frequencyMHz: any[][],
  baseHeightM: any[][],
  mobileHeightM: any[][],
  environment?: any[][],
): any[][] {
  return perCell(hata.range, {
    lossDb: number(lossDb, decibel),
    frequencyMHz: number(frequencyMHz, hata.frequency),
    baseHeightM: number(baseHeightM, hata.baseHeight),
    mobileHeightM: number(mobileHeightM, hata.mobileHeight),
    environment: optionalChoice(environment, hata.ENVIRONMENTS, "urban"),
  });
}

/**
 * Distance at which a loss is reached by the COST 231 extension of Hata's model: the inverse of PATHLOSS.COST231.
 * @customfunction RANGE.COST231
 * @param lossDb Path loss in dB.
 * @param frequencyMHz Frequency in MHz, 1500 to 2000.
 * @param baseHeightM Effective height of the base station antenna in m, 30 to 200.
 * @param mobileHeightM Height of the mobile antenna in m, 1 to 10.
 * @param [environment] "city" (medium city, suburban centre) or "metropolitan" (3 dB more); "city" if left out.
 * @returns Distance in km.
 * @method Root search over the whole range of PATHLOSS.COST231.
 * @source COST Action 231, Digital mobile radio towards future generation systems, final report (1999), section 4.4.1.
 * @assumes As PATHLOSS.COST231. Licence and exposure limits for the radiated power are local law and govern.
 * @errors #VALUE! outside the ranges of the source; #N/A where the loss is not between those at 1 and 20 km; the message gives both.
 * @example =CAP.RANGE.COST231(145, 1800, 30, 1.5) is 1.7779
 */
export function rangeCost231(
  lossDb: any[][],
  frequencyMHz: any[][],
  baseHeightM: any[][],
  mobileHeightM: any[][],
  environment?: any[][],
): any[][] {
  return perCell(cost231.range, {
    lossDb: number(lossDb, decibel),
    frequencyMHz: number(frequencyMHz, cost231.frequency),
    baseHeightM: number(baseHeightM, cost231.baseHeight),
    mobileHeightM: number(mobileHeightM, cost231.mobileHeight),
    environment: optionalChoice(environment, cost231.ENVIRONMENTS, "city"),
  });
}

/**
 * Distance at which the loss of an urban macro cell (3GPP UMa) is reached: the inverse of PATHLOSS.UMA.
 * @customfunction RANGE.UMA
 * @param lossDb Path loss in dB.
 * @param frequencyMHz Frequency in MHz, 500 to 100 000.
 * @param baseHeightM Height of the base station antenna in m, 10 to 150; the report has 25.
 * @param mobileHeightM Height of the mobile antenna in m, 1.5 to 22.5.
 * @param [sight] "los" with line of sight, "nlos" without; "nlos" if left out.
 * @returns Distance in km. Along the ground.
 * @method Root search over the whole range of PATHLOSS.UMA, breakpoint included.
 * @source 3GPP TR 38.901 V19.4.0, table 7.4.1-1, UMa.
 * @assumes As PATHLOSS.UMA. Licence and exposure limits for the radiated power are local law and govern.
 * @errors #VALUE! outside the ranges of the source; #N/A where the loss is not between those at 0.01 and 5 km; the message gives both.
 * @example =CAP.RANGE.UMA(130, 3500, 25, 1.5) is 0.5025
 */
export function rangeUma(
  lossDb: any[][],
  frequencyMHz: any[][],
  baseHeightM: any[][],
  mobileHeightM: any[][],
  sight?: any[][],
): any[][] {
  return perCell(urban.macro.range, {
    lossDb: number(lossDb, decibel),
    frequencyMHz: number(frequencyMHz, urban.frequency),
    baseHeightM: number(baseHeightM, urban.macro.baseHeight),
    mobileHeightM: number(mobileHeightM, urban.mobileHeight),
    sight: optionalChoice(sight, urban.SIGHTS, "nlos"),
  });
}

/**
 * Distance at which the loss of an urban street canyon (3GPP UMi) is reached: the inverse of PATHLOSS.UMI.
 * @customfunction RANGE.UMI
 * @param lossDb Path loss in dB.
 * @param frequencyMHz Frequency in MHz, 500 to 100 000.
 * @param baseHeightM Height of the base station antenna in m, 3 to 25, below the roofs; the report has 10.
 * @param mobileHeightM Height of the mobile antenna in m, 1.5 to 22.5.
 * @param [sight] "los" with line of sight, "nlos" without; "nlos" if left out.
 * @returns Distance in km. Along the ground.
 * @method Root search over the whole range of PATHLOSS.UMI, breakpoint included.
 * @source 3GPP TR 38.901 V19.4.0, table 7.4.1-1, UMi - street canyon.
 * @assumes As PATHLOSS.UMI. Licence and exposure limits for the radiated power are local law and govern.
 * @errors #VALUE! outside the ranges of the source; #N/A where the loss is not between those at 0.01 and 5 km; the message gives both.
 * @example =CAP.RANGE.UMI(120, 3500, 10, 1.5) is 0.2731
 */
export function rangeUmi(
  lossDb: any[][],
  frequencyMHz: any[][],
  baseHeightM: any[][],
  mobileHeightM: any[][],
  sight?: any[][],
): any[][] {
  return perCell(urban.micro.range, {
    lossDb: number(lossDb, decibel),
    frequencyMHz: number(frequencyMHz, urban.frequency),
    baseHeightM: number(baseHeightM, urban.micro.baseHeight),
    mobileHeightM: number(mobileHeightM, urban.mobileHeight),
    sight: optionalChoice(sight, urban.SIGHTS, "nlos"),
  });
}

/**
 * Distance at which the loss of a rural macro cell (3GPP RMa) is reached: the inverse of PATHLOSS.RMA.
 * @customfunction RANGE.RMA
 * @param lossDb Path loss in dB.
 * @param frequencyMHz Frequency in MHz, 500 to 30 000.
 * @param baseHeightM Height of the base station antenna in m, 10 to 150.
 * @param mobileHeightM Height of the mobile antenna in m, 1 to 10.
 * @param [sight] "los" with line of sight, "nlos" without; "nlos" if left out.
 * @returns Distance in km. Along the ground.
 * @method Root search over the whole range of PATHLOSS.RMA, breakpoint included.
 * @source 3GPP TR 38.901 V19.4.0, table 7.4.1-1, RMa.
 * @assumes As PATHLOSS.RMA. Licence and exposure limits for the radiated power are local law and govern.
 * @errors #VALUE! outside the ranges of the source; #N/A where the loss is not between those at 0.01 km and 10 km ("los") or 5 km ("nlos"); the message gives both.
 * @example =CAP.RANGE.RMA(140, 700, 35, 1.5) is 4.0732
 */
export function rangeRma(
  lossDb: any[][],
  frequencyMHz: any[][],
  baseHeightM: any[][],
  mobileHeightM: any[][],
  sight?: any[][],
): any[][] {
  return perCell(rural.range, {
    lossDb: number(lossDb, decibel),
    frequencyMHz: number(frequencyMHz, rural.frequency),
    baseHeightM: number(baseHeightM, rural.baseHeight),
    mobileHeightM: number(mobileHeightM, rural.mobileHeight),
    sight: optionalChoice(sight, urban.SIGHTS, "nlos"),
  });
}
