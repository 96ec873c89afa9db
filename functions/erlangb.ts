import * as erlangB from "../src/model/blocking/erlang-b";
import { nonNegative } from "../src/model/domain";
import { number, perCell } from "../src/sheet/call";

/**
 * Blocking probability of a full-availability group where blocked calls are lost (Erlang B).
 * @customfunction ERLANGB.BLOCKING
 * @param trafficE Offered traffic in erlang, at least 0.
 * @param channels Number of channels, 0 to 1e9; may be fractional.
 * @returns Probability from 0 to 1 that a call is blocked.
 * @method B = (A^N / N!) / (sum of A^k / k!, k = 0 to N), continued to fractional N by 1/B = A times the integral of exp(-A y) (1+y)^N over y from 0: not interpolated between whole N. Recursion up to 32 channels; beyond, the Poisson term by its saddle point over the incomplete gamma function by Temme's uniform expansion, continued fraction or series. Relative error below 1e-12 at any size, down to 1e-300; below about 1e-308 the answer is 0.
 * @source A. K. Erlang 1917; ITU-T Recommendation E.501; continuation: D. L. Jagerman, Bell System Technical Journal 53 (1974); algorithm: NIST Digital Library of Mathematical Functions, sections 8.9 and 8.12.
 * @assumes Poisson arrivals, any distribution of holding times, every call reaches every channel, blocked calls leave and do not return.
 * @errors #VALUE! for traffic below 0 or channels outside 0 to 1e9.
 * @example =CAP.ERLANGB.BLOCKING(10, 15) is 0.03650
 */
export function erlangbBlocking(trafficE: any[][], channels: any[][]): any[][] {
  return perCell(erlangB.blocking, {
    trafficE: number(trafficE, nonNegative),
    channels: number(channels, erlangB.groupSize),
  });
}

/**
 * Smallest whole number of channels that keeps Erlang-B blocking at the target or below.
 * @customfunction ERLANGB.CHANNELS
 * @param trafficE Offered traffic in erlang, 0 to 1e9.
 * @param blocking Largest blocking probability, 1e-300 to below 1; 0.02 is 2 %.
 * @returns Number of channels; 0 where there is no traffic.
 * @method Smallest N with B(A, N) not above the target, by the formula of CAP.ERLANGB.BLOCKING. A real-valued estimate by an expansion in powers of 1/sqrt(A) decides alone unless a whole number lies within its error; then Erlang B at the whole numbers decides, so the answer is exact.
 * @source A. K. Erlang 1917; ITU-T Recommendation E.501; expansion: after D. L. Jagerman, Bell System Technical Journal 53 (1974).
 * @assumes Poisson arrivals, any distribution of holding times, every call reaches every channel, blocked calls leave and do not return.
 * @errors #VALUE! for a target of 0, or of 1 or more.
 * @example =CAP.ERLANGB.CHANNELS(100, 0.01) is 117
 */
export function erlangbChannels(trafficE: any[][], blocking: any[][]): any[][] {
  return perCell(erlangB.channels, {
    trafficE: number(trafficE, erlangB.countableTraffic),
    blocking: number(blocking, erlangB.blockingTarget),
  });
}

/**
 * Traffic that may be offered to a group at a blocking target (Erlang B).
 * @customfunction ERLANGB.TRAFFIC
 * @param channels Number of channels, 0 to 1e9; may be fractional.
 * @param blocking Blocking probability, 1e-300 to below 1; 0.02 is 2 %.
 * @returns Offered traffic in erlang; 0 for no channels.
 * @method Solves B(A, N) = target for A by Newton's method on the logarithm of (1-B)/B; B as in CAP.ERLANGB.BLOCKING.
 * @source A. K. Erlang 1917; ITU-T Recommendation E.501.
 * @assumes Poisson arrivals, any distribution of holding times, every call reaches every channel, blocked calls leave and do not return.
 * @errors #VALUE! for a target of 0, or of 1 or more.
 * @example =CAP.ERLANGB.TRAFFIC(30, 0.02) is 21.932
 */
export function erlangbTraffic(channels: any[][], blocking: any[][]): any[][] {
  return perCell(erlangB.traffic, {
    channels: number(channels, erlangB.groupSize),
    blocking: number(blocking, erlangB.blockingTarget),
  });
}

/**
 * Traffic that a group carries: the mean number of busy channels (Erlang B).
 * @customfunction ERLANGB.CARRIED
 * @param trafficE Offered traffic in erlang, at least 0.
 * @param channels Number of channels, 0 to 1e9; may be fractional.
 * @returns Carried traffic in erlang.
 * @method A (1 - B), B as in CAP.ERLANGB.BLOCKING; 1 - B is computed directly, not by subtraction.
 * @source A. K. Erlang 1917; ITU-T Recommendation E.501.
 * @assumes Poisson arrivals, any distribution of holding times, every call reaches every channel, blocked calls leave and do not return.
 * @errors #VALUE! for traffic below 0 or channels outside 0 to 1e9.
 * @example =CAP.ERLANGB.CARRIED(10, 10) is 7.854
 */
export function erlangbCarried(trafficE: any[][], channels: any[][]): any[][] {
  return perCell(erlangB.carried, {
    trafficE: number(trafficE, nonNegative),
    channels: number(channels, erlangB.groupSize),
  });
}

/**
 * Traffic that one channel more would carry (Moe's improvement function of Erlang B).
 * @customfunction ERLANGB.IMPROVEMENT
 * @param trafficE Offered traffic in erlang, at least 0.
 * @param channels Number of channels before the extra one, 0 to 1e9; may be fractional.
 * @returns Gain in carried traffic, in erlang.
 * @method A (B(N) - B(N+1)) = A B (1 + f) / (N + 1 + A B) with f = N - A (1-B) the mean number of free channels: no difference of nearly equal numbers.
 * @source K. Moe, in A. Jensen, Moe's Principle 1950; ITU-T Recommendation E.522 (improvement function).
 * @assumes Poisson arrivals, any distribution of holding times, every call reaches every channel, blocked calls leave and do not return.
 * @errors #VALUE! for traffic below 0 or channels outside 0 to 1e9.
 * @example =CAP.ERLANGB.IMPROVEMENT(15, 20) is 0.2108
 */
export function erlangbImprovement(trafficE: any[][], channels: any[][]): any[][] {
  return perCell(erlangB.improvement, {
    trafficE: number(trafficE, nonNegative),
    channels: number(channels, erlangB.groupSize),
  });
}

/**
 * Offered traffic behind a measured carried traffic (Erlang B).
 * @customfunction ERLANGB.OFFERED
 * @param carriedE Carried traffic in erlang, at least 0 and below the number of channels.
 * @param channels Number of channels, 0 to 1e9; may be fractional.
 * @returns Offered traffic in erlang.
 * @method Solves A (1 - B(A, N)) = carried for A. Measurements count carried calls; dimensioning needs what was offered. Near a full group a small error of the measurement becomes a large one of the answer.
 * @source ITU-T Recommendation E.501 (estimation of traffic offered from carried).
 * @assumes Poisson arrivals, any distribution of holding times, every call reaches every channel, blocked calls leave and do not return.
 * @errors #N/A where the carried traffic is not below the number of channels.
 * @example =CAP.ERLANGB.OFFERED(7.5, 10) is 9.029
 */
export function erlangbOffered(carriedE: any[][], channels: any[][]): any[][] {
  return perCell(erlangB.offered, {
    carriedE: number(carriedE, nonNegative),
    channels: number(channels, erlangB.groupSize),
  });
}
