import { decibel, requireIn } from "../../domain";
import { NoAnswerError } from "../../errors";
import { root } from "../../numerics/root";

/** What a path-loss model says of one link: its loss as a function of distance, and where it holds. */
export interface LossCurve {
  /** Loss in dB at a distance within the range; grows with distance. */
  readonly lossAt: (distanceKm: number) => number;
  readonly nearestKm: number;
  readonly farthestKm: number;
}

const shown = (x: number): number => Number(x.toPrecision(6));

/**
 * Distance in km at which a model reaches a loss: the largest at which the loss is not above it.
 *
 * Brent's method over the whole range of the model, so that a change of slope inside needs no case of its own.
 *
 * @throws NoAnswerError with the losses at both ends of the range where the loss lies outside them
 */
export function distanceOf(lossDb: number, { lossAt, nearestKm, farthestKm }: LossCurve): number {
  requireIn(decibel, "lossDb", lossDb);
  const least = lossAt(nearestKm);
  const most = lossAt(farthestKm);
  // The loss of an end, computed elsewhere, may differ from ours in its last bits.
  const rounding = 1e-12 * Math.abs(lossDb);
  if (lossDb < least - rounding || lossDb > most + rounding) {
    throw new NoAnswerError(
      `lossDb ${shown(lossDb)} is outside what the model covers: ${shown(least)} dB at ${nearestKm} km to ${shown(most)} dB at ${farthestKm} km.`,
    );
  }
  if (lossDb <= least) return nearestKm;
  if (lossDb >= most) return farthestKm;
  // Losses are nearly straight lines over the logarithm of distance.
  const log = root((at) => lossAt(Math.exp(at)) - lossDb, Math.log(nearestKm), Math.log(farthestKm));
  return Math.min(Math.max(Math.exp(log), nearestKm), farthestKm);
}
