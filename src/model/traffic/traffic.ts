import { domain, nonNegative, positive, probability, requireIn, share } from "../domain";
import { quantile } from "../numerics/normal";

const SECONDS_PER_HOUR = 3600;
const MEGABIT_PER_MEGABYTE = 8;

/** Counts and rates up to here keep every product within a double. */
export const amount = domain(0, 1e15, "a number from 0 to 1E+15");

/**
 * Offered traffic of calls: users times calls per hour times holding time.
 *
 * @param users number of users
 * @param callsPerHour busy-hour calls of one user
 * @param holdingTimeS mean holding time, s
 * @returns erlang
 */
export function calls(users: number, callsPerHour: number, holdingTimeS: number): number {
  requireIn(amount, "users", users);
  return users * perUser(callsPerHour, holdingTimeS);
}

/**
 * Offered traffic of one user.
 *
 * @param callsPerHour busy-hour calls
 * @param holdingTimeS mean holding time, s
 * @returns erlang per user
 */
export function perUser(callsPerHour: number, holdingTimeS: number): number {
  requireIn(amount, "callsPerHour", callsPerHour);
  requireIn(amount, "holdingTimeS", holdingTimeS);
  return (callsPerHour * holdingTimeS) / SECONDS_PER_HOUR;
}

/**
 * Busy-hour mean rate of data, one direction: users V 8 share / 3600, a megabyte being 10^6 bytes.
 *
 * @param users number of users
 * @param volumeMBPerDay volume of one user a day, MB
 * @param busyHourShare share of the day's volume that falls into the busy hour
 * @returns Mbit/s
 */
export function data(users: number, volumeMBPerDay: number, busyHourShare: number): number {
  requireIn(amount, "users", users);
  requireIn(amount, "volumeMBPerDay", volumeMBPerDay);
  requireIn(share, "busyHourShare", busyHourShare);
  return (users * volumeMBPerDay * MEGABIT_PER_MEGABYTE * busyHourShare) / SECONDS_PER_HOUR;
}

/**
 * Traffic level that is not exceeded on a given share of days: mean (1 + z cv), not below 0.
 *
 * @param meanE mean over the days, erlang
 * @param dayToDayVariation coefficient of variation from day to day
 * @param percentile share of days
 * @returns erlang
 */
export function peakLevel(meanE: number, dayToDayVariation: number, percentile: number): number {
  requireIn(amount, "meanE", meanE);
  requireIn(nonNegative, "dayToDayVariation", dayToDayVariation);
  requireIn(probability, "percentile", percentile);
  return Math.max(0, meanE * (1 + quantile(percentile) * dayToDayVariation));
}

/**
 * Traffic of group calls per site: one channel at every site with members, however many members hear it.
 *
 * @param groups number of talk groups
 * @param callsPerHour busy-hour calls of one group
 * @param holdingTimeS mean time that a call holds its channels, hang time included, s
 * @param sitesPerCall mean number of sites that a call occupies
 * @param sites number of sites that share the load
 * @returns erlang per site
 */
export function group(
  groups: number,
  callsPerHour: number,
  holdingTimeS: number,
  sitesPerCall: number,
  sites: number,
): number {
  requireIn(amount, "groups", groups);
  requireIn(amount, "sitesPerCall", sitesPerCall);
  requireIn(positive, "sites", sites);
  return (groups * perUser(callsPerHour, holdingTimeS) * sitesPerCall) / sites;
}
