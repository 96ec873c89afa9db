import { decibel, domain, requireIn } from "../domain";
import { NoAnswerError } from "../errors";
import { bandwidth, bitRate } from "../interference/domains";
import { fromDecibel, toDecibel } from "../numerics/decibel";

/** Implementation loss against Shannon; above 1 where several layers share the band. */
export const attenuationFactor = domain(0.01, 10, "a factor from 0.01 to 10");
export const maximumEfficiency = domain(0, 100, "a spectral efficiency above 0 and up to 100 bit/s/Hz", {
  openLow: true,
});

/** 3GPP TR 36.942 annex A.1, table A.2, downlink. */
export const DEFAULT_ATTENUATION = 0.6;
export const DEFAULT_MINIMUM_DB = -10;
export const DEFAULT_MAXIMUM_BPS_HZ = 4.4;

/**
 * Shannon capacity of a band in Mbit/s.
 *
 * @param bandwidthMHz 1e-9 to 1e9
 * @param sinrDb signal to noise and interference, -1000 to 1000 dB
 */
export function shannon(bandwidthMHz: number, sinrDb: number): number {
  requireIn(bandwidth, "bandwidthMHz", bandwidthMHz);
  requireIn(decibel, "sinrDb", sinrDb);
  return bandwidthMHz * efficiency(sinrDb);
}

// log1p keeps the digits of a ratio far below 1.
function efficiency(sinrDb: number): number {
  return Math.log1p(fromDecibel(sinrDb)) / Math.LN2;
}

function requireLinkCurve(attenuation: number, minimumDb: number, maximumBpsHz: number): void {
  requireIn(attenuationFactor, "attenuation", attenuation);
  requireIn(decibel, "minimumDb", minimumDb);
  requireIn(maximumEfficiency, "maximumBpsHz", maximumBpsHz);
}

/**
 * Rate of an adaptive link in Mbit/s: nothing below the minimum SINR, then attenuated Shannon up to a maximum
 * (3GPP TR 36.942 annex A.1).
 *
 * @param bandwidthMHz 1e-9 to 1e9
 * @param sinrDb -1000 to 1000 dB
 * @param attenuation 0.01 to 10
 * @param minimumDb lowest SINR that is served, itself included
 * @param maximumBpsHz spectral efficiency of the highest modulation, above 0 to 100
 */
export function attenuated(
  bandwidthMHz: number,
  sinrDb: number,
  attenuation = DEFAULT_ATTENUATION,
  minimumDb = DEFAULT_MINIMUM_DB,
  maximumBpsHz = DEFAULT_MAXIMUM_BPS_HZ,
): number {
  requireIn(bandwidth, "bandwidthMHz", bandwidthMHz);
  requireIn(decibel, "sinrDb", sinrDb);
  requireLinkCurve(attenuation, minimumDb, maximumBpsHz);
  if (sinrDb < minimumDb) return 0;
  return bandwidthMHz * Math.min(attenuation * efficiency(sinrDb), maximumBpsHz);
}

/**
 * Smallest SINR in dB at which `attenuated` reaches a bit rate; never below the minimum that is served.
 *
 * @param bandwidthMHz 1e-9 to 1e9
 * @param bitRateKbps 1e-9 to 1e12
 * @param attenuation 0.01 to 10
 * @param minimumDb lowest SINR that is served
 * @param maximumBpsHz spectral efficiency of the highest modulation, above 0 to 100
 * @throws NoAnswerError where the rate is above the maximum
 */
export function requiredSinr(
  bandwidthMHz: number,
  bitRateKbps: number,
  attenuation = DEFAULT_ATTENUATION,
  minimumDb = DEFAULT_MINIMUM_DB,
  maximumBpsHz = DEFAULT_MAXIMUM_BPS_HZ,
): number {
  requireIn(bandwidth, "bandwidthMHz", bandwidthMHz);
  requireIn(bitRate, "bitRateKbps", bitRateKbps);
  requireLinkCurve(attenuation, minimumDb, maximumBpsHz);
  const bpsHz = bitRateKbps / 1000 / bandwidthMHz;
  // A rate computed as bandwidth times maximum may lie a rounding above it.
  if (bpsHz > maximumBpsHz * (1 + 4 * Number.EPSILON)) {
    throw new NoAnswerError(
      `${bitRateKbps} kbit/s in ${bandwidthMHz} MHz needs ${Number(bpsHz.toPrecision(6))} bit/s/Hz, more than the maximum of ${maximumBpsHz}.`,
    );
  }
  return Math.max(minimumDb, sinrOfBits(bpsHz / attenuation));
}

/** SINR in dB at which Shannon's bound is `bits` bit/s/Hz. */
export function sinrOfBits(bits: number): number {
  // Beyond 60 bits the 1 in 2^bits - 1 is below rounding, and 2^bits may overflow.
  return bits > 60 ? bits * toDecibel(2) : toDecibel(Math.expm1(bits * Math.LN2));
}
