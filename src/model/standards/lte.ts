import { domain, requireIn, share } from "../domain";
import { requireModulationBits } from "./modulation-bits";
import { lteBlocks } from "./resource-blocks";

export { lteEfficiency as efficiency } from "./channel-quality";
export { lteBlocks as blocks } from "./resource-blocks";

export const layerCount = domain(1, 8, "a whole number of layers from 1 to 8", { whole: true });
export const codeRates = domain(0, 1, "a code rate above 0 and up to 1", { openLow: true });

/** 948/1024, the highest code rate of the channel quality tables, to six digits. */
export const DEFAULT_CODE_RATE = 0.925781;
const ELEMENTS_PER_BLOCK_AND_MS = 12 * 14;

/**
 * Peak rate of an LTE carrier in Mbit/s: blocks of 12 subcarriers and 14 symbols every millisecond (3GPP TS 36.211, table
 * 6.2.3-1, normal cyclic prefix), less an overhead for control and reference signals.
 *
 * @param bandwidthMHz channel bandwidth of the standard
 * @param layers 1 to 8
 * @param modulationBits 1, 2, 4, 6, 8 or 10
 * @param codeRate above 0 and up to 1
 * @param overheadShare share of the resource elements that carries no data
 */
export function peak(
  bandwidthMHz: number,
  layers = 2,
  modulationBits = 6,
  codeRate = DEFAULT_CODE_RATE,
  overheadShare = 0.25,
): number {
  const blocks = lteBlocks(bandwidthMHz);
  requireIn(layerCount, "layers", layers);
  requireModulationBits(modulationBits);
  requireIn(codeRates, "codeRate", codeRate);
  requireIn(share, "overheadShare", overheadShare);
  return (blocks * ELEMENTS_PER_BLOCK_AND_MS * layers * modulationBits * codeRate * (1 - overheadShare)) / 1000;
}
