import { nonNegative, positiveCount, count } from "../src/model/domain";
import * as code from "../src/model/codes/code";
import { chip } from "../src/model/codes/chips";
import { CORRELATIONS } from "../src/model/codes/correlation";
import { FAMILIES } from "../src/model/codes/sequence";
import { choice, grid, list, number, optionalChoice, perCell, perCellRow } from "../src/sheet/call";

/**
 * Chips of one spreading code, +1 and -1, in a row; a column of indices gives a code a row.
 * @customfunction CODE.SEQUENCE
 * @param family "walsh", "ovsf", "maximal", "gold" or "kasami".
 * @param length Chips: walsh, ovsf 1 to 1024; maximal 3 to 32767; gold 7, 31, 63, 127, 511, 1023; kasami 15, 63, 255, 1023.
 * @param index Which code of the set, from 0.
 * @returns Row of chips.
 * @method "walsh": row of the Hadamard matrix (Sylvester). "ovsf": C(length, index) of the code tree. "maximal": shift register with a primitive polynomial, all ones at first (bit 0 is +1); further indices by decimation, one for each different sequence. "gold": u, v, then u + T^i v; v is u decimated by 3, by 5 at even degrees. "kasami": small set, u, then u + T^i w; w is u decimated by 2^(n/2) + 1.
 * @source Polynomials: S. Lin, D. J. Costello, Error Control Coding, 2nd ed., table 2.7. ovsf: 3GPP TS 25.213, 4.3.1. gold, kasami: D. V. Sarwate, M. B. Pursley, Proc. IEEE 68 (1980).
 * @assumes A row of more than 16384 chips does not fit a sheet; use it inside another function, or transposed.
 * @errors #VALUE! for a length that the family does not have, with those it has, or an index beyond the set, with its size.
 * @example =CAP.CODE.SEQUENCE("walsh", 4, 2) is 1
 */
export function codeSequence(family: any[][], length: any[][], index: any[][]): any[][] {
  return perCellRow(code.sequence, [], {
    family: choice(family, FAMILIES),
    length: number(length, positiveCount),
    index: number(index, count),
  });
}

/**
 * Correlation of two spreading codes at a delay, in chips, whole or not.
 * @customfunction CODE.CORRELATION
 * @param codeA Range: chips of the first code, 1 or -1.
 * @param codeB Range: chips of the second code, as many.
 * @param delayChips Delay of the second code in chips, from 0 to below the number of chips.
 * @param [kind] "periodic" (if left out), "aperiodic" or "odd".
 * @returns Correlation from -1 to 1.
 * @method With C(d) = (1/N) sum of a[k] b[k-d] over the k at which both exist: "aperiodic" C(d), "periodic" C(d) + C(d-N), "odd" C(d) - C(d-N); linear between whole delays, exact for rectangular chips.
 * @source D. V. Sarwate, M. B. Pursley, Crosscorrelation properties of pseudorandom and related sequences, Proc. IEEE 68 (1980).
 * @errors #VALUE! for other chips than 1 and -1, codes of different lengths, or a delay of a whole code or more.
 * @example =CAP.CODE.CORRELATION({1,1,1,-1,-1,1,-1}, {1,1,1,-1,-1,1,-1}, 2.5) is -0.1429
 */
export function codeCorrelation(codeA: any[][], codeB: any[][], delayChips: any[][], kind?: any[][]): any[][] {
  return perCell(code.correlation, {
    codeA: list(codeA, chip),
    codeB: list(codeB, chip),
    delayChips: number(delayChips, nonNegative),
    kind: optionalChoice(kind, CORRELATIONS, "periodic"),
  });
}

/**
 * Largest periodic correlation of a set of codes: all pairs, all delays, each code's own zero delay left out.
 * @customfunction CODE.PEAK
 * @param codes Range: one code a row, chips 1 or -1.
 * @returns Magnitude from 0 to 1.
 * @method Every pair at every whole delay, 32 chips at a time.
 * @source D. V. Sarwate, M. B. Pursley, Crosscorrelation properties of pseudorandom and related sequences, Proc. IEEE 68 (1980).
 * @errors #VALUE! for other chips than 1 and -1, and for sets that take more than about a second (156 codes of 1023 chips).
 * @example =CAP.CODE.PEAK({1,1,1,-1,-1,1,-1;1,1,1,-1,1,-1,-1}) is 0.7143
 */
export function codePeak(codes: any[][]): any[][] {
  return perCell(code.peak, { codes: grid(codes, chip) });
}

/**
 * Lower bound of the largest periodic correlation that any set of codes has.
 * @customfunction CODE.BOUND
 * @param codes Number of codes, at least 1.
 * @param length Chips a code, at least 1.
 * @returns Magnitude from 0 to 1.
 * @method sqrt((M - 1)/(M N - 1)), 0 for a single code.
 * @source L. R. Welch, Lower bounds on the maximum cross correlation of signals, IEEE Trans. Information Theory 20 (1974).
 * @example =CAP.CODE.BOUND(33, 31) is 0.177
 */
export function codeBound(codes: any[][], length: any[][]): any[][] {
  return perCell(code.bound, { codes: number(codes, code.codeCount), length: number(length, code.codeCount) });
}
