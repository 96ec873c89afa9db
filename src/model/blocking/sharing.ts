/** Elastic transfers that share a link: processor sharing, with and without a peak rate of each transfer. */
import { domain, requireIn } from "../domain";
import { NoAnswerError } from "../errors";
import { bracketAround, rootIn } from "../numerics/root";
import { idleOdds } from "./erlang-b-formula";

export const linkRate = domain(0, 1e9, "a rate above 0, up to 1,000,000,000 Mbit/s", { openLow: true });
export const linkTraffic = domain(0, 1e9, "traffic from 0 to 1,000,000,000 Mbit/s");

/** With so many spare peak rates a transfer is slowed down by less than a rounding unit. */
const PLENTY = 1e17;
/** Stands for an infinite logarithm, so that the search can still divide. */
const LARGE_LOG = 1000;

/**
 * Reciprocal of the delay factor's excess: (R - A) / ErlangC(A, R), where R = capacity/peak transfers run at full rate and A of
 * them are offered. Both parts of 1/ErlangC = 1 + (1 - A/R) (1 - B)/B are positive; (1 - B)/B is continued to real R as Erlang B is.
 */
function inverseExcess(trafficMbps: number, spareMbps: number, peakMbps: number): number {
  const spare = spareMbps / peakMbps;
  if (spare > PLENTY) return spare;
  const offered = trafficMbps / peakMbps;
  return spare * (1 + (spareMbps / (trafficMbps + spareMbps)) * idleOdds(offered, offered + spare));
}

/**
 * Mean rate of a transfer: its size over its mean duration.
 *
 * Without a peak rate M/G/1 processor sharing, C - traffic. With one M/G/R processor sharing (K. Lindberger 1999), R = C/peak real:
 * peak / (1 + ErlangC(R rho, R) / (R (1 - rho))). A peak above the capacity is none: R is at least 1, where both agree.
 *
 * @param capacityMbps capacity of the link or cell, Mbit/s
 * @param trafficMbps mean traffic offered, Mbit/s
 * @param peakMbps highest rate of one transfer, Mbit/s; unlimited where left out
 * @returns Mbit/s
 * @throws NoAnswerError where the traffic is not below the capacity
 */
export function throughput(capacityMbps: number, trafficMbps: number, peakMbps?: number): number {
  requireIn(linkRate, "capacityMbps", capacityMbps);
  requireIn(linkTraffic, "trafficMbps", trafficMbps);
  if (peakMbps !== undefined) requireIn(linkRate, "peakMbps", peakMbps);
  if (trafficMbps >= capacityMbps) {
    throw new NoAnswerError(
      `Transfers never end: ${trafficMbps} Mbit/s of traffic is not below the capacity of ${capacityMbps} Mbit/s.`,
    );
  }
  const spareMbps = capacityMbps - trafficMbps;
  if (peakMbps === undefined || peakMbps >= capacityMbps) return spareMbps;
  return peakMbps / (1 + 1 / inverseExcess(trafficMbps, spareMbps, peakMbps));
}

/**
 * Smallest capacity at which the mean rate of a transfer reaches a target.
 *
 * @param trafficMbps mean traffic offered, Mbit/s
 * @param throughputMbps wanted mean rate of a transfer, Mbit/s
 * @param peakMbps highest rate of one transfer, Mbit/s; unlimited where left out
 * @returns Mbit/s
 * @throws NoAnswerError where the target is not below the peak
 */
export function capacity(trafficMbps: number, throughputMbps: number, peakMbps?: number): number {
  requireIn(linkTraffic, "trafficMbps", trafficMbps);
  requireIn(linkRate, "throughputMbps", throughputMbps);
  if (peakMbps !== undefined) requireIn(linkRate, "peakMbps", peakMbps);
  const alone = trafficMbps + throughputMbps;
  if (peakMbps === undefined) return alone;
  if (throughputMbps >= peakMbps) {
    throw new NoAnswerError(
      `No capacity gives a mean of ${throughputMbps} Mbit/s to transfers whose peak is ${peakMbps} Mbit/s: it must be below the peak.`,
    );
  }
  // The peak does not bind, or there is nothing to share with.
  if (alone <= peakMbps || trafficMbps === 0) return alone;
  // A transfer gets at least peak s/(peak + s), and at most s, of the spare capacity s.
  const wanted = Math.log(throughputMbps) - Math.log(peakMbps - throughputMbps);
  const miss = (spareMbps: number): number =>
    Math.min(LARGE_LOG, Math.log(inverseExcess(trafficMbps, spareMbps, peakMbps)) - wanted);
  const most = throughputMbps * (peakMbps / (peakMbps - throughputMbps));
  const least = Math.max(throughputMbps, peakMbps - trafficMbps);
  const bracket = bracketAround(miss, least, least, Math.max(most, least) * (1 + 1e-9));
  return trafficMbps + (bracket ? rootIn(miss, bracket) : least);
}
