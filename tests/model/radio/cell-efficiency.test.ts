import fc from "fast-check";
import {
  cellAverages,
  cellCapacity,
  cellEfficiency,
  type CellParameters,
} from "../../../src/model/radio/cell-efficiency";
import { localSinr } from "../../../src/model/radio/local-sinr";
import { attenuated } from "../../../src/model/radio/rate";
import { publishedValue, title } from "../../checks/published";
import { relativeError } from "../../support/relative-error";

const BASE: CellParameters = {
  pathLossExponent: 3.5,
  clusterSize: 1,
  sectors: 1,
  load: 1,
  edgeSnrDb: undefined,
  shadowingDb: 0,
  attenuation: 0.6,
  minimumDb: -10,
  maximumBpsHz: 4.4,
};

/**
 * The same cell the plain way: a fine grid of places, each with the sum over sites whose beam covers that very place, and a
 * fine grid of shadowing. Knows nothing of rays, kinks or of which sites are heard.
 */
function plainly(p: CellParameters, steps: number): { efficiency: number; served: number; seconds: number } {
  const axis1 = [Math.sqrt(3), 0] as const;
  const axis2 = [Math.sqrt(3) / 2, 1.5] as const;
  let i = 0;
  let j = 0;
  while (i * i + i * j + j * j !== p.clusterSize) [i, j] = i > j ? [i, j + 1] : [i + 1, 0];
  const sites: [number, number][] = [];
  for (let a = -2; a <= 2; a++) {
    for (let b = -2; b <= 2; b++) {
      const ring = Math.max(Math.abs(a), Math.abs(b), Math.abs(a + b));
      if (ring === 0 || ring > 2) continue;
      // a steps along (i, j) and b along that turned by 60 degrees, (-j, i + j).
      const [u, v] = [a * i - b * j, a * j + b * (i + j)];
      sites.push([u * axis1[0] + v * axis2[0], u * axis1[1] + v * axis2[1]]);
    }
  }
  const width = (2 * Math.PI) / p.sectors;
  const from = -Math.PI / 6;
  const inBeam = (x: number, y: number): boolean => {
    const turn = (Math.atan2(y, x) - from + 4 * Math.PI) % (2 * Math.PI);
    return turn <= width;
  };
  const noise = p.edgeSnrDb === undefined ? 0 : 10 ** (-p.edgeSnrDb / 10);
  const zs = p.shadowingDb === 0 ? [0] : Array.from({ length: 121 }, (_, k) => -6 + k / 10);
  const weights = zs.map((z) => Math.exp((-z * z) / 2));
  const all = weights.reduce((a, b) => a + b);
  const sum = { efficiency: 0, served: 0, seconds: 0 };
  let places = 0;
  const visit = (x: number, y: number): void => {
    places++;
    let interference = 0;
    for (const [sx, sy] of sites) {
      if (p.sectors > 1 && !inBeam(x - sx, y - sy)) continue;
      interference += Math.hypot(x - sx, y - sy) ** -p.pathLossExponent;
    }
    const median = -10 * Math.log10((noise + p.load * interference) * Math.hypot(x, y) ** p.pathLossExponent);
    zs.forEach((z, k) => {
      const rate = attenuated(
        1,
        Math.min(1000, median + p.shadowingDb * z),
        p.attenuation,
        p.minimumDb,
        p.maximumBpsHz,
      );
      if (rate === 0) return;
      sum.efficiency += (weights[k]! / all) * rate;
      sum.served += weights[k]! / all;
      sum.seconds += weights[k]! / all / rate;
    });
  };
  // Small triangles between two corners of the hexagon and its middle, each by its centroid.
  for (let sixth = 0; sixth < 6 / p.sectors; sixth++) {
    const corners = [0, 1].map((k) => ((60 * (sixth + k) - 30) * Math.PI) / 180);
    const at = (u: number, v: number): void =>
      visit(
        (u * Math.cos(corners[0]!) + v * Math.cos(corners[1]!)) / steps,
        (u * Math.sin(corners[0]!) + v * Math.sin(corners[1]!)) / steps,
      );
    for (let u = 0; u < steps; u++) {
      for (let v = 0; u + v < steps; v++) {
        at(u + 1 / 3, v + 1 / 3);
        if (u + v < steps - 1) at(u + 2 / 3, v + 2 / 3);
      }
    }
  }
  return { efficiency: sum.efficiency / places, served: sum.served / places, seconds: sum.seconds / places };
}

const CASES: [string, Partial<CellParameters>][] = [
  ["reuse of one", {}],
  ["cluster of three, half load", { clusterSize: 3, load: 0.5 }],
  ["cluster of seven, off the axes", { clusterSize: 7, maximumBpsHz: 10, attenuation: 0.75 }],
  ["three sectors", { sectors: 3 }],
  ["three sectors, cluster of three", { sectors: 3, clusterSize: 3, maximumBpsHz: 10 }],
  ["three sectors, cluster of seven", { sectors: 3, clusterSize: 7, maximumBpsHz: 10, attenuation: 0.75 }],
  ["six sectors", { sectors: 6, pathLossExponent: 4, maximumBpsHz: 10 }],
  ["noise and interference", { edgeSnrDb: 3, load: 0.4 }],
  ["noise alone", { load: 0, edgeSnrDb: 0 }],
  ["part of the cell out of service", { minimumDb: 0 }],
  ["the contour of the minimum cuts the edge of the cell", { minimumDb: -2 }],
  ["a minimum above the SINR of the maximum", { minimumDb: 30 }],
  ["weak shadowing around a jump", { minimumDb: -2, shadowingDb: 0.4 }],
  ["shadowing", { shadowingDb: 8 }],
  ["shadowing, three sectors, noise", { shadowingDb: 6, sectors: 3, edgeSnrDb: 5, load: 0.7 }],
  ["strong shadowing, low minimum", { shadowingDb: 12, minimumDb: -30 }],
  ["flat propagation", { pathLossExponent: 1.5 }],
  ["steep propagation", { pathLossExponent: 8, minimumDb: 5 }],
];

describe("averages over the cell", () => {
  test.each(CASES)("%s: a plain sum over a grid of places agrees", (_, change) => {
    const parameters = { ...BASE, ...change };
    const rays = cellAverages(parameters);
    const grid = plainly(parameters, parameters.shadowingDb >= 1 ? 16 : parameters.shadowingDb > 0 ? 30 : 60);
    for (const key of ["efficiency", "served", "seconds"] as const) {
      expect(relativeError(rays[key], grid[key])).toBeLessThan(0.006);
    }
  });

  test.each(CASES)("%s: twice as many nodes in every direction change less than 1e-5", (_, change) => {
    const rays = cellAverages({ ...BASE, ...change });
    const finer = cellAverages({ ...BASE, ...change }, 2);
    for (const key of ["efficiency", "served", "seconds"] as const) {
      expect(relativeError(rays[key], finer[key])).toBeLessThan(1e-6);
    }
  });

  test("the error bound of 1e-4 holds for parameters at random", () => {
    const parameters = fc.record({
      pathLossExponent: fc.double({ min: 1, max: 10, noNaN: true }),
      clusterSize: fc.constantFrom(1, 3, 4, 7, 9, 12, 13, 19, 21, 49, 1_000_000),
      sectors: fc.constantFrom(1, 3, 6),
      load: fc.double({ min: 0.01, max: 1, noNaN: true }),
      edgeSnrDb: fc.option(fc.double({ min: -20, max: 40, noNaN: true }), { nil: undefined }),
      shadowingDb: fc.oneof(fc.constant(0), fc.double({ min: 0, max: 20, noNaN: true })),
      attenuation: fc.double({ min: 0.1, max: 2, noNaN: true }),
      minimumDb: fc.double({ min: -40, max: 20, noNaN: true }),
      maximumBpsHz: fc.double({ min: 0.5, max: 12, noNaN: true }),
    });
    fc.assert(
      fc.property(parameters, (p) => {
        const rays = cellAverages(p);
        const finer = cellAverages(p, 2);
        // Where hardly anybody is served the averages are next to nothing.
        if (finer.served < 1e-6) return;
        for (const key of ["efficiency", "served", "seconds"] as const) {
          expect(relativeError(rays[key], finer[key])).toBeLessThan(1e-4);
        }
      }),
      { seed: 4, numRuns: 50 },
    );
  });
});

describe("published values", () => {
  test.each(["OF-H2", "OF-H4"].map((id) => [title(publishedValue(id)), publishedValue(id)] as const))(
    "%s",
    (_, { inputs, expected, tolerance }) => {
      const sinr = localSinr(inputs.n_exponent as number, 1, 1, 1, undefined);
      const db = (10 / Math.LN10) * sinr.at(0, Math.cos(Math.PI / 6), Math.sin(Math.PI / 6));
      expect(Math.abs(db - expected)).toBeLessThan(tolerance!);
    },
  );
});

describe("limits", () => {
  test("no load and no noise: the maximum everywhere", () => {
    expect(cellEfficiency(3.5, 1, 1, 0)).toBe(4.4);
    expect(cellCapacity(3.5, 1, 1, 0)).toEqual([4.4, 1]);
  });

  test("a cluster without end: the maximum everywhere", () => {
    expect(cellEfficiency(3.5, 1_000_000)).toBeCloseTo(4.4, 12);
    expect(cellCapacity(3.5, 1_000_000)[0]).toBeCloseTo(4.4, 12);
  });

  test("noise alone, exponent 2, no minimum or maximum in the way: the integral over a hexagon in closed form", () => {
    // log2(1 + 1e6 / r^2) is log2(1e6) - 2 log2(r) to one part in a million.
    const meanLog = cellEfficiency(2, 1, 1, 0, 60, 0, 1, -10, 100) - Math.log2(1e6);
    // Mean of ln r over the hexagon: a sixth is r up to h / cos(t), the integral of r^2/2 (ln r - 1/2) over t.
    const h = Math.sqrt(3) / 2;
    let integral = 0;
    const steps = 2000;
    for (let k = 0; k < steps; k++) {
      const r = h / Math.cos((((k + 0.5) / steps) * Math.PI) / 6);
      integral += ((r * r) / 2) * (Math.log(r) - 0.5) * (Math.PI / 6 / steps);
    }
    const meanLnR = (12 * integral) / ((3 * Math.sqrt(3)) / 2);
    expect(meanLog).toBeCloseTo(-2 * Math.LOG2E * meanLnR, 5);
  });

  test("shadowing that fades out is no shadowing", () => {
    const without = cellCapacity(3.5, 1, 1, 1, 3, 0, 0.6, -2);
    for (const [deviation, apart] of [
      [0.1, 2e-3],
      [0.01, 1e-4],
      [0.001, 1e-5],
    ] as const) {
      const weak = cellCapacity(3.5, 1, 1, 1, 3, deviation, 0.6, -2);
      weak.forEach((value, k) => expect(relativeError(value, without[k]!)).toBeLessThan(apart));
    }
  });

  test("a cell that nobody hears has no capacity", () => {
    expect(cellEfficiency(10, 1, 1, 0, -1000, 0, 0.6, 1000)).toBe(0);
    expect(() => cellCapacity(10, 1, 1, 0, -1000, 0, 0.6, 1000)).toThrow(
      "no part of the cell reaches the minimum of 1000 dB",
    );
  });
});

describe("order", () => {
  const parameters = fc.record({
    exponent: fc.double({ min: 1.5, max: 8, noNaN: true }),
    cluster: fc.constantFrom(1, 3, 4, 7, 12),
    sectors: fc.constantFrom(1, 3, 6),
    load: fc.double({ min: 0, max: 0.9, noNaN: true }),
    snr: fc.option(fc.double({ min: -5, max: 30, noNaN: true }), { nil: undefined }),
    shadowing: fc.constantFrom(0, 0, 1, 8),
  });
  /** Two neighbouring calls may differ by the error of the quadrature. */
  const SLACK = 1 + 1e-6;

  test("more load serves fewer, at lower rates", () => {
    fc.assert(
      fc.property(parameters, ({ exponent, cluster, sectors, load, snr, shadowing }) => {
        const light = cellCapacity(exponent, cluster, sectors, load, snr, shadowing, 0.6, -3);
        const heavy = cellCapacity(exponent, cluster, sectors, load + 0.1, snr, shadowing, 0.6, -3);
        expect(heavy[1]).toBeLessThanOrEqual(light[1] * SLACK);
        const lightMean = cellEfficiency(exponent, cluster, sectors, load, snr, shadowing, 0.6, -3);
        expect(cellEfficiency(exponent, cluster, sectors, load + 0.1, snr, shadowing, 0.6, -3)).toBeLessThanOrEqual(
          lightMean * SLACK,
        );
        // With all served the harmonic mean falls too; with some dropped their slow transfers drop out of it.
        const all = (at: number): number => cellCapacity(exponent, cluster, sectors, at, snr, 0, 0.6, -1000)[0];
        expect(all(load + 0.1)).toBeLessThanOrEqual(all(load) * SLACK);
      }),
      { seed: 6, numRuns: 30 },
    );
  });

  test("the harmonic mean over the served is below their arithmetic mean", () => {
    fc.assert(
      fc.property(parameters, ({ exponent, cluster, sectors, load, snr, shadowing }) => {
        const [harmonic, served] = cellCapacity(exponent, cluster, sectors, load, snr, shadowing);
        const arithmetic = cellEfficiency(exponent, cluster, sectors, load, snr, shadowing) / served;
        expect(harmonic).toBeLessThanOrEqual(arithmetic * SLACK);
      }),
      { seed: 5, numRuns: 30 },
    );
  });

  test("larger clusters, more sectors and a stronger signal serve better", () => {
    const clusters = [1, 3, 4, 7, 9, 12].map((size) => cellEfficiency(3.5, size));
    const sectors = [1, 3, 6].map((count) => cellEfficiency(3.5, 1, count));
    const signals = [-10, 0, 10, 20].map((snr) => cellEfficiency(3.5, 3, 1, 1, snr));
    for (const values of [clusters, sectors, signals]) expect(values).toEqual([...values].sort((a, b) => a - b));
  });
});

describe("bad input is named", () => {
  test.each([
    [() => cellEfficiency(0.5, 1), "pathLossExponent is 0.5"],
    [() => cellEfficiency(3.5, 2), "clusterSize is 2; allowed: a cluster size i² + i j + j²"],
    [() => cellEfficiency(3.5, 1, 2), "sectors is 2; allowed: 1, 3 or 6 sectors."],
    [() => cellEfficiency(3.5, 1, 1, 1.1), "load is 1.1"],
    [() => cellEfficiency(3.5, 1, 1, 1, 2000), "edgeSnrDb is 2000"],
    [() => cellEfficiency(3.5, 1, 1, 1, 10, 21), "shadowingDb is 21"],
    [() => cellEfficiency(3.5, 1, 1, 1, 10, 8, 0), "attenuation is 0"],
    [() => cellCapacity(3.5, 1, 1, 1, 10, 8, 0.6, -1001), "minimumDb is -1001"],
    [() => cellCapacity(3.5, 1, 1, 1, 10, 8, 0.6, -10, 0), "maximumBpsHz is 0"],
  ])("%#", (call, message) => {
    expect(call).toThrow(message);
  });
});
