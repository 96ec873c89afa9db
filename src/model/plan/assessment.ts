import type { Limit } from "./records";

/** What users of a cell see with so many carriers. */
export interface Assessment {
  /** First promise that is broken, in the order of the list of limits; "nothing" where all are kept. */
  readonly limit: Limit;
  readonly blocking: number | undefined;
  readonly worstService: string | undefined;
  readonly waitS: number | undefined;
  readonly throughputMbps: number | undefined;
  readonly uplinkLoad: number | undefined;
  readonly downlinkLoad: number | undefined;
  /** Share of the capacity in use, for interference and spare. */
  readonly utilisation: number;
}

/** Capacity of one cell under its offered load, as a function of its carriers. */
export interface Capacity {
  /** Channels (or units, or users at the planned load) that the load needs, whole. */
  readonly channelsRequired: number;
  /** Where a search for the carriers starts. */
  readonly guess: number;
  channels(carriers: number): number;
  assess(carriers: number): Assessment;
}

/** Service whose blocking lies farthest above its target, with that blocking. */
export function worst(
  blocking: readonly number[],
  targets: readonly number[],
  names: readonly string[],
): { blocking: number; service: string; met: boolean } {
  let at = 0;
  for (let i = 1; i < blocking.length; i++) {
    if (blocking[i]! / targets[i]! > blocking[at]! / targets[at]!) at = i;
  }
  return {
    blocking: blocking[at]!,
    service: names[at]!,
    met: blocking.every((value, i) => value <= targets[i]!),
  };
}
