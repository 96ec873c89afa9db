import * as erlangB from "../src/model/blocking/erlang-b";
import { count, positiveCount } from "../src/model/domain";
import * as tdma from "../src/model/schemes/tdma";
import * as spectrum from "../src/model/schemes/spectrum";
import { trafficPerUser } from "../src/model/schemes/subscribers";
import { number, optionalNumber, perCell } from "../src/sheet/call";

/**
 * Simultaneous users of one sector where each user has a time slot of a carrier.
 * @customfunction TDMA.CHANNELS
 * @param bandwidthMHz Spectrum of one direction in MHz, above 0.
 * @param carrierSpacingKHz Carrier spacing in kHz, above 0.
 * @param slotsPerCarrier Time slots of a carrier, a whole number of at least 1.
 * @param clusterSize Cells that share the spectrum once, a whole number of at least 1.
 * @param [sectors] Sectors of a site, each with channels of its own; 1 by default.
 * @param [guardKHz] Guard at both edges of the spectrum together in kHz; 0 by default.
 * @param [controlSlots] Slots of the sector that carry control; 1 by default. Type 0 for none.
 * @returns Whole number of traffic slots in one sector, not below 0.
 * @method floor(floor((B - guard)/spacing) / (cluster sectors)) carriers, times slots, less control slots.
 * @source Common practice; frequency reuse by clusters: V. H. Mac Donald, The Cellular Concept, Bell System Technical Journal 58 (1979).
 * @assumes One slot a user; whole carriers in a sector.
 * @example =CAP.TDMA.CHANNELS(12.5, 200, 8, 4, 1, 0, 3) is 117
 */
export function tdmaChannels(
  bandwidthMHz: any[][],
  carrierSpacingKHz: any[][],
  slotsPerCarrier: any[][],
  clusterSize: any[][],
  sectors?: any[][],
  guardKHz?: any[][],
  controlSlots?: any[][],
): any[][] {
  return perCell(tdma.channels, {
    bandwidthMHz: number(bandwidthMHz, spectrum.bandwidth),
    carrierSpacingKHz: number(carrierSpacingKHz, spectrum.carrierSpacing),
    slotsPerCarrier: number(slotsPerCarrier, tdma.slotCount),
    clusterSize: number(clusterSize, positiveCount),
    sectors: optionalNumber(sectors, positiveCount, 1),
    guardKHz: optionalNumber(guardKHz, spectrum.guardBand, 0),
    controlSlots: optionalNumber(controlSlots, count, 1),
  });
}

/**
 * Subscribers of one sector at a blocking target, a time slot each.
 * @customfunction TDMA.SUBSCRIBERS
 * @param bandwidthMHz Spectrum of one direction in MHz, above 0.
 * @param carrierSpacingKHz Carrier spacing in kHz, above 0.
 * @param slotsPerCarrier Time slots of a carrier, a whole number of at least 1.
 * @param clusterSize Cells that share the spectrum once, a whole number of at least 1.
 * @param trafficPerUserE Traffic of one subscriber in erlang, above 0.
 * @param blocking Blocking target, above 0 and below 1.
 * @param [sectors] Sectors of a site, each with channels of its own; 1 by default.
 * @param [guardKHz] Guard at both edges of the spectrum together in kHz; 0 by default.
 * @param [controlSlots] Slots of the sector that carry control; 1 by default. Type 0 for none.
 * @returns Whole number of subscribers in one sector.
 * @method Channels as CAP.TDMA.CHANNELS; floor(Erlang-B traffic of that many channels at the blocking target / traffic of one).
 * @source Common practice; Erlang B.
 * @assumes Offered, not carried, traffic of a subscriber; blocked calls leave.
 * @example =CAP.TDMA.SUBSCRIBERS(12.5, 200, 8, 4, 0.025, 0.02) is 4257
 */
export function tdmaSubscribers(
  bandwidthMHz: any[][],
  carrierSpacingKHz: any[][],
  slotsPerCarrier: any[][],
  clusterSize: any[][],
  trafficPerUserE: any[][],
  blocking: any[][],
  sectors?: any[][],
  guardKHz?: any[][],
  controlSlots?: any[][],
): any[][] {
  return perCell(tdma.subscribers, {
    bandwidthMHz: number(bandwidthMHz, spectrum.bandwidth),
    carrierSpacingKHz: number(carrierSpacingKHz, spectrum.carrierSpacing),
    slotsPerCarrier: number(slotsPerCarrier, tdma.slotCount),
    clusterSize: number(clusterSize, positiveCount),
    trafficPerUserE: number(trafficPerUserE, trafficPerUser),
    blocking: number(blocking, erlangB.blockingTarget),
    sectors: optionalNumber(sectors, positiveCount, 1),
    guardKHz: optionalNumber(guardKHz, spectrum.guardBand, 0),
    controlSlots: optionalNumber(controlSlots, count, 1),
  });
}
