import { decibel, share } from "../src/model/domain";
import { bandwidth, bitRate } from "../src/model/interference/domains";
import { pathLossExponent as exponents, sectorsOfSite } from "../src/model/interference/hexagon";
import * as rate from "../src/model/radio/rate";
import { flag, number, optionalNumber, perCell, perCellRow } from "../src/sheet/call";

/**
 * Shannon capacity of a band: the bound no link exceeds.
 * @customfunction RATE.SHANNON
 * @param bandwidthMHz Bandwidth in MHz, above 0.
 * @param sinrDb Signal to interference and noise in dB.
 * @returns Mbit/s.
 * @method W log2(1 + SINR); log1p keeps the digits of a SINR far below 0 dB.
 * @source C. E. Shannon, Communication in the presence of noise, Proc. IRE 37 (1949).
 * @assumes Gaussian interference; one antenna layer.
 * @example =CAP.RATE.SHANNON(10, 10) is 34.594
 */
export function rateShannon(bandwidthMHz: any[][], sinrDb: any[][]): any[][] {
  return perCell(rate.shannon, { bandwidthMHz: number(bandwidthMHz, bandwidth), sinrDb: number(sinrDb, decibel) });
}

/**
 * Rate of an adaptive link: attenuated Shannon between a lowest SINR and a highest spectral efficiency.
 * @customfunction RATE.ATTENUATED
 * @param bandwidthMHz Bandwidth in MHz, above 0.
 * @param sinrDb Signal to interference and noise in dB.
 * @param [attenuation] Implementation loss as a factor on Shannon, 0.6 if left out (downlink; uplink 0.4).
 * @param [minimumDb] Lowest SINR in dB that is served, -10 if left out.
 * @param [maximumBpsHz] Highest spectral efficiency in bit/s/Hz, 4.4 if left out (downlink; uplink 2.0).
 * @returns Mbit/s.
 * @method 0 below the minimum, then W a log2(1 + SINR), at most W times the maximum.
 * @source 3GPP TR 36.942, annex A.1, equation and table A.2 (baseline E-UTRA curves).
 * @assumes The curve holds overhead and fading as the report has them; an overhead share must not be taken off twice.
 * @errors #VALUE! for an attenuation outside 0.01 to 10 (above 1: several layers) or a maximum above 100.
 * @example =CAP.RATE.ATTENUATED(10, 10) is 20.757
 */
export function rateAttenuated(
  bandwidthMHz: any[][],
  sinrDb: any[][],
  attenuation?: any[][],
  minimumDb?: any[][],
  maximumBpsHz?: any[][],
): any[][] {
  return perCell(rate.attenuated, {
    bandwidthMHz: number(bandwidthMHz, bandwidth),
    sinrDb: number(sinrDb, decibel),
    attenuation: optionalNumber(attenuation, rate.attenuationFactor, rate.DEFAULT_ATTENUATION),
    minimumDb: optionalNumber(minimumDb, decibel, rate.DEFAULT_MINIMUM_DB),
    maximumBpsHz: optionalNumber(maximumBpsHz, rate.maximumEfficiency, rate.DEFAULT_MAXIMUM_BPS_HZ),
  });
}

/**
 * SINR that an adaptive link needs for a bit rate: the inverse of RATE.ATTENUATED.
 * @customfunction RATE.REQUIREDSINR
 * @param bandwidthMHz Bandwidth in MHz, above 0.
 * @param bitRateKbps Bit rate in kbit/s, above 0.
 * @param [attenuation] Implementation loss as a factor on Shannon, 0.6 if left out (downlink; uplink 0.4).
 * @param [minimumDb] Lowest SINR in dB that is served, -10 if left out.
 * @param [maximumBpsHz] Highest spectral efficiency in bit/s/Hz, 4.4 if left out (downlink; uplink 2.0).
 * @returns SINR in dB, never below the minimum.
 * @method 2^(R / (W a)) - 1, with expm1 for low rates.
 * @source 3GPP TR 36.942, annex A.1.
 * @assumes As RATE.ATTENUATED.
 * @errors #N/A for a rate above the maximum.
 * @example =CAP.RATE.REQUIREDSINR(10, 20000) is 9.581
 */
export function rateRequiredsinr(
  bandwidthMHz: any[][],
  bitRateKbps: any[][],
  attenuation?: any[][],
  minimumDb?: any[][],
  maximumBpsHz?: any[][],
): any[][] {
  return perCell(rate.requiredSinr, {
    bandwidthMHz: number(bandwidthMHz, bandwidth),
    bitRateKbps: number(bitRateKbps, bitRate),
    attenuation: optionalNumber(attenuation, rate.attenuationFactor, rate.DEFAULT_ATTENUATION),
    minimumDb: optionalNumber(minimumDb, decibel, rate.DEFAULT_MINIMUM_DB),
    maximumBpsHz: optionalNumber(maximumBpsHz, rate.maximumEfficiency, rate.DEFAULT_MAXIMUM_BPS_HZ),
  });
}

/**
 * Mean spectral efficiency of a hexagonal cell over evenly spread users (arithmetic mean: fair in time).
 * @customfunction RATE.CELLEFFICIENCY
 * @param pathLossExponent Path-loss exponent, 1 to 10.
 * @param clusterSize Cells that share the band: 1, 3, 4, 7, 9, 12, 13, ...
 * @param [sectors] Sectors of a site with channels of their own: 1, 3 or 6; 1 if left out.
 * @param [load] Share of the time that interferers send, 1 if left out.
 * @param [edgeSnrDb] Median signal to noise in dB at the corner of the hexagon; no noise if left out.
 * @param [shadowingDb] Standard deviation of the local SINR in dB, 0 to 20; 0 if left out.
 * @param [attenuation] Factor on Shannon, 0.6 if left out.
 * @param [minimumDb] Lowest SINR in dB that is served, -10 if left out.
 * @param [maximumBpsHz] Highest spectral efficiency in bit/s/Hz, 4.4 if left out.
 * @returns Mean bit/s/Hz, users out of service counted as 0.
 * @method Mean over the hexagon of RATE.ATTENUATED at the local SINR: two tiers (18) of co-channel sites, interference scaled by the load, ideal sector beams with edges through corners of the hexagon. Shadowing: the user stays with the site of its hexagon and its SINR is lognormal around the local median. Gauss-Legendre quadrature along rays, split at the jump and the kink of the curve; relative error below 1E-5.
 * @source Hexagonal reuse: V. H. Mac Donald, The cellular concept, Bell System Technical Journal 58 (1979). Link curve: 3GPP TR 36.942, annex A.1.
 * @assumes A regular network, equal powers. What users of equal volume get is less: RATE.CELLCAPACITY. Some hosts pass an empty cell as 0: for no noise leave edgeSnrDb out.
 * @errors #VALUE! for a cluster size that does not tile the plane or sectors other than 1, 3 and 6.
 * @example =CAP.RATE.CELLEFFICIENCY(3.5, 1) is 1.6091
 */
export function rateCellefficiency(
  pathLossExponent: any[][],
  clusterSize: any[][],
  sectors?: any[][],
  load?: any[][],
  edgeSnrDb?: any[][],
  shadowingDb?: any[][],
  attenuation?: any[][],
  minimumDb?: any[][],
  maximumBpsHz?: any[][],
): any[][] {
  return perCell(rate.cellEfficiency, {
    pathLossExponent: number(pathLossExponent, exponents),
    clusterSize: number(clusterSize, rate.latticeCluster),
    sectors: optionalNumber(sectors, sectorsOfSite, 1),
    load: optionalNumber(load, share, 1),
    edgeSnrDb: optionalNumber(edgeSnrDb, decibel),
    shadowingDb: optionalNumber(shadowingDb, rate.shadowingDeviation, 0),
    attenuation: optionalNumber(attenuation, rate.attenuationFactor, rate.DEFAULT_ATTENUATION),
    minimumDb: optionalNumber(minimumDb, decibel, rate.DEFAULT_MINIMUM_DB),
    maximumBpsHz: optionalNumber(maximumBpsHz, rate.maximumEfficiency, rate.DEFAULT_MAXIMUM_BPS_HZ),
  });
}

/**
 * Capacity of a hexagonal cell for transfers of equal volume (harmonic mean), and the share of it that is served.
 * @customfunction RATE.CELLCAPACITY
 * @param pathLossExponent Path-loss exponent, 1 to 10.
 * @param clusterSize Cells that share the band: 1, 3, 4, 7, 9, 12, 13, ...
 * @param [sectors] Sectors of a site with channels of their own: 1, 3 or 6; 1 if left out.
 * @param [load] Share of the time that interferers send, 1 if left out.
 * @param [edgeSnrDb] Median signal to noise in dB at the corner of the hexagon; no noise if left out.
 * @param [shadowingDb] Standard deviation of the local SINR in dB, 0 to 20; 0 if left out.
 * @param [attenuation] Factor on Shannon, 0.6 if left out.
 * @param [minimumDb] Lowest SINR in dB that is served, -10 if left out.
 * @param [maximumBpsHz] Highest spectral efficiency in bit/s/Hz, 4.4 if left out.
 * @param [labels] TRUE for a header row.
 * @returns Two numbers: harmonic mean bit/s/Hz over the served part, and the share served.
 * @method 1 / mean of 1/efficiency over the served users, the cell as in RATE.CELLEFFICIENCY: two tiers of co-channel sites, interference scaled by the load. Server under shadowing: the site of the hexagon in which the user stands; the SINR is lognormal around its local median, and who falls below the minimum is not served. Deterministic quadrature, relative error below 1E-5.
 * @source T. Bonald, A. Proutiere, Wireless downlink data channels: user performance and cell dimensioning, MobiCom 2003. Link curve: 3GPP TR 36.942, annex A.1.
 * @assumes Equal volumes wherever the user is, spread evenly; multiply by the bandwidth for the capacity in SHARING.THROUGHPUT. A real user may be served by a stronger neighbour, so the share served errs low. Some hosts pass an empty cell as 0: for no noise leave edgeSnrDb out.
 * @errors #VALUE! for a cluster size that does not tile the plane or sectors other than 1, 3 and 6; #N/A where no part of the cell is served.
 * @example =CAP.RATE.CELLCAPACITY(3.5, 1) is 0.9681
 */
export function rateCellcapacity(
  pathLossExponent: any[][],
  clusterSize: any[][],
  sectors?: any[][],
  load?: any[][],
  edgeSnrDb?: any[][],
  shadowingDb?: any[][],
  attenuation?: any[][],
  minimumDb?: any[][],
  maximumBpsHz?: any[][],
  labels?: any[][],
): any[][] {
  return perCellRow(
    rate.cellCapacity,
    rate.CELL_CAPACITY_COLUMNS,
    {
      pathLossExponent: number(pathLossExponent, exponents),
      clusterSize: number(clusterSize, rate.latticeCluster),
      sectors: optionalNumber(sectors, sectorsOfSite, 1),
      load: optionalNumber(load, share, 1),
      edgeSnrDb: optionalNumber(edgeSnrDb, decibel),
      shadowingDb: optionalNumber(shadowingDb, rate.shadowingDeviation, 0),
      attenuation: optionalNumber(attenuation, rate.attenuationFactor, rate.DEFAULT_ATTENUATION),
      minimumDb: optionalNumber(minimumDb, decibel, rate.DEFAULT_MINIMUM_DB),
      maximumBpsHz: optionalNumber(maximumBpsHz, rate.maximumEfficiency, rate.DEFAULT_MAXIMUM_BPS_HZ),
    },
    flag(labels),
  );
}
