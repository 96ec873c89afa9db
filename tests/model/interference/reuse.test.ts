import fc from "fast-check";
import { DomainError, NoAnswerError } from "../../../src/model/errors";
import { heardAtCorner, isCluster, latticeSteps } from "../../../src/model/interference/hexagon";
import { cluster, reuse } from "../../../src/model/interference/sinr";
import { published, publishedValue, title } from "../../checks/published";

const SECTORS: Record<number, number> = { 6: 1, 2: 3, 1: 6 };

describe("all interferers at the distance of the centres", () => {
  const entries = published("FT-0", "FT-10", "FT-11", "FT-12", "FT-13", "FT-14", "FT-15");
  test.each(entries.map((entry) => [title(entry), entry] as const))("%s", (_, { inputs, expected, tolerance }) => {
    const { N_cluster, n_exponent, interferers } = inputs as Record<string, number>;
    const actual = reuse(N_cluster!, n_exponent!, SECTORS[interferers!]);
    expect(Math.abs(actual - expected)).toBeLessThanOrEqual(tolerance!);
  });

  test("half the load is 3.0103 dB better", () => {
    expect(reuse(7, 4, 1, 0.5) - reuse(7, 4)).toBeCloseTo(10 * Math.log10(2), 12);
  });

  test("noise as strong as the interference costs 3.0103 dB; without interference only noise is left", () => {
    expect(reuse(7, 4, 1, 1, reuse(7, 4)) - reuse(7, 4)).toBeCloseTo(-10 * Math.log10(2), 12);
    expect(reuse(7, 4, 1, 0, 20)).toBe(20);
    expect(() => reuse(7, 4, 1, 0)).toThrow(NoAnswerError);
  });
});

describe("lattices", () => {
  test.each(published("FT-26", "FT-27").map((entry) => [title(entry), entry] as const))(
    "%s",
    (_, { inputs, expected }) => {
      const { i, j } = inputs as Record<string, number>;
      const steps = latticeSteps(expected);
      expect(steps).toContainEqual({ i: Math.max(i!, j!), j: Math.min(i!, j!) });
    },
  );

  test(title(publishedValue("FT-25")), () => {
    const { expected, tolerance } = publishedValue("FT-25");
    // 10 n log10(q) is the C/I of a single interferer at q: read q back from it.
    expect(Math.abs(10 ** (reuse(7, 1, 6) / 10) - expected)).toBeLessThanOrEqual(tolerance!);
  });

  test("the sizes up to 50 are those of i^2 + i j + j^2 by trial", () => {
    const sizes = new Set<number>();
    for (let i = 0; i <= 7; i++) for (let j = 0; j <= 7; j++) sizes.add(i * i + i * j + j * j);
    for (let size = 1; size <= 49; size++) expect(isCluster(size)).toBe(sizes.has(size));
    expect(latticeSteps(49)).toEqual([
      { i: 7, j: 0 },
      { i: 5, j: 3 },
    ]);
    expect(isCluster(3.5)).toBe(false);
  });
});

describe("as seen from a corner of the hexagon", () => {
  const total = (distances: number[]): number => distances.reduce((sum, d) => sum + d ** -4, 0);

  test("a single channel everywhere: two neighbours are as near as the own site", () => {
    const [distances] = heardAtCorner({ i: 1, j: 0 }, 1);
    const squares = distances!.map((d) => Math.round(d * d)).sort((a, b) => a - b);
    expect(squares).toEqual([1, 1, 4, 4, 7, 7]);
    expect(reuse(1, 4, 1, 1, undefined, "corner")).toBeCloseTo(-10 * Math.log10(2 + 2 / 16 + 2 / 49), 12);
  });

  test("sectors hear the sites whose beam covers the user, by angles", () => {
    // The same rule with trigonometry instead of whole numbers; a hundredth of a degree decides what lies on an edge.
    const EDGE = 0.01;
    for (const size of [1, 3, 4, 7, 9, 12, 13, 19, 21]) {
      for (const step of latticeSteps(size)) {
        const sites = Array.from({ length: 6 }, (_, k) => {
          const turn = Math.atan2((Math.sqrt(3) / 2) * (step.j - step.i), 1.5 * (step.i + step.j)) + (k * Math.PI) / 3;
          const away = Math.sqrt(3 * size);
          return [1 - away * Math.cos(turn), -away * Math.sin(turn)] as const;
        });
        const heard = (low: number, high: number): number =>
          total(
            sites
              .filter(([x, y]) => {
                const degrees = (Math.atan2(y, x) * 180) / Math.PI;
                return [degrees, degrees + 360].some((angle) => angle > low - EDGE && angle < high + EDGE);
              })
              .map(([x, y]) => Math.hypot(x, y)),
          );
        const three = [heard(-60, 60), heard(0, 120), heard(240, 360)].sort();
        const six = [heard(0, 60), heard(300, 360)].sort();
        heardAtCorner(step, 3)
          .map(total)
          .sort()
          .forEach((sum, k) => expect(sum).toBeCloseTo(three[k]!, 10));
        heardAtCorner(step, 6)
          .map(total)
          .sort()
          .forEach((sum, k) => expect(sum).toBeCloseTo(six[k]!, 10));
      }
    }
  });

  test("a sixth-sector always hears somebody, and more sectors never make it worse", () => {
    for (let size = 1; size <= 400; size++) {
      if (!isCluster(size)) continue;
      const [one, three, six] = [1, 3, 6].map((sectors) => reuse(size, 4, sectors, 1, undefined, "corner"));
      expect(three!).toBeGreaterThanOrEqual(one!);
      expect(six!).toBeGreaterThanOrEqual(three!);
      expect(Number.isFinite(six)).toBe(true);
    }
  });

  test.each(published("FT-18", "FT-19", "FT-20").map((entry) => [title(entry), entry] as const))(
    "%s: the textbook rounds the distances to q - 1, q, q + 1, on the safe side of the exact ones",
    (_, { inputs, expected }) => {
      const exact = reuse(inputs["N_cluster"] as number, 4, 1, 1, undefined, "corner");
      expect(exact).toBeGreaterThan(expected);
      expect(exact).toBeLessThan(expected + 0.6);
    },
  );

  test.each(published("FT-21", "FT-22", "FT-23", "FT-24").map((entry) => [title(entry), entry] as const))(
    "%s: the textbook's q and q + 0.7 are within 1 dB of one of the sector's corners, and the worst is no better",
    (_, { id, inputs, expected }) => {
      const size = inputs["N_cluster"] as number;
      const sectors = id < "FT-23" ? 3 : 6;
      const places = heardAtCorner(latticeSteps(size)[0]!, sectors).map(
        (distances) => -10 * Math.log10(total(distances)),
      );
      expect(Math.min(...places.map((place) => Math.abs(place - expected)))).toBeLessThan(1);
      expect(reuse(size, 4, sectors, 1, undefined, "corner")).toBeCloseTo(Math.min(...places), 10);
    },
  );

  test("the centre flatters small clusters, and less so large ones", () => {
    const flattery = [1, 3, 7, 21, 93].map((size) => reuse(size, 4) - reuse(size, 4, 1, 1, undefined, "corner"));
    flattery.forEach((gap, k) => expect(gap).toBeLessThan(k === 0 ? Infinity : flattery[k - 1]!));
    expect(Math.min(...flattery)).toBeGreaterThan(0);
  });

  test("a size that no hexagonal cluster has is refused with its neighbours", () => {
    expect(() => reuse(5, 4, 1, 1, undefined, "corner")).toThrow("such as 4 or 7");
    expect(() => reuse(5.5, 4, 1, 1, undefined, "corner")).toThrow(DomainError);
  });
});

describe("smallest cluster", () => {
  test.each(published("FT-16", "FT-17").map((entry) => [title(entry), entry] as const))(
    "%s",
    (_, { inputs, expected }) => {
      const size = cluster(inputs["CI_dB"] as number, inputs["n_exponent"] as number);
      expect(size).toBeGreaterThanOrEqual(expected);
      expect(isCluster(size)).toBe(true);
      for (let smaller = Math.ceil(expected); smaller < size; smaller++) expect(isCluster(smaller)).toBe(false);
    },
  );

  test("undoes the reuse formula", () => {
    const sizes = Array.from({ length: 300 }, (_, k) => k + 1).filter(isCluster);
    fc.assert(
      fc.property(
        fc.constantFrom(...sizes),
        fc.double({ min: 1, max: 10, noNaN: true }),
        fc.constantFrom(1, 3, 6),
        (size, exponent, sectors) => {
          expect(cluster(reuse(size, exponent, sectors), exponent, sectors)).toBe(size);
        },
      ),
      { seed: 1 },
    );
  });

  test("a low target needs one cell only, an absurd one has no answer", () => {
    expect(cluster(-1000, 4)).toBe(1);
    expect(() => cluster(500, 4)).toThrow(NoAnswerError);
  });
});

test("other sectors and exponents are refused", () => {
  expect(() => reuse(7, 4, 2)).toThrow("sectors is 2; allowed: 1, 3 or 6 sectors.");
  expect(() => reuse(7, 4, 4, 1, undefined, "corner")).toThrow("sectors is 4; allowed: 1, 3 or 6 sectors.");
  expect(() => cluster(18, 4, 2)).toThrow("sectors is 2");
  expect(() => reuse(7, 0)).toThrow("pathLossExponent is 0");
  expect(() => reuse(7, 4, 1, 1, undefined, "edge")).toThrow('allowed: "centre", "corner"');
});
