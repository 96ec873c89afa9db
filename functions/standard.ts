import { profile, STANDARD_NAMES } from "../src/model/standards/profiles";
import { choice, wholeTable } from "../src/sheet/call";
import { labelled } from "../src/sheet/table";

/**
 * Facts that an open radio standard fixes, as a labelled table: parameter, value, source.
 * @customfunction STANDARD.PROFILE
 * @param standard "TETRA", "DMR", "dPMR", "P25", "GSM", "UMTS", "LTE", "NR" or "DECT".
 * @returns Table of parameter, value and source, a row a fact; the parameters are named as in the functions.
 * @method Table of facts. Spacings in kHz, guard times and steps in microseconds, frames in ms, gross rates of a carrier in kbit/s. The spacing of time-division carriers stands twice, as TDMA.CHANNELS and as the radio table name it.
 * @source The standard named in each row; rows marked "from memory" are to be confirmed in the document before they are quoted.
 * @assumes P25 phase 1; one direction of paired spectrum, for DECT the 12 duplex channels of a carrier; LTE and NR with 15 kHz spacing.
 * @errors #VALUE! for any other name.
 * @example =CAP.STANDARD.PROFILE("TETRA") is "parameter"
 */
export function standardProfile(standard: any[][]): any[][] {
  return wholeTable((name: string) => labelled(["parameter", "value", "source"], profile(name)), {
    standard: choice(standard, STANDARD_NAMES),
  });
}
