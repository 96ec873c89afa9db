import { domain, requireIn } from "../domain";

export { correlation } from "./correlation";
export { peak } from "./peak";
export { sequence } from "./sequence";

export const codeCount = domain(1, 1e9, "a whole number from 1 to 1E+9", { whole: true });

/**
 * Lower bound of the largest periodic correlation of any set of codes, from 0 to 1: sqrt((M - 1)/(M N - 1)).
 *
 * Source: L. R. Welch, "Lower bounds on the maximum cross correlation of signals", IEEE Trans. Inform. Theory 20 (1974).
 *
 * @param codes M, number of codes
 * @param length N, chips a code
 */
export function bound(codes: number, length: number): number {
  requireIn(codeCount, "codes", codes);
  requireIn(codeCount, "length", length);
  if (codes === 1) return 0;
  return Math.sqrt((codes - 1) / (codes * length - 1));
}
