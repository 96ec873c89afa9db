import { decibel, domain, positive, requireIn } from "../domain";
import { DomainError } from "../errors";
import { toDecibel } from "../numerics/decibel";
import { decibelSum, ratioMinusOne } from "../numerics/decibel-sum";

/** A matched receiver at the reference temperature cannot be better than noiseless. */
export const noiseFigure = domain(0, 1000, "a noise figure from 0 to 1000 dB");

/** Reference temperature of noise figures, IEEE and ITU-R P.372. */
export const REFERENCE_TEMPERATURE_K = 290;

/** Boltzmann constant in J/K, exact since the SI of 2019, times 1E9 for megahertz and milliwatt. */
const MILLIWATT_PER_KELVIN_AND_MHZ = 1.380649e-14;

/**
 * Noise power of a receiver in dBm: 10 log10(k T B / 1 mW) + F.
 *
 * @param bandwidthMHz noise bandwidth, above 0
 * @param noiseFigureDb 0 to 1000 dB
 * @param temperatureK temperature at the input, above 0
 */
export function floor(
  bandwidthMHz: number,
  noiseFigureDb: number,
  temperatureK: number = REFERENCE_TEMPERATURE_K,
): number {
  requireIn(positive, "bandwidthMHz", bandwidthMHz);
  requireIn(noiseFigure, "noiseFigureDb", noiseFigureDb);
  requireIn(positive, "temperatureK", temperatureK);
  // Two logarithms, since the product may leave the range of a double.
  return toDecibel(MILLIWATT_PER_KELVIN_AND_MHZ * temperatureK) + toDecibel(bandwidthMHz) + noiseFigureDb;
}

/**
 * Noise figure of stages one behind the other, in dB: F1 + (F2 - 1)/G1 + (F3 - 1)/(G1 G2) + ...
 * (H. T. Friis, "Noise figures of radio receivers", Proc. IRE 32 (1944)).
 *
 * @param gainDb gain of each stage in the order of the signal, a loss below 0; the last one does not matter
 * @param noiseFigureDb noise figure of each stage, 0 to 1000 dB; a passive loss has its loss
 */
export function cascade(gainDb: readonly number[], noiseFigureDb: readonly number[]): number {
  if (gainDb.length !== noiseFigureDb.length) {
    throw new DomainError("number of noiseFigureDb", noiseFigureDb.length, `${gainDb.length}, as many as gainDb`);
  }
  if (gainDb.length === 0) throw new DomainError("number of gainDb", 0, "one a stage");
  // Excess noise of each stage referred to the input, in decibel, since a long chain of losses overflows otherwise.
  const excess: number[] = [];
  let gainBefore = 0;
  noiseFigureDb.forEach((figure, i) => {
    requireIn(noiseFigure, "noiseFigureDb", figure);
    requireIn(decibel, "gainDb", gainDb[i]!);
    if (figure > 0) excess.push(toDecibel(ratioMinusOne(figure)) - gainBefore);
    gainBefore += gainDb[i]!;
  });
  return decibelSum([0, ...excess]);
}
