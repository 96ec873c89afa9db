import { domain, requireIn } from "../domain";
import { DomainError } from "../errors";
import { fromDecibel } from "../numerics/decibel";

const LARGEST_CLUSTER = 10_000;

export const pathLossExponent = domain(1, 10, "a path-loss exponent from 1 to 10");
export const clusterSize = domain(
  1,
  LARGEST_CLUSTER,
  `a cluster size i² + i j + j² (1, 3, 4, 7, 9, 12, 13, …) of at most ${LARGEST_CLUSTER}`,
  { whole: true },
);
export const sectorsOfSite = domain(1, 6, "1, 3 or 6 sectors", { whole: true });

/**
 * Steps i and j of the lattice whose cluster has this size, j the smallest possible.
 *
 * V. H. Mac Donald, "The Cellular Concept", Bell System Technical Journal 58 (1979): hexagons tile the plane in clusters of
 * i^2 + i j + j^2 cells only.
 */
function clusterSteps(size: number): { i: number; j: number } {
  requireIn(clusterSize, "clusterSize", size);
  for (let j = 0; 3 * j * j <= size; j++) {
    const i = (Math.sqrt(4 * size - 3 * j * j) - j) / 2;
    if (Number.isInteger(i)) return { i, j };
  }
  throw new DomainError("clusterSize", size, clusterSize.words);
}

/** The SINR around one site of a regular network, in nepers of power (natural logarithm of the ratio). */
export interface LocalSinr {
  /** True where neither interference nor noise is heard, so that the SINR is infinite everywhere. */
  readonly silent: boolean;
  /** True where the field is the same on both sides of the line from the site to the middle of a cell edge. */
  readonly mirrored: boolean;
  /** Logarithm of the SINR at distance exp(logDistance) corner radii, in the direction with this cosine and sine. */
  at(logDistance: number, cosine: number, sine: number): number;
  /** Slope of the last value against logDistance. */
  slope(): number;
}

/**
 * Local SINR over a hexagon of corner radius 1 whose edges are met head-on at 0, 60, ... degrees.
 *
 * Two tiers of co-channel sites: 6 at D = sqrt(3 clusterSize), 6 at sqrt(3) D, 6 at 2 D. Of the sites of a sectored
 * network one in `sectors` points at the user (6, 2 or 1 of the first tier).
 *
 * @param exponent path-loss exponent, 1 to 10
 * @param size cluster size i^2 + i j + j^2
 * @param sectors 1, 3 or 6
 * @param load share of the time that an interferer sends
 * @param edgeSnrDb signal to noise at the corner of the hexagon, without shadowing; undefined: no noise
 */
export function localSinr(
  exponent: number,
  size: number,
  sectors: number,
  load: number,
  edgeSnrDb: number | undefined,
): LocalSinr {
  const { i, j } = clusterSteps(size);
  if (sectors !== 1 && sectors !== 3 && sectors !== 6) throw new DomainError("sectors", sectors, sectorsOfSite.words);
  const reuseDistance = Math.sqrt(3 * size);
  const turn = Math.atan2((j * Math.sqrt(3)) / 2, i + j / 2);
  const x = new Float64Array(18);
  const y = new Float64Array(18);
  for (let k = 0; k < 6; k++) {
    const place = (tier: number, distance: number, angle: number): void => {
      x[6 * tier + k] = distance * Math.cos(angle + (k * Math.PI) / 3);
      y[6 * tier + k] = distance * Math.sin(angle + (k * Math.PI) / 3);
    };
    place(0, reuseDistance, turn);
    place(1, Math.sqrt(3) * reuseDistance, turn + Math.PI / 6);
    place(2, 2 * reuseDistance, turn);
  }
  const weight = load / sectors;
  const noise = edgeSnrDb === undefined ? 0 : fromDecibel(-edgeSnrDb);
  const power = -exponent / 2;
  let lastSlope = 0;

  const at = (logDistance: number, cosine: number, sine: number): number => {
    const r = Math.exp(logDistance);
    const ux = r * cosine;
    const uy = r * sine;
    let sum = 0;
    let turned = 0;
    if (weight > 0) {
      for (let k = 0; k < 18; k++) {
        const dx = ux - x[k]!;
        const dy = uy - y[k]!;
        const square = dx * dx + dy * dy;
        const received = Math.exp(power * Math.log(square));
        sum += received;
        turned += (received * (ux * dx + uy * dy)) / square;
      }
    }
    const unwanted = weight * sum + noise;
    lastSlope = -exponent * (1 - (weight * turned) / unwanted);
    return -exponent * logDistance - Math.log(unwanted);
  };
  return { silent: weight === 0 && noise === 0, mirrored: j === 0 || i === j, at, slope: () => lastSlope };
}
