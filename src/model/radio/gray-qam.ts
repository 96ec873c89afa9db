/** One term of an error rate: weight times Q(sqrt(2 scale Eb/N0)). The weights of a modulation add up to 1. */
export interface ErrorTerm {
  readonly weight: number;
  readonly scale: number;
}

/**
 * Exact bit error rate of Gray-coded square QAM as a sum of terms, nearest neighbours and all others.
 *
 * K. Cho, D. Yoon, "On the general BER expression of one- and two-dimensional amplitude modulations", IEEE Transactions on
 * Communications 50 (2002), equations (14) and (16): bit k of an axis with L levels errs with
 * (1/L) sum over i of (-1)^floor(i 2^(k-1)/L) (2^(k-1) - floor(i 2^(k-1)/L + 1/2)) erfc((2i+1) sqrt(c Eb/N0)).
 *
 * @param bits bits a symbol: 2, 4, 6, 8, ...
 */
export function grayQam(bits: number): readonly ErrorTerm[] {
  const perAxis = bits / 2;
  const levels = 2 ** perAxis;
  const scale = (3 * bits) / (2 * (levels * levels - 1));
  const sums = new Float64Array(levels);
  for (let k = 1; k <= perAxis; k++) {
    const half = 2 ** (k - 1);
    for (let i = 0; i < levels - levels / 2 ** k; i++) {
      const sign = Math.floor((i * half) / levels) % 2 === 0 ? 1 : -1;
      sums[i] = sums[i]! + sign * (half - Math.floor((i * half) / levels + 0.5));
    }
  }
  // erfc(x) = 2 Q(x sqrt 2)
  return Array.from(sums, (sum, i) => ({
    weight: (2 * sum) / (levels * perAxis),
    scale: (2 * i + 1) ** 2 * scale,
  })).filter(({ weight }) => weight !== 0);
}
