import { share } from "../src/model/domain";
import { bitRate, chipRate, ebN0, otherCellRatio as otherCell, userCount } from "../src/model/interference/domains";
import * as load from "../src/model/interference/load";
import { number, optionalNumber, parallel, perCell } from "../src/sheet/call";

/**
 * Uplink load factor of a code-division cell with its services; 1 is the pole capacity.
 * @customfunction LOAD.UPLINK
 * @param ebN0Db Range: required Eb/N0 of each service in dB.
 * @param bitRateKbps Range: bit rate of each service in kbit/s.
 * @param activity Range: share of time that a user of each service sends, 0 to 1.
 * @param users Range: simultaneous users of each service, at least 0.
 * @param chipRateMcps Chip rate in Mchip/s.
 * @param otherCellRatio Other-cell interference over own-cell interference, at least 0.
 * @param [efficiency] Share of the own-cell interference that a multi-user receiver removes, 0 to 1; 0 if left out.
 * @returns Load factor, 0 without users; 1 and more cannot be served.
 * @method (1 - e + i) times the sum of users / (1 + (W/R)/(Eb/N0 v)); the own signal counts as load, hence the 1.
 * @source H. Holma, A. Toskala, WCDMA for UMTS, chapter on radio network planning; K. Sipila et al., IEEE VTC Spring 2000.
 * @assumes Perfect power control: every user is received with just the power that he needs.
 * @errors #VALUE! for lists that do not match place by place.
 * @example =CAP.LOAD.UPLINK({5;2;1.5}, {12.2;64;144}, {0.67;1;1}, {30;4;2}, 3.84, 0.55) is 0.6264
 */
export function loadUplink(
  ebN0Db: any[][],
  bitRateKbps: any[][],
  activity: any[][],
  users: any[][],
  chipRateMcps: any[][],
  otherCellRatio: any[][],
  efficiency?: any[][],
): any[][] {
  return perCell(load.uplink, {
    ebN0Db: parallel(ebN0Db, ebN0),
    bitRateKbps: parallel(bitRateKbps, bitRate),
    activity: parallel(activity, share),
    users: parallel(users, userCount),
    chipRateMcps: number(chipRateMcps, chipRate),
    otherCellRatio: number(otherCellRatio, otherCell),
    efficiency: optionalNumber(efficiency, share, 0),
  });
}

/**
 * Downlink load factor of a code-division cell with its services; 1 is the pole capacity.
 * @customfunction LOAD.DOWNLINK
 * @param ebN0Db Range: required Eb/N0 of each service in dB.
 * @param bitRateKbps Range: bit rate of each service in kbit/s.
 * @param activity Range: share of time that a user of each service is sent to, 0 to 1.
 * @param users Range: simultaneous users of each service, at least 0.
 * @param chipRateMcps Chip rate in Mchip/s.
 * @param otherCellRatio Other-cell interference over own-cell interference, mean over the cell, at least 0.
 * @param orthogonality 1 for codes that stay orthogonal, 0 for none.
 * @returns Load factor, 0 without users; 1 and more cannot be served.
 * @method Sum of users v (Eb/N0)/(W/R) ((1 - a) + i), a = orthogonality: 1 is orthogonal.
 * @source H. Holma, A. Toskala, WCDMA for UMTS, chapter on radio network planning; K. Sipila et al., IEEE VTC Spring 2000.
 * @assumes Power is shared as each user needs; common channels are not in the load.
 * @errors #VALUE! for lists that do not match place by place.
 * @example =CAP.LOAD.DOWNLINK({7}, {12.2}, {0.58}, {40}, 3.84, 0.65, 0.6) is 0.3879
 */
export function loadDownlink(
  ebN0Db: any[][],
  bitRateKbps: any[][],
  activity: any[][],
  users: any[][],
  chipRateMcps: any[][],
  otherCellRatio: any[][],
  orthogonality: any[][],
): any[][] {
  return perCell(load.downlink, {
    ebN0Db: parallel(ebN0Db, ebN0),
    bitRateKbps: parallel(bitRateKbps, bitRate),
    activity: parallel(activity, share),
    users: parallel(users, userCount),
    chipRateMcps: number(chipRateMcps, chipRate),
    otherCellRatio: number(otherCellRatio, otherCell),
    orthogonality: number(orthogonality, share),
  });
}
