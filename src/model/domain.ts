import { DomainError } from "./errors";

/** The numbers that a parameter accepts. Model and sheet share it, so a domain is stated once. */
export interface Domain {
  readonly low: number;
  readonly high: number;
  /** True where `low` itself is not allowed. */
  readonly openLow: boolean;
  /** True where `high` itself is not allowed. */
  readonly openHigh: boolean;
  readonly whole: boolean;
  /** The domain as a message states it: "a number above 0". */
  readonly words: string;
}

interface Edges {
  readonly openLow?: boolean;
  readonly openHigh?: boolean;
  readonly whole?: boolean;
}

/**
 * A domain of finite numbers from `low` to `high`.
 *
 * @param low smallest value
 * @param high largest value
 * @param words the domain as a message states it
 * @param edges which ends are open, and whether only whole numbers count
 */
export function domain(low: number, high: number, words: string, edges: Edges = {}): Domain {
  const { openLow = false, openHigh = false, whole = false } = edges;
  return { low, high, words, openLow, openHigh, whole };
}

const HUGE = Number.MAX_VALUE;

export const finite = domain(-HUGE, HUGE, "any number");
export const nonNegative = domain(0, HUGE, "a number of at least 0");
export const positive = domain(0, HUGE, "a number above 0", { openLow: true });
/** 0 to 1, both allowed. */
export const share = domain(0, 1, "a share from 0 to 1");
/** 0 to 1, 0 allowed, 1 not. */
export const shareBelowOne = domain(0, 1, "a share from 0 to below 1", { openHigh: true });
/** 0 to 1, neither allowed: a target that some finite answer meets. */
export const probability = domain(0, 1, "a probability above 0 and below 1", {
  openLow: true,
  openHigh: true,
});
export const count = domain(0, Number.MAX_SAFE_INTEGER, "a whole number of at least 0", { whole: true });
export const positiveCount = domain(1, Number.MAX_SAFE_INTEGER, "a whole number of at least 1", { whole: true });
/** Decibel values: wide enough for any radio, narrow enough that 10^(x/10) stays a number. */
export const decibel = domain(-1000, 1000, "a decibel value from -1000 to 1000");

/** Whether `value` lies in the domain; false for NaN and infinities. */
export function contains(allowed: Domain, value: number): boolean {
  return (
    (allowed.openLow ? value > allowed.low : value >= allowed.low) &&
    (allowed.openHigh ? value < allowed.high : value <= allowed.high) &&
    (!allowed.whole || Number.isInteger(value))
  );
}

/**
 * Throws unless `value` lies in the domain.
 *
 * @throws DomainError naming the parameter, the value and the allowed domain
 */
export function requireIn(allowed: Domain, parameter: string, value: number): void {
  if (!contains(allowed, value)) throw new DomainError(parameter, value, allowed.words);
}

/**
 * Throws unless `value` is one of the words.
 *
 * @throws DomainError listing the words
 */
export function requireOneOf<T extends string>(
  words: readonly T[],
  parameter: string,
  value: string,
): asserts value is T {
  if (!(words as readonly string[]).includes(value)) {
    throw new DomainError(parameter, value, words.map((word) => `"${word}"`).join(", "));
  }
}
