/**
 * One primitive polynomial over GF(2) for each degree, as bits: bit i is the coefficient of x^i.
 *
 * Source: S. Lin, D. J. Costello, "Error Control Coding", 2nd edition (2004), table 2.7; degree 2 is the only one there is.
 */
const POLYNOMIALS = new Map<number, number>([
  [2, 0b111],
  [3, 0b1011],
  [4, 0b10011],
  [5, 0b100101],
  [6, 0b1000011],
  [7, 0b10001001],
  [8, 0b100011101],
  [9, 0b1000010001],
  [10, 0b10000001001],
  [11, 0b100000000101],
  [12, 0b1000001010011],
  [13, 0b10000000011011],
  [14, 0b100010001000011],
  [15, 0b1000000000000011],
]);

/** The primitive polynomial of a degree from 2 to 15. */
export function primitivePolynomial(degree: number): number {
  const polynomial = POLYNOMIALS.get(degree);
  if (polynomial === undefined) throw new RangeError(`no polynomial of degree ${degree}`);
  return polynomial;
}
