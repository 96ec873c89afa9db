import { nonNegative, positive, probability, share } from "../src/model/domain";
import * as traffic from "../src/model/traffic/traffic";
import { number, perCell } from "../src/sheet/call";

/**
 * Offered traffic of calls from users, call rate and holding time.
 * @customfunction TRAFFIC.CALLS
 * @param users Number of users.
 * @param callsPerHour Busy-hour calls of one user.
 * @param holdingTimeS Mean holding time in seconds.
 * @returns Offered traffic in erlang.
 * @method users calls h / 3600.
 * @source ITU-T Recommendation E.600 (definition of traffic intensity and the erlang).
 * @assumes Offered traffic: calls that are blocked count in full.
 * @example =CAP.TRAFFIC.CALLS(4000, 1, 160) is 177.78
 */
export function trafficCalls(users: any[][], callsPerHour: any[][], holdingTimeS: any[][]): any[][] {
  return perCell(traffic.calls, {
    users: number(users, traffic.amount),
    callsPerHour: number(callsPerHour, traffic.amount),
    holdingTimeS: number(holdingTimeS, traffic.amount),
  });
}

/**
 * Busy-hour mean rate of data from users and daily volume, one direction.
 * @customfunction TRAFFIC.DATA
 * @param users Number of users.
 * @param volumeMBPerDay Volume of one user a day in one direction, megabytes of 10^6 bytes.
 * @param busyHourShare Share of the day in the busy hour, 0 to 1.
 * @returns Mean rate in the busy hour in Mbit/s, of the direction that the volume was given for.
 * @method users V 8 share / 3600.
 * @source Common practice.
 * @assumes The mean of the busy hour: what users see on top of it follows from CAP.SHARING.
 * @example =CAP.TRAFFIC.DATA(500, 200, 0.08) is 17.78
 */
export function trafficData(users: any[][], volumeMBPerDay: any[][], busyHourShare: any[][]): any[][] {
  return perCell(traffic.data, {
    users: number(users, traffic.amount),
    volumeMBPerDay: number(volumeMBPerDay, traffic.amount),
    busyHourShare: number(busyHourShare, share),
  });
}

/**
 * Offered traffic of one user.
 * @customfunction TRAFFIC.PERUSER
 * @param callsPerHour Busy-hour calls of the user.
 * @param holdingTimeS Mean holding time in seconds.
 * @returns Erlang per user, busy or not (not per idle user: see CAP.ENGSET.IDLETRAFFIC).
 * @method calls h / 3600.
 * @source ITU-T Recommendation E.600 (definition of traffic intensity and the erlang).
 * @example =CAP.TRAFFIC.PERUSER(2, 120) is 0.06667
 */
export function trafficPeruser(callsPerHour: any[][], holdingTimeS: any[][]): any[][] {
  return perCell(traffic.perUser, {
    callsPerHour: number(callsPerHour, traffic.amount),
    holdingTimeS: number(holdingTimeS, traffic.amount),
  });
}

/**
 * Traffic level that a given share of days does not exceed.
 * @customfunction TRAFFIC.PEAKLEVEL
 * @param meanE Mean of the daily busy-hour traffic in erlang.
 * @param dayToDayVariation Coefficient of variation from day to day: standard deviation over mean.
 * @param percentile Share of days, above 0 and below 1.
 * @returns Erlang, not below 0.
 * @method mean (1 + z cv), z the standard normal quantile of the percentile.
 * @source Idea of ITU-T Recommendation E.500 (normal and high load levels); the normal distribution is common practice.
 * @assumes Daily busy-hour traffic is normally distributed; busy hours of equal clock time.
 * @example =CAP.TRAFFIC.PEAKLEVEL(50, 0.2, 0.95) is 66.45
 */
export function trafficPeaklevel(meanE: any[][], dayToDayVariation: any[][], percentile: any[][]): any[][] {
  return perCell(traffic.peakLevel, {
    meanE: number(meanE, traffic.amount),
    dayToDayVariation: number(dayToDayVariation, nonNegative),
    percentile: number(percentile, probability),
  });
}

/**
 * Traffic of group calls at each site: a call holds one channel at every site with members.
 * @customfunction TRAFFIC.GROUP
 * @param groups Number of talk groups.
 * @param callsPerHour Busy-hour calls of one group.
 * @param holdingTimeS Mean time a call holds its channels in seconds, hang time included.
 * @param sitesPerCall Mean number of sites that one call occupies.
 * @param sites Number of sites that share the load, above 0.
 * @returns Erlang per site.
 * @method groups rate h sitesPerCall / (3600 sites): one channel a site and call, not one a member.
 * @source Common practice of trunked group radio.
 * @assumes Load is even over the sites; emergency calls that pre-empt others are outside the model: plan them with licensed practice.
 * @example =CAP.TRAFFIC.GROUP(30, 12, 20, 3, 8) is 0.75
 */
export function trafficGroup(
  groups: any[][],
  callsPerHour: any[][],
  holdingTimeS: any[][],
  sitesPerCall: any[][],
  sites: any[][],
): any[][] {
  return perCell(traffic.group, {
    groups: number(groups, traffic.amount),
    callsPerHour: number(callsPerHour, traffic.amount),
    holdingTimeS: number(holdingTimeS, traffic.amount),
    sitesPerCall: number(sitesPerCall, traffic.amount),
    sites: number(sites, positive),
  });
}
