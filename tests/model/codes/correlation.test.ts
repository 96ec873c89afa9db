import fc from "fast-check";
import { bound } from "../../../src/model/codes/code";
import { correlation } from "../../../src/model/codes/correlation";
import { peak } from "../../../src/model/codes/peak";
import { DomainError } from "../../../src/model/errors";
import { SeededRandom } from "../../support/seeded-random";

const code = (length: number): fc.Arbitrary<number[]> =>
  fc.array(fc.constantFrom(1, -1), { minLength: length, maxLength: length });
const pair = fc.integer({ min: 1, max: 40 }).chain((length) => fc.tuple(code(length), code(length)));

/** Overlap of rectangular chips by sampling the waveforms in the middle of each of `fine` parts of a chip. */
function waveformOverlap(a: number[], b: number[], delay: number, previousB: number, fine: number): number {
  let sum = 0;
  for (let i = 0; i < a.length * fine; i++) {
    const t = (i + 0.5) / fine;
    const u = t - delay;
    const chipB = u >= 0 ? b[Math.floor(u)]! : previousB * b[Math.floor(u + b.length)]!;
    sum += a[Math.floor(t)]! * chipB;
  }
  return sum / (a.length * fine);
}

describe("correlation of two codes", () => {
  test("is the overlap of their waveforms: aperiodic alone, periodic after the same symbol, odd after the opposite", () => {
    fc.assert(
      fc.property(pair, fc.nat(), ([a, b], number) => {
        const delay = (number % (8 * a.length)) / 8;
        expect(correlation(a, b, delay, "aperiodic")).toBeCloseTo(waveformOverlap(a, b, delay, 0, 8), 12);
        expect(correlation(a, b, delay, "periodic")).toBeCloseTo(waveformOverlap(a, b, delay, 1, 8), 12);
        expect(correlation(a, b, delay, "odd")).toBeCloseTo(waveformOverlap(a, b, delay, -1, 8), 12);
      }),
      { seed: 1 },
    );
  });

  test("periodic and odd are both halves of aperiodic, and none leaves -1 to 1", () => {
    fc.assert(
      fc.property(pair, fc.double({ min: 0, max: 0.999, noNaN: true }), ([a, b], part) => {
        const delay = part * a.length;
        const [periodic, odd] = [correlation(a, b, delay), correlation(a, b, delay, "odd")];
        expect((periodic + odd) / 2).toBeCloseTo(correlation(a, b, delay, "aperiodic"), 12);
        expect(Math.abs(periodic)).toBeLessThanOrEqual(1);
        expect(Math.abs(odd)).toBeLessThanOrEqual(1);
      }),
      { seed: 2 },
    );
  });

  test("a whole delay is exact", () => {
    expect(correlation([1, 1, -1], [1, -1, -1], 1, "aperiodic")).toBe((1 * 1 + -1 * -1) / 3);
    expect(correlation([1, 1, -1], [1, -1, -1], 1, "periodic")).toBe((1 * -1 + 1 * 1 + -1 * -1) / 3);
  });

  test("errors name what is wrong", () => {
    expect(() => correlation([1, 1], [1, 1], 2)).toThrow(
      "delayChips is 2; allowed: a delay from 0 to below the code length of 2.",
    );
    expect(() => correlation([1, 1], [1, 1], -0.1)).toThrow(DomainError);
    expect(() => correlation([1, 1], [1], 0)).toThrow("number of chips of codeB is 1; allowed: 2, as in codeA.");
    expect(() => correlation([1, 0, 1], [1, 1, 1], 0)).toThrow("codeA chip 2 is 0; allowed: 1 or -1.");
    expect(() => correlation([1], [1], 0, "even")).toThrow('allowed: "periodic", "aperiodic", "odd"');
    expect(() => correlation([], [1], 0)).toThrow("number of chips of codeA is 0");
  });

  test("empty cells that a host passes as 0 at the end do not count", () => {
    expect(correlation([1, -1, 0, 0], [1, -1, 0], 0)).toBe(1);
    expect(
      peak([
        [1, -1, 1, 0],
        [0, 0, 0, 0],
      ]),
    ).toBeCloseTo(1 / 3, 12);
  });
});

describe("largest correlation of a set", () => {
  function plainPeak(codes: number[][]): number {
    const length = codes[0]!.length;
    let largest = 0;
    codes.forEach((a, i) => {
      codes.slice(i).forEach((b, offset) => {
        for (let d = offset === 0 ? 1 : 0; d < length; d++) {
          largest = Math.max(largest, Math.abs(correlation(a, b, d)));
        }
      });
    });
    return largest;
  }

  test("every pair at every delay, at all lengths around the words of 32 chips", () => {
    const random = new SeededRandom(1);
    for (const length of [1, 2, 3, 7, 31, 32, 33, 63, 64, 65, 95, 96, 97, 127, 128, 129, 161]) {
      for (const size of [1, 2, 4]) {
        const codes = Array.from({ length: size }, () => Array.from({ length }, () => random.sign()));
        expect(peak(codes)).toBeCloseTo(plainPeak(codes), 12);
      }
    }
  });

  test("many words: the counts in bytes do not run over", () => {
    const ones = new Array<number>(2047).fill(1);
    expect(peak([ones, ones.map((chip) => -chip)])).toBe(1);
    const random = new SeededRandom(2);
    const codes = Array.from({ length: 2 }, () => Array.from({ length: 1500 }, () => random.sign()));
    expect(peak(codes)).toBeCloseTo(plainPeak(codes), 12);
  });

  test("no set is below Welch's bound", () => {
    fc.assert(
      fc.property(fc.integer({ min: 2, max: 40 }), fc.integer({ min: 1, max: 6 }), fc.nat(), (length, size, seed) => {
        const random = new SeededRandom(seed);
        const codes = Array.from({ length: size }, () => Array.from({ length }, () => random.sign()));
        // The bound is for a code and its shifts together, hence for the set with all its shifts.
        expect(peak(codes)).toBeGreaterThanOrEqual(bound(size, length) - 1e-12);
      }),
      { seed: 3 },
    );
  });

  test("a set that would take too long is refused with the number that would not", () => {
    const code = new Array<number>(1023).fill(1);
    expect(() => peak(new Array<number[]>(200).fill(code))).toThrow(
      "number of codes is 200; allowed: up to 156 of length 1023",
    );
  });

  test("rows of different lengths are refused", () => {
    expect(() =>
      peak([
        [1, 1, 1],
        [1, 1],
      ]),
    ).toThrow("number of chips of codes row 2 is 2; allowed: 3, as in row 1.");
  });
});
