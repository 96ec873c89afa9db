import * as erlangB from "../src/model/blocking/erlang-b";
import { count, positiveCount } from "../src/model/domain";
import * as fdma from "../src/model/schemes/fdma";
import * as spectrum from "../src/model/schemes/spectrum";
import { trafficPerUser } from "../src/model/schemes/subscribers";
import { number, optionalNumber, perCell } from "../src/sheet/call";

/**
 * Simultaneous users of one sector where each user has a frequency channel of its own.
 * @customfunction FDMA.CHANNELS
 * @param bandwidthMHz Spectrum of one direction in MHz, above 0.
 * @param channelSpacingKHz Channel spacing in kHz, above 0.
 * @param clusterSize Cells that share the spectrum once, a whole number of at least 1.
 * @param [sectors] Sectors of a site, each with channels of its own; 1 by default.
 * @param [guardKHz] Guard at both edges of the spectrum together in kHz; 0 by default.
 * @param [controlChannels] Channels of the sector that carry control; 0 by default.
 * @returns Whole number of traffic channels in one sector, not below 0.
 * @method floor(floor((B - guard)/spacing) / (cluster sectors)) - control.
 * @source Common practice; frequency reuse by clusters: V. H. Mac Donald, The Cellular Concept, Bell System Technical Journal 58 (1979).
 * @assumes Paired spectrum counted once; every sector of a cluster gets the same whole number of channels.
 * @example =CAP.FDMA.CHANNELS(1, 12.5, 7) is 11
 */
export function fdmaChannels(
  bandwidthMHz: any[][],
  channelSpacingKHz: any[][],
  clusterSize: any[][],
  sectors?: any[][],
  guardKHz?: any[][],
  controlChannels?: any[][],
): any[][] {
  return perCell(fdma.channels, {
    bandwidthMHz: number(bandwidthMHz, spectrum.bandwidth),
    channelSpacingKHz: number(channelSpacingKHz, spectrum.carrierSpacing),
    clusterSize: number(clusterSize, positiveCount),
    sectors: optionalNumber(sectors, positiveCount, 1),
    guardKHz: optionalNumber(guardKHz, spectrum.guardBand, 0),
    controlChannels: optionalNumber(controlChannels, count, 0),
  });
}

/**
 * Subscribers of one sector at a blocking target, a frequency channel each.
 * @customfunction FDMA.SUBSCRIBERS
 * @param bandwidthMHz Spectrum of one direction in MHz, above 0.
 * @param channelSpacingKHz Channel spacing in kHz, above 0.
 * @param clusterSize Cells that share the spectrum once, a whole number of at least 1.
 * @param trafficPerUserE Traffic of one subscriber in erlang, above 0.
 * @param blocking Blocking target, above 0 and below 1.
 * @param [sectors] Sectors of a site, each with channels of its own; 1 by default.
 * @param [guardKHz] Guard at both edges of the spectrum together in kHz; 0 by default.
 * @param [controlChannels] Channels of the sector that carry control; 0 by default.
 * @returns Whole number of subscribers in one sector.
 * @method Channels as CAP.FDMA.CHANNELS; floor(Erlang-B traffic of that many channels at the blocking target / traffic of one).
 * @source Common practice; Erlang B.
 * @assumes Offered, not carried, traffic of a subscriber; blocked calls leave.
 * @example =CAP.FDMA.SUBSCRIBERS(1, 12.5, 7, 0.025, 0.02) is 233
 */
export function fdmaSubscribers(
  bandwidthMHz: any[][],
  channelSpacingKHz: any[][],
  clusterSize: any[][],
  trafficPerUserE: any[][],
  blocking: any[][],
  sectors?: any[][],
  guardKHz?: any[][],
  controlChannels?: any[][],
): any[][] {
  return perCell(fdma.subscribers, {
    bandwidthMHz: number(bandwidthMHz, spectrum.bandwidth),
    channelSpacingKHz: number(channelSpacingKHz, spectrum.carrierSpacing),
    clusterSize: number(clusterSize, positiveCount),
    trafficPerUserE: number(trafficPerUserE, trafficPerUser),
    blocking: number(blocking, erlangB.blockingTarget),
    sectors: optionalNumber(sectors, positiveCount, 1),
    guardKHz: optionalNumber(guardKHz, spectrum.guardBand, 0),
    controlChannels: optionalNumber(controlChannels, count, 0),
  });
}
