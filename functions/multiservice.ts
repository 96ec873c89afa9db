import { blockingTarget } from "../src/model/blocking/erlang-b";
import * as multiservice from "../src/model/blocking/multiservice";
import { flag, number, optionalParallel, parallel, perCell, perItem } from "../src/sheet/call";

/**
 * Blocking of each service where services of different widths share a group of units, with optional reservation.
 * @customfunction MULTISERVICE.BLOCKING
 * @param units Number of shared units (channels, slots, blocks), whole, 0 to 100,000.
 * @param trafficE Offered traffic per service in erlang of calls (not of units), at least 0.
 * @param width Units that one call of the service takes, whole, at least 1.
 * @param [reserved] Units left free for others when a call of the service is admitted; 0 where left out.
 * @param [labels] TRUE to put the heading first.
 * @returns Blocking probability, one per service.
 * @method A call is admitted while at most units - width - reserved units are occupied. Kaufman-Roberts recursion j q(j) = sum of traffic width q(j - width); with reservation Roberts' recursion, in which a service leads to no state above units - reserved: an approximation, exact without reservation. Weights are kept in scale by powers of two. Relative error below 1e-12, down to 1e-300.
 * @source J. S. Kaufman, IEEE Transactions on Communications 29 (1981); J. W. Roberts 1981; reservation: J. W. Roberts, 10th International Teletraffic Congress (1983); ITU-T Recommendation E.737.
 * @assumes Poisson arrivals per service, any holding times (with reservation: equal mean holding times), any free units serve, blocked calls leave.
 * @errors #VALUE! for widths that are not whole, or more than 100 million units times services.
 * @example =CAP.MULTISERVICE.BLOCKING(32, {10;2;0.5}, {1;4;8}) is 0.02238
 */
export function multiserviceBlocking(
  units: any[][],
  trafficE: any[][],
  width: any[][],
  reserved?: any[][],
  labels?: any[][],
): any[][] {
  return perItem(
    multiservice.blocking,
    ["blocking"],
    {
      units: number(units, multiservice.unitCount),
      trafficE: parallel(trafficE, multiservice.serviceTraffic),
      width: parallel(width, multiservice.serviceWidth),
      reserved: optionalParallel(reserved, multiservice.reservedUnits, 0),
    },
    flag(labels),
  );
}

/**
 * Smallest number of shared units at which every service meets its blocking target.
 * @customfunction MULTISERVICE.UNITS
 * @param trafficE Offered traffic per service in erlang of calls (not of units), at least 0.
 * @param width Units that one call of the service takes, whole, at least 1.
 * @param blocking Largest blocking probability per service, or one for all, 1e-300 to below 1.
 * @returns Number of units.
 * @method First number of units at which all targets hold by the Kaufman-Roberts recursion; every smaller one misses at least one. Blocking of a wide service does not always fall with each unit, so every number from the carried traffic on is tested, all in one pass of the recursion.
 * @source J. S. Kaufman, IEEE Transactions on Communications 29 (1981); J. W. Roberts 1981; ITU-T Recommendation E.737.
 * @assumes Poisson arrivals per service, any holding times, any free units serve, no reservation, blocked calls leave.
 * @errors #N/A where more than 100,000 units are needed; count in coarser units then.
 * @example =CAP.MULTISERVICE.UNITS({10;2;0.5}, {1;4;8}, {0.01;0.02;0.05}) is 44
 */
export function multiserviceUnits(trafficE: any[][], width: any[][], blocking: any[][]): any[][] {
  return perCell(multiservice.units, {
    trafficE: parallel(trafficE, multiservice.serviceTraffic),
    width: parallel(width, multiservice.serviceWidth),
    blocking: parallel(blocking, blockingTarget),
  });
}

/**
 * Mean share of the units that is occupied where services of different widths share them.
 * @customfunction MULTISERVICE.UTILISATION
 * @param units Number of shared units, whole, 1 to 100,000.
 * @param trafficE Offered traffic per service in erlang of calls (not of units), at least 0.
 * @param width Units that one call of the service takes, whole, at least 1.
 * @returns Share from 0 to 1.
 * @method Mean number of occupied units of the Kaufman-Roberts distribution, over the units: the carried traffic in units over the units.
 * @source J. S. Kaufman, IEEE Transactions on Communications 29 (1981); J. W. Roberts 1981.
 * @assumes Poisson arrivals per service, any holding times, any free units serve, no reservation, blocked calls leave.
 * @errors #VALUE! for widths that are not whole, or more than 100 million units times services.
 * @example =CAP.MULTISERVICE.UTILISATION(32, {10;2;0.5}, {1;4;8}) is 0.62065
 */
export function multiserviceUtilisation(units: any[][], trafficE: any[][], width: any[][]): any[][] {
  return perCell(multiservice.utilisation, {
    units: number(units, multiservice.sharedUnits),
    trafficE: parallel(trafficE, multiservice.serviceTraffic),
    width: parallel(width, multiservice.serviceWidth),
  });
}

/**
 * Time, call and traffic congestion of each service where smooth, Poisson and peaky streams share a group of units.
 * @customfunction MULTISERVICE.PEAKY
 * @param units Number of shared units, whole, 0 to 100,000.
 * @param trafficE Mean of each stream in erlang of calls (not of units), at least 0.
 * @param width Units that one call of the stream takes, whole, at least 1.
 * @param peakedness Variance over mean of each stream, 0.01 to 1000: below 1 smooth, 1 Poisson, above 1 peaky.
 * @param [labels] TRUE to put the headings first.
 * @returns A row per service: time congestion, call congestion, traffic congestion.
 * @method Binomial, Poisson and Pascal streams have product form. Delbrouck's recursion for peaky and Poisson streams and for smooth ones with at least twice as many sources, mean/(1-z), as fit; the other smooth streams are convolved with the rest. Where all sources fit and their number is not whole, whole equal sources and one less busy give the same mean and peakedness. Time congestion: probability that a call finds no room; call congestion: share of calls blocked; traffic congestion: share of the mean not carried, z times the blocked calls over the mean. Relative error below 1e-12, down to 1e-300.
 * @source L. E. N. Delbrouck, IEEE Transactions on Communications 31 (1983); V. B. Iversen, convolution algorithm, ITU-D Teletraffic Engineering Handbook.
 * @assumes Streams are independent; a stream of peakedness above 1 is Pascal, below 1 a finite number of sources; any free units serve, blocked calls leave.
 * @errors #N/A where no stream of whole calls is so smooth: with f the fraction of the mean, peakedness must reach f(1-f)/mean. #VALUE! for more than 5 million units times services, or smooth streams too large to convolve.
 * @example =CAP.MULTISERVICE.PEAKY(10, {3;1.2;1}, {1;2;2}, {1;0.8;1.5}) is 0.08717
 */
export function multiservicePeaky(
  units: any[][],
  trafficE: any[][],
  width: any[][],
  peakedness: any[][],
  labels?: any[][],
): any[][] {
  return perItem(
    multiservice.peaky,
    ["timeCongestion", "callCongestion", "trafficCongestion"],
    {
      units: number(units, multiservice.unitCount),
      trafficE: parallel(trafficE, multiservice.serviceTraffic),
      width: parallel(width, multiservice.serviceWidth),
      peakedness: parallel(peakedness, multiservice.streamPeakedness),
    },
    flag(labels),
  );
}
