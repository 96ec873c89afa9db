import { NoAnswerError } from "../errors";
import { OccupancyRecursion } from "./multiservice-recursion";
import { offeredUnits, unitCount } from "./multiservice-services";
import { SlidingSum } from "./sliding-sum";

/**
 * Smallest number of units at which every service meets its target, unchecked inputs.
 *
 * The weights of the recursion do not depend on the units, so that one pass serves all numbers of units: at n units the blocking
 * of a service is the sum of its last d weights over the sum of all. What is carried bounds the answer from below:
 * n is at least the sum of a d (1 - target). The blocking of wide services does not always fall with each unit, so the
 * targets are tested at every number from there on, and the first that meets them all is the answer.
 *
 * @throws NoAnswerError where more than 100,000 units are needed
 */
export function smallestUnits(
  trafficE: readonly number[],
  width: readonly number[],
  blocking: readonly number[],
): number {
  const widest = width.reduce((most, w) => Math.max(most, w), 0);
  const carried = offeredUnits(
    trafficE.map((traffic, i) => traffic * (1 - blocking[i]!)),
    width,
  );
  // A hair less, for the rounding of the sum.
  const lowest = Math.max(widest, Math.floor(carried * (1 - 1e-9)));
  const most = unitCount.high;
  const fail = (): never => {
    throw new NoAnswerError(
      `More than ${most} units are needed: ${offeredUnits(trafficE, width)} units of traffic are offered, ${carried} must be carried, and the widest call takes ${widest}.`,
    );
  };
  if (lowest > most) fail();
  if (trafficE.length === 0) return 0;

  const recursion = new OccupancyRecursion(most, trafficE, width, undefined, widest);
  const { weights } = recursion;
  const start = lowest - 1;
  recursion.advance(start);
  let total = weights.align(start);
  const tops = width.map((w) => {
    const top = new SlidingSum(w);
    for (let state = Math.max(0, start - w + 1); state <= start; state++) top.push(weights.values[state]!);
    return top;
  });
  for (let units = lowest; units <= most; units++) {
    const factor = recursion.advance(units);
    if (factor !== 1) {
      total *= factor;
      for (const top of tops) top.scale(factor);
    }
    const weight = weights.values[units]!;
    total += weight;
    let meets = true;
    for (let i = 0; i < tops.length; i++) {
      const top = tops[i]!;
      top.push(weight);
      if (top.sum > blocking[i]! * total) meets = false;
    }
    if (meets) return units;
  }
  return fail();
}
