import { domain, requireIn } from "../domain";

/** Subframes of a frame: D downlink, U uplink, S special. 3GPP TS 36.211, clause 4.2, table 4.2-2. */
const FRAMES = [
  "DSUUUDSUUU",
  "DSUUDDSUUD",
  "DSUDDDSUDD",
  "DSUUUDDDDD",
  "DSUUDDDDDD",
  "DSUDDDDDDD",
  "DSUUUDSUUD",
] as const;

/**
 * DwPTS and UpPTS of the special subframe in units of Ts, normal cyclic prefix in both directions. 3GPP TS 36.211, clause 4.2,
 * table 4.2-1; configuration 9 since Release 11; configuration 10, since Release 14, from memory.
 */
const SPECIAL_SUBFRAMES: readonly (readonly [downlink: number, uplink: number])[] = [
  [6592, 2192],
  [19760, 2192],
  [21952, 2192],
  [24144, 2192],
  [26336, 2192],
  [6592, 4384],
  [19760, 4384],
  [21952, 4384],
  [24144, 4384],
  [13168, 4384],
  [13168, 13152],
];

/** Ts in a subframe of 1 ms. */
const SUBFRAME = 30720;

export const frameConfiguration = domain(0, FRAMES.length - 1, "a whole number from 0 to 6", { whole: true });
export const specialConfiguration = domain(0, SPECIAL_SUBFRAMES.length - 1, "a whole number from 0 to 10", {
  whole: true,
});

/**
 * Shares of time of an LTE carrier in unpaired spectrum: downlink subframes with DwPTS, uplink subframes with UpPTS, guard.
 *
 * @param configuration uplink-downlink configuration, 0 to 6
 * @param special special subframe configuration, 0 to 10
 * @returns downlink, uplink and guard share; they add up to 1
 */
export function share(configuration: number, special = 7): readonly [downlink: number, uplink: number, guard: number] {
  requireIn(frameConfiguration, "configuration", configuration);
  requireIn(specialConfiguration, "special", special);
  const frame = FRAMES[configuration]!;
  const subframes = (letter: string): number => [...frame].filter((each) => each === letter).length;
  const [dwPts, upPts] = SPECIAL_SUBFRAMES[special]!;
  const specials = subframes("S");
  const whole = frame.length * SUBFRAME;
  return [
    (subframes("D") * SUBFRAME + specials * dwPts) / whole,
    (subframes("U") * SUBFRAME + specials * upPts) / whole,
    (specials * (SUBFRAME - dwPts - upPts)) / whole,
  ];
}
