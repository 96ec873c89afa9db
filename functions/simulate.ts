import * as simulate from "../src/model/plan/simulate-blocking";
import { flag, number, optionalChoice, perCellRow } from "../src/sheet/call";

/**
 * Blocking of a group of channels by event simulation: an independent check of the loss formula.
 * @customfunction SIMULATE.BLOCKING
 * @param trafficE Offered traffic in erlang, above 0 to 10,000.
 * @param channels Number of channels, a whole number up to 100,000.
 * @param calls Calls to count, 1,000 to 2,000,000 and at least 200 for each erlang (800 for "hyperexponential").
 * @param seed Whole number that starts the random numbers: the same seed gives the same answer.
 * @param [holdingTime] "exponential" (default), "constant" or "hyperexponential".
 * @param [labels] TRUE to put the headings first.
 * @returns Estimated blocking, then the half-width of its 95 % confidence interval.
 * @method Poisson calls event by event to a group that starts empty; calls of the first 10 mean holding times (40 for "hyperexponential") are not counted. Half-width by 20 batch means with Student's t; 3/calls where no call is blocked. "hyperexponential": two phases with balanced means, squared coefficient of variation 4. Random numbers: xoshiro128**.
 * @source A. M. Law, Simulation Modeling and Analysis (batch means); D. Blackman, S. Vigna, ACM Trans. Math. Software 47 (2021) (random numbers).
 * @assumes Poisson arrivals; blocked calls leave.
 * @errors #VALUE! for fewer calls than fill 20 batches of that length.
 * @example =CAP.SIMULATE.BLOCKING(10, 15, 100000, 1) is 0.0374
 */
export function simulateBlocking(
  trafficE: any[][],
  channels: any[][],
  calls: any[][],
  seed: any[][],
  holdingTime?: any[][],
  labels?: any[][],
): any[][] {
  return perCellRow(
    simulate.blocking,
    ["estimate", "half-width"],
    {
      trafficE: number(trafficE, simulate.simulatedTraffic),
      channels: number(channels, simulate.simulatedChannels),
      calls: number(calls, simulate.simulatedCalls),
      seed: number(seed, simulate.seedRange),
      holdingTime: optionalChoice(holdingTime, simulate.HOLDING_TIMES, "exponential"),
    },
    flag(labels),
  );
}
