import { domain, positiveCount, requireIn } from "../domain";
import { wholeWithin } from "../numerics/whole";

/** Facts of the spectrum that every scheme of carriers shares. */
export const bandwidth = domain(0, 1e6, "a bandwidth above 0, up to 1,000,000 MHz", { openLow: true });
export const carrierSpacing = domain(1e-6, 1e9, "a spacing from 0.000001 to 1E+9 kHz");
export const guardBand = domain(0, 1e9, "a guard band from 0 to 1E+9 kHz");

const KHZ_PER_MHZ = 1000;

/**
 * Whole carriers of one sector: floor(floor((B - guard)/spacing) / (cluster sectors)).
 *
 * @param bandwidthMHz spectrum of one direction, MHz
 * @param spacingKHz spacing of carriers, kHz
 * @param clusterSize cells that share the spectrum once
 * @param sectors sectors of a site, each with carriers of its own
 * @param guardKHz guard at both edges together, kHz
 */
export function carriersPerSector(
  bandwidthMHz: number,
  spacingKHz: number,
  clusterSize: number,
  sectors: number,
  guardKHz: number,
): number {
  requireIn(bandwidth, "bandwidthMHz", bandwidthMHz);
  requireIn(positiveCount, "clusterSize", clusterSize);
  requireIn(positiveCount, "sectors", sectors);
  requireIn(guardBand, "guardKHz", guardKHz);
  const carriers = wholeWithin((bandwidthMHz * KHZ_PER_MHZ - guardKHz) / spacingKHz);
  return Math.max(0, Math.floor(carriers / (clusterSize * sectors)));
}
