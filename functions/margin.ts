import { decibel, nonNegative, share } from "../src/model/domain";
import * as margin from "../src/model/interference/margin";
import { number, perCell } from "../src/sheet/call";

/**
 * Interference margin (noise rise) that a load of the cell asks of the link budget.
 * @customfunction MARGIN.FROMLOAD
 * @param load Load factor, a share of the pole capacity: 0 to below 1.
 * @returns Margin in dB.
 * @method -10 log10(1 - load).
 * @source H. Holma, A. Toskala, WCDMA for UMTS, chapter on radio network planning.
 * @assumes Uplink of code division: own and other cells' interference grow with the load.
 * @errors #N/A at a load of 1 or more, the pole capacity: no power suffices.
 * @example =CAP.MARGIN.FROMLOAD(0.75) is 6.0206
 */
export function marginFromload(load: any[][]): any[][] {
  return perCell(margin.fromLoad, { load: number(load, nonNegative) });
}

/**
 * Load of a cell at which an interference margin (noise rise) is used up.
 * @customfunction MARGIN.TOLOAD
 * @param marginDb Interference margin in dB, at least 0.
 * @returns Load factor, a share of the pole capacity.
 * @method 1 - 10^(-margin/10).
 * @source H. Holma, A. Toskala, WCDMA for UMTS, chapter on radio network planning.
 * @assumes Uplink of code division: own and other cells' interference grow with the load.
 * @errors #VALUE! for a margin below 0 dB.
 * @example =CAP.MARGIN.TOLOAD(3) is 0.4988
 */
export function marginToload(marginDb: any[][]): any[][] {
  return perCell(margin.toLoad, { marginDb: number(marginDb, margin.margin) });
}

/**
 * Rise of interference and noise together over noise alone.
 * @customfunction MARGIN.FROMPOWERS
 * @param interferenceDbm All interference together in dBm.
 * @param noiseDbm Noise of the receiver in dBm.
 * @returns Rise in dB.
 * @method 10 log10((I + N)/N).
 * @source Definition; common practice.
 * @example =CAP.MARGIN.FROMPOWERS(-100, -103) is 4.764
 */
export function marginFrompowers(interferenceDbm: any[][], noiseDbm: any[][]): any[][] {
  return perCell(margin.fromPowers, {
    interferenceDbm: number(interferenceDbm, decibel),
    noiseDbm: number(noiseDbm, decibel),
  });
}

/**
 * Interference margin of an orthogonal scheme, whose interference comes from the neighbour cells alone.
 * @customfunction MARGIN.NEIGHBOURLOAD
 * @param requiredSinrDb SINR in dB that the service needs at the cell edge.
 * @param edgeSirDb Signal to interference in dB at the cell edge with every neighbour at full load.
 * @param neighbourLoad Share of time or of resources that the neighbours use, 0 to 1.
 * @returns Margin in dB.
 * @method -10 log10(1 - load SINR/SIR), from 1/SINR = load/SIR + 1/SNR: the margin is SNR over SINR.
 * @source Definition of SINR; common practice in link budgets of orthogonal schemes.
 * @assumes Interference averages over time or resources as the load says.
 * @errors #N/A where interference alone takes all that the service bears: no margin suffices.
 * @example =CAP.MARGIN.NEIGHBOURLOAD(-3, 1.76, 0.5) is 0.794
 */
export function marginNeighbourload(requiredSinrDb: any[][], edgeSirDb: any[][], neighbourLoad: any[][]): any[][] {
  return perCell(margin.neighbourLoad, {
    requiredSinrDb: number(requiredSinrDb, decibel),
    edgeSirDb: number(edgeSirDb, decibel),
    neighbourLoad: number(neighbourLoad, share),
  });
}
