import { decibel, domain, requireIn } from "../domain";
import { DomainError } from "../errors";
import { fromDecibel, toDecibel } from "../numerics/decibel";
import { decibelSum } from "../numerics/decibel-sum";

/** A power ratio that a decibel value of the shared domain can state. */
export const powerRatio = domain(1e-100, 1e100, "a power ratio from 1E-100 to 1E+100");

/**
 * Sum of powers, in dBm.
 *
 * @param powersDbm at least one power, each -1000 to 1000 dBm
 */
export function sum(powersDbm: readonly number[]): number {
  requireEach(powersDbm, "powersDbm");
  return decibelSum(powersDbm);
}

/** Decibel value of a power ratio from 1E-100 to 1E+100. */
export function db(ratio: number): number {
  requireIn(powerRatio, "ratio", ratio);
  return toDecibel(ratio);
}

/** Power ratio of a decibel value from -1000 to 1000. */
export function ratio(db: number): number {
  requireIn(decibel, "db", db);
  return fromDecibel(db);
}

/**
 * Throws unless there is at least one level and every level is in the decibel domain.
 *
 * @throws DomainError naming the parameter
 */
export function requireEach(levels: readonly number[], parameter: string): void {
  if (levels.length === 0) throw new DomainError(`number of ${parameter}`, 0, "at least 1");
  for (const level of levels) requireIn(decibel, parameter, level);
}
