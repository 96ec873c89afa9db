import { count, requireIn } from "../domain";
import { carrierSpacing, carriersPerSector } from "./spectrum";
import { subscribersOf } from "./subscribers";

/**
 * Simultaneous users of one sector where each has a frequency channel of its own.
 *
 * floor(floor((B - guard)/spacing) / (cluster sectors)) - control, not below 0.
 *
 * @param bandwidthMHz spectrum of one direction, MHz
 * @param channelSpacingKHz channel spacing, kHz
 * @param clusterSize cells that share the spectrum once
 * @param sectors sectors of a site
 * @param guardKHz guard at both edges together, kHz
 * @param controlChannels channels of the sector that carry control
 */
export function channels(
  bandwidthMHz: number,
  channelSpacingKHz: number,
  clusterSize: number,
  sectors = 1,
  guardKHz = 0,
  controlChannels = 0,
): number {
  requireIn(carrierSpacing, "channelSpacingKHz", channelSpacingKHz);
  requireIn(count, "controlChannels", controlChannels);
  const carriers = carriersPerSector(bandwidthMHz, channelSpacingKHz, clusterSize, sectors, guardKHz);
  return Math.max(0, carriers - controlChannels);
}

/**
 * Subscribers of one sector at a blocking target: floor(Erlang-B traffic / traffic of one).
 *
 * @param bandwidthMHz as for channels
 * @param channelSpacingKHz as for channels
 * @param clusterSize as for channels
 * @param trafficPerUserE traffic of one subscriber, erlang
 * @param blocking blocking target
 * @param sectors as for channels
 * @param guardKHz as for channels
 * @param controlChannels as for channels
 */
export function subscribers(
  bandwidthMHz: number,
  channelSpacingKHz: number,
  clusterSize: number,
  trafficPerUserE: number,
  blocking: number,
  sectors = 1,
  guardKHz = 0,
  controlChannels = 0,
): number {
  const group = channels(bandwidthMHz, channelSpacingKHz, clusterSize, sectors, guardKHz, controlChannels);
  return subscribersOf(group, trafficPerUserE, blocking);
}
