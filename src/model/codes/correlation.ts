import { requireOneOf } from "../domain";
import { DomainError } from "../errors";
import { chipsOf } from "./chips";

export const CORRELATIONS = ["periodic", "aperiodic", "odd"] as const;

/**
 * Correlation of two codes at a delay of the second, from -1 to 1.
 *
 * With C(d) = (1/N) sum of a[k] b[k-d] over the k at which both exist: "aperiodic" is C(d), "periodic" C(d) + C(d-N), as when
 * the neighbour symbol of b is the same, "odd" C(d) - C(d-N), as when it is the opposite. Linear between whole delays, which
 * is exact for rectangular chips.
 *
 * Source: D. V. Sarwate, M. B. Pursley, "Crosscorrelation properties of pseudorandom and related sequences", Proc. IEEE 68 (1980).
 *
 * @param codeA chips of +1 and -1
 * @param codeB as many chips
 * @param delayChips d, from 0 to below the number of chips N
 * @param kind which correlation
 */
export function correlation(
  codeA: readonly number[],
  codeB: readonly number[],
  delayChips: number,
  kind: string = "periodic",
): number {
  requireOneOf(CORRELATIONS, "kind", kind);
  const a = chipsOf(codeA, "codeA");
  const b = chipsOf(codeB, "codeB");
  const length = a.length;
  if (b.length !== length) {
    throw new DomainError("number of chips of codeB", b.length, `${length}, as in codeA`);
  }
  if (!(delayChips >= 0 && delayChips < length)) {
    throw new DomainError("delayChips", delayChips, `a delay from 0 to below the code length of ${length}`);
  }
  const now = aperiodic(a, b, delayChips);
  if (kind === "aperiodic") return now;
  const before = aperiodic(a, b, delayChips - length);
  return kind === "periodic" ? now + before : now - before;
}

/**
 * Aperiodic correlation of codes of one length at any delay, 0 where they do not meet.
 *
 * @param a chips of +1 and -1
 * @param b as many chips
 * @param delay of b in chips, whole or not, of either sign
 */
export function aperiodic(a: Int8Array, b: Int8Array, delay: number): number {
  const whole = Math.floor(delay);
  const part = delay - whole;
  const here = overlap(a, b, whole);
  // The sums are whole numbers, so a whole delay costs no rounding before the division.
  return (part === 0 ? here : (1 - part) * here + part * overlap(a, b, whole + 1)) / a.length;
}

/** Sum of a[k] b[k-d] over the k at which both exist. */
function overlap(a: Int8Array, b: Int8Array, d: number): number {
  const end = Math.min(a.length, b.length + d);
  let sum = 0;
  for (let k = Math.max(0, d); k < end; k++) sum += a[k]! * b[k - d]!;
  return sum;
}
