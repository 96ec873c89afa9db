import { activityFactor, packetTime } from "../src/model/schemes/ofdma";
import * as voice from "../src/model/schemes/voice";
import { number, optionalNumber, perCell } from "../src/sheet/call";

/**
 * Rate of a voice call on the channel with its packet headers.
 * @customfunction VOICE.BITRATE
 * @param codecKbps Rate of the speech codec in kbit/s, above 0.
 * @param frameMs Speech in one packet in ms, above 0.
 * @param headerBytes Headers of a packet in bytes, at least 0.
 * @param [activity] Share of time that packets are sent, above 0 to 1; 1 by default.
 * @returns Rate in kbit/s.
 * @method (codec + 8 header / frame) activity.
 * @source Common practice; header sizes: IETF RFC 3550 (12 bytes), RFC 768 (8 bytes), RFC 791 (20 bytes), compressed by RFC 5795.
 * @assumes Constant packet rate while active; silence frames not counted.
 * @example =CAP.VOICE.BITRATE(12.2, 20, 40) is 28.2
 */
export function voiceBitrate(codecKbps: any[][], frameMs: any[][], headerBytes: any[][], activity?: any[][]): any[][] {
  return perCell(voice.bitRate, {
    codecKbps: number(codecKbps, voice.codecRate),
    frameMs: number(frameMs, packetTime),
    headerBytes: number(headerBytes, voice.headerSize),
    activity: optionalNumber(activity, activityFactor, 1),
  });
}
