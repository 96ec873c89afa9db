import { decibel, requireIn, requireOneOf, share } from "../domain";
import { DomainError, NoAnswerError } from "../errors";
import { toDecibel } from "../numerics/decibel";
import { decibelSum } from "../numerics/decibel-sum";
import { smallestWhole } from "../numerics/root";
import {
  clusterSize as clusterSizes,
  heardAtCentre,
  heardAtCorner,
  isCluster,
  LARGEST_CLUSTER,
  latticeSteps,
  pathLossExponent as exponents,
} from "./hexagon";

export const GEOMETRIES = ["centre", "corner"] as const;
export type Geometry = (typeof GEOMETRIES)[number];

/**
 * Signal to interference and noise of frequency reuse in a regular hexagonal network, in dB, from the first tier of co-channel
 * cells: 1 / (load times the sum of (distance/radius)^-n + 1/snr).
 *
 * Source: V. H. Mac Donald, "The cellular concept", Bell System Technical Journal 58 (1979).
 *
 * @param clusterSize cells that share the band, at least 1; at the corner a size i^2 + i j + j^2
 * @param pathLossExponent n, 1 to 10
 * @param sectors 1, 3 or 6
 * @param load share of time that a co-channel cell sends
 * @param snrDb signal to noise at the edge of the cell; without it interference alone counts
 * @param geometry "centre": all interferers at D = R sqrt(3 clusterSize), 6, 2 or 1 of them by sectors; "corner": distances as seen
 *   from a corner of the hexagon, of a sectored site the worst corner of the sector (see `heardAtCorner`)
 */
export function reuse(
  clusterSize: number,
  pathLossExponent: number,
  sectors = 1,
  load = 1,
  snrDb?: number,
  geometry: string = "centre",
): number {
  requireIn(clusterSizes, "clusterSize", clusterSize);
  requireIn(exponents, "pathLossExponent", pathLossExponent);
  requireIn(share, "load", load);
  if (snrDb !== undefined) requireIn(decibel, "snrDb", snrDb);
  requireOneOf(GEOMETRIES, "geometry", geometry);
  const interference =
    geometry === "centre"
      ? centre(clusterSize, pathLossExponent, sectors)
      : corner(clusterSize, pathLossExponent, sectors);
  const unwanted = [...(load > 0 ? [toDecibel(load) + interference] : []), ...(snrDb === undefined ? [] : [-snrDb])];
  if (unwanted.length === 0) {
    throw new NoAnswerError("Without load and without snrDb there is neither interference nor noise.");
  }
  return -decibelSum(unwanted);
}

/** Interference over signal at full load, in dB, every heard site at the distance of the centres. */
function centre(clusterSize: number, exponent: number, sectors: number): number {
  return toDecibel(heardAtCentre(sectors)) - 5 * exponent * Math.log10(3 * clusterSize);
}

/** Interference over signal at full load, in dB, at the worst corner of the cell or sector. */
function corner(clusterSize: number, exponent: number, sectors: number): number {
  const lattices = latticeSteps(clusterSize);
  if (lattices.length === 0) throw new DomainError("clusterSize", clusterSize, `at the corner ${nearby(clusterSize)}`);
  const places = lattices.flatMap((step) => heardAtCorner(step, sectors));
  return Math.max(
    ...places.map((distances) => decibelSum(distances.map((distance) => -exponent * toDecibel(distance)))),
  );
}

function nearby(size: number): string {
  let below = Math.floor(size);
  while (!isCluster(below)) below--;
  return `a cluster size i² + i j + j², such as ${below} or ${nextCluster(size)}`;
}

function nextCluster(size: number): number {
  let next = Math.ceil(size);
  while (!isCluster(next)) next++;
  return next;
}

/**
 * Smallest cluster size i^2 + i j + j^2 whose signal to interference reaches a target (all interferers at the distance of the
 * centres, full load).
 *
 * @param requiredDb target, -1000 to 1000 dB
 * @param pathLossExponent 1 to 10
 * @param sectors 1, 3 or 6
 * @throws NoAnswerError where no cluster of up to a million cells reaches it
 */
export function cluster(requiredDb: number, pathLossExponent: number, sectors = 1): number {
  requireIn(decibel, "requiredDb", requiredDb);
  requireIn(exponents, "pathLossExponent", pathLossExponent);
  heardAtCentre(sectors);
  // Comparing with `reuse` itself makes the two undo each other to the last bit.
  const reaches = (size: number): boolean => reuse(size, pathLossExponent, sectors) >= requiredDb;
  const enough = smallestWhole(reaches, 1, LARGEST_CLUSTER);
  const size = enough === undefined ? Infinity : nextCluster(enough);
  if (size > LARGEST_CLUSTER) {
    throw new NoAnswerError(
      `No cluster of up to ${LARGEST_CLUSTER} cells reaches ${requiredDb} dB at path-loss exponent ${pathLossExponent}.`,
    );
  }
  return size;
}
