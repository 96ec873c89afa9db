import { domain, requireIn, requireOneOf } from "../../domain";
import { baseHeight, distance, mediumCityCorrection, mobileHeight, perDecade } from "./hata";
import { distanceOf, type LossCurve } from "./inverse";

/*
 * COST Action 231, "Digital mobile radio towards future generation systems", final report (1999), section 4.4.1: Hata's
 * model carried on to 2 GHz. Ranges of heights and distance are Hata's.
 */
export const ENVIRONMENTS = ["city", "metropolitan"] as const;
export type Environment = (typeof ENVIRONMENTS)[number];

export { baseHeight, distance, mobileHeight };
export const frequency = domain(1500, 2000, "a frequency from 1500 to 2000 MHz");

/** What metropolitan centres lose more than medium cities and suburban centres. */
const METROPOLITAN_DB = 3;

function curve(frequencyMHz: number, baseHeightM: number, mobileHeightM: number, environment: string): LossCurve {
  requireIn(frequency, "frequencyMHz", frequencyMHz);
  requireIn(baseHeight, "baseHeightM", baseHeightM);
  requireIn(mobileHeight, "mobileHeightM", mobileHeightM);
  requireOneOf(ENVIRONMENTS, "environment", environment);
  const atOneKm =
    46.3 +
    33.9 * Math.log10(frequencyMHz) -
    13.82 * Math.log10(baseHeightM) -
    mediumCityCorrection(frequencyMHz, mobileHeightM) +
    (environment === "metropolitan" ? METROPOLITAN_DB : 0);
  const slope = perDecade(baseHeightM);
  return {
    lossAt: (distanceKm) => atOneKm + slope * Math.log10(distanceKm),
    nearestKm: distance.low,
    farthestKm: distance.high,
  };
}

/**
 * Median path loss in dB by the COST 231 extension of Hata's formula.
 *
 * @param distanceKm 1 to 20
 * @param frequencyMHz 1500 to 2000
 * @param baseHeightM 30 to 200
 * @param mobileHeightM 1 to 10
 * @param environment "city" (medium city, suburban centre) or "metropolitan" (3 dB more)
 */
export function loss(
  distanceKm: number,
  frequencyMHz: number,
  baseHeightM: number,
  mobileHeightM: number,
  environment: string = "city",
): number {
  requireIn(distance, "distanceKm", distanceKm);
  return curve(frequencyMHz, baseHeightM, mobileHeightM, environment).lossAt(distanceKm);
}

/**
 * Distance in km at which the COST 231 formula reaches a loss.
 *
 * @param lossDb loss between those at 1 and 20 km
 * @param frequencyMHz as in `loss`
 * @param baseHeightM as in `loss`
 * @param mobileHeightM as in `loss`
 * @param environment as in `loss`
 * @throws NoAnswerError with the losses at 1 and 20 km where the loss lies outside them
 */
export function range(
  lossDb: number,
  frequencyMHz: number,
  baseHeightM: number,
  mobileHeightM: number,
  environment: string = "city",
): number {
  return distanceOf(lossDb, curve(frequencyMHz, baseHeightM, mobileHeightM, environment));
}
