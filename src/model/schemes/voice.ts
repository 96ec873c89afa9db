import { domain, requireIn } from "../domain";
import { activityFactor, packetTime } from "./ofdma";

export const codecRate = domain(0, 1e6, "a rate above 0, up to 1,000,000 kbit/s", { openLow: true });
export const headerSize = domain(0, 1e5, "a size from 0 to 100,000 bytes");

const BITS_PER_BYTE = 8;

/**
 * Rate of a voice call on the channel, packet headers included: (codec + 8 header / frame) activity.
 *
 * @param codecKbps rate of the speech codec
 * @param frameMs time of speech in a packet
 * @param headerBytes headers of a packet
 * @param activity share of time that packets are sent
 * @returns kbit/s
 */
export function bitRate(codecKbps: number, frameMs: number, headerBytes: number, activity = 1): number {
  requireIn(codecRate, "codecKbps", codecKbps);
  requireIn(packetTime, "frameMs", frameMs);
  requireIn(headerSize, "headerBytes", headerBytes);
  requireIn(activityFactor, "activity", activity);
  // Bits per millisecond are kbit/s.
  return (codecKbps + (BITS_PER_BYTE * headerBytes) / frameMs) * activity;
}
