/*
 * Rural macro cells (RMa) of 3GPP TR 38.901 V19.4.0, table 7.4.1-1, with the report's default street width and building height.
 */
import { domain, requireIn, requireOneOf } from "../../domain";
import { DomainError } from "../../errors";
import { distanceOf, type LossCurve } from "./inverse";
import { BREAKPOINT_SPEED_OF_LIGHT, SIGHTS, type Sight } from "./urban-38901";

/** 2-D distance, along the ground; without line of sight the model ends at 5 km. */
export const distance = domain(0.01, 10, 'a distance from 0.01 to 10 km with "los", to 5 km with "nlos"');
/** The report: 0.5 GHz to 30 GHz, above 7 GHz resting on a single campaign of measurements. */
export const frequency = domain(500, 30_000, "a frequency from 500 to 30 000 MHz");
export const baseHeight = domain(10, 150, "a base station height from 10 to 150 m");
export const mobileHeight = domain(1, 10, "a mobile height from 1 to 10 m");

const STREET_WIDTH_M = 20;
const BUILDING_HEIGHT_M = 5;
const FARTHEST_KM: Readonly<Record<Sight, number>> = { los: 10, nlos: 5 };

/** Line of sight before the breakpoint: terms of log10 of the distance in m, and of the distance itself. */
const LOG_TERM = 20 + Math.min(0.03 * BUILDING_HEIGHT_M ** 1.72, 10);
const LINEAR_TERM = 0.002 * Math.log10(BUILDING_HEIGHT_M);
const CONSTANT_TERM = -Math.min(0.044 * BUILDING_HEIGHT_M ** 1.72, 14.77);

function curve(frequencyMHz: number, baseHeightM: number, mobileHeightM: number, sight: string): LossCurve {
  requireIn(frequency, "frequencyMHz", frequencyMHz);
  requireIn(baseHeight, "baseHeightM", baseHeightM);
  requireIn(mobileHeight, "mobileHeightM", mobileHeightM);
  requireOneOf(SIGHTS, "sight", sight);
  const gigahertz = frequencyMHz / 1000;
  const heights = baseHeightM - mobileHeightM;
  const breakpointM = (2 * Math.PI * baseHeightM * mobileHeightM * frequencyMHz * 1e6) / BREAKPOINT_SPEED_OF_LIGHT;
  const atOneMetre = 20 * Math.log10((40 * Math.PI * gigahertz) / 3) + CONSTANT_TERM;
  const near = (metres: number): number => atOneMetre + LOG_TERM * Math.log10(metres) + LINEAR_TERM * metres;
  const atBreakpoint = near(breakpointM);
  const logBase = Math.log10(baseHeightM);
  const hidden =
    161.04 -
    7.1 * Math.log10(STREET_WIDTH_M) +
    7.5 * Math.log10(BUILDING_HEIGHT_M) -
    (24.37 - 3.7 * (BUILDING_HEIGHT_M / baseHeightM) ** 2) * logBase +
    20 * Math.log10(gigahertz) -
    (3.2 * Math.log10(11.75 * mobileHeightM) ** 2 - 4.97);
  const hiddenSlope = 43.42 - 3.1 * logBase;

  const lossAt = (distanceKm: number): number => {
    const along = 1000 * distanceKm;
    const metres = Math.hypot(along, heights);
    const los = along <= breakpointM ? near(metres) : atBreakpoint + 40 * Math.log10(metres / breakpointM);
    return sight === "los" ? los : Math.max(los, hidden + hiddenSlope * (Math.log10(metres) - 3));
  };
  return { lossAt, nearestKm: distance.low, farthestKm: FARTHEST_KM[sight] };
}

/**
 * Median path loss in dB of a rural macro cell.
 *
 * @param distanceKm 2-D distance, 0.01 to 10 with line of sight, to 5 without
 * @param frequencyMHz 500 to 30 000
 * @param baseHeightM 10 to 150
 * @param mobileHeightM 1 to 10
 * @param sight "los" or "nlos"
 */
export function loss(
  distanceKm: number,
  frequencyMHz: number,
  baseHeightM: number,
  mobileHeightM: number,
  sight: string = "nlos",
): number {
  requireIn(distance, "distanceKm", distanceKm);
  const { lossAt, farthestKm } = curve(frequencyMHz, baseHeightM, mobileHeightM, sight);
  if (distanceKm > farthestKm) throw new DomainError("distanceKm", distanceKm, distance.words);
  return lossAt(distanceKm);
}

/**
 * 2-D distance in km at which the loss of a rural macro cell is reached.
 *
 * @param lossDb loss between those at the ends of the model's range
 * @param frequencyMHz as in `loss`
 * @param baseHeightM as in `loss`
 * @param mobileHeightM as in `loss`
 * @param sight as in `loss`
 * @throws NoAnswerError with the losses at both ends where the loss lies outside them
 */
export function range(
  lossDb: number,
  frequencyMHz: number,
  baseHeightM: number,
  mobileHeightM: number,
  sight: string = "nlos",
): number {
  return distanceOf(lossDb, curve(frequencyMHz, baseHeightM, mobileHeightM, sight));
}
