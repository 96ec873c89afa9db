import fc from "fast-check";
import { grayQam } from "../../../src/model/radio/gray-qam";
import { ber, CHANNELS, ebN0, MODULATIONS } from "../../../src/model/radio/modulation";
import { publishedValue, title } from "../../checks/published";
import reference from "../../fixtures/radio/modulation.json";
import { relativeError } from "../../support/relative-error";

type Row = [modulation: string, ebN0Db: number, channel: string, expected: number];
const rows = reference.rows as Row[];
const dB = (ratio: number): number => 10 * Math.log10(ratio);

describe("against counted bit errors at 50 digits", () => {
  test.each(MODULATIONS)("%s: relative error below 1e-12, tails to 1e-300 included", (modulation) => {
    const own = rows.filter(([name]) => name === modulation);
    expect(own.length).toBeGreaterThan(15);
    for (const [, db, channel, expected] of own) {
      expect(relativeError(ber(modulation, db, channel), expected)).toBeLessThan(1e-12);
    }
  });

  test.each(MODULATIONS)("%s: the inverse is within 1e-10 dB where the error rate says that much", (modulation) => {
    for (const [, db, channel, expected] of rows.filter(([name, db]) => name === modulation && db > -40)) {
      expect(Math.abs(ebN0(modulation, expected, channel) - db)).toBeLessThan(1e-10);
    }
  });
});

describe("published values", () => {
  const direct: [id: string, modulation: string, key: string, channel: string][] = [
    ["MD-08", "bpsk", "EbN0_dB", "awgn"],
    ["MD-08", "qpsk", "EbN0_dB", "awgn"],
    ["MD-11", "dbpsk", "EbN0_dB", "awgn"],
    ["MD-13", "fsk", "EbN0_dB", "awgn"],
    ["MD-18", "16qam", "EbN0_dB", "awgn"],
    ["MD-19", "64qam", "EbN0_dB", "awgn"],
    ["MD-30", "bpsk", "mean_EbN0_dB", "rayleigh"],
    ["MD-31", "bpsk", "mean_EbN0_dB", "rayleigh"],
    ["MD-32", "bpsk", "mean_EbN0_dB", "rayleigh"],
    ["MD-36", "dbpsk", "mean_EbN0_dB", "rayleigh"],
  ];
  test.each(direct.map((row) => [title(publishedValue(row[0])), ...row] as const))(
    "%s",
    (_, id, modulation, key, channel) => {
      const { inputs, expected, tolerance } = publishedValue(id);
      expect(Math.abs(ber(modulation, inputs[key] as number, channel) - expected)).toBeLessThanOrEqual(tolerance!);
    },
  );

  test.each(
    [
      ["MD-05", "awgn"],
      ["MD-33", "rayleigh"],
    ].map(([id, channel]) => [title(publishedValue(id!)), id!, channel!] as const),
  )("%s", (_, id, channel) => {
    const { inputs, expected, tolerance } = publishedValue(id);
    expect(Math.abs(ebN0("bpsk", inputs.BER as number, channel) - expected)).toBeLessThan(tolerance!);
  });

  // Q(sqrt(2 gamma Eb/N0)) is binary phase-shift keying with gamma of the energy.
  test.each(["MD-25", "MD-26", "MD-27"].map((id) => [title(publishedValue(id)), id] as const))("%s", (_, id) => {
    const { inputs, expected, tolerance } = publishedValue(id);
    const { gamma, EbN0_dB } = inputs as { gamma: number; EbN0_dB: number };
    expect(Math.abs(ber("bpsk", EbN0_dB + dB(gamma)) - expected)).toBeLessThan(tolerance!);
  });

  // Coherent orthogonal signalling needs twice the energy of antipodal signalling.
  test(title(publishedValue("MD-14")), () => {
    const { inputs, expected, tolerance } = publishedValue("MD-14");
    expect(Math.abs(ber("bpsk", (inputs.EbN0_dB as number) - dB(2)) - expected)).toBeLessThan(tolerance!);
  });

  // The nearest-neighbour form is the first of the exact terms.
  test(title(publishedValue("MD-20")), () => {
    const { inputs, expected, tolerance } = publishedValue("MD-20");
    const [first] = grayQam(4);
    const nearest = first!.weight * ber("bpsk", (inputs.EbN0_dB as number) + dB(first!.scale));
    expect(Math.abs(nearest - expected)).toBeLessThan(tolerance!);
    expect(ber("16qam", 10)).not.toBe(nearest);
  });
});

describe("exact Gray-coded terms", () => {
  test("16QAM and 64QAM have the printed weights (Cho, Yoon 2002, table of special cases)", () => {
    const weights = (bits: number): number[] => grayQam(bits).map(({ weight }) => weight);
    expect(weights(2)).toEqual([1]);
    expect(weights(4)).toEqual([3 / 4, 2 / 4, -1 / 4]);
    expect(weights(6)).toEqual([7 / 12, 6 / 12, -1 / 12, 1 / 12, -1 / 12]);
  });

  test.each([2, 4, 6, 8, 10, 12])("the weights of %d bits add up to 1: no energy, a coin toss", (bits) => {
    expect(grayQam(bits).reduce((sum, { weight }) => sum + weight, 0)).toBeCloseTo(1, 14);
  });
});

describe("every modulation", () => {
  test.each(MODULATIONS.flatMap((modulation) => CHANNELS.map((channel) => [modulation, channel] as const)))(
    "%s, %s: falls from one half, and the inverse goes back",
    (modulation, channel) => {
      fc.assert(
        fc.property(fc.double({ min: -40, max: 25, noNaN: true }), (db) => {
          const rate = ber(modulation, db, channel);
          expect(rate).toBeLessThan(0.5);
          expect(rate).toBeGreaterThan(ber(modulation, db + 0.01, channel));
          // Near one half the digits of the rate itself are the limit.
          const lost = 1e-16 / (0.5 - rate);
          expect(Math.abs(ebN0(modulation, rate, channel) - db)).toBeLessThan(1e-11 + 20 * lost);
        }),
        { seed: 11, numRuns: 30 },
      );
      expect(ber(modulation, -1000, channel)).toBeCloseTo(0.5, 12);
    },
  );

  test.each(MODULATIONS)("%s: fading never helps, and falls by ten for ten decibels", (modulation) => {
    for (const db of [-10, 0, 5, 10, 20])
      expect(ber(modulation, db, "rayleigh")).toBeGreaterThan(0.9 * ber(modulation, db));
    expect(ber(modulation, 15, "rayleigh")).toBeGreaterThan(ber(modulation, 15));
    expect(ber(modulation, 900, "rayleigh") / ber(modulation, 910, "rayleigh")).toBeCloseTo(10, 10);
  });

  test("denser constellations need more energy", () => {
    for (const channel of CHANNELS) {
      const needed = ["bpsk", "8psk", "16qam", "64qam", "256qam"].map((name) => ebN0(name, 1e-6, channel));
      if (channel === "awgn") expect(needed[1]).toBeCloseTo(13.95, 1);
      expect(needed[2]!).toBeGreaterThan(needed[0]!);
      expect(needed.slice(2)).toEqual(needed.slice(2).sort((a, b) => a - b));
    }
  });

  test("below the smallest number the error rate is 0", () => {
    for (const modulation of MODULATIONS) expect(ber(modulation, 1000)).toBe(0);
  });
});

test("the lowest rates have an answer in noise; in fading a message says what they would need", () => {
  for (const modulation of MODULATIONS) {
    expect(relativeError(ber(modulation, ebN0(modulation, 1e-300)), 1e-300)).toBeLessThan(1e-11);
    expect(() => ebN0(modulation, 1e-102, "rayleigh")).toThrow("needs more than 1000 dB in rayleigh fading");
  }
});

test.each([
  [() => ber("32qam", 3), 'modulation is the text "32qam"; allowed: "bpsk", "qpsk"'],
  [() => ber("bpsk", 3, "rice"), 'channel is the text "rice"; allowed: "awgn", "rayleigh".'],
  [() => ber("bpsk", Infinity), "ebN0Db is Infinity"],
  [() => ebN0("bpsk", 0.5), "ber is 0.5; allowed: a bit error rate from 1E-300 to below 0.5."],
  [() => ebN0("bpsk", 0), "ber is 0"],
])("bad input %# is named", (call, message) => {
  expect(call).toThrow(message);
});
