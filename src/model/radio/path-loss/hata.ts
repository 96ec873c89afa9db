import { domain, requireIn, requireOneOf } from "../../domain";
import { DomainError } from "../../errors";
import { distanceOf, type LossCurve } from "./inverse";

/*
 * M. Hata, "Empirical formula for propagation loss in land mobile radio services", IEEE Transactions on Vehicular
 * Technology 29 (1980), with the ranges stated there; the same formulas are in Recommendation ITU-R P.529.
 */
export const ENVIRONMENTS = ["urban", "large city", "suburban", "open"] as const;
export type Environment = (typeof ENVIRONMENTS)[number];

export const distance = domain(1, 20, "a distance from 1 to 20 km");
export const frequency = domain(150, 1500, "a frequency from 150 to 1500 MHz");
export const baseHeight = domain(30, 200, "a base station height from 30 to 200 m");
export const mobileHeight = domain(1, 10, "a mobile height from 1 to 10 m");

/** The correction for the mobile's height in a small or medium city; 0 near 1.5 m. COST 231 uses it too. */
export function mediumCityCorrection(frequencyMHz: number, mobileHeightM: number): number {
  const log = Math.log10(frequencyMHz);
  return (1.1 * log - 0.7) * mobileHeightM - (1.56 * log - 0.8);
}

/** In a large city Hata gives one form up to 200 MHz and another from 400 MHz on; between them there is none. */
function largeCityCorrection(frequencyMHz: number, mobileHeightM: number): number {
  if (frequencyMHz <= 200) return 8.29 * Math.log10(1.54 * mobileHeightM) ** 2 - 1.1;
  if (frequencyMHz >= 400) return 3.2 * Math.log10(11.75 * mobileHeightM) ** 2 - 4.97;
  throw new DomainError("frequencyMHz", frequencyMHz, 'in a "large city" 150 to 200 or 400 to 1500 MHz');
}

/** Loss over log10 of the distance in km is a line: its height at 1 km and its slope. */
interface Line {
  readonly atOneKm: number;
  readonly perDecade: number;
}

/** The urban line before the correction for the mobile's height. Slope common to Hata and COST 231. */
export function perDecade(baseHeightM: number): number {
  return 44.9 - 6.55 * Math.log10(baseHeightM);
}

function line(frequencyMHz: number, baseHeightM: number, mobileHeightM: number, environment: string): Line {
  requireIn(frequency, "frequencyMHz", frequencyMHz);
  requireIn(baseHeight, "baseHeightM", baseHeightM);
  requireIn(mobileHeight, "mobileHeightM", mobileHeightM);
  requireOneOf(ENVIRONMENTS, "environment", environment);
  const log = Math.log10(frequencyMHz);
  const correction = environment === "large city" ? largeCityCorrection : mediumCityCorrection;
  const urban = 69.55 + 26.16 * log - 13.82 * Math.log10(baseHeightM) - correction(frequencyMHz, mobileHeightM);
  return { atOneKm: urban - opening(environment, log, frequencyMHz), perDecade: perDecade(baseHeightM) };
}

/** How much less is lost where fewer buildings stand in the way. */
function opening(environment: Environment, log: number, frequencyMHz: number): number {
  if (environment === "suburban") return 2 * Math.log10(frequencyMHz / 28) ** 2 + 5.4;
  if (environment === "open") return 4.78 * log * log - 18.33 * log + 40.94;
  return 0;
}

function curve(frequencyMHz: number, baseHeightM: number, mobileHeightM: number, environment: string): LossCurve {
  const { atOneKm, perDecade: slope } = line(frequencyMHz, baseHeightM, mobileHeightM, environment);
  return {
    lossAt: (distanceKm) => atOneKm + slope * Math.log10(distanceKm),
    nearestKm: distance.low,
    farthestKm: distance.high,
  };
}

/**
 * Median path loss in dB by Hata's formula.
 *
 * @param distanceKm 1 to 20
 * @param frequencyMHz 150 to 1500
 * @param baseHeightM effective height of the base station antenna, 30 to 200
 * @param mobileHeightM 1 to 10
 * @param environment "urban" (small or medium city), "large city", "suburban" or "open"
 */
export function loss(
  distanceKm: number,
  frequencyMHz: number,
  baseHeightM: number,
  mobileHeightM: number,
  environment: string = "urban",
): number {
  requireIn(distance, "distanceKm", distanceKm);
  return curve(frequencyMHz, baseHeightM, mobileHeightM, environment).lossAt(distanceKm);
}

/**
 * Distance in km at which Hata's formula reaches a loss.
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
  environment: string = "urban",
): number {
  return distanceOf(lossDb, curve(frequencyMHz, baseHeightM, mobileHeightM, environment));
}
