import { domain, requireIn } from "../domain";
import { DomainError } from "../errors";
import { requireModulationBits } from "./modulation-bits";

export const blockCount = domain(1, 275, "a whole number of resource blocks from 1 to 275", { whole: true });
export const symbolCount = domain(1, 14, "a whole number of symbols from 1 to 14", { whole: true });
export const codeRates1024 = domain(0, 1024, "1024 times the code rate, above 0 and below 1024", {
  openLow: true,
  openHigh: true,
});
/** A transport block is one codeword, which has at most four layers. */
export const codewordLayers = domain(1, 4, "1 to 4 layers (of one codeword)", { whole: true });
export const elementCount = domain(0, 168, "a whole number of resource elements from 0 to 168", { whole: true });

const SUBCARRIERS = 12;
/** More than these elements of a block do not count: 38.214 rounds all larger allocations to one size. */
const MOST_ELEMENTS = 156;

/** First, step and last of the runs of which TS 38.214 V18.7.0, table 5.1.3.2-1 consists. */
const SIZE_RUNS: readonly (readonly [number, number, number])[] = [
  [24, 8, 192],
  [208, 16, 384],
  [408, 24, 576],
  [608, 32, 736],
  [768, 40, 928],
  [984, 48, 1032],
  [1064, 64, 1128],
  [1160, 32, 1352],
  [1416, 64, 1928],
  [2024, 64, 2280],
  [2408, 64, 2856],
  [2976, 128, 3104],
  [3240, 128, 3752],
  [3824, 1, 3824],
];

/** The 93 transport block sizes of TS 38.214 table 5.1.3.2-1, for up to 3824 information bits. */
export const SMALL_SIZES: readonly number[] = SIZE_RUNS.flatMap(([first, step, last]) =>
  Array.from({ length: (last - first) / step + 1 }, (_, i) => first + i * step),
);
const LARGEST_SMALL = 3824;

/**
 * Size in bits of an NR transport block: 3GPP TS 38.214 V18.7.0, clause 5.1.3.2, steps 1 to 4.
 *
 * With the code rates of the standard all quantities are multiples of 1/2048 far below 2^53, so every branch is decided exactly.
 *
 * @param blocks resource blocks, 1 to 275
 * @param symbols symbols of the allocation in its slot, 1 to 14
 * @param modulationBits 1, 2, 4, 6, 8 or 10
 * @param codeRate1024 1024 times the code rate
 * @param layers 1 to 4
 * @param dmrsPerBlock resource elements of reference signals in a block
 * @param overheadPerBlock other resource elements not to be used: 0, 6, 12 or 18 as configured
 */
export function transportBlock(
  blocks: number,
  symbols: number,
  modulationBits: number,
  codeRate1024: number,
  layers: number,
  dmrsPerBlock = 12,
  overheadPerBlock = 0,
): number {
  requireIn(blockCount, "blocks", blocks);
  requireIn(symbolCount, "symbols", symbols);
  requireModulationBits(modulationBits);
  requireIn(codeRates1024, "codeRate1024", codeRate1024);
  requireIn(codewordLayers, "layers", layers);
  requireIn(elementCount, "dmrsPerBlock", dmrsPerBlock);
  requireIn(elementCount, "overheadPerBlock", overheadPerBlock);
  const elements = SUBCARRIERS * symbols - dmrsPerBlock - overheadPerBlock;
  if (elements <= 0) {
    throw new DomainError(
      "dmrsPerBlock",
      dmrsPerBlock,
      `with overheadPerBlock ${overheadPerBlock} fewer than the ${SUBCARRIERS * symbols} resource elements of ${symbols} symbols`,
    );
  }
  const information = (Math.min(MOST_ELEMENTS, elements) * blocks * codeRate1024 * modulationBits * layers) / 1024;
  return information <= LARGEST_SMALL ? smallSize(information) : largeSize(information, codeRate1024 <= 256);
}

/** Step 3. */
function smallSize(information: number): number {
  const unit = 2 ** Math.max(3, floorLog2(information) - 6);
  const quantised = Math.max(24, unit * Math.floor(information / unit));
  return SMALL_SIZES.find((size) => size >= quantised)!;
}

/** Step 4: code blocks of equal size, ties rounded up. */
function largeSize(information: number, lowRate: boolean): number {
  const unit = 2 ** (floorLog2(information - 24) - 5);
  const quantised = Math.max(3840, unit * Math.floor((information - 24) / unit + 0.5));
  const codeBlocks = lowRate
    ? Math.ceil((quantised + 24) / 3816)
    : quantised > 8424
      ? Math.ceil((quantised + 24) / 8424)
      : 1;
  return 8 * codeBlocks * Math.ceil((quantised + 24) / (8 * codeBlocks)) - 24;
}

/** Exact at powers of two, where a rounded logarithm may fall short. */
function floorLog2(x: number): number {
  const guess = Math.floor(Math.log2(x));
  return 2 ** (guess + 1) <= x ? guess + 1 : 2 ** guess > x ? guess - 1 : guess;
}
