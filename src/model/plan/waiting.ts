/** Calls and messages that wait: one queue, common to all of them, on channels of their own. */
import * as erlangC from "../blocking/erlang-c";
import { messageTimeS, totalTraffic, type CallStream } from "./offered";
import type { Scheme } from "./scheme";

/** Channels for a queue, and what its users see. */
export interface WaitingGroup {
  readonly trafficE: number;
  readonly channels: number;
  /** Mean holding time, weighted by traffic: what an arrival finds the channels busy with. */
  readonly holdingTimeS: number;
}

function holdingTimeOf({ service }: CallStream, scheme: Scheme): number {
  return service.kind === "message" ? messageTimeS(service, scheme) : service.holdingTimeS;
}

/**
 * Smallest number of channels at which every service keeps its waiting target, by Erlang C with the mean holding time weighted
 * by traffic: the calls that a newcomer waits for are the long ones, in proportion to their time on the channel.
 *
 * @param streams waiting calls and messages
 * @param scheme the scheme, whose channel rate gives the time of a message
 */
export function waitingGroup(streams: readonly CallStream[], scheme: Scheme): WaitingGroup {
  const trafficE = totalTraffic(streams);
  if (trafficE === 0) return { trafficE: 0, channels: 0, holdingTimeS: 0 };
  const holdingTimeS =
    streams.reduce((sum, stream) => sum + stream.trafficE * holdingTimeOf(stream, scheme), 0) / trafficE;
  let channels = 0;
  for (const { service } of streams) {
    const late = 1 - service.targetWaitShare;
    channels = Math.max(channels, erlangC.channels(trafficE, holdingTimeS, service.targetWaitS, late));
  }
  return { trafficE, channels, holdingTimeS };
}

/** Mean wait on so many channels; undefined where the queue never settles. */
export function meanWait({ trafficE, holdingTimeS }: WaitingGroup, channels: number): number | undefined {
  if (trafficE === 0) return undefined;
  return trafficE < channels ? erlangC.wait(trafficE, channels, holdingTimeS) : undefined;
}
