import { domain, nonNegative, positive, requireIn } from "../domain";
import { NoAnswerError } from "../errors";

export const messageRate = domain(0, 1e12, "messages per hour from 0 to 1e12");

const SECONDS_PER_HOUR = 3600;

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
  const transmissionS = (8 * messageBytes) / (1000 * channelKbps);
  const capacityPerHour = SECONDS_PER_HOUR / transmissionS;
  if (messagesPerHour >= capacityPerHour) {
    throw new NoAnswerError(
      `The queue never settles: ${messagesPerHour} messages an hour is not below the ${capacityPerHour} that the channel can send.`,
    );
  }
  const waitS =
    (messagesPerHour * transmissionS * (1 + sizeVariation * sizeVariation)) / (2 * (capacityPerHour - messagesPerHour));
  return transmissionS + waitS;
}
