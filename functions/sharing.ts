import * as sharing from "../src/model/blocking/sharing";
import { number, optionalNumber, perCell } from "../src/sheet/call";

/**
 * Mean rate of an elastic transfer on a link that all transfers share equally.
 * @customfunction SHARING.THROUGHPUT
 * @param capacityMbps Capacity of the link or cell in Mbit/s.
 * @param trafficMbps Mean traffic offered in Mbit/s, below the capacity.
 * @param [peakMbps] Highest rate of one transfer in Mbit/s; unlimited where left out.
 * @returns Mbit/s: mean size over mean duration of a transfer.
 * @method M/G/1 processor sharing: capacity - traffic. With a peak M/G/R processor sharing: peak / (1 + ErlangC(R rho, R) / (R (1-rho))), R = capacity/peak real by the continued Erlang formula, rho = traffic/capacity. A peak above the capacity does not bind. Relative error below 1e-12.
 * @source K. Lindberger, Balancing quality of service, pricing and utilisation in multiservice networks with stream and elastic traffic, 16th International Teletraffic Congress (1999).
 * @assumes Poisson arrivals of transfers, any distribution of sizes, the capacity divided equally at every moment, none lost.
 * @errors #N/A where the traffic is not below the capacity.
 * @example =CAP.SHARING.THROUGHPUT(10, 8, 2) is 1.28691
 */
export function sharingThroughput(capacityMbps: any[][], trafficMbps: any[][], peakMbps?: any[][]): any[][] {
  return perCell(sharing.throughput, {
    capacityMbps: number(capacityMbps, sharing.linkRate),
    trafficMbps: number(trafficMbps, sharing.linkTraffic),
    peakMbps: optionalNumber(peakMbps, sharing.linkRate),
  });
}

/**
 * Smallest capacity of a shared link at which an elastic transfer reaches a mean rate.
 * @customfunction SHARING.CAPACITY
 * @param trafficMbps Mean traffic offered in Mbit/s.
 * @param throughputMbps Wanted mean rate of a transfer in Mbit/s, below the peak.
 * @param [peakMbps] Highest rate of one transfer in Mbit/s; unlimited where left out.
 * @returns Capacity in Mbit/s.
 * @method Inverse of CAP.SHARING.THROUGHPUT: traffic + throughput without a peak, else a bracketed root search to the last digits.
 * @source K. Lindberger, Balancing quality of service, pricing and utilisation in multiservice networks with stream and elastic traffic, 16th International Teletraffic Congress (1999).
 * @assumes Poisson arrivals of transfers, any distribution of sizes, the capacity divided equally at every moment, none lost.
 * @errors #N/A where the wanted rate is not below the peak.
 * @example =CAP.SHARING.CAPACITY(8, 1.25, 2) is 9.9036
 */
export function sharingCapacity(trafficMbps: any[][], throughputMbps: any[][], peakMbps?: any[][]): any[][] {
  return perCell(sharing.capacity, {
    trafficMbps: number(trafficMbps, sharing.linkTraffic),
    throughputMbps: number(throughputMbps, sharing.linkRate),
    peakMbps: optionalNumber(peakMbps, sharing.linkRate),
  });
}
