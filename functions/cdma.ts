import * as erlangB from "../src/model/blocking/erlang-b";
import { share, shareBelowOne } from "../src/model/domain";
import {
  bitRate,
  chipRate,
  ebN0,
  otherCellRatio as otherCellRatios,
  userCount,
} from "../src/model/interference/domains";
import * as cdma from "../src/model/schemes/cdma";
import { outage, outageTraffic } from "../src/model/schemes/cdma-outage";
import { trafficPerUser } from "../src/model/schemes/subscribers";
import { number, optionalNumber, parallel, perCell } from "../src/sheet/call";

/**
 * Pole capacity of the code-division uplink: users at which the load reaches 1.
 * @customfunction CDMA.POLE
 * @param chipRateMcps Chip rate in Mchip/s, above 0.
 * @param bitRateKbps Bit rate in kbit/s, above 0.
 * @param ebN0Db Required Eb/N0 in dB.
 * @param activity Share of time that a user sends, above 0 to 1.
 * @param otherCellRatio Other-cell interference over own-cell power, at least 0.
 * @param [powerControlErrorDb] Standard deviation of received powers in dB; 0 by default.
 * @param [efficiency] Share of own-cell interference that a multi-user receiver removes; 0 by default.
 * @returns Number of users of one cell and carrier, not rounded.
 * @method F / ((1 - e + i) L1) with L1 = 1/(1 + (W/R)/(Eb/N0 v)) (the own signal counts in the interference, hence 1 + inside) and F = exp(-(s ln10/10)^2/2) for power control with standard deviation s.
 * @source K. S. Gilhousen et al., On the Capacity of a Cellular CDMA System, IEEE Trans. Veh. Technol. 40 (1991); H. Holma, A. Toskala, WCDMA for UMTS, chapter on radio network planning.
 * @assumes Equal received powers but for the error; other cells loaded alike.
 * @errors #N/A where no interference is left.
 * @example =CAP.CDMA.POLE(3.84, 12.2, 5, 0.67, 0.55) is 96.49
 */
export function cdmaPole(
  chipRateMcps: any[][],
  bitRateKbps: any[][],
  ebN0Db: any[][],
  activity: any[][],
  otherCellRatio: any[][],
  powerControlErrorDb?: any[][],
  efficiency?: any[][],
): any[][] {
  return perCell(cdma.pole, {
    chipRateMcps: number(chipRateMcps, chipRate),
    bitRateKbps: number(bitRateKbps, bitRate),
    ebN0Db: number(ebN0Db, ebN0),
    activity: number(activity, cdma.activityFactor),
    otherCellRatio: number(otherCellRatio, otherCellRatios),
    powerControlErrorDb: optionalNumber(powerControlErrorDb, cdma.powerControlError, 0),
    efficiency: optionalNumber(efficiency, share, 0),
  });
}

/**
 * Users of one cell and carrier at the planned load of the code-division uplink.
 * @customfunction CDMA.CHANNELS
 * @param chipRateMcps Chip rate in Mchip/s, above 0.
 * @param bitRateKbps Bit rate in kbit/s, above 0.
 * @param ebN0Db Required Eb/N0 in dB.
 * @param activity Share of time that a user sends, above 0 to 1.
 * @param otherCellRatio Other-cell interference over own-cell power, at least 0.
 * @param [loadLimit] Planned share of the pole capacity, above 0 and below 1; 0.75 by default.
 * @param [powerControlErrorDb] Standard deviation of received powers in dB; 0 by default.
 * @param [efficiency] Share of own-cell interference that a multi-user receiver removes; 0 by default.
 * @returns Whole number of users.
 * @method floor(loadLimit POLE), POLE of CAP.CDMA.POLE.
 * @source K. S. Gilhousen et al., On the Capacity of a Cellular CDMA System, IEEE Trans. Veh. Technol. 40 (1991); H. Holma, A. Toskala, WCDMA for UMTS, chapter on radio network planning.
 * @assumes As CAP.CDMA.POLE.
 * @example =CAP.CDMA.CHANNELS(3.84, 12.2, 5, 0.67, 0.55) is 72
 */
export function cdmaChannels(
  chipRateMcps: any[][],
  bitRateKbps: any[][],
  ebN0Db: any[][],
  activity: any[][],
  otherCellRatio: any[][],
  loadLimit?: any[][],
  powerControlErrorDb?: any[][],
  efficiency?: any[][],
): any[][] {
  return perCell(cdma.channels, {
    chipRateMcps: number(chipRateMcps, chipRate),
    bitRateKbps: number(bitRateKbps, bitRate),
    ebN0Db: number(ebN0Db, ebN0),
    activity: number(activity, cdma.activityFactor),
    otherCellRatio: number(otherCellRatio, otherCellRatios),
    loadLimit: optionalNumber(loadLimit, cdma.loadLimitShare, 0.75),
    powerControlErrorDb: optionalNumber(powerControlErrorDb, cdma.powerControlError, 0),
    efficiency: optionalNumber(efficiency, share, 0),
  });
}

/**
 * Users of one cell and carrier that the code-division downlink power serves.
 * @customfunction CDMA.DOWNLINKCHANNELS
 * @param chipRateMcps Chip rate in Mchip/s, above 0.
 * @param bitRateKbps Bit rate in kbit/s, above 0.
 * @param ebN0Db Required Eb/N0 in dB.
 * @param activity Share of time that a user sends, above 0 to 1.
 * @param otherCellRatio Other-cell interference over own-cell power, at least 0.
 * @param orthogonality 1 for codes that stay orthogonal, 0 for none.
 * @param [loadLimit] Planned share of the maximum power, above 0 and below 1; 0.75 by default.
 * @param [overheadShare] Share of the maximum power for common channels; 0.2 by default. Type 0 for none.
 * @returns Whole number of users, not below 0.
 * @method floor((loadLimit - overhead) / (v (Eb/N0)/(W/R) ((1 - a) + i))), a the orthogonality (1 = fully orthogonal).
 * @source H. Holma, A. Toskala, WCDMA for UMTS, chapter on radio network planning (downlink load factor).
 * @assumes Mean values over the cell for a and i.
 * @errors #N/A where nothing limits the users.
 * @example =CAP.CDMA.DOWNLINKCHANNELS(3.84, 12.2, 7, 0.58, 0.65, 0.6) is 56
 */
export function cdmaDownlinkchannels(
  chipRateMcps: any[][],
  bitRateKbps: any[][],
  ebN0Db: any[][],
  activity: any[][],
  otherCellRatio: any[][],
  orthogonality: any[][],
  loadLimit?: any[][],
  overheadShare?: any[][],
): any[][] {
  return perCell(cdma.downlinkChannels, {
    chipRateMcps: number(chipRateMcps, chipRate),
    bitRateKbps: number(bitRateKbps, bitRate),
    ebN0Db: number(ebN0Db, ebN0),
    activity: number(activity, cdma.activityFactor),
    otherCellRatio: number(otherCellRatio, otherCellRatios),
    orthogonality: number(orthogonality, share),
    loadLimit: optionalNumber(loadLimit, cdma.loadLimitShare, 0.75),
    overheadShare: optionalNumber(overheadShare, shareBelowOne, 0.2),
  });
}

/**
 * Traffic under soft blocking, where a cell may use what its neighbours leave of the load.
 * @customfunction CDMA.SOFTTRAFFIC
 * @param channels Users at the planned load; need not be whole.
 * @param otherCellRatio Other-cell interference over own-cell power, at least 0.
 * @param blocking Blocking target, above 0 and below 1.
 * @returns Offered traffic in erlang.
 * @method Erlang-B traffic of N (1 + i) channels at the target, over 1 + i; continuous in N. Erlang B itself where i = 0.
 * @source H. Holma, A. Toskala, WCDMA for UMTS, section on soft capacity.
 * @assumes Neighbours carry the same traffic.
 * @example =CAP.CDMA.SOFTTRAFFIC(60, 0.55, 0.02) is 52.388
 */
export function cdmaSofttraffic(channels: any[][], otherCellRatio: any[][], blocking: any[][]): any[][] {
  return perCell(cdma.softTraffic, {
    channels: number(channels, erlangB.groupSize),
    otherCellRatio: number(otherCellRatio, otherCellRatios),
    blocking: number(blocking, erlangB.blockingTarget),
  });
}

/**
 * Subscribers of one cell and carrier at a blocking target, with soft blocking.
 * @customfunction CDMA.SUBSCRIBERS
 * @param chipRateMcps Chip rate in Mchip/s, above 0.
 * @param bitRateKbps Bit rate in kbit/s, above 0.
 * @param ebN0Db Required Eb/N0 in dB.
 * @param activity Share of time that a user sends, above 0 to 1.
 * @param otherCellRatio Other-cell interference over own-cell power, at least 0.
 * @param trafficPerUserE Traffic of one subscriber in erlang, above 0.
 * @param blocking Blocking target, above 0 and below 1.
 * @param [loadLimit] Planned share of the pole capacity, above 0 and below 1; 0.75 by default.
 * @param [powerControlErrorDb] Standard deviation of received powers in dB; 0 by default.
 * @param [efficiency] Share of own-cell interference that a multi-user receiver removes; 0 by default.
 * @returns Whole number of subscribers.
 * @method floor(SOFTTRAFFIC(loadLimit POLE, i, blocking) / traffic of one): the same blocking criterion as the other schemes.
 * @source K. S. Gilhousen et al., On the Capacity of a Cellular CDMA System, IEEE Trans. Veh. Technol. 40 (1991); H. Holma, A. Toskala, WCDMA for UMTS, chapter on radio network planning.
 * @assumes As CAP.CDMA.POLE and CAP.CDMA.SOFTTRAFFIC.
 * @example =CAP.CDMA.SUBSCRIBERS(3.84, 12.2, 5, 0.67, 0.55, 0.025, 0.02) is 2575
 */
export function cdmaSubscribers(
  chipRateMcps: any[][],
  bitRateKbps: any[][],
  ebN0Db: any[][],
  activity: any[][],
  otherCellRatio: any[][],
  trafficPerUserE: any[][],
  blocking: any[][],
  loadLimit?: any[][],
  powerControlErrorDb?: any[][],
  efficiency?: any[][],
): any[][] {
  return perCell(cdma.subscribers, {
    chipRateMcps: number(chipRateMcps, chipRate),
    bitRateKbps: number(bitRateKbps, bitRate),
    ebN0Db: number(ebN0Db, ebN0),
    activity: number(activity, cdma.activityFactor),
    otherCellRatio: number(otherCellRatio, otherCellRatios),
    trafficPerUserE: number(trafficPerUserE, trafficPerUser),
    blocking: number(blocking, erlangB.blockingTarget),
    loadLimit: optionalNumber(loadLimit, cdma.loadLimitShare, 0.75),
    powerControlErrorDb: optionalNumber(powerControlErrorDb, cdma.powerControlError, 0),
    efficiency: optionalNumber(efficiency, share, 0),
  });
}

/**
 * Power that a cell sends to serve its users on the code-division downlink.
 * @customfunction CDMA.DOWNLINKPOWER
 * @param ebN0Db Required Eb/N0 in dB of each service.
 * @param bitRateKbps Bit rate in kbit/s of each service.
 * @param activity Share of time sent, of each service.
 * @param users Users of each service.
 * @param chipRateMcps Chip rate in Mchip/s, above 0.
 * @param otherCellRatio Other-cell interference over own-cell power, at least 0.
 * @param orthogonality 1 for codes that stay orthogonal, 0 for none.
 * @param noiseFloorDbm Noise power of a mobile in the carrier, dBm.
 * @param meanLossDb Mean path loss from cell to mobile, dB.
 * @param commonDbm Power of the common channels, dBm.
 * @returns Mean power of the cell in dBm.
 * @method (common + noise meanLoss sum K v (Eb/N0)/(W/R)) / (1 - downlink load), load of CAP.LOAD.DOWNLINK.
 * @source K. Sipila, Z.-C. Honkasalo, J. Laiho-Steffens, A. Wacker, Estimation of Capacity and Required Transmission Power of WCDMA Downlink Based on a Downlink Pole Equation, VTC 2000.
 * @assumes Users meet the mean loss. Radiated power is subject to local licence and exposure limits, which govern.
 * @errors #N/A at or above a load of 1.
 * @example =CAP.CDMA.DOWNLINKPOWER({7}, {12.2}, {0.58}, {40}, 3.84, 0.65, 0.6, -99, 130, 33) is 36.04
 */
export function cdmaDownlinkpower(
  ebN0Db: any[][],
  bitRateKbps: any[][],
  activity: any[][],
  users: any[][],
  chipRateMcps: any[][],
  otherCellRatio: any[][],
  orthogonality: any[][],
  noiseFloorDbm: any[][],
  meanLossDb: any[][],
  commonDbm: any[][],
): any[][] {
  return perCell(cdma.downlinkPower, {
    ebN0Db: parallel(ebN0Db, ebN0),
    bitRateKbps: parallel(bitRateKbps, bitRate),
    activity: parallel(activity, share),
    users: parallel(users, userCount),
    chipRateMcps: number(chipRateMcps, chipRate),
    otherCellRatio: number(otherCellRatio, otherCellRatios),
    orthogonality: number(orthogonality, share),
    noiseFloorDbm: number(noiseFloorDbm, cdma.powerLevel),
    meanLossDb: number(meanLossDb, cdma.lossLevel),
    commonDbm: number(commonDbm, cdma.powerLevel),
  });
}

/**
 * Probability that the load of the code-division uplink exceeds its limit; it is not call blocking.
 * @customfunction CDMA.OUTAGE
 * @param trafficE Offered traffic of the cell in erlang, 0 to 1,000,000.
 * @param chipRateMcps Chip rate in Mchip/s, above 0.
 * @param bitRateKbps Bit rate in kbit/s, above 0.
 * @param ebN0Db Required Eb/N0 in dB.
 * @param activity Share of time that a user sends, above 0 to 1.
 * @param otherCellRatio Other-cell interference over own-cell power, at least 0.
 * @param [loadLimit] Load not to exceed, above 0 and below 1; 0.75 by default.
 * @param [powerControlErrorDb] Standard deviation of received powers in dB, 0 to 20; 0 by default.
 * @returns Probability from 0 to 1.
 * @method P(N L > limit) for a Poisson number N of active users of mean v A (1 + i) and the load L = 1/(1+(W/R)/(Eb/N0)) of one: v thins the number, not L. Other cells add to mean and variance alike, by i. Exact Poisson tail without power-control error. With it each load is times a lognormal of median 1; the transform exp(-m (1 - phi)) of the sum is inverted numerically, absolute error below 1e-9 (1e-7 below 0.09 dB), and 0 stands for less than 1e-12.
 * @source A. M. Viterbi, A. J. Viterbi, Erlang Capacity of a Power Controlled CDMA System, IEEE J. Select. Areas Commun. 11 (1993). J. Abate, W. Whitt, The Fourier-Series Method for Inverting Transforms, Queueing Systems 10 (1992).
 * @assumes Calls are admitted without limit; power-control errors of users are independent; other-cell interference as that of i times the cell's own users.
 * @errors #VALUE! with a power-control error where v A (1 + i) is above 1,000,000.
 * @example =CAP.CDMA.OUTAGE(60, 3.84, 12.2, 5, 0.67, 0.55) is 0.0508
 */
export function cdmaOutage(
  trafficE: any[][],
  chipRateMcps: any[][],
  bitRateKbps: any[][],
  ebN0Db: any[][],
  activity: any[][],
  otherCellRatio: any[][],
  loadLimit?: any[][],
  powerControlErrorDb?: any[][],
): any[][] {
  return perCell(outage, {
    trafficE: number(trafficE, outageTraffic),
    chipRateMcps: number(chipRateMcps, chipRate),
    bitRateKbps: number(bitRateKbps, bitRate),
    ebN0Db: number(ebN0Db, ebN0),
    activity: number(activity, cdma.activityFactor),
    otherCellRatio: number(otherCellRatio, otherCellRatios),
    loadLimit: optionalNumber(loadLimit, cdma.loadLimitShare, 0.75),
    powerControlErrorDb: optionalNumber(powerControlErrorDb, cdma.powerControlError, 0),
  });
}
