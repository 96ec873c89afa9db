import { decibel } from "../src/model/domain";
import * as nearFar from "../src/model/codes/near-far";
import { userCountFromOne } from "../src/model/interference/domains";
import { pathLossExponent as exponents } from "../src/model/interference/hexagon";
import { number, perCell } from "../src/sheet/call";

/**
 * Signal to interference and noise of a weak user among equally strong others behind a matched filter.
 * @customfunction NEARFAR.SINR
 * @param wantedDbm Received power of the wanted user in dBm.
 * @param users Users, the wanted one included, at least 1.
 * @param spreadDb How much stronger each of the others is, in dB; below 0 weaker.
 * @param processingGainDb Processing gain in dB: 10 log10 of the chips a symbol.
 * @param noiseDbm Noise power in the band before despreading, in dBm.
 * @returns Ratio in dB.
 * @method G S / ((K - 1) S 10^(spread/10) + N).
 * @source Definition of the near-far effect; S. Verdu, Multiuser Detection (1998), chapter 3; common practice.
 * @assumes Other users' codes act as noise that despreading lowers by the processing gain.
 * @example =CAP.NEARFAR.SINR(-110, 10, 20, 21, -105) is -8.558
 */
export function nearfarSinr(
  wantedDbm: any[][],
  users: any[][],
  spreadDb: any[][],
  processingGainDb: any[][],
  noiseDbm: any[][],
): any[][] {
  return perCell(nearFar.sinr, {
    wantedDbm: number(wantedDbm, decibel),
    users: number(users, userCountFromOne),
    spreadDb: number(spreadDb, decibel),
    processingGainDb: number(processingGainDb, nearFar.processingGain),
    noiseDbm: number(noiseDbm, decibel),
  });
}

/**
 * Range of powers that power control has to even out between the nearest and the farthest user.
 * @customfunction NEARFAR.RANGE
 * @param nearKm Distance of the nearest user in km.
 * @param farKm Distance of the farthest user in km, not below nearKm.
 * @param pathLossExponent Path-loss exponent, 1 to 10.
 * @returns Range in dB.
 * @method 10 n log10(far/near).
 * @source Log-distance path loss; common practice.
 * @assumes One slope of path loss, no shadowing: its spread comes on top.
 * @errors #VALUE! for a farthest user nearer than the nearest.
 * @example =CAP.NEARFAR.RANGE(0.1, 10, 4) is 80
 */
export function nearfarRange(nearKm: any[][], farKm: any[][], pathLossExponent: any[][]): any[][] {
  return perCell(nearFar.range, {
    nearKm: number(nearKm, nearFar.distance),
    farKm: number(farKm, nearFar.distance),
    pathLossExponent: number(pathLossExponent, exponents),
  });
}
