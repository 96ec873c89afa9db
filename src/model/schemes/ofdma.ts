import { domain, positiveCount, requireIn, shareBelowOne } from "../domain";
import { bitRate } from "../interference/domains";
import { wholeWithin } from "../numerics/whole";
import { subscribersOf } from "./subscribers";

export const blockCount = domain(0, 1e6, "a number of resource blocks above 0, up to 1,000,000", { openLow: true });
export const blockBandwidth = domain(0, 1e6, "a bandwidth above 0, up to 1,000,000 kHz", { openLow: true });
export const spectralEfficiencyRange = domain(0, 100, "an efficiency above 0, up to 100 bit/s/Hz", { openLow: true });
export const packetTime = domain(0, 10_000, "a time above 0, up to 10,000 ms", { openLow: true });
export const activityFactor = domain(0, 1, "a share above 0, up to 1", { openLow: true });
export const transmissionCount = domain(1, 100, "a mean number of transmissions from 1 to 100");

/**
 * Bearers of constant rate that one cell carries: floor(blocks bw eff (1 - oh) / (cluster rate)).
 *
 * @param blocks resource blocks of the carrier
 * @param blockBandwidthKHz bandwidth of a block
 * @param bitRateKbps rate of a bearer
 * @param spectralEfficiency mean efficiency, bit/s/Hz, without overhead
 * @param overheadShare share of the resource that carries no user data
 * @param clusterSize cells that share the blocks once
 */
export function channels(
  blocks: number,
  blockBandwidthKHz: number,
  bitRateKbps: number,
  spectralEfficiency: number,
  overheadShare = 0.25,
  clusterSize = 1,
): number {
  requireIn(blockCount, "blocks", blocks);
  requireIn(blockBandwidth, "blockBandwidthKHz", blockBandwidthKHz);
  requireIn(bitRate, "bitRateKbps", bitRateKbps);
  requireIn(spectralEfficiencyRange, "spectralEfficiency", spectralEfficiency);
  requireIn(shareBelowOne, "overheadShare", overheadShare);
  requireIn(positiveCount, "clusterSize", clusterSize);
  return wholeWithin(
    (blocks * blockBandwidthKHz * spectralEfficiency * (1 - overheadShare)) / (clusterSize * bitRateKbps),
  );
}

/**
 * Subscribers of one cell at a blocking target: floor(Erlang-B traffic / traffic of one).
 *
 * @param blocks as for channels
 * @param blockBandwidthKHz as for channels
 * @param bitRateKbps as for channels
 * @param spectralEfficiency as for channels
 * @param trafficPerUserE traffic of one subscriber, erlang
 * @param blocking blocking target
 * @param overheadShare as for channels
 * @param clusterSize as for channels
 */
export function subscribers(
  blocks: number,
  blockBandwidthKHz: number,
  bitRateKbps: number,
  spectralEfficiency: number,
  trafficPerUserE: number,
  blocking: number,
  overheadShare = 0.25,
  clusterSize = 1,
): number {
  const group = channels(blocks, blockBandwidthKHz, bitRateKbps, spectralEfficiency, overheadShare, clusterSize);
  return subscribersOf(group, trafficPerUserE, blocking);
}

/**
 * Voice calls of one cell where each packet is scheduled on whole blocks:
 * floor(packetMs blocksPerMs / (blocksPerPacket activity transmissions)).
 *
 * @param blocksPerMs resource blocks in a millisecond
 * @param packetMs time between packets of a call
 * @param blocksPerPacket blocks that a packet takes, whole
 * @param activity share of time that a speaker talks
 * @param transmissions mean transmissions of a packet, repeats included
 */
export function packetVoice(
  blocksPerMs: number,
  packetMs: number,
  blocksPerPacket: number,
  activity = 0.5,
  transmissions = 1.2,
): number {
  requireIn(blockCount, "blocksPerMs", blocksPerMs);
  requireIn(packetTime, "packetMs", packetMs);
  requireIn(positiveCount, "blocksPerPacket", blocksPerPacket);
  requireIn(activityFactor, "activity", activity);
  requireIn(transmissionCount, "transmissions", transmissions);
  return wholeWithin((packetMs * blocksPerMs) / (blocksPerPacket * activity * transmissions));
}
