import { decibel } from "../src/model/domain";
import * as power from "../src/model/radio/power";
import { list, number, perCell } from "../src/sheet/call";

/**
 * Sum of powers given in dBm, such as the interference of several transmitters.
 * @customfunction POWER.SUM
 * @param powersDbm Range of powers in dBm; empty cells are ignored.
 * @returns Sum in dBm.
 * @method 10 log10 of the sum of 10^(power/10), the largest power taken out first.
 * @source Definition of the decibel, ISO 80000-3; common practice.
 * @assumes Powers add: the signals are not coherent.
 * @errors #VALUE! for a power outside -1000 to 1000 dBm.
 * @example =CAP.POWER.SUM({-90;-93;-100}) is -87.96
 */
export function powerSum(powersDbm: any[][]): any[][] {
  return perCell(power.sum, { powersDbm: list(powersDbm, decibel) });
}

/**
 * Decibel value of a power ratio.
 * @customfunction POWER.DB
 * @param ratio Ratio of two powers, above 0.
 * @returns 10 log10(ratio) in dB.
 * @method 10 log10(ratio).
 * @source Definition of the decibel, ISO 80000-3.
 * @errors #VALUE! for a ratio of 0 or below, or beyond 1E-100 to 1E+100.
 * @example =CAP.POWER.DB(200) is 23.01
 */
export function powerDb(ratio: any[][]): any[][] {
  return perCell(power.db, { ratio: number(ratio, power.powerRatio) });
}

/**
 * Power ratio of a decibel value.
 * @customfunction POWER.RATIO
 * @param db Decibel value, -1000 to 1000.
 * @returns Ratio of two powers.
 * @method 10^(db/10).
 * @source Definition of the decibel, ISO 80000-3.
 * @errors #VALUE! outside -1000 to 1000 dB.
 * @example =CAP.POWER.RATIO(7) is 5.012
 */
export function powerRatio(db: any[][]): any[][] {
  return perCell(power.ratio, { db: number(db, decibel) });
}
