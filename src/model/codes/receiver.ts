import { decibel, domain, requireIn, requireOneOf } from "../domain";
import { NoAnswerError } from "../errors";
import { fromDecibel, toDecibel } from "../numerics/decibel";
import { userCountFromOne } from "../interference/domains";

export { sinr } from "./receiver-sinr";

export const LARGE_SYSTEM_RECEIVERS = ["matched", "decorrelating", "mmse"] as const;
export const usersPerChipDomain = domain(0, 1e6, "a number of users a chip above 0 and up to 1E+6", { openLow: true });
export const chipCount = domain(1, 1e9, "a number of chips from 1 to 1E+9");

/**
 * Signal to interference and noise of a very large synchronous system with random codes and equal powers, in dB.
 *
 * Sources: S. Verdu, S. Shamai, "Spectral efficiency of CDMA with random spreading", IEEE Trans. Inform. Theory 45 (1999);
 * D. N. C. Tse, S. V. Hanly, "Linear multiuser receivers", same volume. With b users a chip: matched snr/(1 + b snr),
 * decorrelating snr (1 - b), mmse the root x of x (1 + b snr/(1 + x)) = snr.
 *
 * @param usersPerChip b, above 0
 * @param snrDb signal to noise of one user in the bandwidth matched to a symbol
 * @param receiver one of the three
 * @throws NoAnswerError decorrelating, with as many users as chips or more
 */
export function largeSystem(usersPerChip: number, snrDb: number, receiver: string = "matched"): number {
  requireIn(usersPerChipDomain, "usersPerChip", usersPerChip);
  requireIn(decibel, "snrDb", snrDb);
  requireOneOf(LARGE_SYSTEM_RECEIVERS, "receiver", receiver);
  const snr = fromDecibel(snrDb);
  switch (receiver) {
    case "matched":
      return toDecibel(snr) - toDecibel(1 + usersPerChip * snr);
    case "decorrelating":
      if (usersPerChip >= 1) {
        throw new NoAnswerError(
          `With ${usersPerChip} users a chip codes depend on each other: nothing separates them.`,
        );
      }
      return toDecibel(snr) + toDecibel(1 - usersPerChip);
    case "mmse": {
      const half = 0.5 * (1 + (usersPerChip - 1) * snr);
      const root = Math.sqrt(half * half + snr);
      // Of the two forms of the root the one that adds.
      return toDecibel(half > 0 ? snr / (half + root) : root - half);
    }
  }
}

/**
 * Mean signal to interference and noise of asynchronous users with random codes behind matched filters, in dB:
 * 1 / ((K - 1)/(3N) + N0/(2 Eb)).
 *
 * M. B. Pursley, "Performance evaluation for phase-coded spread-spectrum multiple-access communication", IEEE Trans. Commun. 25
 * (1977); his ratio is one of amplitudes, the root of this. It is the ratio in the phase of the wanted carrier, where interferers
 * of random phase leave half their power, as noise does: twice the mean of `sinr` of random codes and delays, which counts
 * both phases.
 *
 * @param users K, the user himself included, at least 1
 * @param chipsPerBit N
 * @param ebN0Db Eb/N0
 */
export function asynchronous(users: number, chipsPerBit: number, ebN0Db: number): number {
  requireIn(userCountFromOne, "users", users);
  requireIn(chipCount, "chipsPerBit", chipsPerBit);
  requireIn(decibel, "ebN0Db", ebN0Db);
  return -toDecibel((users - 1) / (3 * chipsPerBit) + 0.5 * fromDecibel(-ebN0Db));
}
