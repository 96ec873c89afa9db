import * as erlangB from "../src/model/blocking/erlang-b";
import { positiveCount, shareBelowOne } from "../src/model/domain";
import { bitRate } from "../src/model/interference/domains";
import * as ofdma from "../src/model/schemes/ofdma";
import { trafficPerUser } from "../src/model/schemes/subscribers";
import { number, optionalNumber, perCell } from "../src/sheet/call";

/**
 * Bearers of constant rate that one cell carries on its resource blocks.
 * @customfunction OFDMA.CHANNELS
 * @param blocks Resource blocks of the carrier, above 0.
 * @param blockBandwidthKHz Bandwidth of a resource block in kHz, above 0.
 * @param bitRateKbps Rate of a bearer in kbit/s, above 0.
 * @param spectralEfficiency Mean efficiency in bit/s/Hz before overhead, above 0.
 * @param [overheadShare] Share of the resource without user data; 0.25 by default. Type 0 if the efficiency holds it.
 * @param [clusterSize] Cells that share the blocks once; 1 by default.
 * @returns Whole number of bearers.
 * @method floor(blocks bw eff (1 - overhead) / (cluster rate)).
 * @source Common practice; mean efficiency of a cell as in Report ITU-R M.2134.
 * @assumes Mean efficiency over the cell; overhead must not be in the efficiency already. Elastic data belongs in CAP.SHARING.
 * @example =CAP.OFDMA.CHANNELS(50, 180, 64, 1.5) is 158
 */
export function ofdmaChannels(
  blocks: any[][],
  blockBandwidthKHz: any[][],
  bitRateKbps: any[][],
  spectralEfficiency: any[][],
  overheadShare?: any[][],
  clusterSize?: any[][],
): any[][] {
  return perCell(ofdma.channels, {
    blocks: number(blocks, ofdma.blockCount),
    blockBandwidthKHz: number(blockBandwidthKHz, ofdma.blockBandwidth),
    bitRateKbps: number(bitRateKbps, bitRate),
    spectralEfficiency: number(spectralEfficiency, ofdma.spectralEfficiencyRange),
    overheadShare: optionalNumber(overheadShare, shareBelowOne, 0.25),
    clusterSize: optionalNumber(clusterSize, positiveCount, 1),
  });
}

/**
 * Subscribers of one cell at a blocking target, a bearer of constant rate each.
 * @customfunction OFDMA.SUBSCRIBERS
 * @param blocks Resource blocks of the carrier, above 0.
 * @param blockBandwidthKHz Bandwidth of a resource block in kHz, above 0.
 * @param bitRateKbps Rate of a bearer in kbit/s, above 0.
 * @param spectralEfficiency Mean efficiency in bit/s/Hz before overhead, above 0.
 * @param trafficPerUserE Traffic of one subscriber in erlang, above 0.
 * @param blocking Blocking target, above 0 and below 1.
 * @param [overheadShare] Share of the resource without user data; 0.25 by default. Type 0 if the efficiency holds it.
 * @param [clusterSize] Cells that share the blocks once; 1 by default.
 * @returns Whole number of subscribers.
 * @method Bearers as CAP.OFDMA.CHANNELS; floor(Erlang-B traffic of that many channels at the blocking target / traffic of one).
 * @source Common practice; Erlang B.
 * @assumes Offered, not carried, traffic of a subscriber; blocked calls leave.
 * @example =CAP.OFDMA.SUBSCRIBERS(50, 180, 64, 1.5, 0.025, 0.02) is 5786
 */
export function ofdmaSubscribers(
  blocks: any[][],
  blockBandwidthKHz: any[][],
  bitRateKbps: any[][],
  spectralEfficiency: any[][],
  trafficPerUserE: any[][],
  blocking: any[][],
  overheadShare?: any[][],
  clusterSize?: any[][],
): any[][] {
  return perCell(ofdma.subscribers, {
    blocks: number(blocks, ofdma.blockCount),
    blockBandwidthKHz: number(blockBandwidthKHz, ofdma.blockBandwidth),
    bitRateKbps: number(bitRateKbps, bitRate),
    spectralEfficiency: number(spectralEfficiency, ofdma.spectralEfficiencyRange),
    trafficPerUserE: number(trafficPerUserE, trafficPerUser),
    blocking: number(blocking, erlangB.blockingTarget),
    overheadShare: optionalNumber(overheadShare, shareBelowOne, 0.25),
    clusterSize: optionalNumber(clusterSize, positiveCount, 1),
  });
}

/**
 * Voice calls of one cell where every packet is scheduled on whole resource blocks.
 * @customfunction OFDMA.PACKETVOICE
 * @param blocksPerMs Resource blocks in a millisecond, above 0.
 * @param packetMs Time between the packets of a call in ms, above 0.
 * @param blocksPerPacket Blocks that a packet takes, a whole number of at least 1.
 * @param [activity] Share of time that a speaker talks, above 0 to 1; 0.5 by default.
 * @param [transmissions] Mean transmissions of a packet, repeats included, at least 1; 1.2 by default.
 * @returns Whole number of calls.
 * @method floor(packetMs blocksPerMs / (blocksPerPacket activity transmissions)).
 * @source Common practice; packet voice capacity as defined in Report ITU-R M.2135 (from memory).
 * @assumes Scheduling is perfect and control channels do not limit; a mean over users of the blocks a packet takes.
 * @example =CAP.OFDMA.PACKETVOICE(50, 20, 2) is 833
 */
export function ofdmaPacketvoice(
  blocksPerMs: any[][],
  packetMs: any[][],
  blocksPerPacket: any[][],
  activity?: any[][],
  transmissions?: any[][],
): any[][] {
  return perCell(ofdma.packetVoice, {
    blocksPerMs: number(blocksPerMs, ofdma.blockCount),
    packetMs: number(packetMs, ofdma.packetTime),
    blocksPerPacket: number(blocksPerPacket, positiveCount),
    activity: optionalNumber(activity, ofdma.activityFactor, 0.5),
    transmissions: optionalNumber(transmissions, ofdma.transmissionCount, 1.2),
  });
}
