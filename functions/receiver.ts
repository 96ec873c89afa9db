import { decibel } from "../src/model/domain";
import { chip } from "../src/model/codes/chips";
import * as detection from "../src/model/codes/receiver";
import { delay, RECEIVERS } from "../src/model/codes/receiver-sinr";
import { userCountFromOne } from "../src/model/interference/domains";
import { grid, number, optionalChoice, parallel, perCell, wholeTable } from "../src/sheet/call";
import { errorCell } from "../src/sheet/to-cell";

/**
 * Signal to interference and noise of every user of an asynchronous uplink behind its receiver.
 * @customfunction RECEIVER.SINR
 * @param codes Range: one code a row, chips 1 or -1.
 * @param powersDbm Range: received power of each user in dBm; one cell serves all.
 * @param delaysChips Range: delay of each user in chips, whole or not; one cell serves all.
 * @param noiseDbm Noise power in the bandwidth matched to a symbol, in dBm.
 * @param [receiver] "matched" (if left out), "decorrelating", "mmse" or "successive".
 * @returns Column of ratios in dB, one for each row of codes.
 * @method Unit-energy codes, rectangular chips, random symbols of all users without end: each symbol meets two of every other user that is not aligned. "matched": P/(N + sum of P_j times both squared partial correlations). "decorrelating", "mmse": inverse of the correlation matrix, a window of 1, 3, 7, 15, ... symbols until the ratio changes by less than 1E-9. "successive": strongest first, perfect cancellation, then matched filter. Carrier phases do not matter.
 * @source S. Verdu, Multiuser Detection (1998), chapters 2, 3, 5, 6, 7.
 * @assumes Single path, perfect knowledge of codes, delays and powers; ratio in both phases of the carrier.
 * @errors #VALUE! for lists that do not match, or more than 160 users or 4096 chips. #N/A for single users: decorrelating, where the code depends on others so much that noise rises by more than 50 dB; mmse, where it depends on users more than 100 dB stronger.
 * @example =CAP.RECEIVER.SINR({1,1,1,-1;1,-1,1,1}, {-100;-90}, {0;0.5}, -110) is 3.846
 */
export function receiverSinr(
  codes: any[][],
  powersDbm: any[][],
  delaysChips: any[][],
  noiseDbm: any[][],
  receiver?: any[][],
): any[][] {
  return wholeTable(sinrColumn, {
    codes: grid(codes, chip),
    powersDbm: parallel(powersDbm, decibel),
    delaysChips: parallel(delaysChips, delay),
    noiseDbm: number(noiseDbm, decibel),
    receiver: optionalChoice(receiver, RECEIVERS, "matched"),
  });
}

/** One answer a row; a user without one gets the reason in its cell. */
function sinrColumn(...inputs: Parameters<typeof detection.sinr>): unknown[][] {
  return detection.sinr(...inputs).map((ratio) => [typeof ratio === "number" ? ratio : errorCell(ratio)]);
}

/**
 * Signal to interference and noise of a very large system with random codes and equal powers.
 * @customfunction RECEIVER.LARGESYSTEM
 * @param usersPerChip Users over chips a symbol, above 0.
 * @param snrDb Signal to noise of one user in the bandwidth matched to a symbol, in dB.
 * @param [receiver] "matched" (if left out), "decorrelating" or "mmse".
 * @returns Ratio in dB.
 * @method Users and chips without limit at their ratio b. matched: snr/(1 + b snr); decorrelating: snr (1 - b); mmse: the root x of x (1 + b snr/(1 + x)) = snr.
 * @source S. Verdu, S. Shamai, IEEE Trans. Information Theory 45 (1999) p. 622; D. N. C. Tse, S. V. Hanly, same volume p. 641.
 * @assumes Synchronous, random codes, equal powers.
 * @errors #N/A for decorrelating with as many users as chips or more.
 * @example =CAP.RECEIVER.LARGESYSTEM(0.5, 10, "mmse") is 7.590
 */
export function receiverLargesystem(usersPerChip: any[][], snrDb: any[][], receiver?: any[][]): any[][] {
  return perCell(detection.largeSystem, {
    usersPerChip: number(usersPerChip, detection.usersPerChipDomain),
    snrDb: number(snrDb, decibel),
    receiver: optionalChoice(receiver, detection.LARGE_SYSTEM_RECEIVERS, "matched"),
  });
}

/**
 * Mean signal to interference and noise of asynchronous equal-power users with random codes behind matched filters.
 * @customfunction RECEIVER.ASYNCHRONOUS
 * @param users Users, the wanted one included, at least 1.
 * @param chipsPerBit Chips a bit, at least 1.
 * @param ebN0Db Eb/N0 in dB.
 * @returns Ratio in dB, of powers; the source's is its root, the argument of Q.
 * @method 1 / ((K - 1)/(3N) + N0/(2 Eb)): the ratio in the phase of the wanted carrier, twice the mean of RECEIVER.SINR.
 * @source M. B. Pursley, Performance evaluation for phase-coded spread-spectrum multiple-access communication, IEEE Trans. Communications 25 (1977).
 * @assumes Random codes, delays and carrier phases; equal powers; rectangular chips.
 * @example =CAP.RECEIVER.ASYNCHRONOUS(10, 127, 8) is 9.877
 */
export function receiverAsynchronous(users: any[][], chipsPerBit: any[][], ebN0Db: any[][]): any[][] {
  return perCell(detection.asynchronous, {
    users: number(users, userCountFromOne),
    chipsPerBit: number(chipsPerBit, detection.chipCount),
    ebN0Db: number(ebN0Db, decibel),
  });
}
