import * as tdd from "../src/model/standards/tdd";
import { flag, number, optionalNumber, perCellRow } from "../src/sheet/call";

/**
 * Shares of time for downlink, uplink and guard of an LTE carrier in unpaired spectrum.
 * @customfunction TDD.SHARE
 * @param configuration Uplink-downlink configuration, a whole number from 0 to 6.
 * @param [special] Special subframe configuration, a whole number from 0 to 10; 7 by default. Type 0 for 0.
 * @param [labels] TRUE puts the names of the columns first.
 * @returns Downlink, uplink and guard share of the time; together 1.
 * @method Subframes of the frame of 10 ms; of a special subframe of 30720 Ts, DwPTS counts as downlink, UpPTS as uplink, the rest as guard.
 * @source 3GPP TS 36.211, clause 4.2, table 4.2-1 (special subframe, normal cyclic prefix in both directions) and table 4.2-2 (uplink-downlink configurations); special configuration 10 from memory.
 * @assumes Normal cyclic prefix. UpPTS of one or two symbols carries sounding and access only, no user data; special configuration 10 gives it six.
 * @errors #VALUE! for configurations that the standard does not define.
 * @example =CAP.TDD.SHARE(2, 7) is 0.742917
 */
export function tddShare(configuration: any[][], special?: any[][], labels?: any[][]): any[][] {
  return perCellRow(
    tdd.share,
    ["downlinkShare", "uplinkShare", "guardShare"],
    {
      configuration: number(configuration, tdd.frameConfiguration),
      special: optionalNumber(special, tdd.specialConfiguration, 7),
    },
    flag(labels),
  );
}
