import { decibel, domain, requireIn } from "../domain";
import { DomainError } from "../errors";
import { toDecibel } from "../numerics/decibel";
import { decibelSum } from "../numerics/decibel-sum";
import { userCountFromOne } from "../interference/domains";
import { pathLossExponent as exponents } from "../interference/hexagon";

export const distance = domain(1e-9, 1e9, "a distance from 1E-9 to 1E+9 km");
export const processingGain = domain(0, 1000, "a processing gain from 0 to 1000 dB");

/**
 * Signal to interference and noise behind a matched filter where all other users are stronger by the same amount, in dB:
 * G S / ((K - 1) S 10^(spread/10) + N).
 *
 * @param wantedDbm power of the wanted user
 * @param users K, the wanted one included, at least 1
 * @param spreadDb how much stronger each of the others is; below 0 weaker
 * @param processingGainDb chips a symbol in dB, at least 0
 * @param noiseDbm noise power in the band before despreading
 */
export function sinr(
  wantedDbm: number,
  users: number,
  spreadDb: number,
  processingGainDb: number,
  noiseDbm: number,
): number {
  requireIn(decibel, "wantedDbm", wantedDbm);
  requireIn(userCountFromOne, "users", users);
  requireIn(decibel, "spreadDb", spreadDb);
  requireIn(processingGain, "processingGainDb", processingGainDb);
  requireIn(decibel, "noiseDbm", noiseDbm);
  const others = users > 1 ? [wantedDbm + spreadDb + toDecibel(users - 1)] : [];
  return wantedDbm + processingGainDb - decibelSum([...others, noiseDbm]);
}

/**
 * Range of powers that power control has to even out between the nearest and the farthest user, in dB: 10 n log10(far/near).
 *
 * @param nearKm distance of the nearest user
 * @param farKm distance of the farthest, not below nearKm
 * @param pathLossExponent n, 1 to 10
 */
export function range(nearKm: number, farKm: number, pathLossExponent: number): number {
  requireIn(distance, "nearKm", nearKm);
  requireIn(distance, "farKm", farKm);
  requireIn(exponents, "pathLossExponent", pathLossExponent);
  if (farKm < nearKm) throw new DomainError("farKm", farKm, `a distance of at least nearKm, ${nearKm}`);
  return pathLossExponent * toDecibel(farKm / nearKm);
}
