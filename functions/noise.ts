import { decibel, positive } from "../src/model/domain";
import * as noise from "../src/model/radio/noise";
import { number, optionalNumber, parallel, perCell } from "../src/sheet/call";

/**
 * Noise floor of a receiver: thermal noise in its bandwidth raised by its noise figure.
 * @customfunction NOISE.FLOOR
 * @param bandwidthMHz Noise bandwidth in MHz, above 0.
 * @param noiseFigureDb Noise figure in dB, at least 0.
 * @param [temperatureK] Temperature in kelvin, 290 if left out.
 * @returns Noise power in dBm.
 * @method 10 log10(k T B / 1 mW) + F with k = 1.380649E-23 J/K. The bandwidth decides: per channel, chip rate and bit rate differ.
 * @source Thermal noise: Recommendation ITU-R P.372; k exact in the SI of 2019; T0 = 290 K.
 * @assumes Thermal noise alone; man-made noise (ITU-R P.372) comes on top.
 * @errors #VALUE! for a bandwidth or temperature of 0 or below, or a noise figure below 0.
 * @example =CAP.NOISE.FLOOR(0.0125, 6) is -127.01
 */
export function noiseFloor(bandwidthMHz: any[][], noiseFigureDb: any[][], temperatureK?: any[][]): any[][] {
  return perCell(noise.floor, {
    bandwidthMHz: number(bandwidthMHz, positive),
    noiseFigureDb: number(noiseFigureDb, noise.noiseFigure),
    temperatureK: optionalNumber(temperatureK, positive, noise.REFERENCE_TEMPERATURE_K),
  });
}

/**
 * Noise figure of a chain of stages, such as tower amplifier, feeder and receiver.
 * @customfunction NOISE.CASCADE
 * @param gainDb Range: gain of each stage in dB, in the order of the signal; a loss below 0.
 * @param noiseFigureDb Range: noise figure of each stage in dB, at least 0; a passive loss has its loss.
 * @returns Noise figure of the chain in dB.
 * @method F = F1 + (F2 - 1)/G1 + (F3 - 1)/(G1 G2) + ... in ratios. The gain of the last stage does not matter.
 * @source H. T. Friis, Noise figures of radio receivers, Proc. IRE 32 (1944).
 * @assumes Matched stages; passive stages at 290 K.
 * @errors #VALUE! for a noise figure below 0 or lists that do not match place by place.
 * @example =CAP.NOISE.CASCADE({15;-3;30}, {1.5;3;7}) is 2.2972
 */
export function noiseCascade(gainDb: any[][], noiseFigureDb: any[][]): any[][] {
  return perCell(noise.cascade, {
    gainDb: parallel(gainDb, decibel),
    noiseFigureDb: parallel(noiseFigureDb, noise.noiseFigure),
  });
}
