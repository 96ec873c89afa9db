import { decibel } from "../src/model/domain";
import * as errorRate from "../src/model/radio/modulation";
import { choice, number, optionalChoice, perCell } from "../src/sheet/call";

/**
 * Bit error rate of a modulation, exact for Gray-coded symbols.
 * @customfunction MODULATION.BER
 * @param modulation "bpsk", "qpsk", "dbpsk", "fsk" (binary, non-coherent), "8psk", "16qam", "64qam" or "256qam".
 * @param ebN0Db Eb/N0 in dB; in Rayleigh fading its mean.
 * @param [channel] "awgn" or "rayleigh"; "awgn" if left out.
 * @returns Bit error rate, 0 to 0.5.
 * @method QAM: exact sum over all Gray-coded decisions, not the nearest neighbours alone; 8psk: (2/3)(Qa + Qb - Qa Qb) from the half planes at 22.5 and 67.5 degrees; dbpsk exp(-Eb/N0)/2, fsk exp(-Eb/N0/2)/2. Rayleigh: closed-form averages, for the product in 8psk a finite integral. Relative error below 1E-12 down to 1E-300.
 * @source K. Cho, D. Yoon, IEEE Trans. Communications 50 (2002); P. J. Lee, IEEE Trans. Communications 34 (1986); J. G. Proakis, Digital Communications; M. K. Simon, M.-S. Alouini, Digital Communication over Fading Channels.
 * @assumes Uncoded, ideal receiver; fading flat and slow against the symbol.
 * @errors #VALUE! for a word that is not in the list.
 * @example =CAP.MODULATION.BER("16qam", 10) is 0.001754
 */
export function modulationBer(modulation: any[][], ebN0Db: any[][], channel?: any[][]): any[][] {
  return perCell(errorRate.ber, {
    modulation: choice(modulation, errorRate.MODULATIONS),
    ebN0Db: number(ebN0Db, decibel),
    channel: optionalChoice(channel, errorRate.CHANNELS, "awgn"),
  });
}

/**
 * Eb/N0 that a bit error rate asks for: the inverse of MODULATION.BER.
 * @customfunction MODULATION.EBN0
 * @param modulation "bpsk", "qpsk", "dbpsk", "fsk" (binary, non-coherent), "8psk", "16qam", "64qam" or "256qam".
 * @param ber Bit error rate, from 1E-300 to below 0.5.
 * @param [channel] "awgn" or "rayleigh"; "awgn" if left out.
 * @returns Eb/N0 in dB; in Rayleigh fading its mean.
 * @method Root search (Brent) on the logarithm of the exact error rate, near one half on the distance from it.
 * @source As MODULATION.BER.
 * @assumes As MODULATION.BER.
 * @errors #N/A where more than 1000 dB would be needed.
 * @example =CAP.MODULATION.EBN0("qpsk", 1E-6) is 10.53
 */
export function modulationEbn0(modulation: any[][], ber: any[][], channel?: any[][]): any[][] {
  return perCell(errorRate.ebN0, {
    modulation: choice(modulation, errorRate.MODULATIONS),
    ber: number(ber, errorRate.bitErrorRate),
    channel: optionalChoice(channel, errorRate.CHANNELS, "awgn"),
  });
}
