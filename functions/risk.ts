import * as erlangB from "../src/model/blocking/erlang-b";
import { probability } from "../src/model/domain";
import * as risk from "../src/model/plan/risk";
import { number, perCell } from "../src/sheet/call";

/**
 * Channels that suffice with a confidence when the traffic is uncertain.
 * @customfunction RISK.CHANNELS
 * @param trafficE Median of the forecast traffic in erlang, at least 0.
 * @param errorShare Relative error of the forecast, at least 0; 0.2 puts 68 % of outcomes between A/1.2 and 1.2 A.
 * @param blocking Blocking target, above 0 and below 1.
 * @param confidence Probability that the channels suffice, above 0 and below 1.
 * @returns Whole number of channels.
 * @method Erlang-B channels of A (1 + e)^z, z the standard normal quantile of the confidence: exact, since blocking grows with traffic.
 * @source A. K. Erlang 1917 (Erlang B); lognormal forecast error: common practice.
 * @assumes The logarithm of the traffic is normal with median ln A and deviation ln(1 + e).
 * @example =CAP.RISK.CHANNELS(20, 0.2, 0.02, 0.9) is 34
 */
export function riskChannels(trafficE: any[][], errorShare: any[][], blocking: any[][], confidence: any[][]): any[][] {
  return perCell(risk.channels, {
    trafficE: number(trafficE, erlangB.countableTraffic),
    errorShare: number(errorShare, risk.errorShareRange),
    blocking: number(blocking, erlangB.blockingTarget),
    confidence: number(confidence, probability),
  });
}
