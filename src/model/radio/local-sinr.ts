import { domain } from "../domain";
import { DomainError } from "../errors";
import { LARGEST_CLUSTER, latticeSteps, sectorsOfSite } from "../interference/hexagon";
import { fromDecibel } from "../numerics/decibel";

export const latticeCluster = domain(
  1,
  LARGEST_CLUSTER,
  `a cluster size i² + i j + j² (1, 3, 4, 7, 9, 12, 13, …) of at most ${LARGEST_CLUSTER}`,
  { whole: true },
);

const DEGREE = Math.PI / 180;
/** Far below the smallest angle by which a co-channel site of the largest cluster can miss the edge of a beam. */
const ON_EDGE = 1e-9;

/** The beam that covers the user: from the corner of the hexagon at -30 degrees over 360, 120 or 60 degrees. */
function beamWidth(sectors: number): number {
  if (sectors === 1) return 360;
  if (sectors === 3) return 120;
  if (sectors === 6) return 60;
  throw new DomainError("sectors", sectors, sectorsOfSite.words);
}

/** The SINR around one site of a regular network, in nepers of power (natural logarithm of the ratio). */
export interface LocalSinr {
  /** True where neither interference nor noise is heard, so that the SINR is infinite everywhere. */
  readonly silent: boolean;
  /** Directions, in pairs from and to, whose part of the hexagon stands for all of the sector; none holds a corner inside. */
  readonly directions: readonly (readonly [number, number])[];
  /** Logarithm of the SINR at distance exp(logDistance) corner radii, in the direction with this cosine and sine. */
  at(logDistance: number, cosine: number, sine: number): number;
  /** Slope of the last value against logDistance: always below 0, as no interferer is nearer than the server. */
  slope(): number;
}

/**
 * Local SINR over a hexagon of corner radius 1 around its site, with corners at 30, 90, ... degrees.
 *
 * Two tiers of co-channel sites on the lattice of the cluster: 6 at D = sqrt(3 clusterSize), 6 at sqrt(3) D, 6 at 2 D (V. H.
 * Mac Donald, "The cellular concept", Bell System Technical Journal 58 (1979)).
 *
 * Sectors: ideal beams with their edges through corners of the hexagon, the same at every site. Since co-channel sites lie
 * on rows half a cell apart along those edges, a site lights either all of the sector or nothing of it: it is heard if its
 * beam, edges included, holds the direction to our site (2 or 3 of the first tier with three sectors, 1 or 2 with six).
 *
 * @param exponent path-loss exponent
 * @param clusterSize i^2 + i j + j^2; where two lattices have that size (first at 49) the one with the smaller j
 * @param sectors 1, 3 or 6
 * @param load share of the time that an interferer sends
 * @param edgeSnrDb signal to noise at the corner of the hexagon, without shadowing; undefined: no noise
 */
export function localSinr(
  exponent: number,
  clusterSize: number,
  sectors: number,
  load: number,
  edgeSnrDb: number | undefined,
): LocalSinr {
  const step = latticeSteps(clusterSize)[0];
  if (!step) throw new DomainError("clusterSize", clusterSize, latticeCluster.words);
  const { i, j } = step;
  const width = beamWidth(sectors);
  const sites = heardSites(Math.sqrt(3 * clusterSize), Math.atan2((j * Math.sqrt(3)) / 2, i + j / 2), width * DEGREE);
  const x = Float64Array.from(sites, (site) => site.x);
  const y = Float64Array.from(sites, (site) => site.y);
  const noise = edgeSnrDb === undefined ? 0 : fromDecibel(-edgeSnrDb);
  const power = -exponent / 2;
  let lastSlope = 0;

  const at = (logDistance: number, cosine: number, sine: number): number => {
    const r = Math.exp(logDistance);
    const ux = r * cosine;
    const uy = r * sine;
    let sum = 0;
    let turned = 0;
    if (load > 0) {
      for (let k = 0; k < x.length; k++) {
        const dx = ux - x[k]!;
        const dy = uy - y[k]!;
        const square = dx * dx + dy * dy;
        const received = Math.exp(power * Math.log(square));
        sum += received;
        turned += (received * (ux * dx + uy * dy)) / square;
      }
    }
    const unwanted = load * sum + noise;
    lastSlope = -exponent * (1 - (load * turned) / unwanted);
    return -exponent * logDistance - Math.log(unwanted);
  };
  const mirrored = j === 0 || i === j;
  return {
    silent: load === 0 && noise === 0,
    directions: directionsOf(width, mirrored).map(([from, to]) => [from * DEGREE, to * DEGREE]),
    at,
    slope: () => lastSlope,
  };
}

interface Site {
  readonly x: number;
  readonly y: number;
}

/** Sites of the two tiers whose beam, of this width from -30 degrees on, holds the way back to the origin. */
function heardSites(reuseDistance: number, turn: number, width: number): Site[] {
  const tiers = [
    [reuseDistance, turn],
    [Math.sqrt(3) * reuseDistance, turn + Math.PI / 6],
    [2 * reuseDistance, turn],
  ] as const;
  const sites: Site[] = [];
  for (const [distance, first] of tiers) {
    for (let k = 0; k < 6; k++) {
      const angle = first + (k * Math.PI) / 3;
      const back = (((angle + Math.PI + Math.PI / 6) % (2 * Math.PI)) + 2 * Math.PI) % (2 * Math.PI);
      if (back > width + ON_EDGE && back < 2 * Math.PI - ON_EDGE) continue;
      sites.push({ x: distance * Math.cos(angle), y: distance * Math.sin(angle) });
    }
  }
  return sites;
}

/** In degrees: all of the sector, or what its symmetries leave. A full circle repeats every 60 degrees. */
function directionsOf(width: number, mirrored: boolean): (readonly [number, number])[] {
  const sixth = [-30, 30] as const;
  if (width === 120) return mirrored ? [sixth] : [sixth, [30, 90]];
  return mirrored ? [[0, 30]] : [sixth];
}
