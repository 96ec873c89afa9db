import { domain, nonNegative, positive, requireIn } from "../domain";
import { NoAnswerError } from "../errors";
import { productError } from "../numerics/exact";

export const messageRate = domain(0, 1e12, "messages per hour from 0 to 1e12");

/** Bytes an hour that a channel of 1 kbit/s can send. */
const BYTES_PER_HOUR_PER_KBPS = (1000 * 3600) / 8;

/**
 * Mean delay of a message on one channel, waiting and its own transmission (M/G/1, Pollaczek-Khinchine).
 *
 * T = s + lambda s^2 (1 + c^2) / (2 (1 - lambda s)), s the mean transmission time, c the coefficient of variation of the size.
 *
 * @param messagesPerHour messages per hour on the channel
 * @param messageBytes mean size, bytes
 * @param channelKbps rate of the channel, kbit/s
 * @param sizeVariation coefficient of variation of the size: 0 constant, 1 exponential
 * @returns s
 * @throws NoAnswerError where the load is 1 or more
 */
export function delay(messagesPerHour: number, messageBytes: number, channelKbps: number, sizeVariation = 1): number {
  requireIn(messageRate, "messagesPerHour", messagesPerHour);
  requireIn(positive, "messageBytes", messageBytes);
  requireIn(positive, "channelKbps", channelKbps);
  requireIn(nonNegative, "sizeVariation", sizeVariation);
  const transmissionS = messageBytes / (125 * channelKbps);
  const capacity = BYTES_PER_HOUR_PER_KBPS * channelKbps;
  const load = messagesPerHour * messageBytes;
  // Near full load the spare capacity is a small difference, so the rounding of both products counts.
  const spare =
    capacity -
    load +
    (productError(BYTES_PER_HOUR_PER_KBPS, channelKbps, capacity) - productError(messagesPerHour, messageBytes, load));
  if (!(spare > 0)) {
    throw new NoAnswerError(
      `The queue never settles: ${messagesPerHour} messages an hour is not below the ${capacity / messageBytes} that the channel can send.`,
    );
  }
  const waitS = (load * transmissionS * (1 + sizeVariation * sizeVariation)) / (2 * spare);
  return transmissionS + waitS;
}
