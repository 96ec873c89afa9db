import {
  LTE_BLOCKS,
  lteBlocks,
  NR_BLOCKS_RANGE_1,
  NR_BLOCKS_RANGE_2,
  nrBlocks,
} from "../../../src/model/standards/resource-blocks";
import { published, publishedValue, title } from "../../checks/published";
import printed from "../../fixtures/standards/printed.json";

type Guards = Record<string, Record<string, number>>;

describe("published values", () => {
  test.each(published("OF-N").map((entry) => [title(entry), entry] as const))("%s", (_, { id, inputs, expected }) => {
    const { BW_MHz, SCS_kHz } = inputs as Record<string, number>;
    expect(nrBlocks(BW_MHz!, SCS_kHz!, id.endsWith("F2") ? 2 : 1)).toBe(expected);
  });

  test.each(
    ["OF-L3", "OF-L5", "OF-L15", "OF-L20"].map((id) => [title(publishedValue(id)), publishedValue(id)] as const),
  )("%s", (_, { inputs, expected }) => {
    expect(lteBlocks(inputs.BW_MHz as number)).toBe(expected);
  });

  test.each(published("OF-G", "OF-U").map((entry) => [title(entry), entry] as const))(
    "%s",
    (_, { id, inputs, expected, tolerance }) => {
      const { BW_MHz, SCS_kHz } = inputs as Record<string, number>;
      const lte = id.includes("LTE");
      const blocks = lte ? lteBlocks(BW_MHz!) : nrBlocks(BW_MHz!, SCS_kHz!, SCS_kHz === 120 ? 2 : 1);
      expect(blocks).toBe(inputs.N_RB);
      const used = 12 * blocks * SCS_kHz!;
      const value = id.startsWith("OF-G") ? (1000 * BW_MHz! - used - SCS_kHz!) / 2 : used / (1000 * BW_MHz!);
      expect(Math.abs(value - expected)).toBeLessThanOrEqual(tolerance!);
    },
  );
});

describe("every row against the printed guard band of the same channel", () => {
  test.each([
    ["range 1", NR_BLOCKS_RANGE_1, printed.guardKHz.range1 as Guards, 1],
    ["range 2", NR_BLOCKS_RANGE_2, printed.guardKHz.range2 as Guards, 2],
  ] as const)("%s", (_, table, guards, range) => {
    const channels = (of: Readonly<Record<string, Readonly<Record<string, number>>>>): string[] =>
      Object.entries(of).flatMap(([spacing, row]) => Object.keys(row).map((bandwidth) => `${bandwidth}/${spacing}`));
    expect(channels(table)).toEqual(channels(guards));
    for (const [spacing, row] of Object.entries(guards)) {
      for (const [bandwidth, guard] of Object.entries(row)) {
        const blocks = nrBlocks(Number(bandwidth), Number(spacing), range);
        expect((1000 * Number(bandwidth) - 12 * blocks * Number(spacing) - Number(spacing)) / 2).toBe(guard);
      }
    }
  });

  test("LTE: nine tenths of the channel from 3 MHz on, 1.08 MHz of 1.4", () => {
    for (const [bandwidth, blocks] of Object.entries(LTE_BLOCKS)) {
      if (bandwidth === "1.4") expect(blocks * 0.18).toBeCloseTo(1.08, 12);
      else expect((blocks * 0.18) / Number(bandwidth)).toBeCloseTo(0.9, 12);
    }
  });
});

describe("what the standard does not define is refused, with what it does define", () => {
  test.each([
    [() => lteBlocks(8), "bandwidthMHz is 8; allowed: 1.4, 3, 5, 10, 15 or 20 MHz."],
    [
      () => nrBlocks(3, 30),
      "bandwidthMHz is 3; allowed: at 30 kHz in frequency range 1 5, 10, 15, 20, 25, 30, 35, 40, 45, 50, 60, 70, 80, 90 or 100 MHz.",
    ],
    [() => nrBlocks(100, 15), "bandwidthMHz is 100; allowed: at 15 kHz in frequency range 1 3, 5, 7"],
    [() => nrBlocks(100, 120), "subcarrierKHz is 120; allowed: in frequency range 1 15, 30 or 60 kHz."],
    [() => nrBlocks(100, 30, 2), "subcarrierKHz is 30; allowed: in frequency range 2 60, 120, 480 or 960 kHz."],
    [() => nrBlocks(400, 60, 2), "bandwidthMHz is 400; allowed: at 60 kHz in frequency range 2 50, 100 or 200 MHz."],
    [() => nrBlocks(100, 30, 3), "frequencyRange is 3; allowed: frequency range 1 or 2."],
    [() => lteBlocks(NaN), "bandwidthMHz is NaN"],
  ])("%#", (call, message) => {
    expect(call).toThrow(message);
  });
});
