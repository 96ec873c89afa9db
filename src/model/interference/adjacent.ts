import { decibel, requireIn } from "../domain";
import { decibelSum } from "../numerics/decibel-sum";

/**
 * Signal to interference and noise beside a transmission on an adjacent channel, in dB:
 * 1/ACIR = 1/ACLR + 1/ACS, what the transmitter leaks and what the receiver lets in.
 *
 * Source: 3GPP TR 36.942, the clause on adjacent channel interference ratio.
 *
 * @param signalDbm wanted power
 * @param adjacentDbm power received on the adjacent channel
 * @param aclrDb adjacent channel leakage ratio of the transmitter
 * @param acsDb adjacent channel selectivity of the receiver
 * @param noiseDbm noise power
 */
export function adjacent(
  signalDbm: number,
  adjacentDbm: number,
  aclrDb: number,
  acsDb: number,
  noiseDbm: number,
): number {
  requireIn(decibel, "signalDbm", signalDbm);
  requireIn(decibel, "adjacentDbm", adjacentDbm);
  requireIn(decibel, "aclrDb", aclrDb);
  requireIn(decibel, "acsDb", acsDb);
  requireIn(decibel, "noiseDbm", noiseDbm);
  return signalDbm - decibelSum([adjacentDbm - aclrDb, adjacentDbm - acsDb, noiseDbm]);
}
