import { DomainError, NoAnswerError } from "../errors";
import { requireIn } from "../domain";
import { level, time } from "./forecast";

/**
 * Time at which a growing demand first exceeds a capacity, linear between the given times.
 *
 * @param times times in any order, no two alike
 * @param demand demand at each time
 * @param capacity what is there
 * @returns the time; the first one where the demand exceeds the capacity from the start
 * @throws NoAnswerError where the demand stays at or below the capacity
 */
export function exhaustion(times: readonly number[], demand: readonly number[], capacity: number): number {
  requireIn(level, "capacity", capacity);
  if (demand.length !== times.length) {
    throw new DomainError("demand", demand.length, `as many values as times, which are ${times.length}`);
  }
  if (times.length === 0) throw new DomainError("times", undefined, "at least one time");
  times.forEach((at) => requireIn(time, "times", at));
  demand.forEach((value) => requireIn(level, "demand", value));
  const order = times.map((_, i) => i).sort((a, b) => times[a]! - times[b]!);
  let highest = -Infinity;
  for (let k = 0; k < order.length; k++) {
    const at = times[order[k]!]!;
    const value = demand[order[k]!]!;
    if (k > 0 && at === times[order[k - 1]!]!) throw new DomainError("times", at, "each time once");
    if (value > capacity) {
      if (k === 0) return at;
      const before = times[order[k - 1]!]!;
      const below = demand[order[k - 1]!]!;
      return before + (at - before) * ((capacity - below) / (value - below));
    }
    highest = Math.max(highest, value);
  }
  throw new NoAnswerError(`The demand never exceeds the capacity of ${capacity}: its highest value is ${highest}.`);
}
