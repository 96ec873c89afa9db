import { bound } from "../../../src/model/codes/code";
import { correlation } from "../../../src/model/codes/correlation";
import { decimated, maximalBits } from "../../../src/model/codes/maximal";
import { peak } from "../../../src/model/codes/peak";
import { codeLengths, FAMILIES, sequence, setSize, type Family } from "../../../src/model/codes/sequence";
import { published, publishedValue, title } from "../../checks/published";

function codeSet(family: Family, length: number): number[][] {
  return Array.from({ length: setSize(family, length) }, (_, index) => sequence(family, length, index));
}

function dot(a: readonly number[], b: readonly number[]): number {
  return a.reduce((sum, chip, k) => sum + chip * b[k]!, 0);
}

/** Periodic correlation at all delays, by definition. */
function spectrum(a: readonly number[], b: readonly number[]): number[] {
  return a.map((_, d) => a.reduce((sum, chip, k) => sum + chip * b[(k - d + b.length) % b.length]!, 0));
}

/**
 * Values of the correlation of `bits` with all shifts of the maximal-length sequence of index 0: its windows of `degree` bits are
 * all numbers but 0, so that a Walsh-Hadamard transform of the bits put in that order has them all.
 */
function fastSpectrum(bits: Uint8Array, degree: number): number[] {
  const base = maximalBits(degree);
  const values = new Float64Array(2 ** degree);
  for (let k = 0; k < base.length; k++) {
    let window = 0;
    for (let i = 0; i < degree; i++) window = 2 * window + base[(k + i) % base.length]!;
    values[window] = 1 - 2 * bits[k]!;
  }
  for (let half = 1; half < values.length; half *= 2) {
    for (let i = 0; i < values.length; i++) {
      if (i & half) continue;
      const [a, b] = [values[i]!, values[i + half]!];
      values[i] = a + b;
      values[i + half] = a - b;
    }
  }
  // The all-zero mask is no shift of the sequence but the sum of the bits.
  return Array.from(values).slice(1);
}

const within = (actual: number, expected: number, tolerance: number | undefined): void =>
  expect(Math.abs(actual - expected)).toBeLessThanOrEqual(tolerance!);

describe("maximal-length sequences", () => {
  test.each(codeLengths("maximal").map((length) => [length]))("length %p: the polynomial is primitive", (length) => {
    const degree = Math.log2(length + 1);
    const bits = maximalBits(degree);
    const windows = new Set<number>();
    for (let k = 0; k < length; k++) {
      let window = 0;
      for (let i = 0; i < degree; i++) window = 2 * window + bits[(k + i) % length]!;
      windows.add(window);
    }
    // All windows but the zero one appear once in a period.
    expect(windows.size).toBe(length);
    expect(windows.has(0)).toBe(false);
  });

  test.each(
    published("SQ-")
      .filter(({ id }) => /^SQ-\d+a$/.test(id))
      .map((entry) => [title(entry), entry] as const),
  )("%s", (_, { inputs, expected }) => expect(setSize("maximal", inputs["period"] as number)).toBe(expected));

  test("every index is a maximal-length sequence of its own: off zero delay the correlation is -1", () => {
    for (const length of [3, 7, 15, 31, 63]) {
      const codes = codeSet("maximal", length);
      for (const code of codes) {
        expect(
          spectrum(code, code)
            .slice(1)
            .every((value) => value === -1),
        ).toBe(true);
        expect(
          dot(
            code,
            code.map(() => 1),
          ),
        ).toBe(-1);
      }
      const shapes = codes.map((code) => code.map((_, d) => [...code.slice(d), ...code.slice(0, d)].join()).sort()[0]);
      expect(new Set(shapes).size).toBe(codes.length);
    }
  });

  const peaks = published("SQ-").filter(({ id }) => /^SQ-\d+b$/.test(id));
  const small = peaks.filter(({ inputs }) => (inputs["degree_n"] as number) <= 10);
  test.each(small.map((entry) => [title(entry), entry] as const))("%s, all pairs", (_, { inputs, expected }) => {
    const period = inputs["period"] as number;
    expect(peak(codeSet("maximal", period)) * period).toBeCloseTo(expected, 9);
  });

  const large = peaks.filter(({ inputs }) => (inputs["degree_n"] as number) > 10);
  test.each(large.map((entry) => [title(entry), entry] as const))(
    "%s, with index 0, since pair (r, s) correlates as (1, s/r)",
    (_, { inputs, expected }) => {
      const degree = inputs["degree_n"] as number;
      const period = inputs["period"] as number;
      let largest = 0;
      for (let index = 1; index < setSize("maximal", period); index++) {
        const bits = Uint8Array.from(sequence("maximal", period, index), (chip) => (1 - chip) / 2);
        for (const value of fastSpectrum(bits, degree)) largest = Math.max(largest, Math.abs(value));
      }
      expect(largest).toBe(expected);
    },
  );

  test("the fast spectrum is the plain one", () => {
    const a = sequence("maximal", 63, 0);
    const b = sequence("maximal", 63, 2);
    const bits = Uint8Array.from(b, (chip) => (1 - chip) / 2);
    const plain = spectrum(b, a).sort((x, y) => x - y);
    expect(fastSpectrum(bits, 6).sort((x, y) => x - y)).toEqual(plain);
  });
});

describe("Gold codes", () => {
  const t = (degree: number): number => 1 + 2 ** Math.floor((degree + 2) / 2);

  test.each(codeLengths("gold").map((length) => [length]))("length %p: u and v are a preferred pair", (length) => {
    const degree = Math.log2(length + 1);
    const values = new Set(spectrum(sequence("gold", length, 0), sequence("gold", length, 1)));
    expect([...values].sort((a, b) => a - b)).toEqual([-t(degree), -1, t(degree) - 2]);
  });

  test.each(
    published("SQ-")
      .filter(({ id }) => /^SQ-\d+c$/.test(id))
      .map((entry) => [title(entry), entry] as const),
  )("%s: reached by a pair where the degree is no multiple of 4, by none where it is", (_, { inputs, expected }) => {
    const degree = inputs["degree_n"] as number;
    const u = maximalBits(degree);
    const spread = (step: number): Set<number> => new Set(fastSpectrum(decimated(u, step), degree));
    if (degree % 4 === 0) {
      expect(t(degree)).toBe(expected);
      for (let index = 1; index < setSize("maximal", u.length); index++) {
        const other = Uint8Array.from(sequence("maximal", u.length, index), (chip) => (1 - chip) / 2);
        const values = new Set(fastSpectrum(other, degree));
        expect(values.size === 3 && Math.max(...[...values].map(Math.abs)) === expected).toBe(false);
      }
    } else {
      expect([...spread(degree % 2 === 1 ? 3 : 5)].sort((a, b) => a - b)).toEqual([-expected, -1, expected - 2]);
    }
  });

  test(title(publishedValue("SQ-G05m")), () => {
    expect(peak(codeSet("gold", 31)) * 31).toBeCloseTo(publishedValue("SQ-G05m").expected, 9);
  });

  test(title(publishedValue("SQ-G07s")), () => {
    expect(setSize("gold", 127)).toBe(publishedValue("SQ-G07s").expected);
    const codes = codeSet("gold", 127);
    expect(new Set(codes.map((code) => code.join())).size).toBe(129);
    expect(peak(codes) * 127).toBeCloseTo(t(7), 9);
  });
});

describe("Kasami codes", () => {
  test.each(codeLengths("kasami").map((length) => [length]))(
    "length %p: peak 1 + 2^(n/2), which nothing beats",
    (length) => {
      const degree = Math.log2(length + 1);
      const codes = codeSet("kasami", length);
      expect(codes.length).toBe(2 ** (degree / 2));
      expect(peak(codes) * length).toBeCloseTo(1 + 2 ** (degree / 2), 9);
      // Peaks are odd, so the next lower one is 2 below.
      expect(bound(codes.length, length) * length).toBeGreaterThan(2 ** (degree / 2) - 1);
    },
  );

  test(title(publishedValue("SQ-K04m")), () => {
    expect(peak(codeSet("kasami", 15)) * 15).toBeCloseTo(publishedValue("SQ-K04m").expected, 9);
  });

  test(title(publishedValue("SQ-K10s")), () => {
    expect(setSize("kasami", 1023)).toBe(publishedValue("SQ-K10s").expected);
  });
});

describe("orthogonal codes", () => {
  test(title(publishedValue("SQ-W5")), () => {
    const codes = codeSet("walsh", 64);
    expect(codes.length).toBe(publishedValue("SQ-W5").expected);
    for (const a of codes) for (const b of codes) expect(dot(a, b)).toBe(a === b ? 64 : 0);
  });

  test("Hadamard order: row index has the parity of index and chip", () => {
    expect(codeSet("walsh", 4)).toEqual([
      [1, 1, 1, 1],
      [1, -1, 1, -1],
      [1, 1, -1, -1],
      [1, -1, -1, 1],
    ]);
  });

  test("the code tree of 3GPP TS 25.213, 4.3.1: children are (c, c) and (c, -c)", () => {
    expect(codeSet("ovsf", 4)).toEqual([
      [1, 1, 1, 1],
      [1, 1, -1, -1],
      [1, -1, 1, -1],
      [1, -1, -1, 1],
    ]);
    for (let length = 1; length < 1024; length *= 2) {
      for (const k of [0, 1, length >> 1, length - 1]) {
        if (k >= length) continue;
        const parent = sequence("ovsf", length, k);
        expect(sequence("ovsf", 2 * length, 2 * k)).toEqual([...parent, ...parent]);
        expect(sequence("ovsf", 2 * length, 2 * k + 1)).toEqual([...parent, ...parent.map((chip) => -chip)]);
      }
    }
  });

  test(title(publishedValue("SQ-W6")), () => {
    const { SF_used, users, SF_leaf } = publishedValue("SQ-W6").inputs as Record<string, number>;
    const used = Array.from({ length: users! }, (_, k) => sequence("ovsf", SF_used!, k));
    const free = codeSet("ovsf", SF_leaf!).filter((leaf) =>
      used.every((code) => {
        // Orthogonal whatever the short code's symbols are: in each of its symbols.
        for (let from = 0; from < SF_leaf!; from += SF_used!) {
          if (dot(code, leaf.slice(from, from + SF_used!)) !== 0) return false;
        }
        return true;
      }),
    );
    expect(free.length).toBe(publishedValue("SQ-W6").expected);
  });
});

describe("Welch's bound", () => {
  test.each(published("SQ-W2", "SQ-W3", "SQ-W4").map((entry) => [title(entry), entry] as const))(
    "%s",
    (_, { inputs, expected, tolerance }) => {
      const { M_sequences, N_length } = inputs as Record<string, number>;
      within(bound(M_sequences!, N_length!) * N_length!, expected, tolerance);
    },
  );

  test("a single code, or a single chip", () => {
    expect(bound(1, 31)).toBe(0);
    expect(bound(1, 1)).toBe(0);
    expect(bound(5, 1)).toBe(1);
  });
});

describe("errors say what exists", () => {
  test.each(FAMILIES.map((family) => [family]))("%s lists its lengths", (family) => {
    expect(() => sequence(family, 5, 0)).toThrow(
      `length is 5; allowed: for "${family}" ${codeLengths(family).join(", ")}.`,
    );
  });

  test("an index beyond the set gives its size", () => {
    expect(() => sequence("gold", 127, 129)).toThrow(
      'index is 129; allowed: a whole number from 0 to 128 for "gold" of length 127.',
    );
    expect(() => sequence("gold", 127, -1)).toThrow("index is -1");
    expect(() => sequence("barker", 13, 0)).toThrow('family is the text "barker"');
    expect(() => bound(0, 31)).toThrow("codes is 0");
  });

  test("the longest of each family can be had", () => {
    for (const family of FAMILIES) {
      const lengths = codeLengths(family);
      const longest = lengths[lengths.length - 1]!;
      const last = sequence(family, longest, setSize(family, longest) - 1);
      expect(last.length).toBe(longest);
      expect(correlation(last, last, 0)).toBe(1);
    }
  });
});
