import { requireOneOf } from "../domain";
import { DomainError } from "../errors";
import { decimated, maximalBits, maximalDecimations } from "./maximal";

export const FAMILIES = ["walsh", "ovsf", "maximal", "gold", "kasami"] as const;
export type Family = (typeof FAMILIES)[number];

/** The codes of one family and length. */
interface CodeSet {
  readonly size: number;
  /** Bits of one code: 0 is sent as +1, 1 as -1. */
  readonly bits: (index: number) => Uint8Array;
}

const powersOfTwo = Array.from({ length: 11 }, (_, k) => 2 ** k);
const withDegrees = (degrees: readonly number[]): number[] => degrees.map((degree) => 2 ** degree - 1);

const LENGTHS: Record<Family, readonly number[]> = {
  walsh: powersOfTwo,
  ovsf: powersOfTwo,
  maximal: withDegrees([2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12, 13, 14, 15]),
  // No preferred pair exists where the degree is a multiple of 4.
  gold: withDegrees([3, 5, 6, 7, 9, 10]),
  kasami: withDegrees([4, 6, 8, 10]),
};

/** The lengths that exist in a family. */
export function codeLengths(family: Family): readonly number[] {
  return LENGTHS[family];
}

/** The number of codes of a family and length. */
export function setSize(family: Family, length: number): number {
  return codeSet(family, length).size;
}

/**
 * One spreading code as chips of +1 and -1.
 *
 * - "walsh": row `index` of the Hadamard matrix of Sylvester's construction.
 * - "ovsf": code C(length, index) of 3GPP TS 25.213, 4.3.1.
 * - "maximal": the different maximal-length sequences of the length, one an index: index 0 from the primitive polynomial (see
 *   `primitivePolynomial`), the others by decimation of it (see `maximalDecimations`).
 * - "gold": the preferred pair u and v at indices 0 and 1, then u + T^i v for i from 0 (R. Gold, IEEE Trans. Inform. Theory 13
 *   (1967); pairs of D. V. Sarwate, M. B. Pursley, Proc. IEEE 68 (1980): v is u decimated by 3, by 5 where the degree is even).
 * - "kasami": u at index 0, then u + T^i w for i from 0, w being u decimated by 2^(n/2) + 1 (small set; T. Kasami 1966; Sarwate
 *   and Pursley as above).
 *
 * @param family one of the five
 * @param length a length that exists in the family
 * @param index from 0
 */
export function sequence(family: string, length: number, index: number): number[] {
  requireOneOf(FAMILIES, "family", family);
  const { size, bits } = codeSet(family, length);
  if (!(Number.isInteger(index) && index >= 0 && index < size)) {
    throw new DomainError("index", index, `a whole number from 0 to ${size - 1} for "${family}" of length ${length}`);
  }
  return Array.from(bits(index), (bit) => 1 - 2 * bit);
}

function codeSet(family: Family, length: number): CodeSet {
  const lengths = LENGTHS[family];
  if (!lengths.includes(length)) throw new DomainError("length", length, `for "${family}" ${lengths.join(", ")}`);
  const degree = Math.ceil(Math.log2(length));
  switch (family) {
    case "walsh":
      return { size: length, bits: (index) => hadamardRow(index, length) };
    case "ovsf":
      // The code tree writes the index from its other end: the first branch is the first bit.
      return { size: length, bits: (index) => hadamardRow(reversed(index, degree), length) };
    case "maximal": {
      const decimations = maximalDecimations(degree);
      return { size: decimations.length, bits: (index) => decimated(maximalBits(degree), decimations[index]!) };
    }
    case "gold":
      return goldSet(degree);
    case "kasami":
      return kasamiSet(degree);
  }
}

function hadamardRow(index: number, length: number): Uint8Array {
  return Uint8Array.from({ length }, (_, k) => parity(index & k));
}

function parity(bits: number): number {
  let odd = 0;
  for (let left = bits; left > 0; left &= left - 1) odd ^= 1;
  return odd;
}

function reversed(bits: number, count: number): number {
  let result = 0;
  for (let i = 0; i < count; i++) result = (result << 1) | ((bits >> i) & 1);
  return result;
}

function goldSet(degree: number): CodeSet {
  const u = maximalBits(degree);
  // 2^k + 1 with k = 1, or 2 where the degree is even, so that degree/gcd(degree, k) is odd.
  const v = decimated(u, degree % 2 === 1 ? 3 : 5);
  return {
    size: u.length + 2,
    bits: (index) => (index === 0 ? u : index === 1 ? v : sum(u, v, index - 2)),
  };
}

function kasamiSet(degree: number): CodeSet {
  const u = maximalBits(degree);
  const step = 2 ** (degree / 2) + 1;
  // The step divides the length, so the decimated sequence depends on where it starts, and from some places it is all 0.
  let w = decimated(u, step);
  for (let start = 1; w.every((bit) => bit === 0); start++) w = decimated(u, step, start);
  return { size: 2 ** (degree / 2), bits: (index) => (index === 0 ? u : sum(u, w, index - 1)) };
}

/** u plus v shifted cyclically by `shift`, modulo 2. */
function sum(u: Uint8Array, v: Uint8Array, shift: number): Uint8Array {
  return u.map((bit, k) => bit ^ v[(k + shift) % v.length]!);
}
