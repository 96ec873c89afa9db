import { domain, requireIn, share } from "../domain";
import { DomainError } from "../errors";

/** Kilometres that light travels in a microsecond; exact. */
const KM_PER_US = 0.299792458;

export const time = domain(0, 1e9, "a time from 0 to 1E+9 us");
export const positiveTime = domain(1e-9, 1e9, "a time from 1E-9 to 1E+9 us");
export const distance = domain(0, 1e9, "a distance from 0 to 1E+9 km");
export const stepCount = domain(0, 1e9, "a whole number from 0 to 1E+9", { whole: true });

/**
 * Radius in km within which bursts of one slot do not reach into the next: half of what light travels in the guard time and
 * in the largest timing advance, since the terminal follows the base's clock, late by the way out, and its burst comes late
 * by the way back.
 *
 * @param guardTimeUs guard time between bursts
 * @param advanceSteps largest timing advance in steps
 * @param stepUs duration of a step
 */
export function radius(guardTimeUs: number, advanceSteps = 0, stepUs = 0): number {
  requireIn(time, "guardTimeUs", guardTimeUs);
  requireIn(stepCount, "advanceSteps", advanceSteps);
  requireIn(time, "stepUs", stepUs);
  return 0.5 * KM_PER_US * (guardTimeUs + advanceSteps * stepUs);
}

/**
 * Guard time in us that a radius needs without timing advance: there and back.
 *
 * @param radiusKm radius of the cell
 */
export function guard(radiusKm: number): number {
  requireIn(distance, "radiusKm", radiusKm);
  return (2 * radiusKm) / KM_PER_US;
}

/**
 * Nearest whole step of timing advance at a distance.
 *
 * @param distanceKm from the base
 * @param stepUs duration of a step, above 0
 */
export function steps(distanceKm: number, stepUs: number): number {
  requireIn(distance, "distanceKm", distanceKm);
  requireIn(positiveTime, "stepUs", stepUs);
  return Math.round(guard(distanceKm) / stepUs);
}

/**
 * Share of a slot that carries payload: (1 - guard/slot)(1 - overhead).
 *
 * @param slotUs duration of the slot, guard time included, above 0
 * @param guardUs guard time, at most the slot
 * @param overheadShare share of the burst for training, synchronisation and signalling
 */
export function efficiency(slotUs: number, guardUs: number, overheadShare = 0): number {
  requireIn(positiveTime, "slotUs", slotUs);
  requireIn(time, "guardUs", guardUs);
  requireIn(share, "overheadShare", overheadShare);
  if (guardUs > slotUs) throw new DomainError("guardUs", guardUs, `a guard time up to the slot of ${slotUs} us`);
  return ((slotUs - guardUs) / slotUs) * (1 - overheadShare);
}
