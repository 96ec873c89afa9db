import { decibel, domain, requireIn } from "../../domain";
import { DomainError, NoAnswerError } from "../../errors";
import { distance } from "./log-distance";

export { distance };

const SPEED_OF_LIGHT = 299_792_458;
/** 4 pi d f / c for a distance of 1 km and a frequency of 1 MHz. */
const AT_ONE = (4 * Math.PI * 1e9) / SPEED_OF_LIGHT;

export const frequency = domain(0, 1e6, "a frequency above 0 and up to 1 000 000 MHz", { openLow: true });
export const freeSpaceLoss = domain(0, decibel.high, "a loss from 0 to 1000 dB");

/**
 * Free-space basic transmission loss in dB: 20 log10(4 pi d f / c), c = 299 792 458 m/s (Recommendation ITU-R P.525-4,
 * equation (3)).
 *
 * @param distanceKm up to 1e9; at least wavelength / (4 pi), below which the formula turns into a gain
 * @param frequencyMHz above 0 and up to 1 000 000
 */
export function loss(distanceKm: number, frequencyMHz: number): number {
  requireIn(distance, "distanceKm", distanceKm);
  requireIn(frequency, "frequencyMHz", frequencyMHz);
  const turns = AT_ONE * distanceKm * frequencyMHz;
  if (!(turns >= 1)) {
    const nearest = Number((1 / (AT_ONE * frequencyMHz)).toPrecision(3));
    throw new DomainError(
      "distanceKm",
      distanceKm,
      `at least ${nearest} km at ${frequencyMHz} MHz, where the loss is 0 dB`,
    );
  }
  return 20 * Math.log10(turns);
}

/**
 * Distance in km of a free-space loss.
 *
 * @param lossDb 0 to 1000 dB
 * @param frequencyMHz above 0 and up to 1 000 000
 * @throws NoAnswerError beyond 1e9 km
 */
export function range(lossDb: number, frequencyMHz: number): number {
  requireIn(freeSpaceLoss, "lossDb", lossDb);
  requireIn(frequency, "frequencyMHz", frequencyMHz);
  const found = Math.pow(10, lossDb / 20) / (AT_ONE * frequencyMHz);
  if (found > distance.high) {
    throw new NoAnswerError(`lossDb ${lossDb} at ${frequencyMHz} MHz is reached at ${found} km, beyond 1e9 km.`);
  }
  return found;
}
