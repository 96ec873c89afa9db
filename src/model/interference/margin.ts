import { decibel, domain, nonNegative, requireIn, share } from "../domain";
import { NoAnswerError } from "../errors";
import { fromDecibel } from "../numerics/decibel";
import { decibelOfOnePlus } from "../numerics/decibel-sum";

/** A noise rise cannot be below 0 dB. */
export const margin = domain(0, 1000, "a margin from 0 to 1000 dB");

/**
 * Interference margin (noise rise) of a cell at a load, in dB: -10 log10(1 - load).
 *
 * @param load share of the pole capacity, at least 0
 * @throws NoAnswerError at or above the pole, where no power suffices
 */
export function fromLoad(load: number): number {
  requireIn(nonNegative, "load", load);
  if (load >= 1) throw new NoAnswerError(`A load of ${load} is at or above the pole capacity (1): no margin suffices.`);
  return load === 0 ? 0 : -decibelOfOnePlus(-load);
}

/**
 * Load at which the interference margin is used up: 1 - 10^(-margin/10).
 *
 * @param marginDb 0 to 1000 dB
 */
export function toLoad(marginDb: number): number {
  requireIn(margin, "marginDb", marginDb);
  return marginDb === 0 ? 0 : -Math.expm1((-marginDb * Math.LN10) / 10);
}

/**
 * Rise of interference and noise over noise alone, in dB.
 *
 * @param interferenceDbm all interference together
 * @param noiseDbm noise of the receiver
 */
export function fromPowers(interferenceDbm: number, noiseDbm: number): number {
  requireIn(decibel, "interferenceDbm", interferenceDbm);
  requireIn(decibel, "noiseDbm", noiseDbm);
  const above = interferenceDbm - noiseDbm;
  // The 1 in 1 + I/N is below rounding long before I/N overflows.
  return above > 200 ? above : decibelOfOnePlus(fromDecibel(above));
}

/**
 * Interference margin where users of one cell do not disturb each other but neighbour cells do, in dB:
 * -10 log10(1 - load SINR/SIR).
 *
 * From 1/SINR = load/SIR + 1/SNR at the cell edge: the margin is SNR over SINR.
 *
 * @param requiredSinrDb SINR that the service needs at the edge
 * @param edgeSirDb signal to interference at the edge with every neighbour at full load
 * @param neighbourLoad share of time or of resources that the neighbours use
 * @throws NoAnswerError where interference alone is more than the service bears
 */
export function neighbourLoad(requiredSinrDb: number, edgeSirDb: number, neighbourLoad: number): number {
  requireIn(decibel, "requiredSinrDb", requiredSinrDb);
  requireIn(decibel, "edgeSirDb", edgeSirDb);
  requireIn(share, "neighbourLoad", neighbourLoad);
  const used = neighbourLoad * fromDecibel(requiredSinrDb - edgeSirDb);
  if (used >= 1) {
    const sirDb = edgeSirDb - 10 * Math.log10(neighbourLoad);
    throw new NoAnswerError(
      `At load ${neighbourLoad} the neighbours alone leave ${rounded(sirDb)} dB at the edge, not above the required ${requiredSinrDb} dB: no margin suffices.`,
    );
  }
  return used === 0 ? 0 : -decibelOfOnePlus(-used);
}

function rounded(value: number): number {
  return Number(value.toPrecision(5));
}
