import { probability } from "../src/model/domain";
import { exponent } from "../src/model/radio/path-loss/log-distance";
import * as shadowing from "../src/model/radio/shadowing";
import { number, perCell } from "../src/sheet/call";

/**
 * Margin that keeps the signal at the cell edge above its threshold with a given probability.
 * @customfunction SHADOWING.MARGIN
 * @param edgeProbability Probability at the cell edge, above 0 and below 1.
 * @param shadowingDb Standard deviation of the shadowing in dB, 0 to 100.
 * @returns Margin in dB; below 0 for a probability below one half.
 * @method Deviation times the normal quantile of the probability.
 * @source W. C. Jakes (ed.), Microwave Mobile Communications (1974), section 2.5; common practice.
 * @assumes Lognormal shadowing around the median of the path-loss model; one server.
 * @example =CAP.SHADOWING.MARGIN(0.9, 8) is 10.25
 */
export function shadowingMargin(edgeProbability: any[][], shadowingDb: any[][]): any[][] {
  return perCell(shadowing.margin, {
    edgeProbability: number(edgeProbability, probability),
    shadowingDb: number(shadowingDb, shadowing.deviation),
  });
}

/**
 * Share of a round cell's area that is covered, from the probability at its edge.
 * @customfunction SHADOWING.AREA
 * @param edgeProbability Probability at the cell edge, above 0 and below 1.
 * @param shadowingDb Standard deviation of the shadowing in dB, 0 to 100.
 * @param pathLossExponent Path-loss exponent, 0.1 to 100.
 * @returns Share of the area, 0 to 1.
 * @method Closed form with the threshold on the median where the edge probability is one half: p + exp(-z^2/2) erfcx(sqrt 2 s/(10 n log10 e) + z/sqrt 2)/2, z the normal quantile of p; the scaled error function where the printed form would overflow.
 * @source W. C. Jakes (ed.), Microwave Mobile Communications (1974), section 2.5.3 (D. O. Reudink).
 * @assumes Lognormal shadowing, one server, users spread evenly.
 * @example =CAP.SHADOWING.AREA(0.9, 8, 4) is 0.9687
 */
export function shadowingArea(edgeProbability: any[][], shadowingDb: any[][], pathLossExponent: any[][]): any[][] {
  return perCell(shadowing.area, {
    edgeProbability: number(edgeProbability, probability),
    shadowingDb: number(shadowingDb, shadowing.deviation),
    pathLossExponent: number(pathLossExponent, exponent),
  });
}

/**
 * Probability at the cell edge that covers a given share of the area: the inverse of SHADOWING.AREA.
 * @customfunction SHADOWING.EDGE
 * @param areaProbability Share of the area to be covered, above 0 and below 1.
 * @param shadowingDb Standard deviation of the shadowing in dB, above 0 and up to 100.
 * @param pathLossExponent Path-loss exponent, 0.1 to 100.
 * @returns Probability at the cell edge.
 * @method Root search on the closed form of SHADOWING.AREA, on the smaller of the covered and uncovered shares.
 * @source W. C. Jakes (ed.), Microwave Mobile Communications (1974), section 2.5.3 (D. O. Reudink).
 * @assumes As SHADOWING.AREA.
 * @errors #N/A where so little shadowing covers more than that share at any edge probability above 1E-300.
 * @example =CAP.SHADOWING.EDGE(0.95, 8, 3.5) is 0.8616
 */
export function shadowingEdge(areaProbability: any[][], shadowingDb: any[][], pathLossExponent: any[][]): any[][] {
  return perCell(shadowing.edge, {
    areaProbability: number(areaProbability, probability),
    shadowingDb: number(shadowingDb, shadowing.positiveDeviation),
    pathLossExponent: number(pathLossExponent, exponent),
  });
}
