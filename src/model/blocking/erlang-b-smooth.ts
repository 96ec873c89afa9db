/** Erlang B continued below 0 channels, which smooth traffic needs (G. Bretschneider, ITC 7, 1973). */

const NEGLIGIBLE = 2 ** -54;
/** About 85/A terms are enough; callers keep A above `SMALLEST_TRAFFIC`. */
const MOST_TERMS = 2_000_000;

/** Below this traffic the continued fraction takes too long for a cell. */
export const SMALLEST_TRAFFIC = 1e-4;

/**
 * A B(A, N) for N = -order below 0: 1 / (exp(A) E_order(A)), E the generalised exponential integral (DLMF 8.19), from
 * 1/B = A * integral of exp(-A y) (1 + y)^N.
 *
 * A + order/(1 + 1/(A + (order + 1)/(1 + 2/(A + ...)))) (DLMF 8.19.17): positive parts only, summed from the tail.
 *
 * @param trafficE traffic, erlang, at least `SMALLEST_TRAFFIC`
 * @param order above 0
 */
export function overflowBelowZero(trafficE: number, order: number): number {
  let n = termCount(trafficE);
  let value = trafficE;
  for (; n >= 1; n--) value = trafficE + (order + n - 1) / (1 + n / value);
  return value;
}

/** Terms after which the fraction has settled: its error falls like exp(-4 sqrt(n A)). */
function termCount(trafficE: number): number {
  const digits = Math.log(1 / NEGLIGIBLE);
  return Math.min(MOST_TERMS, 20 + Math.ceil((digits * digits) / (12 * trafficE)));
}
