import * as erlangB from "../blocking/erlang-b";
import { count, domain, requireIn } from "../domain";

export const channelsOfCarrier = domain(1, 100_000, "a whole number of channels from 1 to 100,000", { whole: true });

/**
 * Smallest number of carriers that carries the traffic at a blocking target.
 *
 * @param trafficE offered traffic, erlang
 * @param blocking blocking target
 * @param channelsPerCarrier channels or slots of a carrier
 * @param controlChannels channels of the cell that carry control, whatever its carriers
 * @returns carriers; 0 where there is no traffic
 */
export function carriers(trafficE: number, blocking: number, channelsPerCarrier: number, controlChannels = 0): number {
  requireIn(channelsOfCarrier, "channelsPerCarrier", channelsPerCarrier);
  requireIn(count, "controlChannels", controlChannels);
  const channels = erlangB.channels(trafficE, blocking);
  return channels === 0 ? 0 : Math.ceil((channels + controlChannels) / channelsPerCarrier);
}
