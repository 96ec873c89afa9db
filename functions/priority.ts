import * as priority from "../src/model/blocking/priority";
import { channelCount, waitingTraffic } from "../src/model/blocking/waiting-domains";
import { positive } from "../src/model/domain";
import { flag, number, parallel, perItem } from "../src/sheet/call";

/**
 * Mean wait of each priority class on a common group of channels, calls in progress not interrupted.
 * @customfunction PRIORITY.WAIT
 * @param trafficE Offered traffic of each class in erlang, highest class first, one row or column.
 * @param channels Number of channels, above the sum of the traffic.
 * @param holdingTimeS Mean holding time in seconds, the same for all classes.
 * @param [labels] TRUE to put the heading first.
 * @returns Mean wait in seconds, one for each class, calls that do not wait included.
 * @method W_k = C h / (N (1 - s_(k-1)) (1 - s_k)): C is Erlang C of the whole traffic, s_k the traffic per channel of class k and all above it.
 * @source A. Cobham, Priority Assignment in Waiting Line Problems, Operations Research 2 (1954).
 * @assumes Poisson arrivals, equal exponential holding times, no interruption, first come first served within a class. Emergency traffic deserves a check by licensed practice, since a queue without limit is assumed.
 * @errors #N/A where the whole traffic is not below the channels.
 * @example =CAP.PRIORITY.WAIT({2;2}, 5, 180) is 33.25
 */
export function priorityWait(trafficE: any[][], channels: any[][], holdingTimeS: any[][], labels?: any[][]): any[][] {
  return perItem(
    priority.wait,
    ["waitS"],
    {
      trafficE: parallel(trafficE, waitingTraffic),
      channels: number(channels, channelCount),
      holdingTimeS: number(holdingTimeS, positive),
    },
    flag(labels),
  );
}
