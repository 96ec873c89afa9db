import { domain, requireIn } from "../domain";
import * as erlangB from "../blocking/erlang-b";

export const trafficPerUser = domain(1e-9, 1e6, "traffic of one user from 1E-9 to 1,000,000 erlang");

/**
 * Subscribers that traffic of a group serves: whole ones only.
 *
 * @param trafficE traffic that may be offered, erlang
 * @param trafficPerUserE traffic of one subscriber, erlang
 */
export function subscribersFor(trafficE: number, trafficPerUserE: number): number {
  requireIn(trafficPerUser, "trafficPerUserE", trafficPerUserE);
  return Math.floor(trafficE / trafficPerUserE);
}

/** Subscribers that a group of channels serves at a blocking target, by Erlang B. */
export function subscribersOf(channels: number, trafficPerUserE: number, blocking: number): number {
  return subscribersFor(erlangB.traffic(channels, blocking), trafficPerUserE);
}
