import { domain, requireIn } from "../domain";
import { sumsAbove } from "../numerics/poisson-ratio";
import { idleOdds } from "./erlang-b-formula";
import { channelCount, waitingTraffic } from "./waiting-domains";

/** Patience and holding time may differ by this much: far beyond practice, and every digit is tested up to here. */
const LARGEST_RATIO = 1e6;
export const timeS = domain(0, 1e9, "a time above 0, up to 1,000,000,000 s", { openLow: true });
const patienceRange = (holdingTimeS: number): ReturnType<typeof domain> =>
  domain(
    holdingTimeS / LARGEST_RATIO,
    holdingTimeS * LARGEST_RATIO,
    `a time within a factor of 1,000,000 of the holding time of ${holdingTimeS} s`,
  );

/**
 * Share of calls that leave the queue before they are served: N servers, exponential holding and patience
 * (C. Palm 1957; M/M/N+M).
 *
 * The queue empties at the rate N/h + j/patience, so its states follow the terms of a Poisson distribution above N patience/h with the mean
 * A patience/h; the share is (h/patience) E[queue] / A. The sums come by region at any size, none with cancellation.
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
  requireIn(patienceRange(holdingTimeS), "patienceS", patienceS);
  if (trafficE === 0) return 0;
  const patience = patienceS / holdingTimeS;
  // In units of the chance that all servers are busy and nobody waits.
  const { total, weighted } = sumsAbove(channels * patience, trafficE * patience, (channels - trafficE) * patience);
  const upToBusy = idleOdds(trafficE, channels) + 1;
  if (trafficE <= channels) return weighted / (patience * trafficE * (upToBusy + total));
  // Over load, by balance, weighted = ((A - N) total + A) patience: positive parts. The total may leave the doubles.
  if (total < 1) return ((trafficE - channels) * total + trafficE) / (trafficE * (upToBusy + total));
  return (trafficE - channels + trafficE / total) / (trafficE * (upToBusy / total + 1));
}
