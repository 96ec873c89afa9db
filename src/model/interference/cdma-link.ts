import { decibel, requireIn, share } from "../domain";
import { NoAnswerError } from "../errors";
import { fromDecibel, toDecibel } from "../numerics/decibel";
import { bitRate, chipRate, otherCellRatio as otherCellRatios, processingGain, userCountFromOne } from "./domains";

function ebN0(gain: number, interference: number, snrDb: number | undefined): number {
  if (snrDb !== undefined) requireIn(decibel, "snrDb", snrDb);
  const unwanted = interference + (snrDb === undefined ? 0 : fromDecibel(-snrDb));
  if (unwanted === 0) throw new NoAnswerError("There is neither interference nor noise: the ratio has no limit.");
  return toDecibel(gain) - toDecibel(unwanted);
}

/**
 * Eb/(N0 + I0) in dB of one of several equal-power users of a code-division uplink:
 * (W/R) / (v ((1 - e)(K - 1) + i K) + 1/snr).
 *
 * Source: K. S. Gilhousen et al., "On the capacity of a cellular CDMA system", IEEE Trans. Veh. Technol. 40 (1991).
 *
 * @param users K, the user himself included, at least 1
 * @param chipRateMcps chip rate W
 * @param bitRateKbps bit rate R
 * @param activity v, share of time that an interferer sends, 0 to 1
 * @param otherCellRatio i, other-cell interference over own-cell power
 * @param snrDb signal to noise of one user before despreading; without it interference alone counts
 * @param efficiency e, share of the own-cell interference that a multi-user receiver removes, 0 to 1
 */
export function uplink(
  users: number,
  chipRateMcps: number,
  bitRateKbps: number,
  activity: number,
  otherCellRatio: number,
  snrDb?: number,
  efficiency = 0,
): number {
  requireLink(users, chipRateMcps, bitRateKbps, activity, otherCellRatio);
  requireIn(share, "efficiency", efficiency);
  const interference = activity * ((1 - efficiency) * (users - 1) + otherCellRatio * users);
  return ebN0(processingGain(chipRateMcps, bitRateKbps), interference, snrDb);
}

/**
 * Eb/(N0 + I0) in dB of one of several equal-power users of a code-division downlink:
 * (W/R) / (v ((1 - a)(K - 1) + i K) + 1/snr).
 *
 * Source: H. Holma, A. Toskala, "WCDMA for UMTS", the chapter on radio network planning; a = 1 is full orthogonality.
 *
 * @param users K, the user himself included, at least 1
 * @param chipRateMcps chip rate W
 * @param bitRateKbps bit rate R
 * @param activity v, share of time that an interferer is sent to, 0 to 1
 * @param otherCellRatio i, other-cell interference over own-cell power
 * @param orthogonality a, 1 for codes that stay orthogonal, 0 for none
 * @param snrDb signal to noise of one user before despreading; without it interference alone counts
 */
export function downlink(
  users: number,
  chipRateMcps: number,
  bitRateKbps: number,
  activity: number,
  otherCellRatio: number,
  orthogonality: number,
  snrDb?: number,
): number {
  requireLink(users, chipRateMcps, bitRateKbps, activity, otherCellRatio);
  requireIn(share, "orthogonality", orthogonality);
  const interference = activity * ((1 - orthogonality) * (users - 1) + otherCellRatio * users);
  return ebN0(processingGain(chipRateMcps, bitRateKbps), interference, snrDb);
}

function requireLink(
  users: number,
  chipRateMcps: number,
  bitRateKbps: number,
  activity: number,
  otherCellRatio: number,
): void {
  requireIn(userCountFromOne, "users", users);
  requireIn(chipRate, "chipRateMcps", chipRateMcps);
  requireIn(bitRate, "bitRateKbps", bitRateKbps);
  requireIn(share, "activity", activity);
  requireIn(otherCellRatios, "otherCellRatio", otherCellRatio);
}
