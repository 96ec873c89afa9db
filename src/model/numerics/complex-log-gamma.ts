/** Bernoulli numbers B(2k) / (2k (2k - 1)) of Stirling's series, DLMF 5.11.1. */
const STIRLING = [1 / 12, -1 / 360, 1 / 1260, -1 / 1680, 1 / 1188, -691 / 360360, 1 / 156, -3617 / 122400];
const SHIFT = 10;
const HALF_LOG_TWO_PI = 0.5 * Math.log(2 * Math.PI);

/**
 * Logarithm of the gamma function for complex arguments right of the imaginary axis; the imaginary part is one of the
 * continuous branch up to rounding.
 *
 * Stirling's series at the argument plus 10, where eight terms are below rounding, and the recurrence back.
 *
 * @param re real part, above 0
 * @param im imaginary part
 */
export function logGamma(re: number, im: number): { re: number; im: number } {
  let factorsRe = 0;
  let factorsIm = 0;
  for (let k = 0; k < SHIFT; k++) {
    factorsRe += 0.5 * Math.log((re + k) * (re + k) + im * im);
    factorsIm += Math.atan2(im, re + k);
  }
  const x = re + SHIFT;
  const logSize = 0.5 * Math.log(x * x + im * im);
  const angle = Math.atan2(im, x);
  // 1/w and 1/w^2
  const square = x * x + im * im;
  const ir = x / square;
  const ii = -im / square;
  const sr = ir * ir - ii * ii;
  const si = 2 * ir * ii;
  let seriesRe = 0;
  let seriesIm = 0;
  for (let k = STIRLING.length - 1; k >= 0; k--) {
    const next = seriesRe * sr - seriesIm * si + STIRLING[k]!;
    seriesIm = seriesRe * si + seriesIm * sr;
    seriesRe = next;
  }
  return {
    re: (x - 0.5) * logSize - im * angle - x + HALF_LOG_TWO_PI + (seriesRe * ir - seriesIm * ii) - factorsRe,
    im: (x - 0.5) * angle + im * logSize - im + (seriesRe * ii + seriesIm * ir) - factorsIm,
  };
}
