import { aperiodic } from "./correlation";

/**
 * What the matched filters of all users see of all users: `same` is the correlation of user k's symbol (row) with user j's symbol
 * of the same number (column), `next` that with user j's next symbol, which overlaps where j is ahead of k. The previous one
 * is the transpose of `next`.
 */
export interface SymbolCorrelations {
  readonly size: number;
  readonly same: Float64Array;
  readonly next: Float64Array;
}

/**
 * Correlations of unit-energy codes with rectangular chips.
 *
 * Source: S. Verdu, "Multiuser Detection" (1998), chapter 2 (asynchronous channel).
 *
 * @param codes chips of +1 and -1, of one length
 * @param delaysChips delay of each user; only the remainder modulo the code length matters, since symbols never end
 */
export function symbolCorrelations(codes: readonly Int8Array[], delaysChips: readonly number[]): SymbolCorrelations {
  const size = codes.length;
  const length = codes[0]!.length;
  const same = new Float64Array(size * size);
  const next = new Float64Array(size * size);
  const delays = delaysChips.map((delay) => delay - length * Math.floor(delay / length));
  for (let k = 0; k < size; k++) {
    same[k * size + k] = 1;
    for (let j = 0; j < k; j++) {
      const [late, early] = delays[k]! >= delays[j]! ? [k, j] : [j, k];
      const lag = delays[late]! - delays[early]!;
      // The early user's symbol covers the end of the late user's previous symbol and the start of the one of its number.
      const common = aperiodic(codes[early]!, codes[late]!, lag);
      same[late * size + early] = same[early * size + late] = common;
      if (lag > 0) next[late * size + early] = aperiodic(codes[late]!, codes[early]!, length - lag);
    }
  }
  return { size, same, next };
}
