import { count, domain, requireIn } from "../domain";
import { carrierSpacing, carriersPerSector } from "./spectrum";
import { subscribersOf } from "./subscribers";

export const slotCount = domain(1, 10_000, "a whole number of slots from 1 to 10,000", { whole: true });

/**
 * Simultaneous users of one sector where each has a time slot of a carrier: whole carriers times slots, less control.
 *
 * @param bandwidthMHz spectrum of one direction, MHz
 * @param carrierSpacingKHz carrier spacing, kHz
 * @param slotsPerCarrier slots of a carrier
 * @param clusterSize cells that share the spectrum once
 * @param sectors sectors of a site
 * @param guardKHz guard at both edges together, kHz
 * @param controlSlots slots of the sector that carry control
 */
export function channels(
  bandwidthMHz: number,
  carrierSpacingKHz: number,
  slotsPerCarrier: number,
  clusterSize: number,
  sectors = 1,
  guardKHz = 0,
  controlSlots = 1,
): number {
  requireIn(carrierSpacing, "carrierSpacingKHz", carrierSpacingKHz);
  requireIn(slotCount, "slotsPerCarrier", slotsPerCarrier);
  requireIn(count, "controlSlots", controlSlots);
  const carriers = carriersPerSector(bandwidthMHz, carrierSpacingKHz, clusterSize, sectors, guardKHz);
  return Math.max(0, carriers * slotsPerCarrier - controlSlots);
}

/**
 * Subscribers of one sector at a blocking target: floor(Erlang-B traffic / traffic of one).
 *
 * @param bandwidthMHz as for channels
 * @param carrierSpacingKHz as for channels
 * @param slotsPerCarrier as for channels
 * @param clusterSize as for channels
 * @param trafficPerUserE traffic of one subscriber, erlang
 * @param blocking blocking target
 * @param sectors as for channels
 * @param guardKHz as for channels
 * @param controlSlots as for channels
 */
export function subscribers(
  bandwidthMHz: number,
  carrierSpacingKHz: number,
  slotsPerCarrier: number,
  clusterSize: number,
  trafficPerUserE: number,
  blocking: number,
  sectors = 1,
  guardKHz = 0,
  controlSlots = 1,
): number {
  const group = channels(
    bandwidthMHz,
    carrierSpacingKHz,
    slotsPerCarrier,
    clusterSize,
    sectors,
    guardKHz,
    controlSlots,
  );
  return subscribersOf(group, trafficPerUserE, blocking);
}
