import * as message from "../src/model/blocking/message";
import { nonNegative, positive } from "../src/model/domain";
import { number, optionalNumber, perCell } from "../src/sheet/call";

/**
 * Mean delay of a message on one channel: waiting for the channel and its own transmission.
 * @customfunction MESSAGE.DELAY
 * @param messagesPerHour Messages per hour on the channel, at least 0.
 * @param messageBytes Mean size of a message in bytes, above 0.
 * @param channelKbps Rate of the channel in kbit/s, above 0.
 * @param [sizeVariation] Coefficient of variation of the size: 0 constant, 1 exponential (default).
 * @returns Mean delay in seconds, from arrival to the end of the transmission.
 * @method M/G/1 by Pollaczek and Khinchine: s + lambda s^2 (1 + c^2) / (2 (1 - lambda s)), s the mean transmission time. The mean wait alone is the delay less s.
 * @source F. Pollaczek 1930; A. Khinchine 1932; ITU-D Teletraffic Engineering Handbook, chapter on delay systems.
 * @assumes Poisson arrivals, first come first served, no loss; an empty size variation cell that the host passes as 0 means constant size.
 * @errors #N/A where the messages need the whole channel or more.
 * @example =CAP.MESSAGE.DELAY(2880, 1250, 10, 0) is 3.000
 */
export function messageDelay(
  messagesPerHour: any[][],
  messageBytes: any[][],
  channelKbps: any[][],
  sizeVariation?: any[][],
): any[][] {
  return perCell(message.delay, {
    messagesPerHour: number(messagesPerHour, message.messageRate),
    messageBytes: number(messageBytes, positive),
    channelKbps: number(channelKbps, positive),
    sizeVariation: optionalNumber(sizeVariation, nonNegative, 1),
  });
}
