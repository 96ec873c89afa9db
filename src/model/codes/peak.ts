import { DomainError } from "../errors";
import { codesOf } from "./chips";

/** Word comparisons that take about half a second. */
const MOST_WORK = 4e8;

/**
 * Largest magnitude of the periodic correlations of a set of codes, from 0 to 1: all pairs at all delays, every code with
 * itself at all delays but 0.
 *
 * Chips are packed 32 to a word; a correlation is the length less twice the bits that differ. The shifts by 0 to 31 bits
 * of a code are made once, so that every delay is a run of whole words.
 *
 * @param rows one code a row, chips of +1 and -1
 */
export function peak(rows: readonly (readonly number[])[]): number {
  const codes = codesOf(rows, "codes");
  const length = codes[0]!.length;
  const words = Math.ceil(length / 32);
  const most = Math.floor(Math.sqrt((2 * MOST_WORK) / (length * words)));
  if (codes.length > most) {
    throw new DomainError(
      "number of codes",
      codes.length,
      `up to ${most} of length ${length}, which one call can compare`,
    );
  }
  const packed = codes.map((code) => pack(code, words));
  let largest = 0;
  for (let j = 0; j < codes.length; j++) {
    const shifted = shiftedCopies(codes[j]!, words);
    for (let i = 0; i <= j; i++) {
      // A code and itself: delay d is delay length - d, so half of them do.
      const delays = i === j ? Math.floor(length / 2) + 1 : length;
      largest = Math.max(largest, largestOfPair(packed[i]!, shifted, length, words, i === j ? 1 : 0, delays));
    }
  }
  return largest / length;
}

function pack(code: Int8Array, words: number): Int32Array {
  const bits = new Int32Array(words);
  code.forEach((chip, k) => {
    if (chip < 0) bits[k >> 5]! |= 1 << (k & 31);
  });
  return bits;
}

/** For each shift r by 0 to 31 bits: the code written again and again from bit r on, as words. */
function shiftedCopies(code: Int8Array, words: number): Int32Array[] {
  const length = code.length;
  return Array.from({ length: Math.min(32, length) }, (_, r) => {
    const bits = new Int32Array(2 * words);
    for (let k = 0; k < 64 * words; k++) {
      if (code[(k + r) % length]! < 0) bits[k >> 5]! |= 1 << (k & 31);
    }
    return bits;
  });
}

function largestOfPair(
  a: Int32Array,
  shifted: readonly Int32Array[],
  length: number,
  words: number,
  first: number,
  delays: number,
): number {
  const lastMask = length % 32 === 0 ? -1 : (1 << (length % 32)) - 1;
  let largest = 0;
  for (let r = 0; r < shifted.length; r++) {
    const b = shifted[r]!;
    for (let q = 0; 32 * q + r < delays; q++) {
      if (32 * q + r < first) continue;
      const differing = differingBits(a, b, q, words, lastMask);
      const magnitude = Math.abs(length - 2 * differing);
      if (magnitude > largest) largest = magnitude;
    }
  }
  return largest;
}

/**
 * Bits in which two runs of words differ: three words at a time through a full adder, whose sums and carries are counted by
 * adding neighbours (H. S. Warren, "Hacker's Delight", 2nd edition, section 5-1). Counts are kept a byte wide as long as
 * they fit, so that most words cost no multiplication.
 */
function differingBits(a: Int32Array, b: Int32Array, from: number, words: number, lastMask: number): number {
  let total = 0;
  let bytes = 0;
  let held = 0;
  let w = 0;
  for (; w + 3 < words; w += 3) {
    const x = a[w]! ^ b[from + w]!;
    const y = a[w + 1]! ^ b[from + w + 1]!;
    const z = a[w + 2]! ^ b[from + w + 2]!;
    const either = x ^ y;
    bytes = (bytes + countBytes(either ^ z) + (countBytes((x & y) | (either & z)) << 1)) | 0;
    // Three words add at most 24 to a byte.
    if (++held === 10) {
      total += sumOfBytes(bytes);
      bytes = 0;
      held = 0;
    }
  }
  total += sumOfBytes(bytes);
  for (; w < words; w++) {
    const x = a[w]! ^ b[from + w]!;
    total += sumOfBytes(countBytes(w === words - 1 ? x & lastMask : x));
  }
  return total;
}

/** In each byte of the result the number of bits set in that byte. */
function countBytes(word: number): number {
  let x = word - ((word >>> 1) & 0x55555555);
  x = (x & 0x33333333) + ((x >>> 2) & 0x33333333);
  return (x + (x >>> 4)) & 0x0f0f0f0f;
}

/** Sum of four bytes, each up to 255. */
function sumOfBytes(bytes: number): number {
  const pairs = (bytes & 0x00ff00ff) + ((bytes >>> 8) & 0x00ff00ff);
  return (pairs & 0xffff) + (pairs >>> 16);
}
