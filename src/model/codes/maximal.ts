import { primitivePolynomial } from "./primitive-polynomials";

/** Bits of the maximal-length sequence of a degree: shift register with the primitive polynomial, all ones at first. */
export function maximalBits(degree: number): Uint8Array {
  const polynomial = primitivePolynomial(degree);
  const length = 2 ** degree - 1;
  const bits = new Uint8Array(length).fill(1, 0, degree);
  for (let k = degree; k < length; k++) {
    let sum = 0;
    for (let i = 0; i < degree; i++) if ((polynomial >> i) & 1) sum ^= bits[k - degree + i]!;
    bits[k] = sum;
  }
  return bits;
}

/** Every `step`-th bit around and around, from bit `start`. */
export function decimated(bits: Uint8Array, step: number, start = 0): Uint8Array {
  return bits.map((_, k) => bits[(start + step * k) % bits.length]!);
}

const leaders = new Map<number, readonly number[]>();

/**
 * Decimations that give all different maximal-length sequences of a degree, shifts apart: the smallest number of every
 * cyclotomic coset (d, 2d, 4d, ... modulo the length) of numbers prime to the length, in rising order.
 *
 * Source: S. W. Golomb, "Shift Register Sequences" (1967); there are phi(2^n - 1)/n of them.
 */
export function maximalDecimations(degree: number): readonly number[] {
  const known = leaders.get(degree);
  if (known) return known;
  const length = 2 ** degree - 1;
  const found: number[] = [];
  for (let d = 1; d < length; d += 2) {
    let member = d;
    let least = true;
    for (let i = 1; i < degree && least; i++) {
      member = (2 * member) % length;
      least = member >= d;
    }
    if (least && greatestCommonDivisor(d, length) === 1) found.push(d);
  }
  leaders.set(degree, found);
  return found;
}

function greatestCommonDivisor(a: number, b: number): number {
  while (b > 0) [a, b] = [b, a % b];
  return a;
}
