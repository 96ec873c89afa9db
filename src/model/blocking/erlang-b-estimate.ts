import { scaledErfc } from "../numerics/erfc";

/**
 * Real number of channels for a traffic and a blocking, by an expansion in 1/sqrt(A), with an estimate of its error.
 *
 * With N = A + c sqrt(A) the integral for 1/B becomes sqrt(A) times a0(c) + a1(c)/sqrt(A) + a2(c)/A + ...: the logarithm of its
 * integrand is c t - t^2/2 plus powers of 1/sqrt(A), as in D. L. Jagerman, "Some properties of the Erlang loss function", Bell
 * System Technical Journal 53 (1974). Solved for N term by term it gives
 *   N = A + c sqrt(A) + d1 + d2/sqrt(A) + d3/A + ...,  a0(c) = 1/(B sqrt(A)),
 * whose coefficients depend on B sqrt(A) alone. So one table over ln(B sqrt(A)) serves all traffics and targets.
 */

/** The table spans ln(B sqrt(A)) from LOW to LOW + CELLS/PER_UNIT, which is c from about 6.5 to -8. */
const LOW = -24;
const PER_UNIT = 32;
const CELLS = 26 * PER_UNIT;
/** Polynomials of third degree for c, d1, d2, d3. */
const FUNCTIONS = 4;
const STRIDE = 4 * FUNCTIONS;

const ROOT_HALF_PI = Math.sqrt(Math.PI / 2);

/** A polynomial times a0 plus a polynomial, by ascending powers of c: the form of all the coefficients a_k. */
interface Form {
  readonly timesA0: readonly number[];
  readonly plain: readonly number[];
}

const A1: Form = { timesA0: [0, 1 / 2, 0, -1 / 6], plain: [2 / 3, 0, -1 / 6] };
const A2: Form = {
  timesA0: [1 / 12, 0, -1 / 8, 0, 0, 0, 1 / 72],
  plain: [0, -1 / 12, 0, -1 / 72, 0, 1 / 72],
};
const A3: Form = {
  timesA0: [0, -1 / 24, 0, 7 / 144, 0, 1 / 80, 0, -1 / 144, 0, -1 / 1296],
  plain: [-4 / 135, 0, 29 / 1080, 0, 37 / 2160, 0, -1 / 162, 0, -1 / 1296],
};

function value(polynomial: readonly number[], c: number): number {
  let sum = 0;
  for (let k = polynomial.length - 1; k >= 0; k--) sum = sum * c + polynomial[k]!;
  return sum;
}

function slope(polynomial: readonly number[]): number[] {
  return polynomial.slice(1).map((coefficient, i) => coefficient * (i + 1));
}

function plus(a: readonly number[], b: readonly number[]): number[] {
  return Array.from({ length: Math.max(a.length, b.length) }, (_, i) => (a[i] ?? 0) + (b[i] ?? 0));
}

/** Derivative in c, since a0' = 1 + c a0. */
function derivative({ timesA0, plain }: Form): Form {
  return { timesA0: plus(slope(timesA0), [0, ...timesA0]), plain: plus(slope(plain), timesA0) };
}

const A1_SLOPE = derivative(A1);
const A1_CURVATURE = derivative(A1_SLOPE);
const A2_SLOPE = derivative(A2);

/** a0(c), the integral of exp(c t - t^2/2) over t from 0 up. */
function leading(c: number): number {
  const y = Math.abs(c) * Math.SQRT1_2;
  const tail = ROOT_HALF_PI * scaledErfc(y);
  return c <= 0 ? tail : 2 * ROOT_HALF_PI * Math.exp(y * y) - tail;
}

/** c where a0(c) = exp(-logHeight): Newton's method on ln a0, which is convex, from a start on its right. */
function leadingInverse(logHeight: number): number {
  let c = logHeight < -1 ? Math.sqrt(-2 * logHeight) : 1.5;
  for (let step = 0; step < 50; step++) {
    const a0 = leading(c);
    const change = ((Math.log(a0) + logHeight) * a0) / (1 + c * a0);
    c -= change;
    if (Math.abs(change) < 1e-8) break;
  }
  return c;
}

/** c, d1, d2, d3 where a0(c) = exp(-logHeight). */
function coefficients(logHeight: number): readonly number[] {
  const c = leadingInverse(logHeight);
  const a0 = leading(c);
  const at = ({ timesA0, plain }: Form): number => value(timesA0, c) * a0 + value(plain, c);
  const first = 1 + c * a0;
  const second = a0 + c * first;
  const third = 2 * first + c * second;
  const d1 = -at(A1) / first;
  const d2 = -((second * d1 * d1) / 2 + at(A1_SLOPE) * d1 + at(A2)) / first;
  const d3 =
    -(
      second * d1 * d2 +
      (third * d1 * d1 * d1) / 6 +
      at(A1_SLOPE) * d2 +
      (at(A1_CURVATURE) * d1 * d1) / 2 +
      at(A2_SLOPE) * d1 +
      at(A3)
    ) / first;
  return [c, d1, d2, d3];
}

/** Cells are filled when first asked for; a cell without an answer yet holds NaN. */
const table = new Float64Array(CELLS * STRIDE).fill(NaN);

function fillCell(cell: number): void {
  const nodes = [-1, 0, 1, 2].map((j) => coefficients(LOW + (cell + j) / PER_UNIT));
  for (let k = 0; k < FUNCTIONS; k++) {
    // The cubic through the nodes around the cell, in the distance from its lower node.
    const [a, b, d, e] = nodes.map((node) => node[k]!) as [number, number, number, number];
    const at = cell * STRIDE + 4 * k;
    table[at] = b;
    table[at + 1] = d - a / 3 - b / 2 - e / 6;
    table[at + 2] = (a + d) / 2 - b;
    table[at + 3] = (e - a) / 6 + (b - d) / 2;
  }
}

/** The expansion and the bound of its error are for traffics from here up. */
export const ESTIMATE_FROM = 12;
/** What interpolation in the table adds to the error of c. */
const TABLE_ERROR = 1e-6;

/** An estimated number of channels and how far off it may be; Infinity where the table says nothing. */
export interface Estimate {
  channels: number;
  error: number;
}

/**
 * Writes the estimate into `into`, which a caller keeps: a million calls should leave nothing behind.
 *
 * @param trafficE at least ESTIMATE_FROM
 * @param blocking above 0 and below 1
 */
export function estimateChannels(trafficE: number, blocking: number, into: Estimate): void {
  const root = Math.sqrt(trafficE);
  const place = (Math.log(blocking * root) - LOW) * PER_UNIT;
  if (!(place >= 0 && place < CELLS)) {
    into.error = Infinity;
    return;
  }
  const cell = Math.floor(place);
  const x = place - cell;
  const i = cell * STRIDE;
  if (Number.isNaN(table[i]!)) fillCell(cell);
  const c = table[i]! + x * (table[i + 1]! + x * (table[i + 2]! + x * table[i + 3]!));
  const d1 = table[i + 4]! + x * (table[i + 5]! + x * (table[i + 6]! + x * table[i + 7]!));
  const d2 = table[i + 8]! + x * (table[i + 9]! + x * (table[i + 10]! + x * table[i + 11]!));
  const d3 = table[i + 12]! + x * (table[i + 13]! + x * (table[i + 14]! + x * table[i + 15]!));
  const inverse = 1 / root;
  const last = d3 * inverse * inverse;
  into.channels = trafficE + c * root + d1 + d2 * inverse + last;
  // The first neglected term is smaller than the last one taken, except near a zero of that, where d2 has none. Measured over the
  // whole table the error stays below a quarter of this.
  into.error = Math.abs(last) + Math.abs(d2) * inverse * inverse + TABLE_ERROR * root + 1e-4;
}
