/*
 * Urban models of 3GPP TR 38.901 V19.4.0 ("Study on channel model for frequencies from 0.5 to 100 GHz"), table 7.4.1-1: macro cells
 * (UMa) and street canyons (UMi) differ in constants only.
 */
import { domain, requireIn, requireOneOf, type Domain } from "../../domain";
import { distanceOf, type LossCurve } from "./inverse";

export const SIGHTS = ["los", "nlos"] as const;
export type Sight = (typeof SIGHTS)[number];

/** 2-D distance, along the ground. */
export const distance = domain(0.01, 5, "a distance from 0.01 to 5 km");
export const frequency = domain(500, 100_000, "a frequency from 500 to 100 000 MHz");
export const mobileHeight = domain(1.5, 22.5, "a mobile height from 1.5 to 22.5 m");

/** The report prescribes this round value inside its breakpoints (note 1 of the table). */
export const BREAKPOINT_SPEED_OF_LIGHT = 3e8;
/** Height of what stands on the ground; in UMa the value of highest probability, and the only one below 13 m. */
const ENVIRONMENT_HEIGHT_M = 1;

interface Constants {
  readonly baseHeight: Domain;
  /** Loss at 1 m and 1 GHz with a clear line of sight. */
  readonly nearLoss: number;
  /** dB for a decade of distance before the breakpoint; 40 after it. */
  readonly nearSlope: number;
  readonly breakpointSlope: number;
  readonly hiddenLoss: number;
  readonly hiddenSlope: number;
  readonly hiddenFrequencySlope: number;
  /** dB for a metre of mobile height above 1.5 m. */
  readonly hiddenHeightGain: number;
}

/** UMa. The report's base station stands at 25 m, which is its default and not a limit. */
const MACRO: Constants = {
  baseHeight: domain(10, 150, "a base station height from 10 to 150 m"),
  nearLoss: 28,
  nearSlope: 22,
  breakpointSlope: 9,
  hiddenLoss: 13.54,
  hiddenSlope: 39.08,
  hiddenFrequencySlope: 20,
  hiddenHeightGain: 0.6,
};

/** UMi, street canyon. The report's base station stands at 10 m; it must stay below the roofs. */
const MICRO: Constants = {
  baseHeight: domain(3, 25, "a base station height from 3 to 25 m, below the roofs"),
  nearLoss: 32.4,
  nearSlope: 21,
  breakpointSlope: 9.5,
  hiddenLoss: 22.4,
  hiddenSlope: 35.3,
  hiddenFrequencySlope: 21.3,
  hiddenHeightGain: 0.3,
};

/** One urban model: its loss and the inverse. */
export interface UrbanModel {
  readonly baseHeight: Domain;
  /**
   * Median path loss in dB.
   *
   * @param distanceKm 2-D distance, 0.01 to 5
   * @param frequencyMHz 500 to 100 000
   * @param baseHeightM antenna height of the base station
   * @param mobileHeightM 1.5 to 22.5
   * @param sight "los" or "nlos"
   */
  readonly loss: (
    distanceKm: number,
    frequencyMHz: number,
    baseHeightM: number,
    mobileHeightM: number,
    sight?: string,
  ) => number;
  /**
   * 2-D distance in km at which the loss is reached.
   *
   * @throws NoAnswerError with the losses at 0.01 and 5 km where the loss lies outside them
   */
  readonly range: (
    lossDb: number,
    frequencyMHz: number,
    baseHeightM: number,
    mobileHeightM: number,
    sight?: string,
  ) => number;
}

function urbanModel(constants: Constants): UrbanModel {
  function curve(frequencyMHz: number, baseHeightM: number, mobileHeightM: number, sight: string): LossCurve {
    requireIn(frequency, "frequencyMHz", frequencyMHz);
    requireIn(constants.baseHeight, "baseHeightM", baseHeightM);
    requireIn(mobileHeight, "mobileHeightM", mobileHeightM);
    requireOneOf(SIGHTS, "sight", sight);
    const logGHz = Math.log10(frequencyMHz / 1000);
    const heights = baseHeightM - mobileHeightM;
    const breakpointM =
      (4 * (baseHeightM - ENVIRONMENT_HEIGHT_M) * (mobileHeightM - ENVIRONMENT_HEIGHT_M) * frequencyMHz * 1e6) /
      BREAKPOINT_SPEED_OF_LIGHT;
    const seen = constants.nearLoss + 20 * logGHz;
    const beyond = constants.breakpointSlope * Math.log10(breakpointM ** 2 + heights ** 2);
    const hidden =
      constants.hiddenLoss +
      constants.hiddenFrequencySlope * logGHz -
      constants.hiddenHeightGain * (mobileHeightM - 1.5);

    const lossAt = (distanceKm: number): number => {
      const along = 1000 * distanceKm;
      const log = Math.log10(Math.hypot(along, heights));
      const los = seen + (along <= breakpointM ? constants.nearSlope * log : 40 * log - beyond);
      return sight === "los" ? los : Math.max(los, hidden + constants.hiddenSlope * log);
    };
    return { lossAt, nearestKm: distance.low, farthestKm: distance.high };
  }

  return {
    baseHeight: constants.baseHeight,
    loss(distanceKm, frequencyMHz, baseHeightM, mobileHeightM, sight = "nlos") {
      requireIn(distance, "distanceKm", distanceKm);
      return curve(frequencyMHz, baseHeightM, mobileHeightM, sight).lossAt(distanceKm);
    },
    range(lossDb, frequencyMHz, baseHeightM, mobileHeightM, sight = "nlos") {
      return distanceOf(lossDb, curve(frequencyMHz, baseHeightM, mobileHeightM, sight));
    },
  };
}

export const macro = urbanModel(MACRO);
export const micro = urbanModel(MICRO);
