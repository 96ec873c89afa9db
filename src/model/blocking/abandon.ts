import { domain, requireIn } from "../domain";
import { inverseTerm, isFarBelowMean, below } from "../numerics/poisson-ratio";
import { idleOdds } from "./erlang-b-formula";
import { channelCount, waitingTraffic } from "./waiting-domains";

/** Patience and holding time may differ by this much: beyond, the sums of the queue grow longer than a call may take. */
const LARGEST_RATIO = 1e6;
export const timeS = domain(0, 1e9, "a time above 0, up to 1,000,000,000 s", { openLow: true });
const patience = (holdingTimeS: number): ReturnType<typeof domain> =>
  domain(
    holdingTimeS / LARGEST_RATIO,
    holdingTimeS * LARGEST_RATIO,
    `a time within a factor of 1,000,000 of the holding time of ${holdingTimeS} s`,
  );

const NEGLIGIBLE = 1e-17;

/**
 * Sums over the queue with terms t_j = y^j / ((x + 1) ... (x + j)): total of t_j, and of j t_j, for j from 1.
 * Both are sums of positive terms; below the mean x the terms fall from the start and some 9 sqrt(x) of them count.
 */
function queueByTerms(x: number, y: number): { total: number; weighted: number } {
  let term = 1;
  let total = 0;
  let weighted = 0;
  for (let j = 1; j * term > NEGLIGIBLE * weighted; j++) {
    term *= y / (x + j);
    total += term;
    weighted += j * term;
  }
  return { total, weighted };
}

/**
 * Share of calls that leave the queue before they are served: N servers, exponential holding and patience
 * (C. Palm 1957; M/M/N+M).
 *
 * A call that waits in place j of the queue leaves at rate 1/patience, so the share is (h/patience) E[queue] / A. Balance
 * gives the mean queue from the total alone where the traffic exceeds the servers; below them the terms are summed.
 *
 * @param trafficE offered traffic, erlang
 * @param channels number of channels, above 0
 * @param holdingTimeS mean holding time, s
 * @param patienceS mean patience, s
 * @returns share from 0 to 1
 */
export function lost(trafficE: number, channels: number, holdingTimeS: number, patienceS: number): number {
  requireIn(waitingTraffic, "trafficE", trafficE);
  requireIn(channelCount, "channels", channels);
  requireIn(timeS, "holdingTimeS", holdingTimeS);
  requireIn(patience(holdingTimeS), "patienceS", patienceS);
  if (trafficE === 0) return 0;
  const leave = holdingTimeS / patienceS;
  const x = channels / leave;
  const y = trafficE / leave;
  // In units of the chance that all servers are busy and nobody waits.
  const belowBusy = idleOdds(trafficE, channels);
  if (y <= x) {
    const { total, weighted } = queueByTerms(x, y);
    return (weighted * leave) / (trafficE * (belowBusy + 1 + total));
  }
  // With J = 1 + total, sum of j t_j = (y - x) J + x: positive parts only.
  const inverseJ = 1 / upperTotal(x, y);
  return ((y - x + x * inverseJ) * leave) / (trafficE * (belowBusy * inverseJ + 1));
}

/** 1 + sum of y^j / ((x + 1) ... (x + j)) for y above x: what the whole Poisson sum has above x, in units of its term at x. */
function upperTotal(x: number, y: number): number {
  if (y < 50) {
    const { total } = queueByTerms(x, y);
    return 1 + total;
  }
  const whole = inverseTerm(x, y);
  return isFarBelowMean(x, y) && whole === Infinity ? Infinity : whole - below(x, y);
}
