import { domain } from "../domain";
import { DomainError } from "../errors";

/** Largest cluster that is looked at; a larger one would leave a cell no channel of any band. */
export const LARGEST_CLUSTER = 1_000_000;

export const clusterSize = domain(1, LARGEST_CLUSTER, `a cluster size from 1 to ${LARGEST_CLUSTER}`);
export const pathLossExponent = domain(1, 10, "a path-loss exponent from 1 to 10");
export const sectorsOfSite = domain(1, 6, "1, 3 or 6 sectors", { whole: true });

/** Steps i >= j along two lattice axes, 60 degrees apart, from a cell to the nearest cell with its channels. */
export interface LatticeStep {
  readonly i: number;
  readonly j: number;
}

/**
 * All lattices in which every cluster has `size` cells: i^2 + i j + j^2 = size. Most sizes have one or none; 49 has two.
 *
 * Source: V. H. Mac Donald, "The cellular concept", Bell System Technical Journal 58 (1979).
 */
export function latticeSteps(size: number): LatticeStep[] {
  const steps: LatticeStep[] = [];
  if (!Number.isInteger(size)) return steps;
  for (let j = 0; 3 * j * j <= size; j++) {
    // 4 size - 3 j^2 is far below 2^53, so the root of a square is exact.
    const i = (Math.sqrt(4 * size - 3 * j * j) - j) / 2;
    if (Number.isInteger(i)) steps.push({ i, j });
  }
  return steps;
}

/** Whether hexagonal cells tile the plane in clusters of this size. */
export function isCluster(size: number): boolean {
  return latticeSteps(size).length > 0;
}

/** First-tier co-channel sites that an ideal sector antenna lets through at the centre of the cell: 6, 2 or 1. */
export function heardAtCentre(sectors: number): number {
  if (sectors === 1) return 6;
  if (sectors === 3) return 2;
  if (sectors === 6) return 1;
  throw new DomainError("sectors", sectors, sectorsOfSite.words);
}

/**
 * Distances, over the cell radius, from a corner of the cell to the first-tier co-channel sites heard there; one list for
 * each place and orientation that the symmetry of the lattice leaves apart, so that the worst can be taken.
 *
 * The corner is at (1, 0), the lattice axes at -30 and 30 degrees from it, so that a co-channel site is at
 * (3/2 (i + j), sqrt(3)/2 (j - i)) and the vector from it to the user is (X, sqrt(3) Y)/2 with whole X and Y: distances and
 * beam edges are exact.
 *
 * Sectors: ideal beams of 360/sectors degrees, the same at every site, with their edges through corners of the hexagon (3:
 * every second corner). The user stands at a corner of his sector; a site is heard if the beam of the same sector there,
 * edges included, covers the user. A corner of a third-sector lies in the middle of the beam or on either edge, one of
 * a sixth-sector on either edge.
 */
export function heardAtCorner({ i, j }: LatticeStep, sectors: number): number[][] {
  const sites: [number, number][] = [
    [i, j],
    [-j, i + j],
    [-i - j, i],
    [-i, -j],
    [j, -i - j],
    [i + j, -i],
  ];
  const beams = BEAMS.get(sectors);
  if (!beams) throw new DomainError("sectors", sectors, sectorsOfSite.words);
  const vectors = sites.map(([a, b]) => ({ x: 2 - 3 * (a + b), y: a - b }));
  return beams.map((covers) =>
    vectors.filter(({ x, y }) => covers(x, y)).map(({ x, y }) => Math.sqrt((x * x + 3 * y * y) / 4)),
  );
}

/** Whether a beam covers the direction (x, sqrt(3) y): the slopes at 60 and 120 degrees are whole numbers here. */
type Beam = (x: number, y: number) => boolean;

const BEAMS = new Map<number, Beam[]>([
  [1, [() => true]],
  [
    3,
    [
      // -60 to 60 degrees, 0 to 120, -120 to 0
      (x, y) => x >= Math.abs(y),
      (x, y) => y >= 0 && y >= -x,
      (x, y) => y <= 0 && -y >= -x,
    ],
  ],
  [
    6,
    [
      // 0 to 60 degrees, -60 to 0
      (x, y) => y >= 0 && y <= x,
      (x, y) => y <= 0 && -y <= x,
    ],
  ],
]);
