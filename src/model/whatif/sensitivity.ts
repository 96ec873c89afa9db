import { domain } from "../domain";
import type { OfOneNumber } from "./solve";

export const changeRange = domain(0, 1, "a share above 0 and below 1", { openLow: true, openHigh: true });

/** What a function answers, or what it throws. */
export type Outcome = { readonly value: number } | { readonly thrown: unknown };

/** What a change of one input does to a result. */
export interface Effect {
  readonly below: Outcome;
  readonly above: Outcome;
  /** Relative change of the result over relative change of the input; undefined where neither side nor the result allows it. */
  readonly elasticity: number | undefined;
}

/**
 * Effect of one input by a share of its value down and up.
 *
 * Elasticity from both sides, ((f+ - f-)/f) / ((x+ - x-)/x), or from the one that has an answer. An input that must be whole moves to the
 * nearest whole number beyond, at least by one.
 *
 * @param f the function of this input
 * @param value the input, not 0
 * @param change share of its value
 */
export function effectOf(f: OfOneNumber, value: number, change: number): Effect {
  const base = outcome(f, value);
  const below = moved(f, value, value * (1 - change));
  const above = moved(f, value, value * (1 + change));
  return { below: below.outcome, above: above.outcome, elasticity: elasticity(value, base, below, above) };
}

interface Moved {
  readonly x: number;
  readonly outcome: Outcome;
}

function outcome(f: OfOneNumber, x: number): Outcome {
  try {
    return { value: f(x) };
  } catch (thrown) {
    return { thrown };
  }
}

function moved(f: OfOneNumber, from: number, to: number): Moved {
  const first = outcome(f, to);
  if (!("thrown" in first) || !Number.isInteger(from) || Number.isInteger(to)) return { x: to, outcome: first };
  const whole = to > from ? Math.ceil(to) : Math.floor(to);
  const second = outcome(f, whole);
  return "thrown" in second ? { x: to, outcome: first } : { x: whole, outcome: second };
}

function elasticity(value: number, base: Outcome, below: Moved, above: Moved): number | undefined {
  if ("thrown" in base || base.value === 0) return undefined;
  const known = [below, { x: value, outcome: base }, above].filter(({ outcome: o }) => !("thrown" in o));
  const first = known[0]!;
  const last = known[known.length - 1]!;
  if (first.x === last.x) return undefined;
  const change = (last.outcome as { value: number }).value - (first.outcome as { value: number }).value;
  const result = change / base.value / ((last.x - first.x) / value);
  return Number.isFinite(result) ? result : undefined;
}
