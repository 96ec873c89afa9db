import { rawRange, wholeTable } from "../src/sheet/call";
import { schemeTable } from "../src/sheet/scheme-table";

/**
 * Users of one sector by FDMA, TDMA, CDMA and OFDMA on the same spectrum, service and blocking.
 * @customfunction SCHEME.COMPARE
 * @param profile Table of two columns, parameter and value, their names in the first row.
 * @returns Table of scheme, channels, erlangs, subscribers and limitedBy; a scheme that lacks parameters names them in limitedBy.
 * @method All: bandwidthMHz of one direction less guardKHz once at its edges; controlChannels off the channels of a sector (0 if left out); erlangs at the blocking target; subscribers = floor(erlangs / trafficPerUserE). FDMA, TDMA: channels as CAP.FDMA.CHANNELS of channelSpacingKHz and CAP.TDMA.CHANNELS of carrierSpacingKHz and slotsPerCarrier, spectrum shared by clusterSize and sectors (1); Erlang B. CDMA: every sector uses floor((B - guard)/codeCarrierSpacingKHz) carriers (spacing 5/3.84 of the chip rate if left out); users of a carrier are loadLimit (0.75) x CAP.CDMA.POLE, or CAP.CDMA.DOWNLINKCHANNELS where orthogonality and downlinkEbN0Db are given and it is less (overheadShare 0.2); erlangs of all carriers together as CAP.CDMA.SOFTTRAFFIC, Erlang B where the downlink limits. OFDMA: every sector uses all blocks, whole blocks of the spectrum unless blocks are fewer; bearers as CAP.OFDMA.CHANNELS (overheadShare 0.25); Erlang B.
 * @source As of the functions named in the method: Mac Donald 1979 (reuse), Gilhousen et al. 1991 and Holma, Toskala (CDMA), Report ITU-R M.2134 (efficiency of a cell), Erlang B.
 * @assumes A user holds its channel, slot or bearer through pauses; only CDMA gains by activity. Interference is in clusterSize for FDMA and TDMA, in otherCellRatio for CDMA, in spectralEfficiency for OFDMA. A channel or slot carries the service. One overheadShare, where given, serves CDMA downlink and OFDMA.
 * @errors #VALUE! for a name close to a known one, a name given twice, a value outside its domain, or more blocks than the spectrum holds; other names are ignored.
 * @example =CAP.SCHEME.COMPARE({"parameter","value";"bandwidthMHz",5;"channelSpacingKHz",25;"clusterSize",7;"trafficPerUserE",0.025;"blocking",0.02}) is "scheme"
 */
export function schemeCompare(profile: any[][]): any[][] {
  return wholeTable(schemeTable, { profile: rawRange(profile) });
}
