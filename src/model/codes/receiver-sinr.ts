import { decibel, domain, requireIn, requireOneOf } from "../domain";
import { DomainError, NoAnswerError } from "../errors";
import { fromDecibel, toDecibel } from "../numerics/decibel";
import { codesOf } from "./chips";
import { endlessInverse } from "./endless-inverse";
import { symbolCorrelations, type SymbolCorrelations } from "./symbol-correlations";

export const RECEIVERS = ["matched", "decorrelating", "mmse", "successive"] as const;
export type Receiver = (typeof RECEIVERS)[number];

export const delay = domain(-1e9, 1e9, "a delay from -1E+9 to 1E+9 chips");

/** Users times users times chips, and users cubed, bound the work to about a second. */
const MOST_USERS = 160;
const MOST_CHIPS = 4096;

const SETTLED = 1e-9;

/**
 * Signal to interference and noise of every user of an asynchronous uplink behind its receiver, in dB: real codes, delays and
 * powers, unit-energy codes with rectangular chips, random independent symbols of all users at every symbol time without end,
 * so that each symbol meets two of every other user that is not aligned with it.
 *
 * Source: S. Verdu, "Multiuser Detection" (1998): matched filter chapter 3, decorrelator chapter 5, MMSE chapter 6, successive
 * cancellation chapter 7.
 *
 * - "matched": P_k / (noise + sum of P_j times both squared partial correlations).
 * - "decorrelating": P_k / (noise g_k), g_k the middle diagonal entry of the inverse of the endless correlation matrix.
 * - "mmse": from the middle block of the inverse of 1 + A R A/noise, the same way.
 * - "successive": strongest first (of equals the first row), perfect cancellation of all symbols of those before, matched filter.
 *
 * "decorrelating" and "mmse" observe a window around the symbol that doubles until the ratio changes by less than 1e-9; since the
 * change then falls with its square, the answer is settled to rounding (see `endlessInverse`).
 *
 * @param codes one row a user, chips of +1 and -1
 * @param powersDbm received power of each user; one for all is enough
 * @param delaysChips delay of each user in chips, whole or not; one for all is enough
 * @param noiseDbm noise power in the bandwidth matched to a symbol
 * @param receiver one of the four
 * @returns a ratio in dB for each row, or the reason why a user has none (decorrelating receiver alone: codes that depend on each
 *   other)
 */
export function sinr(
  codes: readonly (readonly number[])[],
  powersDbm: readonly number[],
  delaysChips: readonly number[],
  noiseDbm: number,
  receiver: string = "matched",
): (number | NoAnswerError)[] {
  requireOneOf(RECEIVERS, "receiver", receiver);
  requireIn(decibel, "noiseDbm", noiseDbm);
  const chips = codesOf(codes, "codes");
  const size = chips.length;
  if (size > MOST_USERS) throw new DomainError("number of codes", size, `up to ${MOST_USERS}`);
  if (chips[0]!.length > MOST_CHIPS) {
    throw new DomainError("number of chips of codes", chips[0]!.length, `up to ${MOST_CHIPS}`);
  }
  const powers = oneForEach(powersDbm, size, "powersDbm");
  powers.forEach((power) => requireIn(decibel, "powersDbm", power));
  const delays = oneForEach(delaysChips, size, "delaysChips");
  delays.forEach((chipsLate) => requireIn(delay, "delaysChips", chipsLate));

  const snr = powers.map((power) => fromDecibel(power - noiseDbm));
  const correlations = symbolCorrelations(chips, delays);
  switch (receiver) {
    case "matched":
      return snr.map((own, k) => toDecibel(own / (1 + interference(correlations, snr, k, () => true))));
    case "successive":
      return snr.map((own, k) =>
        toDecibel(own / (1 + interference(correlations, snr, k, (j) => snr[j]! < own || (snr[j] === own && j > k)))),
      );
    case "decorrelating":
      return decorrelating(correlations, snr);
    case "mmse":
      return mmse(correlations, snr);
  }
}

function oneForEach(values: readonly number[], size: number, parameter: string): readonly number[] {
  if (values.length === size) return values;
  if (values.length === 1) return new Array<number>(size).fill(values[0]!);
  throw new DomainError(`number of ${parameter}`, values.length, `${size}, one for each row of codes, or a single one`);
}

/** Interference behind the matched filter of user k over noise. */
function interference(
  { size, same, next }: SymbolCorrelations,
  snr: readonly number[],
  k: number,
  counts: (j: number) => boolean,
): number {
  let sum = 0;
  for (let j = 0; j < size; j++) {
    if (j === k || !counts(j)) continue;
    const here = same[k * size + j]!;
    // One of the two overlaps: j's next symbol if j is ahead, j's previous one if k is.
    const beside = next[k * size + j]! + next[j * size + k]!;
    sum += snr[j]! * (here * here + beside * beside);
  }
  return sum;
}

/** A ratio that is left over from terms this many times as large has lost its digits. */
const MOST_CANCELLATION = 1e10;

function mmse({ size, same, next }: SymbolCorrelations, snr: readonly number[]): (number | NoAnswerError)[] {
  const amplitudes = snr.map(Math.sqrt);
  const scaled = (matrix: Float64Array): Float64Array =>
    matrix.map((value, at) => value * amplitudes[Math.floor(at / size)]! * amplitudes[at % size]!);
  let ratios: number[] = [];
  let lost: boolean[] = [];
  const outcome = endlessInverse(size, scaled(same), scaled(next), 1, ({ inverse, reduced }) => {
    // With E = (1 + Q)^-1 the ratio is 1/E_kk - 1, here as (E Q)_kk / E_kk: no cancellation for users far below the noise.
    const now = new Array<number>(size);
    lost = new Array<boolean>(size);
    for (let k = 0; k < size; k++) {
      let signal = 0;
      let largest = 0;
      for (let j = 0; j < size; j++) {
        const term = inverse[k * size + j]! * reduced[j * size + k]!;
        signal += term;
        largest = Math.max(largest, Math.abs(term));
      }
      now[k] = signal / inverse[k * size + k]!;
      lost[k] = !(signal * MOST_CANCELLATION > largest);
    }
    const settled = isSettled(ratios, now);
    ratios = now;
    return settled;
  });
  return ratios.map((ratio, k) =>
    outcome !== "settled" || lost[k]
      ? new NoAnswerError(
          `The code of row ${k + 1} depends on codes of users so much stronger that what is left of it has no digits; give a noiseDbm nearer to the powers, or powers nearer to each other.`,
        )
      : toDecibel(ratio),
  );
}

function isSettled(before: readonly number[], now: readonly number[]): boolean {
  return before.length > 0 && now.every((value, k) => Math.abs(value - before[k]!) <= SETTLED * Math.abs(value));
}

/** A correlation matrix with a smaller pivot is singular: rounding leaves about 1e-15. */
const SMALLEST_PIVOT = 1e-10;
/** Added to the diagonal of a singular matrix: users whose codes do not depend on others hardly notice. */
const RIDGE = 1e-12;
/** Noise amplified by more than 50 dB: to all practical ends the code depends on the others. */
const MOST_AMPLIFICATION = 1e5;
/** After so many doublings noise that grows with the window has passed that limit. */
const ENOUGH_DOUBLINGS = 18;

/**
 * Codes that depend on each other take the answer from their own users alone. Where they do so at one frequency of the symbol
 * sequence only, as two users of one constant code, each longer window amplifies their noise further, without limit.
 */
function decorrelating(correlations: SymbolCorrelations, snr: readonly number[]): (number | NoAnswerError)[] {
  const amplification =
    noiseAmplification(correlations, 0, SMALLEST_PIVOT) ?? noiseAmplification(correlations, RIDGE, 0);
  return snr.map((own, k) => {
    const noise = amplification?.[k] ?? Infinity;
    if (noise <= MOST_AMPLIFICATION) return toDecibel(own / noise);
    return new NoAnswerError(
      `The code of row ${k + 1} at its delay is a combination of the others, or so nearly that a decorrelating receiver would amplify its noise by more than 50 dB.`,
    );
  });
}

/** Noise behind the decorrelating filter of each user over that behind the matched filter; undefined where singular. */
function noiseAmplification(
  { size, same, next }: SymbolCorrelations,
  ridge: number,
  pivotFloor: number,
): number[] | undefined {
  let before: number[] = [];
  let now: number[] = [];
  let doublings = 0;
  const change = (k: number): number => Math.abs(now[k]! - before[k]!) / now[k]!;
  const outcome = endlessInverse(
    size,
    same,
    next,
    ridge,
    ({ inverse }) => {
      before = now;
      now = Array.from({ length: size }, (_, k) => inverse[k * size + k]!);
      if (before.length === 0) return false;
      const hopeless = now.map((value) => value > MOST_AMPLIFICATION);
      if (++doublings >= ENOUGH_DOUBLINGS && hopeless.includes(true)) return true;
      return now.every((_, k) => hopeless[k] === true || change(k) <= SETTLED);
    },
    pivotFloor,
  );
  if (outcome !== "settled") return undefined;
  if (before.length === 0) return now;
  // Beside users of one constant code the others settle as the inverse of the window: one extrapolation does the rest.
  return now.map((value, k) => (change(k) <= SETTLED ? value : 2 * value - before[k]!));
}
