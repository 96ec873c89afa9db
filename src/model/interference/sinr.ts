import { decibel, requireIn } from "../domain";
import { toDecibel } from "../numerics/decibel";
import { decibelSum } from "../numerics/decibel-sum";
import { requireEach } from "../radio/power";
import { bandwidth, bitRate, processingGain } from "./domains";

export { adjacent } from "./adjacent";
export { downlink, uplink } from "./cdma-link";
export { coverage } from "./coverage";
export { outage } from "./outage";
export { cluster, reuse } from "./reuse";

/**
 * Signal to interference and noise in dB: S / (sum of I + N).
 *
 * @param signalDbm wanted power
 * @param interferersDbm power of each interferer; may be empty
 * @param noiseDbm noise power
 */
export function fromPowers(signalDbm: number, interferersDbm: readonly number[], noiseDbm: number): number {
  requireIn(decibel, "signalDbm", signalDbm);
  if (interferersDbm.length > 0) requireEach(interferersDbm, "interferersDbm");
  requireIn(decibel, "noiseDbm", noiseDbm);
  return signalDbm - decibelSum([...interferersDbm, noiseDbm]);
}

/**
 * Signal to interference in dB, without noise.
 *
 * @param signalDbm wanted power
 * @param interferersDbm power of each interferer, at least one
 */
export function sir(signalDbm: number, interferersDbm: readonly number[]): number {
  requireIn(decibel, "signalDbm", signalDbm);
  requireEach(interferersDbm, "interferersDbm");
  return signalDbm - decibelSum(interferersDbm);
}

/**
 * Eb/N0 in dB from the SINR in the band: SINR + 10 log10(W/R).
 *
 * @param sinrDb -1000 to 1000 dB
 * @param bandwidthMHz noise bandwidth W
 * @param bitRateKbps bit rate R
 */
export function ebN0(sinrDb: number, bandwidthMHz: number, bitRateKbps: number): number {
  requireIn(decibel, "sinrDb", sinrDb);
  return sinrDb + spreadingDb(bandwidthMHz, bitRateKbps);
}

/**
 * SINR in the band in dB from Eb/N0: Eb/N0 - 10 log10(W/R).
 *
 * @param ebN0Db -1000 to 1000 dB
 * @param bandwidthMHz noise bandwidth W
 * @param bitRateKbps bit rate R
 */
export function fromEbN0(ebN0Db: number, bandwidthMHz: number, bitRateKbps: number): number {
  requireIn(decibel, "ebN0Db", ebN0Db);
  return ebN0Db - spreadingDb(bandwidthMHz, bitRateKbps);
}

function spreadingDb(bandwidthMHz: number, bitRateKbps: number): number {
  requireIn(bandwidth, "bandwidthMHz", bandwidthMHz);
  requireIn(bitRate, "bitRateKbps", bitRateKbps);
  return toDecibel(processingGain(bandwidthMHz, bitRateKbps));
}
