import { domain, requireIn } from "../domain";
import { DomainError } from "../errors";

/** Resource blocks by channel bandwidth in MHz. */
type Blocks = Readonly<Record<number, number>>;

/** 3GPP TS 36.101, clause 5.6, table 5.6-1 (the same since Release 8): transmission bandwidth configuration N_RB; blocks of 12 subcarriers of 15 kHz. */
export const LTE_BLOCKS: Blocks = { 1.4: 6, 3: 15, 5: 25, 10: 50, 15: 75, 20: 100 };

/** 3GPP TS 38.101-1 V19.3.0, table 5.3.2-1 (frequency range 1): maximum N_RB by subcarrier spacing in kHz. */
export const NR_BLOCKS_RANGE_1: Readonly<Record<number, Blocks>> = {
  15: { 3: 15, 5: 25, 7: 35, 10: 52, 15: 79, 20: 106, 25: 133, 30: 160, 35: 188, 40: 216, 45: 242, 50: 270 },
  30: {
    5: 11,
    10: 24,
    15: 38,
    20: 51,
    25: 65,
    30: 78,
    35: 92,
    40: 106,
    45: 119,
    50: 133,
    60: 162,
    70: 189,
    80: 217,
    90: 245,
    100: 273,
  },
  60: {
    10: 11,
    15: 18,
    20: 24,
    25: 31,
    30: 38,
    35: 44,
    40: 51,
    45: 58,
    50: 65,
    60: 79,
    70: 93,
    80: 107,
    90: 121,
    100: 135,
  },
};

/** 3GPP TS 38.101-2 V19.3.0, table 5.3.2-1 (frequency range 2): 480 and 960 kHz above 52.6 GHz only. */
export const NR_BLOCKS_RANGE_2: Readonly<Record<number, Blocks>> = {
  60: { 50: 66, 100: 132, 200: 264 },
  120: { 50: 32, 100: 66, 200: 132, 400: 264 },
  480: { 400: 66, 800: 124, 1600: 248 },
  960: { 400: 33, 800: 62, 1600: 124, 2000: 148 },
};

export const lteBandwidth = domain(1.4, 20, "a channel bandwidth of 1.4, 3, 5, 10, 15 or 20 MHz");
export const nrBandwidth = domain(3, 2000, "a channel bandwidth of the standard, 3 to 2000 MHz");
export const nrSpacing = domain(15, 960, "a subcarrier spacing of 15, 30, 60, 120, 480 or 960 kHz", { whole: true });
export const frequencyRanges = domain(1, 2, "frequency range 1 or 2", { whole: true });

function listed(table: Readonly<Record<number, unknown>>, unit: string): string {
  const values = Object.keys(table)
    .map(Number)
    .sort((a, b) => a - b);
  const last = values.pop()!;
  return `${values.join(", ")} or ${last} ${unit}`;
}

/**
 * Resource blocks of an LTE carrier.
 *
 * @param bandwidthMHz channel bandwidth: 1.4, 3, 5, 10, 15 or 20
 */
export function lteBlocks(bandwidthMHz: number): number {
  const blocks = LTE_BLOCKS[bandwidthMHz];
  if (blocks === undefined) throw new DomainError("bandwidthMHz", bandwidthMHz, listed(LTE_BLOCKS, "MHz"));
  return blocks;
}

/**
 * Largest number of resource blocks of an NR carrier.
 *
 * @param bandwidthMHz channel bandwidth that the standard defines for the spacing
 * @param subcarrierKHz 15, 30 or 60 in frequency range 1; 60, 120, 480 or 960 in range 2
 * @param frequencyRange 1 (up to 7.125 GHz) or 2 (from 24.25 GHz)
 */
export function nrBlocks(bandwidthMHz: number, subcarrierKHz: number, frequencyRange = 1): number {
  requireIn(frequencyRanges, "frequencyRange", frequencyRange);
  const table = frequencyRange === 1 ? NR_BLOCKS_RANGE_1 : NR_BLOCKS_RANGE_2;
  const row = table[subcarrierKHz];
  if (row === undefined) {
    throw new DomainError(
      "subcarrierKHz",
      subcarrierKHz,
      `in frequency range ${frequencyRange} ${listed(table, "kHz")}`,
    );
  }
  const blocks = row[bandwidthMHz];
  if (blocks === undefined) {
    const allowed = `at ${subcarrierKHz} kHz in frequency range ${frequencyRange} ${listed(row, "MHz")}`;
    throw new DomainError("bandwidthMHz", bandwidthMHz, allowed);
  }
  return blocks;
}
