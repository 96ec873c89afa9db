import { share } from "../src/model/domain";
import { lteIndex } from "../src/model/standards/channel-quality";
import * as lte from "../src/model/standards/lte";
import { modulationBits as bitsASymbol } from "../src/model/standards/modulation-bits";
import { lteBandwidth } from "../src/model/standards/resource-blocks";
import { number, optionalNumber, perCell } from "../src/sheet/call";

/**
 * Resource blocks of an LTE carrier.
 * @customfunction LTE.BLOCKS
 * @param bandwidthMHz Channel bandwidth in MHz: 1.4, 3, 5, 10, 15 or 20.
 * @returns Resource blocks of 180 kHz.
 * @method Table of the standard.
 * @source 3GPP TS 36.101, clause 5.6, table 5.6-1.
 * @errors #VALUE! for any other bandwidth.
 * @example =CAP.LTE.BLOCKS(20) is 100
 */
export function lteBlocks(bandwidthMHz: any[][]): any[][] {
  return perCell(lte.blocks, { bandwidthMHz: number(bandwidthMHz, lteBandwidth) });
}

/**
 * Peak rate of an LTE carrier.
 * @customfunction LTE.PEAK
 * @param bandwidthMHz Channel bandwidth in MHz: 1.4, 3, 5, 10, 15 or 20.
 * @param [layers] Antenna layers, 1 to 8; 2 if left out.
 * @param [modulationBits] Bits a symbol: 1, 2, 4, 6, 8 or 10; 6 if left out.
 * @param [codeRate] Code rate, above 0 and up to 1; 0.925781 if left out.
 * @param [overheadShare] Share of control and reference signals; 0.25 if left out.
 * @returns Mbit/s.
 * @method Blocks x 12 subcarriers x 14 symbols x 1000 a second x layers x bits x code rate x (1 - overhead).
 * @source 3GPP TS 36.211, table 6.2.3-1 (normal cyclic prefix); TS 36.101, table 5.6-1; code rate 948/1024 of TS 36.213, table 7.2.3-1.
 * @assumes All blocks to one user in every subframe. The largest transport blocks of TS 36.213 give up to 8 % more.
 * @errors #VALUE! for a bandwidth that the standard does not define.
 * @example =CAP.LTE.PEAK(20) is 139.98
 */
export function ltePeak(
  bandwidthMHz: any[][],
  layers?: any[][],
  modulationBits?: any[][],
  codeRate?: any[][],
  overheadShare?: any[][],
): any[][] {
  return perCell(lte.peak, {
    bandwidthMHz: number(bandwidthMHz, lteBandwidth),
    layers: optionalNumber(layers, lte.layerCount, 2),
    modulationBits: optionalNumber(modulationBits, bitsASymbol, 6),
    codeRate: optionalNumber(codeRate, lte.codeRates, lte.DEFAULT_CODE_RATE),
    overheadShare: optionalNumber(overheadShare, share, 0.25),
  });
}

/**
 * Information bits a modulation symbol of an LTE channel quality index.
 * @customfunction LTE.EFFICIENCY
 * @param cqi Channel quality index, 1 to 15.
 * @returns Bit a symbol.
 * @method Modulation bits x code rate of the table, not rounded to its four decimals.
 * @source 3GPP TS 36.213, clause 7.2.3, table 7.2.3-1.
 * @assumes Block errors of 10 % at first transmission; overhead is not in it.
 * @errors #VALUE! for an index outside 1 to 15; 0 is "out of range".
 * @example =CAP.LTE.EFFICIENCY(7) is 1.4766
 */
export function lteEfficiency(cqi: any[][]): any[][] {
  return perCell(lte.efficiency, { cqi: number(cqi, lteIndex) });
}
