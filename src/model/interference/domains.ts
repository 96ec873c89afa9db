import { domain } from "../domain";

/** Domains that this area shares: wide, yet no product or ratio of them leaves the range of a double. */
export const bandwidth = domain(1e-9, 1e9, "a bandwidth from 1E-9 to 1E+9 MHz");
export const chipRate = domain(1e-9, 1e9, "a chip rate from 1E-9 to 1E+9 Mchip/s");
export const bitRate = domain(1e-9, 1e12, "a bit rate from 1E-9 to 1E+12 kbit/s");
export const userCount = domain(0, 1e9, "a number of users from 0 to 1E+9");
export const userCountFromOne = domain(1, 1e9, "a number of users from 1 to 1E+9");
/** Other-cell interference over own-cell interference. */
export const otherCellRatio = domain(0, 1000, "a ratio from 0 to 1000");
export const ebN0 = domain(-100, 100, "an Eb/N0 from -100 to 100 dB");

/** W/R, the processing gain, from W in MHz or Mchip/s and R in kbit/s. */
export function processingGain(widthMHz: number, bitRateKbps: number): number {
  return (1000 * widthMHz) / bitRateKbps;
}
