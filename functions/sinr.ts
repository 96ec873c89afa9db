import { decibel, positiveCount, share } from "../src/model/domain";
import {
  bandwidth,
  bitRate,
  chipRate,
  otherCellRatio as otherCell,
  userCountFromOne,
} from "../src/model/interference/domains";
import { clusterSize as clusterSizes, pathLossExponent as exponents } from "../src/model/interference/hexagon";
import { exponentAboveTwo } from "../src/model/interference/coverage";
import { interfererCount, shadowing } from "../src/model/interference/outage";
import { GEOMETRIES } from "../src/model/interference/reuse";
import * as sinr from "../src/model/interference/sinr";
import { list, number, optionalChoice, optionalNumber, perCell } from "../src/sheet/call";

/**
 * Signal to interference and noise from received powers.
 * @customfunction SINR.FROMPOWERS
 * @param signalDbm Wanted power in dBm.
 * @param interferersDbm Range: power of each interferer in dBm; empty cells are ignored.
 * @param noiseDbm Noise power in dBm.
 * @returns Ratio in dB.
 * @method S / (sum of I + N), powers added in milliwatt.
 * @source Definition; common practice.
 * @assumes Interferers are not coherent with each other.
 * @example =CAP.SINR.FROMPOWERS(-80, {-95;-98}, -101) is 12.56
 */
export function sinrFrompowers(signalDbm: any[][], interferersDbm: any[][], noiseDbm: any[][]): any[][] {
  return perCell(sinr.fromPowers, {
    signalDbm: number(signalDbm, decibel),
    interferersDbm: list(interferersDbm, decibel),
    noiseDbm: number(noiseDbm, decibel),
  });
}

/**
 * Signal to interference from received powers, without noise.
 * @customfunction SINR.SIR
 * @param signalDbm Wanted power in dBm.
 * @param interferersDbm Range: power of each interferer in dBm; empty cells are ignored.
 * @returns Ratio in dB.
 * @method S / sum of I, powers added in milliwatt.
 * @source Definition; common practice.
 * @assumes Interferers are not coherent with each other.
 * @example =CAP.SINR.SIR(-80, {-95;-98}) is 13.24
 */
export function sinrSir(signalDbm: any[][], interferersDbm: any[][]): any[][] {
  return perCell(sinr.sir, {
    signalDbm: number(signalDbm, decibel),
    interferersDbm: list(interferersDbm, decibel),
  });
}

/**
 * Eb/N0 that a SINR in the band gives at a bit rate.
 * @customfunction SINR.EBN0
 * @param sinrDb SINR in the band in dB.
 * @param bandwidthMHz Noise bandwidth in MHz; of code division the chip rate.
 * @param bitRateKbps Bit rate in kbit/s.
 * @returns Eb/N0 in dB.
 * @method SINR + 10 log10(W/R).
 * @source Definition of Eb/N0; common practice.
 * @assumes Interference acts as noise.
 * @example =CAP.SINR.EBN0(-20, 3.84, 12.2) is 4.98
 */
export function sinrEbn0(sinrDb: any[][], bandwidthMHz: any[][], bitRateKbps: any[][]): any[][] {
  return perCell(sinr.ebN0, {
    sinrDb: number(sinrDb, decibel),
    bandwidthMHz: number(bandwidthMHz, bandwidth),
    bitRateKbps: number(bitRateKbps, bitRate),
  });
}

/**
 * SINR in the band that an Eb/N0 asks for at a bit rate.
 * @customfunction SINR.FROMEBN0
 * @param ebN0Db Eb/N0 in dB.
 * @param bandwidthMHz Noise bandwidth in MHz; of code division the chip rate.
 * @param bitRateKbps Bit rate in kbit/s.
 * @returns SINR in dB.
 * @method Eb/N0 - 10 log10(W/R).
 * @source Definition of Eb/N0; common practice.
 * @assumes Interference acts as noise.
 * @example =CAP.SINR.FROMEBN0(5, 3.84, 12.2) is -19.98
 */
export function sinrFromebn0(ebN0Db: any[][], bandwidthMHz: any[][], bitRateKbps: any[][]): any[][] {
  return perCell(sinr.fromEbN0, {
    ebN0Db: number(ebN0Db, decibel),
    bandwidthMHz: number(bandwidthMHz, bandwidth),
    bitRateKbps: number(bitRateKbps, bitRate),
  });
}

/**
 * Signal to interference and noise of frequency reuse in a regular hexagonal network.
 * @customfunction SINR.REUSE
 * @param clusterSize Cells that share the band; at the corner a size i2 + ij + j2 (1, 3, 4, 7, 9, 12, ...).
 * @param pathLossExponent Path-loss exponent, 1 to 10.
 * @param [sectors] Sectors a site: 1, 3 or 6; 1 if left out.
 * @param [load] Share of time that a co-channel cell sends, 0 to 1; 1 if left out.
 * @param [snrDb] Signal to noise at the cell edge in dB; if left out interference alone counts.
 * @param [geometry] "centre": interferers at the distance of the centres (if left out); "corner": as seen from the cell corner.
 * @returns Ratio in dB.
 * @method 1 / (load times the sum of (distance/radius)^-n + 1/snr) over the first tier. "centre": q = sqrt(3 cluster size) for all 6, 2 or 1 interferers of 1, 3, 6 sectors; it flatters small clusters. "corner": exact distances from a corner of the hexagon. Sectors there: ideal beams, the same at all sites, edges through the corners of the hexagon; sites count whose beam, edges included, covers the user; worst corner of the sector.
 * @source V. H. Mac Donald, The cellular concept, Bell System Technical Journal 58 (1979).
 * @assumes Regular sites, equal powers, one slope of path loss, no shadowing, first tier only.
 * @errors #VALUE! for other sectors, and at the corner for a size that no hexagonal cluster has. #N/A without interference and noise.
 * @example =CAP.SINR.REUSE(7, 4) is 18.66
 */
export function sinrReuse(
  clusterSize: any[][],
  pathLossExponent: any[][],
  sectors?: any[][],
  load?: any[][],
  snrDb?: any[][],
  geometry?: any[][],
): any[][] {
  return perCell(sinr.reuse, {
    clusterSize: number(clusterSize, clusterSizes),
    pathLossExponent: number(pathLossExponent, exponents),
    sectors: optionalNumber(sectors, positiveCount, 1),
    load: optionalNumber(load, share, 1),
    snrDb: optionalNumber(snrDb, decibel),
    geometry: optionalChoice(geometry, GEOMETRIES, "centre"),
  });
}

/**
 * Smallest hexagonal cluster whose signal to interference reaches a target.
 * @customfunction SINR.CLUSTER
 * @param requiredDb Required signal to interference in dB.
 * @param pathLossExponent Path-loss exponent, 1 to 10.
 * @param [sectors] Sectors a site: 1, 3 or 6; 1 if left out.
 * @returns Cluster size i2 + ij + j2.
 * @method Smallest i2 + ij + j2 at which SINR.REUSE with all interferers at the distance of the centres, at full load, reaches the target.
 * @source V. H. Mac Donald, The cellular concept, Bell System Technical Journal 58 (1979).
 * @assumes As SINR.REUSE with geometry "centre".
 * @errors #VALUE! for other sectors. #N/A where a million cells do not reach the target.
 * @example =CAP.SINR.CLUSTER(18, 4) is 7
 */
export function sinrCluster(requiredDb: any[][], pathLossExponent: any[][], sectors?: any[][]): any[][] {
  return perCell(sinr.cluster, {
    requiredDb: number(requiredDb, decibel),
    pathLossExponent: number(pathLossExponent, exponents),
    sectors: optionalNumber(sectors, positiveCount, 1),
  });
}

/**
 * Probability that shadowing takes the signal to interference below a target.
 * @customfunction SINR.OUTAGE
 * @param medianDb Median wanted power over the sum of the interferers' medians, in dB.
 * @param requiredDb Required signal to interference in dB.
 * @param shadowingDb Deviation of the shadowing of every path in dB, 0 to 100.
 * @param interferers Number of equal interferers, 1 to 1000000.
 * @param [correlation] Correlation between any two paths, 0 to 1; 0 if left out.
 * @returns Probability from 0 to 1.
 * @method Sum of lognormals without approximation: Mellin transform of the sum from the Laplace transform of one lognormal, inverted by trapezoidal rules; absolute error below 1E-12 (1E-11 below 0.1 dB of deviation), less than 1E-12 counts as 0. One interferer: normal tail, exact. The part that all paths share cancels, so a correlation leaves independent paths of deviation times sqrt(1 - correlation). Closer than Fenton-Wilkinson, which misses a tenth of the probability at 8 dB, a quarter at 12 dB.
 * @source Definition of outage with lognormal shadowing; L. F. Fenton, IRE Trans. Communications Systems 8 (1960); W. Feller, An Introduction to Probability Theory, vol. 2, ch. XIII (transforms).
 * @assumes Wanted signal and interferers lognormal with one deviation; equal interferers; no noise.
 * @errors #VALUE! for a deviation outside 0 to 100 dB or a number of interferers that is not whole.
 * @example =CAP.SINR.OUTAGE(16, 9, 8, 6) is 0.4049
 */
export function sinrOutage(
  medianDb: any[][],
  requiredDb: any[][],
  shadowingDb: any[][],
  interferers: any[][],
  correlation?: any[][],
): any[][] {
  return perCell(sinr.outage, {
    medianDb: number(medianDb, decibel),
    requiredDb: number(requiredDb, decibel),
    shadowingDb: number(shadowingDb, shadowing),
    interferers: number(interferers, interfererCount),
    correlation: optionalNumber(correlation, share, 0),
  });
}

/**
 * Share of places with a SINR above a target in a network of sites placed at random, with Rayleigh fading.
 * @customfunction SINR.COVERAGE
 * @param requiredDb SINR in dB to exceed.
 * @param pathLossExponent Path-loss exponent, above 2, at most 10.
 * @param [load] Share of time that another site sends, 0 to 1; 1 if left out.
 * @param [snrDb] Signal to noise in dB at the mean distance to the nearest site; if left out interference alone counts.
 * @returns Probability from 0 to 1.
 * @method Integral of exp(-x (1 + load rho) - (T/snr) (4x/pi)^(n/2)) over x from 0; rho(T, n) by hypergeometric series, the integral by double-exponential quadrature; relative error below 1E-12.
 * @source J. G. Andrews, F. Baccelli, R. K. Ganti, A tractable approach to coverage and rate in cellular networks, IEEE Trans. Communications 59 (2011), theorem 1.
 * @assumes Poisson sites, user at the nearest one, Rayleigh fading on all paths, no shadowing, one slope of path loss. A regular network does better.
 * @errors #VALUE! for an exponent of 2 or less, at which interference has no limit.
 * @example =CAP.SINR.COVERAGE(0, 4) is 0.5601
 */
export function sinrCoverage(requiredDb: any[][], pathLossExponent: any[][], load?: any[][], snrDb?: any[][]): any[][] {
  return perCell(sinr.coverage, {
    requiredDb: number(requiredDb, decibel),
    pathLossExponent: number(pathLossExponent, exponentAboveTwo),
    load: optionalNumber(load, share, 1),
    snrDb: optionalNumber(snrDb, decibel),
  });
}

/**
 * Signal to interference and noise beside a transmission on an adjacent channel.
 * @customfunction SINR.ADJACENT
 * @param signalDbm Wanted power in dBm.
 * @param adjacentDbm Power received on the adjacent channel in dBm.
 * @param aclrDb Adjacent channel leakage ratio of the transmitter in dB.
 * @param acsDb Adjacent channel selectivity of the receiver in dB.
 * @param noiseDbm Noise power in dBm.
 * @returns Ratio in dB.
 * @method S / (A/ACIR + N) with 1/ACIR = 1/ACLR + 1/ACS in ratios.
 * @source 3GPP TR 36.942, adjacent channel interference ratio.
 * @assumes What leaks out and what is let in add in power; no blocking or intermodulation.
 * @example =CAP.SINR.ADJACENT(-90, -50, 45, 33, -105) is -7.291
 */
export function sinrAdjacent(
  signalDbm: any[][],
  adjacentDbm: any[][],
  aclrDb: any[][],
  acsDb: any[][],
  noiseDbm: any[][],
): any[][] {
  return perCell(sinr.adjacent, {
    signalDbm: number(signalDbm, decibel),
    adjacentDbm: number(adjacentDbm, decibel),
    aclrDb: number(aclrDb, decibel),
    acsDb: number(acsDb, decibel),
    noiseDbm: number(noiseDbm, decibel),
  });
}

/**
 * Eb/(N0 + I0) of one of several equal-power users of a code-division uplink.
 * @customfunction SINR.UPLINK
 * @param users Simultaneous users of the cell, the user himself included, at least 1.
 * @param chipRateMcps Chip rate in Mchip/s.
 * @param bitRateKbps Bit rate in kbit/s.
 * @param activity Share of time that an interferer sends, 0 to 1.
 * @param otherCellRatio Other-cell interference over own-cell power, at least 0.
 * @param [snrDb] Signal to noise of one user before despreading in dB; if left out interference alone counts.
 * @param [efficiency] Share of the own-cell interference that a multi-user receiver removes, 0 to 1; 0 if left out.
 * @returns Eb/(N0 + I0) in dB.
 * @method (W/R) / (v ((1 - e)(K - 1) + i K) + 1/snr).
 * @source K. S. Gilhousen et al., On the capacity of a cellular CDMA system, IEEE Trans. Vehicular Technology 40 (1991).
 * @assumes Perfect power control; interference acts as noise.
 * @errors #N/A without interference and noise.
 * @example =CAP.SINR.UPLINK(40, 3.84, 12.2, 0.5, 0.6) is 9.997
 */
export function sinrUplink(
  users: any[][],
  chipRateMcps: any[][],
  bitRateKbps: any[][],
  activity: any[][],
  otherCellRatio: any[][],
  snrDb?: any[][],
  efficiency?: any[][],
): any[][] {
  return perCell(sinr.uplink, {
    users: number(users, userCountFromOne),
    chipRateMcps: number(chipRateMcps, chipRate),
    bitRateKbps: number(bitRateKbps, bitRate),
    activity: number(activity, share),
    otherCellRatio: number(otherCellRatio, otherCell),
    snrDb: optionalNumber(snrDb, decibel),
    efficiency: optionalNumber(efficiency, share, 0),
  });
}

/**
 * Eb/(N0 + I0) of one of several equal-power users of a code-division downlink.
 * @customfunction SINR.DOWNLINK
 * @param users Simultaneous users of the cell, the user himself included, at least 1.
 * @param chipRateMcps Chip rate in Mchip/s.
 * @param bitRateKbps Bit rate in kbit/s.
 * @param activity Share of time that an interferer is sent to, 0 to 1.
 * @param otherCellRatio Other-cell interference over own-cell power, at least 0.
 * @param orthogonality 1 for codes that stay orthogonal, 0 for none.
 * @param [snrDb] Signal to noise of one user before despreading in dB; if left out interference alone counts.
 * @returns Eb/(N0 + I0) in dB.
 * @method (W/R) / (v ((1 - a)(K - 1) + i K) + 1/snr), a = orthogonality: 1 is orthogonal.
 * @source H. Holma, A. Toskala, WCDMA for UMTS, chapter on radio network planning.
 * @assumes Equal powers for all users; interference acts as noise.
 * @errors #N/A without interference and noise.
 * @example =CAP.SINR.DOWNLINK(40, 3.84, 12.2, 0.5, 0.6, 0.6) is 12.01
 */
export function sinrDownlink(
  users: any[][],
  chipRateMcps: any[][],
  bitRateKbps: any[][],
  activity: any[][],
  otherCellRatio: any[][],
  orthogonality: any[][],
  snrDb?: any[][],
): any[][] {
  return perCell(sinr.downlink, {
    users: number(users, userCountFromOne),
    chipRateMcps: number(chipRateMcps, chipRate),
    bitRateKbps: number(bitRateKbps, bitRate),
    activity: number(activity, share),
    otherCellRatio: number(otherCellRatio, otherCell),
    orthogonality: number(orthogonality, share),
    snrDb: optionalNumber(snrDb, decibel),
  });
}
