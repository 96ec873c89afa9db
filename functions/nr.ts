import { share } from "../src/model/domain";
import { NR_TABLE_NAMES, nrIndex } from "../src/model/standards/channel-quality";
import { modulationBits as bitsASymbol } from "../src/model/standards/modulation-bits";
import * as nr from "../src/model/standards/nr";
import { frequencyRanges, nrBandwidth, nrSpacing } from "../src/model/standards/resource-blocks";
import * as block from "../src/model/standards/transport-block";
import { number, optionalChoice, optionalNumber, perCell } from "../src/sheet/call";

/**
 * Largest number of resource blocks of an NR carrier.
 * @customfunction NR.BLOCKS
 * @param bandwidthMHz Channel bandwidth in MHz that the standard defines for the spacing.
 * @param subcarrierKHz Subcarrier spacing in kHz: 15, 30, 60 in range 1; 60, 120, 480, 960 in range 2.
 * @param [frequencyRange] 1 (to 7.125 GHz) or 2 (from 24.25 GHz); 1 if left out.
 * @returns Resource blocks of 12 subcarriers.
 * @method Table of the standard.
 * @source 3GPP TS 38.101-1 V19.3.0, table 5.3.2-1 (range 1); TS 38.101-2 V19.3.0, table 5.3.2-1 (range 2).
 * @errors #VALUE! for a bandwidth or spacing that the standard does not define; the message lists those it does.
 * @example =CAP.NR.BLOCKS(100, 30) is 273
 */
export function nrBlocks(bandwidthMHz: any[][], subcarrierKHz: any[][], frequencyRange?: any[][]): any[][] {
  return perCell(nr.blocks, {
    bandwidthMHz: number(bandwidthMHz, nrBandwidth),
    subcarrierKHz: number(subcarrierKHz, nrSpacing),
    frequencyRange: optionalNumber(frequencyRange, frequencyRanges, 1),
  });
}

/**
 * Approximate maximum data rate of one NR carrier.
 * @customfunction NR.PEAK
 * @param bandwidthMHz Channel bandwidth in MHz that the standard defines for the spacing.
 * @param subcarrierKHz Subcarrier spacing in kHz: 15, 30, 60 in range 1; 60, 120, 480, 960 in range 2.
 * @param [layers] Antenna layers, 1 to 8; 4 if left out.
 * @param [modulationBits] Bits a symbol: 1, 2, 4, 6, 8 or 10; 8 if left out.
 * @param [scaling] Scaling factor of the terminal: 1, 0.8, 0.75 or 0.4; 1 if left out.
 * @param [overheadShare] Overhead: range 1 0.14 down, 0.08 up; range 2 0.18, 0.10; 0.14 if left out.
 * @param [frequencyRange] 1 (to 7.125 GHz) or 2 (from 24.25 GHz); 1 if left out.
 * @param [timeShare] Share of the time in this direction, 1 if left out (paired spectrum); see TDD.SHARE.
 * @returns Mbit/s.
 * @method Layers x bits x scaling x 948/1024 x blocks x 12 / mean symbol time x (1 - overhead) x time share.
 * @source 3GPP TS 38.306, clause 4.1.2, with Rmax = 948/1024 (left out by some) and normal cyclic prefix; the time share is ours.
 * @assumes A bound of the terminal's capability, not what a cell carries.
 * @errors #VALUE! for a bandwidth or spacing that the standard does not define; the message lists those it does.
 * @example =CAP.NR.PEAK(100, 30) is 2337.0
 */
export function nrPeak(
  bandwidthMHz: any[][],
  subcarrierKHz: any[][],
  layers?: any[][],
  modulationBits?: any[][],
  scaling?: any[][],
  overheadShare?: any[][],
  frequencyRange?: any[][],
  timeShare?: any[][],
): any[][] {
  return perCell(nr.peak, {
    bandwidthMHz: number(bandwidthMHz, nrBandwidth),
    subcarrierKHz: number(subcarrierKHz, nrSpacing),
    layers: optionalNumber(layers, nr.layerCount, 4),
    modulationBits: optionalNumber(modulationBits, bitsASymbol, 8),
    scaling: optionalNumber(scaling, nr.scalingFactor, 1),
    overheadShare: optionalNumber(overheadShare, share, 0.14),
    frequencyRange: optionalNumber(frequencyRange, frequencyRanges, 1),
    timeShare: optionalNumber(timeShare, share, 1),
  });
}

/**
 * Size of an NR transport block.
 * @customfunction NR.TRANSPORTBLOCK
 * @param blocks Resource blocks of the allocation, 1 to 275.
 * @param symbols Symbols of the allocation in its slot, 1 to 14.
 * @param modulationBits Bits a symbol: 1, 2, 4, 6, 8 or 10.
 * @param codeRate1024 1024 times the code rate, above 0 and below 1024.
 * @param layers Antenna layers of the codeword, 1 to 4.
 * @param [dmrsPerBlock] Resource elements of reference signals in a block, 12 if left out.
 * @param [overheadPerBlock] Other unusable resource elements in a block: 0, 6, 12 or 18; 0 if left out.
 * @returns Bits.
 * @method Steps 1 to 4: at most 156 elements a block; up to 3824 information bits the table, above it code blocks of equal size; ties round up.
 * @source 3GPP TS 38.214 V18.7.0, clause 5.1.3.2 and table 5.1.3.2-1.
 * @assumes No scaling of the information bits (paging and random-access answers have one).
 * @errors #VALUE! where nothing is left beside reference signals and overhead.
 * @example =CAP.NR.TRANSPORTBLOCK(273, 13, 8, 948, 4) is 1179864
 */
export function nrTransportblock(
  blocks: any[][],
  symbols: any[][],
  modulationBits: any[][],
  codeRate1024: any[][],
  layers: any[][],
  dmrsPerBlock?: any[][],
  overheadPerBlock?: any[][],
): any[][] {
  return perCell(nr.transportBlock, {
    blocks: number(blocks, block.blockCount),
    symbols: number(symbols, block.symbolCount),
    modulationBits: number(modulationBits, bitsASymbol),
    codeRate1024: number(codeRate1024, block.codeRates1024),
    layers: number(layers, block.codewordLayers),
    dmrsPerBlock: optionalNumber(dmrsPerBlock, block.elementCount, 12),
    overheadPerBlock: optionalNumber(overheadPerBlock, block.elementCount, 0),
  });
}

/**
 * Information bits a modulation symbol of an NR index.
 * @customfunction NR.EFFICIENCY
 * @param index Row of the table: channel quality 1 to 15, modulation and coding from 0.
 * @param [table] "cqi1" to "cqi4" or "mcs1" to "mcs4"; "cqi1" if left out.
 * @returns Bit a symbol.
 * @method Modulation bits x code rate of the table, not rounded to its four decimals.
 * @source 3GPP TS 38.214 V18.7.0: cqi1 to cqi4 are tables 5.2.2.1-2 to -5, mcs1 to mcs4 tables 5.1.3.1-1 to -4.
 * @assumes Block errors of 10 % at first transmission (cqi3: 0.001 %); overhead is not in it.
 * @errors #VALUE! for an index that the table lacks or reserves; the message gives its rows.
 * @example =CAP.NR.EFFICIENCY(15, "cqi2") is 7.4063
 */
export function nrEfficiency(index: any[][], table?: any[][]): any[][] {
  return perCell(nr.efficiency, {
    index: number(index, nrIndex),
    table: optionalChoice(table, NR_TABLE_NAMES, "cqi1"),
  });
}
