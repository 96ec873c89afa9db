import { share } from "../src/model/domain";
import * as timing from "../src/model/codes/timing";
import { number, optionalNumber, perCell } from "../src/sheet/call";

/**
 * Cell radius up to which bursts of one time slot do not reach into the next.
 * @customfunction TIMING.RADIUS
 * @param guardTimeUs Guard time between bursts in microseconds.
 * @param [advanceSteps] Largest timing advance in steps; 0 if left out.
 * @param [stepUs] Duration of a step of timing advance in microseconds; 0 if left out.
 * @returns Radius in km.
 * @method c (guard + steps step)/2: the way there and back, c = 299 792 458 m/s.
 * @source Propagation time; common practice in time-division systems.
 * @assumes Terminals take their time from the base's signal; delay spread takes its part of the guard time first.
 * @example =CAP.TIMING.RADIUS(0, 63, 3.6923) is 34.87
 */
export function timingRadius(guardTimeUs: any[][], advanceSteps?: any[][], stepUs?: any[][]): any[][] {
  return perCell(timing.radius, {
    guardTimeUs: number(guardTimeUs, timing.time),
    advanceSteps: optionalNumber(advanceSteps, timing.stepCount, 0),
    stepUs: optionalNumber(stepUs, timing.time, 0),
  });
}

/**
 * Guard time that a cell radius needs without timing advance.
 * @customfunction TIMING.GUARD
 * @param radiusKm Radius of the cell in km.
 * @returns Guard time in microseconds.
 * @method 2 r / c, c = 299 792 458 m/s.
 * @source Propagation time; common practice in time-division systems.
 * @assumes Terminals take their time from the base's signal; delay spread comes on top.
 * @example =CAP.TIMING.GUARD(5) is 33.36
 */
export function timingGuard(radiusKm: any[][]): any[][] {
  return perCell(timing.guard, { radiusKm: number(radiusKm, timing.distance) });
}

/**
 * Timing advance at a distance, as the nearest whole step.
 * @customfunction TIMING.STEPS
 * @param distanceKm Distance from the base in km.
 * @param stepUs Duration of a step of timing advance in microseconds, above 0.
 * @returns Whole number of steps.
 * @method 2 d / (c step), rounded to the nearest, c = 299 792 458 m/s.
 * @source Propagation time; common practice in time-division systems.
 * @errors #VALUE! for a step of 0.
 * @example =CAP.TIMING.STEPS(10, 3.6923) is 18
 */
export function timingSteps(distanceKm: any[][], stepUs: any[][]): any[][] {
  return perCell(timing.steps, {
    distanceKm: number(distanceKm, timing.distance),
    stepUs: number(stepUs, timing.positiveTime),
  });
}

/**
 * Share of a time slot that carries payload.
 * @customfunction TIMING.EFFICIENCY
 * @param slotUs Duration of the slot with its guard time in microseconds, above 0.
 * @param guardUs Guard time in microseconds, at most the slot.
 * @param [overheadShare] Share of the burst for training, synchronisation and signalling, 0 to 1; 0 if left out.
 * @returns Share from 0 to 1.
 * @method (1 - guard/slot)(1 - overhead).
 * @source Definition; common practice in time-division systems.
 * @errors #VALUE! for a guard time longer than the slot.
 * @example =CAP.TIMING.EFFICIENCY(576.92, 30.46, 0.2) is 0.7578
 */
export function timingEfficiency(slotUs: any[][], guardUs: any[][], overheadShare?: any[][]): any[][] {
  return perCell(timing.efficiency, {
    slotUs: number(slotUs, timing.positiveTime),
    guardUs: number(guardUs, timing.time),
    overheadShare: optionalNumber(overheadShare, share, 0),
  });
}
