import { domain, requireIn, share } from "../domain";
import { requireModulationBits } from "./modulation-bits";
import { nrBlocks } from "./resource-blocks";

export { nrEfficiency as efficiency } from "./channel-quality";
export { nrBlocks as blocks } from "./resource-blocks";
export { transportBlock } from "./transport-block";

export const layerCount = domain(1, 8, "a whole number of layers from 1 to 8", { whole: true });
export const scalingFactor = domain(
  0,
  1,
  "a scaling factor above 0 and up to 1 (the standard has 1, 0.8, 0.75 and 0.4)",
  {
    openLow: true,
  },
);

/** TS 38.306: the highest code rate. */
const HIGHEST_CODE_RATE = 948 / 1024;
/** Resource elements of a block in a millisecond at 15 kHz: 12 subcarriers, 14 symbols of normal cyclic prefix. */
const ELEMENTS_PER_BLOCK_AND_MS = 12 * 14;

/**
 * Approximate maximum data rate of one NR carrier in Mbit/s: 3GPP TS 38.306 (Release 18), clause 4.1.2.
 *
 * @param bandwidthMHz channel bandwidth of the standard
 * @param subcarrierKHz subcarrier spacing of the standard
 * @param layers 1 to 8
 * @param modulationBits 1, 2, 4, 6, 8 or 10
 * @param scaling 1, 0.8, 0.75 or 0.4 in the standard
 * @param overheadShare in the standard 0.14 down and 0.08 up in range 1, 0.18 and 0.10 in range 2
 * @param frequencyRange 1 or 2
 * @param timeShare share of the time in this direction: 1 for paired spectrum
 */
export function peak(
  bandwidthMHz: number,
  subcarrierKHz: number,
  layers = 4,
  modulationBits = 8,
  scaling = 1,
  overheadShare = 0.14,
  frequencyRange = 1,
  timeShare = 1,
): number {
  const blocks = nrBlocks(bandwidthMHz, subcarrierKHz, frequencyRange);
  requireIn(layerCount, "layers", layers);
  requireModulationBits(modulationBits);
  requireIn(scalingFactor, "scaling", scaling);
  requireIn(share, "overheadShare", overheadShare);
  requireIn(share, "timeShare", timeShare);
  const symbolsOverFifteen = subcarrierKHz / 15;
  const elementsPerMs = blocks * ELEMENTS_PER_BLOCK_AND_MS * symbolsOverFifteen;
  const bitsPerElement = layers * modulationBits * scaling * HIGHEST_CODE_RATE;
  return (elementsPerMs * bitsPerElement * (1 - overheadShare) * timeShare) / 1000;
}
