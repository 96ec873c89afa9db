import * as erlangB from "../blocking/erlang-b";
import { domain, requireIn, share, shareBelowOne } from "../domain";
import { NoAnswerError } from "../errors";
import { bitRate, chipRate, ebN0, otherCellRatio as otherCellRatios, processingGain } from "../interference/domains";
import * as load from "../interference/load";
import { fromDecibel, toDecibel } from "../numerics/decibel";
import { wholeWithin } from "../numerics/whole";
import { subscribersFor } from "./subscribers";

/** Share of time that a user sends; 0 would mean no load at all. */
export const activityFactor = domain(0, 1, "a share above 0, up to 1", { openLow: true });
/** Share of the pole capacity that is planned for. */
export const loadLimitShare = domain(0, 1, "a share above 0 and below 1", { openLow: true, openHigh: true });
export const powerControlError = domain(0, 20, "a standard deviation from 0 to 20 dB");
export const powerLevel = domain(-300, 300, "a power from -300 to 300 dBm");
export const lossLevel = domain(0, 400, "a loss from 0 to 400 dB");

const DECIBEL_PER_NEPER = 10 / Math.LN10;

/**
 * Pole capacity of the uplink: users at which the load would reach 1.
 *
 * F / ((1 - e + i) L1), L1 = 1/(1 + (W/R)/(Eb/N0 v)) the load of one user, F = exp(-(s ln10/10)^2 / 2) for imperfect power
 * control with standard deviation s in dB.
 *
 * @param chipRateMcps chip rate W
 * @param bitRateKbps bit rate R
 * @param ebN0Db required Eb/N0
 * @param activity v, share of time that a user sends
 * @param otherCellRatio i, other-cell interference over own-cell power
 * @param powerControlErrorDb s, standard deviation of received powers
 * @param efficiency e, share of own-cell interference that a multi-user receiver removes
 * @returns users, not rounded
 */
export function pole(
  chipRateMcps: number,
  bitRateKbps: number,
  ebN0Db: number,
  activity: number,
  otherCellRatio: number,
  powerControlErrorDb = 0,
  efficiency = 0,
): number {
  requireIn(chipRate, "chipRateMcps", chipRateMcps);
  requireIn(bitRate, "bitRateKbps", bitRateKbps);
  requireIn(ebN0, "ebN0Db", ebN0Db);
  requireIn(activityFactor, "activity", activity);
  requireIn(otherCellRatios, "otherCellRatio", otherCellRatio);
  requireIn(powerControlError, "powerControlErrorDb", powerControlErrorDb);
  requireIn(share, "efficiency", efficiency);
  const shared = 1 - efficiency + otherCellRatio;
  if (shared === 0) {
    throw new NoAnswerError(
      "The receiver removes all interference and other cells add none: nothing limits the users.",
    );
  }
  const users = 1 + processingGain(chipRateMcps, bitRateKbps) / (fromDecibel(ebN0Db) * activity);
  const spread = powerControlErrorDb / DECIBEL_PER_NEPER;
  return (Math.exp((-spread * spread) / 2) * users) / shared;
}

/**
 * Users of one cell and carrier at a planned load: floor(loadLimit pole).
 *
 * @param chipRateMcps as for pole
 * @param bitRateKbps as for pole
 * @param ebN0Db as for pole
 * @param activity as for pole
 * @param otherCellRatio as for pole
 * @param loadLimit planned share of the pole capacity
 * @param powerControlErrorDb as for pole
 * @param efficiency as for pole
 */
export function channels(
  chipRateMcps: number,
  bitRateKbps: number,
  ebN0Db: number,
  activity: number,
  otherCellRatio: number,
  loadLimit = 0.75,
  powerControlErrorDb = 0,
  efficiency = 0,
): number {
  requireIn(loadLimitShare, "loadLimit", loadLimit);
  return wholeWithin(
    loadLimit * pole(chipRateMcps, bitRateKbps, ebN0Db, activity, otherCellRatio, powerControlErrorDb, efficiency),
  );
}

/**
 * Users of one cell and carrier that the downlink power serves:
 * floor((loadLimit - overhead) / (v (Eb/N0)/(W/R) ((1 - a) + i))).
 *
 * @param chipRateMcps as for pole
 * @param bitRateKbps as for pole
 * @param ebN0Db required Eb/N0 of the downlink
 * @param activity as for pole
 * @param otherCellRatio as for pole, at a mean place of the cell
 * @param orthogonality a, 1 for codes that stay orthogonal
 * @param loadLimit planned share of the maximum power
 * @param overheadShare share of the maximum power that common channels take
 */
export function downlinkChannels(
  chipRateMcps: number,
  bitRateKbps: number,
  ebN0Db: number,
  activity: number,
  otherCellRatio: number,
  orthogonality: number,
  loadLimit = 0.75,
  overheadShare = 0.2,
): number {
  requireIn(activityFactor, "activity", activity);
  requireIn(loadLimitShare, "loadLimit", loadLimit);
  requireIn(shareBelowOne, "overheadShare", overheadShare);
  const one = load.downlink([ebN0Db], [bitRateKbps], [activity], [1], chipRateMcps, otherCellRatio, orthogonality);
  if (one === 0) {
    throw new NoAnswerError("Codes stay orthogonal and other cells add no interference: nothing limits the users.");
  }
  return Math.max(0, wholeWithin((loadLimit - overheadShare) / one));
}

/**
 * Traffic under soft blocking: ErlangB.traffic(N (1 + i), B) / (1 + i), the group seen with its neighbours' share of the load.
 *
 * @param channels N, users at the planned load; need not be whole
 * @param otherCellRatio i
 * @param blocking blocking target
 * @returns erlang
 */
export function softTraffic(channels: number, otherCellRatio: number, blocking: number): number {
  requireIn(otherCellRatios, "otherCellRatio", otherCellRatio);
  return erlangB.traffic(channels * (1 + otherCellRatio), blocking) / (1 + otherCellRatio);
}

/**
 * Subscribers of one cell and carrier: floor(softTraffic(loadLimit pole, i, blocking) / traffic of one).
 *
 * @param chipRateMcps as for pole
 * @param bitRateKbps as for pole
 * @param ebN0Db as for pole
 * @param activity as for pole
 * @param otherCellRatio as for pole
 * @param trafficPerUserE traffic of one subscriber, erlang
 * @param blocking blocking target
 * @param loadLimit as for channels
 * @param powerControlErrorDb as for pole
 * @param efficiency as for pole
 */
export function subscribers(
  chipRateMcps: number,
  bitRateKbps: number,
  ebN0Db: number,
  activity: number,
  otherCellRatio: number,
  trafficPerUserE: number,
  blocking: number,
  loadLimit = 0.75,
  powerControlErrorDb = 0,
  efficiency = 0,
): number {
  requireIn(loadLimitShare, "loadLimit", loadLimit);
  const users =
    loadLimit * pole(chipRateMcps, bitRateKbps, ebN0Db, activity, otherCellRatio, powerControlErrorDb, efficiency);
  return subscribersFor(softTraffic(users, otherCellRatio, blocking), trafficPerUserE);
}

/**
 * Power that a cell sends: (common + noise meanLoss sum K v (Eb/N0)/(W/R)) / (1 - downlink load).
 *
 * K. Sipila, Z.-C. Honkasalo, J. Laiho-Steffens, A. Wacker, "Estimation of capacity and required transmission power of WCDMA
 * downlink based on a downlink pole equation", VTC 2000.
 *
 * @param ebN0Db required Eb/N0 per service
 * @param bitRateKbps bit rate per service
 * @param activity activity per service
 * @param users users per service
 * @param chipRateMcps chip rate W
 * @param otherCellRatio i
 * @param orthogonality a
 * @param noiseFloorDbm noise of a mobile in the carrier
 * @param meanLossDb mean path loss
 * @param commonDbm power of the common channels
 * @returns dBm
 * @throws NoAnswerError at or above the pole
 */
export function downlinkPower(
  ebN0Db: readonly number[],
  bitRateKbps: readonly number[],
  activity: readonly number[],
  users: readonly number[],
  chipRateMcps: number,
  otherCellRatio: number,
  orthogonality: number,
  noiseFloorDbm: number,
  meanLossDb: number,
  commonDbm: number,
): number {
  requireIn(powerLevel, "noiseFloorDbm", noiseFloorDbm);
  requireIn(lossLevel, "meanLossDb", meanLossDb);
  requireIn(powerLevel, "commonDbm", commonDbm);
  const used = load.downlink(ebN0Db, bitRateKbps, activity, users, chipRateMcps, otherCellRatio, orthogonality);
  if (used >= 1) {
    throw new NoAnswerError(`The downlink load is ${used}: no power serves these users, the pole is at 1.`);
  }
  // Load with neither orthogonality nor other cells is the plain sum of K v (Eb/N0)/(W/R).
  const needed = load.downlink(ebN0Db, bitRateKbps, activity, users, chipRateMcps, 0, 0);
  const milliwatt = fromDecibel(commonDbm) + fromDecibel(noiseFloorDbm + meanLossDb) * needed;
  return toDecibel(milliwatt / (1 - used));
}
