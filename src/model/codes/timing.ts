/** Signal travel time against guard times: how far a slotted uplink reaches, with timing advance and without. */
import { domain, nonNegative, positive, requireIn, shareBelowOne } from "../domain";
import { DomainError } from "../errors";

/** Speed of light in km per microsecond. */
const KM_PER_US = 0.299792458;

export const timeUs = domain(0, 1e9, "a time from 0 to 1E+9 us");
export const stepCount = domain(0, 1e9, "a number of steps from 0 to 1E+9");
export const distance = domain(0, 1e9, "a distance from 0 to 1E+9 km");

/**
 * Largest distance at which a burst still falls into its slot: c (guard + steps step) / 2, there and back.
 *
 * @param guardTimeUs guard time of the slot
 * @param advanceSteps largest timing advance, in steps
 * @param stepUs one step of timing advance
 * @returns km
 */
export function radius(guardTimeUs: number, advanceSteps = 0, stepUs = 0): number {
  requireIn(timeUs, "guardTimeUs", guardTimeUs);
  requireIn(stepCount, "advanceSteps", advanceSteps);
  requireIn(timeUs, "stepUs", stepUs);
  return (KM_PER_US * (guardTimeUs + advanceSteps * stepUs)) / 2;
}

/**
 * Guard time that a cell needs without timing advance: 2 r / c.
 *
 * @param radiusKm radius of the cell
 * @returns us
 */
export function guard(radiusKm: number): number {
  requireIn(distance, "radiusKm", radiusKm);
  return (2 * radiusKm) / KM_PER_US;
}

/**
 * Timing advance of a user at a distance, in whole steps, the nearest one.
 *
 * @param distanceKm distance of the user
 * @param stepUs one step of timing advance
 * @returns steps
 */
export function steps(distanceKm: number, stepUs: number): number {
  requireIn(distance, "distanceKm", distanceKm);
  requireIn(positive, "stepUs", stepUs);
  requireIn(timeUs, "stepUs", stepUs);
  return Math.round(guard(distanceKm) / stepUs);
}

/**
 * Share of a slot that carries user data: (1 - guard/slot) (1 - overhead).
 *
 * @param slotUs duration of the slot
 * @param guardUs guard time within it
 * @param overheadShare share of the rest that carries no user data
 */
export function efficiency(slotUs: number, guardUs: number, overheadShare = 0): number {
  requireIn(positive, "slotUs", slotUs);
  requireIn(nonNegative, "guardUs", guardUs);
  requireIn(shareBelowOne, "overheadShare", overheadShare);
  if (guardUs > slotUs) throw new DomainError("guardUs", guardUs, `a time from 0 to the slot's ${slotUs} us`);
  return (1 - guardUs / slotUs) * (1 - overheadShare);
}
