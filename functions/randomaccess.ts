import * as randomAccess from "../src/model/blocking/random-access";
import { nonNegative, positiveCount } from "../src/model/domain";
import { number, optionalNumber, perCell } from "../src/sheet/call";

/**
 * Probability that a random-access attempt meets no other one (slotted ALOHA).
 * @customfunction RANDOMACCESS.SUCCESS
 * @param attemptsPerSlot Mean attempts in a slot on all channels together, repeats included.
 * @param [channels] Channels or preambles to choose from, whole; 1 where left out.
 * @returns Probability from 0 to 1.
 * @method exp(-G/n), G attempts a slot on n channels: the chance seen by one attempt. The share of channels that see a collision is another figure.
 * @source L. G. Roberts, ALOHA packet system with and without slots and capture, ACM SIGCOMM 5 (1975).
 * @assumes Poisson attempts, each on a channel at random; two attempts on one channel in one slot are both lost.
 * @errors #VALUE! for negative attempts or channels that are not whole.
 * @example =CAP.RANDOMACCESS.SUCCESS(10, 54) is 0.83095
 */
export function randomaccessSuccess(attemptsPerSlot: any[][], channels?: any[][]): any[][] {
  return perCell(randomAccess.success, {
    attemptsPerSlot: number(attemptsPerSlot, nonNegative),
    channels: optionalNumber(channels, positiveCount, 1),
  });
}

/**
 * Mean number of successful random-access attempts in a slot (slotted ALOHA).
 * @customfunction RANDOMACCESS.THROUGHPUT
 * @param attemptsPerSlot Mean attempts in a slot on all channels together, repeats included.
 * @param [channels] Channels or preambles to choose from, whole; 1 where left out.
 * @returns Successful attempts in a slot on all channels together; at most channels/e.
 * @method G exp(-G/n), G attempts a slot on n channels.
 * @source L. G. Roberts, ALOHA packet system with and without slots and capture, ACM SIGCOMM 5 (1975).
 * @assumes Poisson attempts, each on a channel at random; two attempts on one channel in one slot are both lost.
 * @errors #VALUE! for negative attempts or channels that are not whole.
 * @example =CAP.RANDOMACCESS.THROUGHPUT(10, 54) is 8.3095
 */
export function randomaccessThroughput(attemptsPerSlot: any[][], channels?: any[][]): any[][] {
  return perCell(randomAccess.throughput, {
    attemptsPerSlot: number(attemptsPerSlot, nonNegative),
    channels: optionalNumber(channels, positiveCount, 1),
  });
}
