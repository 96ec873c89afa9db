import { requireIn, share } from "../domain";
import { DomainError } from "../errors";
import { fromDecibel } from "../numerics/decibel";
import { bitRate, chipRate, ebN0, otherCellRatio as otherCellRatios, processingGain, userCount } from "./domains";

/** Some users of one service in the cell. */
interface Service {
  readonly ebN0: number;
  readonly gain: number;
  readonly activity: number;
  readonly users: number;
}

function services(
  ebN0Db: readonly number[],
  bitRateKbps: readonly number[],
  activity: readonly number[],
  users: readonly number[],
  chipRateMcps: number,
): Service[] {
  requireIn(chipRate, "chipRateMcps", chipRateMcps);
  const lists = { bitRateKbps, activity, users };
  for (const [name, list] of Object.entries(lists)) {
    if (list.length !== ebN0Db.length) {
      throw new DomainError(`number of ${name}`, list.length, `${ebN0Db.length}, as many as ebN0Db`);
    }
  }
  return ebN0Db.map((needed, i) => {
    requireIn(ebN0, "ebN0Db", needed);
    requireIn(bitRate, "bitRateKbps", bitRateKbps[i]!);
    requireIn(share, "activity", activity[i]!);
    requireIn(userCount, "users", users[i]!);
    return {
      ebN0: fromDecibel(needed),
      gain: processingGain(chipRateMcps, bitRateKbps[i]!),
      activity: activity[i]!,
      users: users[i]!,
    };
  });
}

/**
 * Uplink load factor of a cell: (1 - e + i) times the sum of users / (1 + (W/R)/(Eb/N0 v)). At 1 the cell is at its pole.
 *
 * The own signal counts as load, hence the 1 in the denominator (H. Holma, A. Toskala, "WCDMA for UMTS", the chapter on
 * radio network planning).
 *
 * @param ebN0Db required Eb/N0 of each service, -100 to 100 dB
 * @param bitRateKbps bit rate of each service
 * @param activity share of time that each user sends, 0 to 1
 * @param users simultaneous users of each service
 * @param chipRateMcps chip rate W
 * @param otherCellRatio i, other-cell interference over own-cell interference
 * @param efficiency e, share of the own-cell interference that a multi-user receiver removes, 0 to 1
 */
export function uplink(
  ebN0Db: readonly number[],
  bitRateKbps: readonly number[],
  activity: readonly number[],
  users: readonly number[],
  chipRateMcps: number,
  otherCellRatio: number,
  efficiency = 0,
): number {
  requireIn(otherCellRatios, "otherCellRatio", otherCellRatio);
  requireIn(share, "efficiency", efficiency);
  let sum = 0;
  for (const service of services(ebN0Db, bitRateKbps, activity, users, chipRateMcps)) {
    const needed = service.ebN0 * service.activity;
    sum += (service.users * needed) / (needed + service.gain);
  }
  return (1 - efficiency + otherCellRatio) * sum;
}

/**
 * Downlink load factor of a cell: the sum of users v (Eb/N0)/(W/R) ((1 - a) + i). At 1 the cell is at its pole.
 *
 * Source: H. Holma, A. Toskala, "WCDMA for UMTS", the chapter on radio network planning; a = 1 is full orthogonality.
 *
 * @param ebN0Db required Eb/N0 of each service, -100 to 100 dB
 * @param bitRateKbps bit rate of each service
 * @param activity share of time that each user is sent to, 0 to 1
 * @param users simultaneous users of each service
 * @param chipRateMcps chip rate W
 * @param otherCellRatio i, other-cell interference over own-cell interference, mean over the cell
 * @param orthogonality a, 1 for codes that stay orthogonal, 0 for none
 */
export function downlink(
  ebN0Db: readonly number[],
  bitRateKbps: readonly number[],
  activity: readonly number[],
  users: readonly number[],
  chipRateMcps: number,
  otherCellRatio: number,
  orthogonality: number,
): number {
  requireIn(otherCellRatios, "otherCellRatio", otherCellRatio);
  requireIn(share, "orthogonality", orthogonality);
  let sum = 0;
  for (const service of services(ebN0Db, bitRateKbps, activity, users, chipRateMcps)) {
    sum += (service.users * service.activity * service.ebN0) / service.gain;
  }
  return (1 - orthogonality + otherCellRatio) * sum;
}
