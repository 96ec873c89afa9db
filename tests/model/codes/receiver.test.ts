import fc from "fast-check";
import { inv } from "mathjs";
import * as receiver from "../../../src/model/codes/receiver";
import { RECEIVERS } from "../../../src/model/codes/receiver-sinr";
import { sequence } from "../../../src/model/codes/sequence";
import * as timing from "../../../src/model/codes/timing";
import { NoAnswerError } from "../../../src/model/errors";
import { upperTail } from "../../../src/model/numerics/normal";
import { published, publishedValue, title } from "../../checks/published";
import { relativeError } from "../../support/relative-error";
import { SeededRandom } from "../../support/seeded-random";

const ratio = (db: number): number => 10 ** (db / 10);
const db = (value: number): number => 10 * Math.log10(value);

/** Ratios as numbers, where every user has one. */
function sinr(
  codes: number[][],
  powersDbm: number[],
  delays: number[],
  noiseDbm: number,
  kind: string = "matched",
): number[] {
  return receiver.sinr(codes, powersDbm, delays, noiseDbm, kind).map((value) => {
    if (typeof value !== "number") throw value;
    return value;
  });
}

function randomCodes(random: SeededRandom, users: number, chips: number): number[][] {
  return Array.from({ length: users }, () => Array.from({ length: chips }, () => random.sign()));
}

describe("synchronous users: the closed forms of two users", () => {
  // 8 of 10 chips agree: correlation 0.6; 6 of 10: 0.2.
  const first = [1, 1, 1, 1, 1, 1, 1, 1, 1, 1];
  const second: Record<string, number[]> = {
    "0.6": [-1, -1, 1, 1, 1, 1, 1, 1, 1, 1],
    "0.2": [-1, -1, -1, -1, 1, 1, 1, 1, 1, 1],
  };

  const entries = published("MU-0").filter(({ id, inputs }) => id.endsWith("dec") && String(inputs["rho"]) in second);
  test.each(entries.map((entry) => [title(entry), entry] as const))("%s", (_, { inputs, expected, tolerance }) => {
    const ratioOfAmplitudes = inputs["A2_over_A1"] as number;
    const codes = [first, second[String(inputs["rho"])]!];
    const [own] = sinr(codes, [-100, -100 + db(ratioOfAmplitudes ** 2)], [0, 0], -120, "decorrelating");
    expect(Math.abs(ratio(own! - 20) - expected)).toBeLessThanOrEqual(tolerance!);
  });

  test("matched, MMSE and successive (Verdu 1998, chapters 3, 6, 7)", () => {
    fc.assert(
      fc.property(
        fc.constantFrom("0.6", "0.2"),
        fc.double({ min: -40, max: 60, noNaN: true }),
        fc.double({ min: -40, max: 60, noNaN: true }),
        (rho, snr1, snr2) => {
          const codes = [first, second[rho]!];
          const square = Number(rho) ** 2;
          const [a, b] = [ratio(snr1), ratio(snr2)];
          const run = (kind: string): number[] => sinr(codes, [snr1, snr2], [3, 3], 0, kind).map(ratio);
          const close = (actual: number, expected: number): void =>
            expect(relativeError(actual, expected)).toBeLessThan(1e-10);
          close(run("matched")[0]!, a / (1 + b * square));
          close(run("mmse")[0]!, a * (1 - (square * b) / (1 + b)));
          close(run("mmse")[1]!, b * (1 - (square * a) / (1 + a)));
          close(run("successive")[0]!, a >= b ? a / (1 + b * square) : a);
          close(run("successive")[1]!, a >= b ? b : b / (1 + a * square));
        },
      ),
      { seed: 1 },
    );
  });
});

/** Chips in halves: a signal space in which codes delayed by whole and half chips are exact vectors. */
function windowOfSymbols(
  codes: number[][],
  delays: number[],
  around: number,
): { vectors: number[][]; middle: number[] } {
  const length = codes[0]!.length;
  const samples = 2 * length * (2 * around + 2);
  const vectors: number[][] = [];
  const middle: number[] = [];
  for (let symbol = -around; symbol <= around; symbol++) {
    codes.forEach((code, k) => {
      const vector = new Array<number>(samples).fill(0);
      const start = 2 * delays[k]! + 2 * length * (symbol + around);
      code.forEach((chip, c) => {
        for (const half of [0, 1]) vector[start + 2 * c + half] = chip / Math.sqrt(2 * length);
      });
      if (symbol === 0) middle.push(vectors.length);
      vectors.push(vector);
    });
  }
  return { vectors, middle };
}

function product(a: number[], b: number[]): number {
  return a.reduce((sum, value, i) => sum + value * b[i]!, 0);
}

describe("asynchronous users, against sampled waveforms and a dense inverse", () => {
  const random = new SeededRandom(7);
  const codes = randomCodes(random, 3, 11);
  const delays = [0, 3.5, 8];
  const powers = [0, 6, -4];
  const noise = -8;
  const window = windowOfSymbols(codes, delays, 7);
  const amplitudes = window.vectors.map((_, i) => Math.sqrt(ratio(powers[i % 3]! - noise)));
  const gram = window.vectors.map((a) => window.vectors.map((b) => product(a, b)));

  test("matched: correlate the waveforms", () => {
    sinr(codes, powers, delays, noise).forEach((actual, k) => {
      const own = window.middle[k]!;
      const unwanted = gram[own]!.reduce((sum, rho, i) => (i === own ? sum : sum + (rho * amplitudes[i]!) ** 2), 0);
      expect(actual).toBeCloseTo(db(amplitudes[own]! ** 2 / (1 + unwanted)), 10);
    });
  });

  test("decorrelating: invert the correlations of fifteen symbols", () => {
    const inverse = inv(gram);
    sinr(codes, powers, delays, noise, "decorrelating").forEach((actual, k) => {
      const own = window.middle[k]!;
      expect(actual).toBeCloseTo(db(amplitudes[own]! ** 2 / inverse[own]![own]!), 7);
    });
  });

  test("mmse: the error of the best linear estimate from the samples", () => {
    const errors = inv(
      gram.map((row, i) => row.map((rho, j) => (i === j ? 1 : 0) + rho * amplitudes[i]! * amplitudes[j]!)),
    );
    sinr(codes, powers, delays, noise, "mmse").forEach((actual, k) => {
      const own = window.middle[k]!;
      expect(actual).toBeCloseTo(db(1 / errors[own]![own]! - 1), 8);
    });
  });

  test("successive: as matched, of the weaker ones alone", () => {
    const order = [1, 0, 2];
    const all = sinr(codes, powers, delays, noise, "successive");
    order.forEach((k, place) => {
      const left = order.slice(place);
      const matched = sinr(
        left.map((j) => codes[j]!),
        left.map((j) => powers[j]!),
        left.map((j) => delays[j]!),
        noise,
      );
      expect(all[k]).toBeCloseTo(matched[0]!, 10);
    });
  });
});

describe("truths of the uplink and the downlink", () => {
  const walsh = Array.from({ length: 8 }, (_, index) => sequence("walsh", 8, index));
  const equal = new Array<number>(8).fill(-100);

  test("orthogonal codes at equal delays do not disturb each other, whatever the receiver", () => {
    for (const kind of RECEIVERS) {
      for (const delay of [0, 2, 5.25]) {
        for (const value of sinr(walsh, equal, [delay], -110, kind)) expect(value).toBeCloseTo(10, 10);
      }
    }
  });

  test("at unequal delays they do, and a timing advance to equal arrival restores them", () => {
    // Users at 0 to 2.1 km from the base, chips of 0.26 us, timing steps of a quarter of a chip.
    const chipUs = 0.26;
    const stepUs = chipUs / 4;
    const late = walsh.map((_, k) => timing.guard(0.3 * k));
    const spoilt = sinr(
      walsh,
      equal,
      late.map((us) => us / chipUs),
      -110,
    );
    expect(Math.min(...spoilt)).toBeLessThan(5);
    const advanced = late.map((us, k) => (us - timing.steps(0.3 * k, stepUs) * stepUs) / chipUs);
    const restored = sinr(walsh, equal, advanced, -110);
    expect(Math.min(...restored)).toBeGreaterThan(8);
    expect(Math.min(...sinr(walsh, equal, [0], -110))).toBeCloseTo(10, 10);
  });

  test("powers spread by the near-far ratio destroy the matched filter and leave the decorrelator untouched", () => {
    const random = new SeededRandom(3);
    const codes = randomCodes(random, 5, 31);
    const delays = codes.map(() => 31 * random.uniform());
    const even = [-100, -100, -100, -100, -100];
    const spread = [-100, -60, -60, -60, -60];
    const [matchedEven] = sinr(codes, even, delays, -115);
    const [matchedSpread] = sinr(codes, spread, delays, -115);
    expect(matchedEven).toBeGreaterThan(5);
    expect(matchedSpread).toBeLessThan(-25);
    const [decorrelatedEven] = sinr(codes, even, delays, -115, "decorrelating");
    const [decorrelatedSpread] = sinr(codes, spread, delays, -115, "decorrelating");
    expect(decorrelatedSpread).toBe(decorrelatedEven);
    // MMSE tends to the decorrelator there.
    expect(sinr(codes, spread, delays, -115, "mmse")[0]).toBeCloseTo(decorrelatedEven!, 2);
  });

  test("matched filters with random codes: Pursley's (K - 1)/(3N) in the phase of the carrier, in the mean", () => {
    const random = new SeededRandom(5);
    const [users, chips, draws] = [6, 31, 800];
    let sum = 0;
    let squares = 0;
    for (let draw = 0; draw < draws; draw++) {
      const codes = randomCodes(random, users, chips);
      const delays = codes.map(() => chips * random.uniform());
      const [first] = sinr(codes, [0], delays, -200);
      // Interferers at random carrier phases have half their power in the phase of the wanted one.
      const interference = 1 / ratio(first!) / 2;
      sum += interference;
      squares += interference * interference;
    }
    const mean = sum / draws;
    const deviation = Math.sqrt((squares / draws - mean * mean) / draws);
    const expected = (users - 1) / (3 * chips);
    expect(deviation / expected).toBeLessThan(0.02);
    expect(Math.abs(mean - expected)).toBeLessThan(3.5 * deviation);
    expect(1 / ratio(receiver.asynchronous(users, chips, 300))).toBeCloseTo(expected, 12);
  });

  test.each(["matched", "decorrelating", "mmse"])("%s: large random systems converge to their limit", (kind) => {
    const random = new SeededRandom(11);
    const error = (users: number, chips: number, draws: number): number => {
      let sum = 0;
      for (let draw = 0; draw < draws; draw++) {
        for (const value of sinr(randomCodes(random, users, chips), [0], [0], -10, kind)) sum += ratio(value);
      }
      return Math.abs(sum / (draws * users) / ratio(receiver.largeSystem(users / chips, 10, kind)) - 1);
    };
    expect(error(64, 128, 4)).toBeLessThan(0.04);
    expect(error(8, 16, 40)).toBeLessThan(0.35);
  });
});

describe("what must hold", () => {
  const system = fc
    .tuple(fc.integer({ min: 1, max: 6 }), fc.integer({ min: 1, max: 12 }), fc.nat())
    .map(([users, chips, seed]) => {
      const random = new SeededRandom(seed);
      return {
        codes: randomCodes(random, users, chips),
        powers: Array.from({ length: users }, () => 40 * random.uniform() - 20),
        delays: Array.from({ length: users }, () => 3 * chips * random.uniform() - chips),
      };
    });

  test("MMSE is the best linear receiver, and no receiver beats a user alone", () => {
    fc.assert(
      fc.property(system, ({ codes, powers, delays }) => {
        const mmse = sinr(codes, powers, delays, 0, "mmse");
        for (const kind of ["matched", "decorrelating"]) {
          receiver.sinr(codes, powers, delays, 0, kind).forEach((value, k) => {
            if (typeof value === "number") expect(mmse[k]).toBeGreaterThanOrEqual(value - 1e-9);
          });
        }
        mmse.forEach((value, k) => expect(value).toBeLessThanOrEqual(powers[k]! + 1e-9));
      }),
      { seed: 2 },
    );
  });

  test("only delays relative to each other and to the symbol count", () => {
    fc.assert(
      fc.property(system, fc.double({ min: -50, max: 50, noNaN: true }), ({ codes, powers, delays }, shift) => {
        const moved = delays.map((delay, k) => delay + shift + codes[0]!.length * (k % 3));
        for (const kind of ["matched", "mmse", "successive"]) {
          const here = sinr(codes, powers, delays, 0, kind);
          sinr(codes, powers, moved, 0, kind).forEach((value, k) => expect(value).toBeCloseTo(here[k]!, 8));
        }
      }),
      { seed: 3 },
    );
  });

  test("the order of the users does not matter", () => {
    fc.assert(
      fc.property(system, ({ codes, powers, delays }) => {
        for (const kind of RECEIVERS) {
          const here = receiver.sinr(codes, powers, delays, 0, kind);
          const reversed = receiver
            .sinr([...codes].reverse(), [...powers].reverse(), [...delays].reverse(), 0, kind)
            .reverse();
          here.forEach((value, k) => {
            const other = reversed[k]!;
            if (typeof value === "number" && typeof other === "number") expect(other).toBeCloseTo(value, 6);
            else expect(typeof other).toBe(typeof value);
          });
        }
      }),
      { seed: 4 },
    );
  });

  test("powers and delays at the ends of their domains give a number or a reason", () => {
    const level = fc.constantFrom(-1000, -300, -100, 0, 3, 100, 300, 1000);
    const late = fc.constantFrom(0, 1e-12, 0.5, 3, 7 - 1e-9, 7, 1e9, -1e9);
    fc.assert(
      fc.property(
        fc.nat(),
        fc.array(fc.tuple(level, late), { minLength: 1, maxLength: 5 }),
        level,
        fc.constantFrom(...RECEIVERS),
        (seed, users, noise, kind) => {
          const codes = randomCodes(new SeededRandom(seed), users.length, 7);
          const powers = users.map(([power]) => power);
          const delays = users.map(([, delay]) => delay);
          for (const value of receiver.sinr(codes, powers, delays, noise, kind)) {
            if (value instanceof NoAnswerError) expect(value.message.length).toBeGreaterThan(40);
            else expect(Number.isFinite(value)).toBe(true);
          }
        },
      ),
      { seed: 5 },
    );
  });

  test("a user far below the noise keeps his digits", () => {
    const codes = [sequence("gold", 7, 0), sequence("gold", 7, 1), sequence("gold", 7, 2)];
    const delays = [0, 2.5, 4];
    const [strong] = sinr(codes, [-60, 10, 5], delays, 0, "mmse");
    const [weak] = sinr(codes, [-260, 10, 5], delays, 0, "mmse");
    expect(strong! - weak!).toBeCloseTo(200, 5);
  });
});

describe("codes that depend on each other", () => {
  const a = [1, 1, 1, -1, -1, 1, -1];
  const b = [1, -1, 1, 1, 1, -1, -1];

  test("two users of one code at one delay cannot be separated, a third one is not affected", () => {
    const answers = receiver.sinr([a, b, a], [-90], [0, 1.5, 0], -100, "decorrelating");
    expect(answers[0]).toBeInstanceOf(NoAnswerError);
    expect((answers[0] as Error).message).toContain("row 1");
    expect((answers[2] as Error).message).toContain("row 3");
    const [, alone] = sinr([a, b], [-90], [0, 1.5], -100, "decorrelating");
    expect(answers[1]).toBeCloseTo(alone!, 7);
  });

  test("users of one constant code are separated by no window, whatever their delays", () => {
    const constant = [1, 1, 1, 1];
    const answers = receiver.sinr([constant, constant, [1, -1, 1, -1]], [-90], [0, 1.5, 0], -100, "decorrelating");
    expect(answers.map((value) => typeof value === "number")).toEqual([false, false, true]);
  });

  test("more users than chips at one delay: nobody", () => {
    const codes = [0, 1, 2, 3].map((index) => sequence("walsh", 4, index));
    const answers = receiver.sinr([...codes, [1, 1, 1, -1]], [-90], [0], -100, "decorrelating");
    expect(answers.every((value) => value instanceof NoAnswerError)).toBe(true);
  });

  test("nearly dependent ones are, at the price of their noise", () => {
    // One code twice, a hundredth of a chip apart: separation costs about 10 log10 of some fifty.
    const [one] = sinr([a, a], [-90], [0, 0.01], -100, "decorrelating");
    expect(one).toBeLessThan(-5);
    expect(one).toBeGreaterThan(-10);
  });

  test("MMSE shares what there is, and says so where it has no digits left", () => {
    const [one, two] = sinr([a, a], [-90, -90], [0, 0], -180, "mmse");
    expect(one).toBeCloseTo(0, 4);
    expect(two).toBeCloseTo(0, 4);
    const answers = receiver.sinr([a, a], [500, -90], [0, 0], -100, "mmse");
    expect(answers[0]).toBeCloseTo(590, 0);
    expect(answers[1]).toBeInstanceOf(NoAnswerError);
  });
});

describe("limits of large systems", () => {
  const kinds: Record<string, string> = { mf: "matched", dec: "decorrelating", mm: "mmse" };
  const entries = published("MU-1").filter(({ id }) => /(mf|dec|mm)$/.test(id));
  test.each(entries.map((entry) => [title(entry), entry] as const))("%s", (_, { id, inputs, expected, tolerance }) => {
    const kind = kinds[/[a-z]+$/.exec(id)![0]]!;
    const { SNR_linear, load_K_over_N } = inputs as Record<string, number>;
    const actual = ratio(receiver.largeSystem(load_K_over_N!, db(SNR_linear!), kind));
    expect(Math.abs(actual - expected)).toBeLessThanOrEqual(tolerance!);
  });

  test("the MMSE value solves the equation of Tse and Hanly at all ends", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-6, max: 1e6, noNaN: true }),
        fc.double({ min: -1000, max: 1000, noNaN: true }),
        (load, snrDb) => {
          const x = receiver.largeSystem(load, snrDb, "mmse");
          // x (1 + b snr/(1 + x)) = snr, in decibel
          const right = 1 + load * ratio(snrDb - db(1 + ratio(x)));
          expect(Math.abs(x + db(right) - snrDb)).toBeLessThan(1e-9);
        },
      ),
      { seed: 1 },
    );
  });

  test("as many users as chips leave the decorrelator nothing", () => {
    expect(() => receiver.largeSystem(1, 10, "decorrelating")).toThrow(NoAnswerError);
    expect(() => receiver.largeSystem(0, 10)).toThrow("usersPerChip is 0");
    expect(() => receiver.largeSystem(0.5, 10, "successive")).toThrow('allowed: "matched", "decorrelating", "mmse"');
  });
});

describe("asynchronous random codes", () => {
  test.each(["SQ-P2", "SQ-P3"].map((id) => [title(publishedValue(id)), id] as const))("%s", (_, id) => {
    const { inputs, expected, tolerance } = publishedValue(id);
    const { K_users, N_chips, EbN0_dB } = inputs as Record<string, number>;
    const amplitude = Math.sqrt(ratio(receiver.asynchronous(K_users!, N_chips!, EbN0_dB!)));
    expect(Math.abs(amplitude - expected)).toBeLessThanOrEqual(tolerance!);
    const errorRate = publishedValue(`${id}b`);
    expect(Math.abs(upperTail(amplitude) - errorRate.expected)).toBeLessThanOrEqual(errorRate.tolerance!);
  });

  test("a single user has twice Eb/N0, the argument of Q squared", () => {
    expect(receiver.asynchronous(1, 31, 7)).toBeCloseTo(7 + 10 * Math.log10(2), 12);
  });
});

describe("errors name what is wrong", () => {
  const codes = [
    [1, 1, -1],
    [1, -1, 1],
  ];
  test.each<[string, () => unknown]>([
    [
      "number of powersDbm is 3; allowed: 2, one for each row of codes, or a single one.",
      () => receiver.sinr(codes, [1, 2, 3], [0], 0),
    ],
    ["number of delaysChips is 3", () => receiver.sinr(codes, [1], [0, 1, 2], 0)],
    ["codes row 1 chip 2 is 0.5; allowed: 1 or -1.", () => receiver.sinr([[1, 0.5]], [1], [0], 0)],
    [
      "number of chips of codes row 2 is 2; allowed: 3, as in row 1.",
      () =>
        receiver.sinr(
          [
            [1, 1, 1],
            [1, 1],
          ],
          [1],
          [0],
          0,
        ),
    ],
    [
      "number of codes is 161; allowed: up to 160.",
      () => receiver.sinr(new Array<number[]>(161).fill([1, 1]), [1], [0], 0),
    ],
    ["number of chips of codes is 5000", () => receiver.sinr([new Array<number>(5000).fill(1)], [1], [0], 0)],
    ["powersDbm is 1001", () => receiver.sinr(codes, [1001], [0], 0)],
    ["delaysChips is 1e+100", () => receiver.sinr(codes, [1], [1e100], 0)],
    ['receiver is the text "rake"', () => receiver.sinr(codes, [1], [0], 0, "rake")],
    ["users is 0", () => receiver.asynchronous(0, 31, 7)],
    ["chipsPerBit is 0", () => receiver.asynchronous(2, 0, 7)],
  ])("%s", (message, call) => expect(call).toThrow(message));
});
