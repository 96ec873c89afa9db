import { domain } from "../domain";
import { NoAnswerError } from "../errors";

/** Up to here every call is a matter of microseconds and every digit is tested. */
export const waitingTraffic = domain(0, 1e7, "traffic from 0 to 10,000,000 erlang");
export const channelCount = domain(0, 1e7, "a number of channels above 0, up to 10,000,000", { openLow: true });

/** A queue without limit settles only where the servers can carry what is offered. */
export function requireBelowServers(trafficE: number, channels: number): void {
  if (trafficE >= channels) {
    throw new NoAnswerError(
      `The queue never settles: ${trafficE} erlang offered is not below the ${channels} channels that serve it.`,
    );
  }
}
