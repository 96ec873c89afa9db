import { decibel, domain, requireIn, requireOneOf } from "../domain";
import { NoAnswerError } from "../errors";
import { fromDecibel } from "../numerics/decibel";
import { erf, scaledErfc } from "../numerics/erfc";
import { integrate } from "../numerics/quadrature";
import { root } from "../numerics/root";
import { grayQam, type ErrorTerm } from "./gray-qam";

export const MODULATIONS = ["bpsk", "qpsk", "dbpsk", "fsk", "8psk", "16qam", "64qam", "256qam"] as const;
export type Modulation = (typeof MODULATIONS)[number];
export const CHANNELS = ["awgn", "rayleigh"] as const;
export type Channel = (typeof CHANNELS)[number];

export const bitErrorRate = domain(1e-300, 0.5, "a bit error rate from 1E-300 to below 0.5", { openHigh: true });

/** The error rate over Eb/N0 as a ratio, and how far it is below one half: each keeps its digits where the other is near 1/2. */
interface Curve {
  errors(ratio: number): number;
  belowHalf(ratio: number): number;
}

/** Q(sqrt(2 g)), with one rounding of the exponent g: a squared square root would cost more in the tail. */
const tail = (g: number): number => 0.5 * Math.exp(-g) * scaledErfc(Math.sqrt(g));
const tailBelowHalf = (g: number): number => 0.5 * erf(Math.sqrt(g));
/** Mean of Q(sqrt(2 g)) for g exponential around c: (1 - sqrt(c/(1+c)))/2, without its cancellation for large c. */
const fadingTail = (c: number): number => 0.5 / (1 + c) / (1 + Math.sqrt(c / (1 + c)));
const fadingTailBelowHalf = (c: number): number => 0.5 * Math.sqrt(c / (1 + c));

function sumOf(terms: readonly ErrorTerm[], f: (g: number) => number): (ratio: number) => number {
  return (ratio) => {
    let sum = 0;
    for (const { weight, scale } of terms) sum += weight * f(scale * ratio);
    return sum;
  };
}

/** Modulations whose error rate is a sum of Q functions; their Rayleigh average is the sum of the averages. */
function coherent(terms: readonly ErrorTerm[]): Record<Channel, Curve> {
  return {
    awgn: { errors: sumOf(terms, tail), belowHalf: sumOf(terms, tailBelowHalf) },
    rayleigh: { errors: sumOf(terms, fadingTail), belowHalf: sumOf(terms, fadingTailBelowHalf) },
  };
}

/** exp(-scale Eb/N0)/2: differential and non-coherent detection of two signals. */
function exponential(scale: number): Record<Channel, Curve> {
  return {
    awgn: { errors: (g) => 0.5 * Math.exp(-scale * g), belowHalf: (g) => -0.5 * Math.expm1(-scale * g) },
    rayleigh: { errors: (g) => 0.5 / (1 + scale * g), belowHalf: (g) => (0.5 * scale * g) / (1 + scale * g) },
  };
}

/*
 * 8-PSK with Gray code. Of the eight sectors around the sent symbol those 1, 2, 3 and 4 steps away have 1, 2, 2 and 2 wrong
 * bits of three, on the mean over the symbols. The half planes beyond the decision lines at 22.5 and 67.5 degrees and the
 * quarter plane that they share add up to just that count: P = (2/3) (Qa + Qb - Qa Qb), exact. Compare P. J. Lee, "Computation of
 * the bit error rate of coherent M-ary PSK with Gray code bit mapping", IEEE Transactions on Communications 34 (1986).
 */
const NEAR = 3 * Math.sin(Math.PI / 8) ** 2;
const FAR = 3 * Math.sin((3 * Math.PI) / 8) ** 2;

/**
 * Mean of Qa Qb over Rayleigh fading: the product as M. K. Simon, M.-S. Alouini, "Digital Communication over Fading
 * Channels", section 4.1, two finite integrals of exponentials, which average to rational functions of the sine.
 */
function fadingProduct(ratio: number): number {
  return (shadowed(NEAR * ratio, Math.PI / 8) + shadowed(FAR * ratio, (3 * Math.PI) / 8)) / (2 * Math.PI);
}

/** Integral of sin^2/(sin^2 + c) from 0 to an angle. The closed form cancels for large c, where the integrand is smooth. */
function shadowed(c: number, angle: number): number {
  if (c > 0.3) return integrate((x) => 1 / (1 + c / Math.sin(x) ** 2), 0, angle, 32);
  return angle - Math.sqrt(c / (1 + c)) * Math.atan2(Math.sqrt(1 + c) * Math.tan(angle), Math.sqrt(c));
}

const eightPsk: Record<Channel, Curve> = {
  awgn: {
    errors(ratio) {
      const near = tail(NEAR * ratio);
      const far = tail(FAR * ratio);
      return (2 / 3) * (near + far * (1 - near));
    },
    belowHalf(ratio) {
      const near = tailBelowHalf(NEAR * ratio);
      const far = tailBelowHalf(FAR * ratio);
      return (near + far + 2 * near * far) / 3;
    },
  },
  rayleigh: {
    errors: (ratio) => (2 / 3) * (fadingTail(NEAR * ratio) + fadingTail(FAR * ratio) - fadingProduct(ratio)),
    belowHalf(ratio) {
      const single = fadingTailBelowHalf(NEAR * ratio) + fadingTailBelowHalf(FAR * ratio);
      return single / 3 + (2 / 3) * (fadingProduct(ratio) - 0.25 + 0.5 * single);
    },
  },
};

const binary = coherent([{ weight: 1, scale: 1 }]);
const CURVES: Readonly<Record<Modulation, Record<Channel, Curve>>> = {
  bpsk: binary,
  // Two binary signals in quadrature.
  qpsk: binary,
  dbpsk: exponential(1),
  fsk: exponential(0.5),
  "8psk": eightPsk,
  "16qam": coherent(grayQam(4)),
  "64qam": coherent(grayQam(6)),
  "256qam": coherent(grayQam(8)),
};

function curveOf(modulation: string, channel: string): Curve {
  requireOneOf(MODULATIONS, "modulation", modulation);
  requireOneOf(CHANNELS, "channel", channel);
  return CURVES[modulation][channel];
}

/**
 * Bit error rate of a modulation: exact for Gray-coded symbols, not a union bound.
 *
 * Relative error below 1e-12 down to 1e-300; 0 below the smallest number.
 *
 * @param modulation "bpsk", "qpsk", "dbpsk" (differential), "fsk" (binary, orthogonal, non-coherent), "8psk", "16qam",
 *   "64qam" or "256qam"
 * @param ebN0Db energy of a bit over noise density; in Rayleigh fading its mean
 * @param channel "awgn" or "rayleigh" (flat, slow against the symbol)
 */
export function ber(modulation: string, ebN0Db: number, channel: string = "awgn"): number {
  const curve = curveOf(modulation, channel);
  requireIn(decibel, "ebN0Db", ebN0Db);
  return curve.errors(fromDecibel(ebN0Db));
}

/** Eb/N0 at which every one of the curves is nearer to 1/2 than the numbers below 1/2 can say. */
const LOWEST_DB = -400;

/**
 * Eb/N0 in dB at which a modulation has a bit error rate: the inverse of `ber`.
 *
 * @param modulation as in `ber`
 * @param ber 1e-300 to below 0.5
 * @param channel as in `ber`
 * @throws NoAnswerError where more than 1000 dB would be needed (Rayleigh fading, rates below 1e-100)
 */
export function ebN0(modulation: string, ber: number, channel: string = "awgn"): number {
  const curve = curveOf(modulation, channel);
  requireIn(bitErrorRate, "ber", ber);
  // Logarithms are close to straight lines over decibels on both sides; Brent's method then takes few steps.
  const miss =
    ber < 0.25
      ? (db: number): number => Math.log(Math.max(curve.errors(fromDecibel(db)), Number.MIN_VALUE) / ber)
      : (db: number): number => Math.log((0.5 - ber) / curve.belowHalf(fromDecibel(db)));
  if (miss(decibel.high) > 0) {
    throw new NoAnswerError(`a bit error rate of ${ber} needs more than ${decibel.high} dB in ${channel} fading.`);
  }
  return root(miss, LOWEST_DB, highest(ber, channel));
}

/** Above the answer in decibels: the slowest curve in noise falls as exp(-Eb/N0 / 22), in fading as 22 N0/Eb. */
function highest(ber: number, channel: string): number {
  const decades = -Math.log10(ber);
  return channel === "awgn" ? 10 * Math.log10(60 * (decades + 1)) : Math.min(decibel.high, 10 * decades + 20);
}
