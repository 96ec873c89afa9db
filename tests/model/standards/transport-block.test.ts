import fc from "fast-check";
import { SMALL_SIZES, transportBlock } from "../../../src/model/standards/transport-block";
import { NR_TABLE_NAMES, NR_TABLES } from "../../../src/model/standards/channel-quality";
import { published, title } from "../../checks/published";
import printed from "../../fixtures/standards/printed.json";

describe("published values", () => {
  const sizes = published("OF-B").filter(({ quantity }) => quantity.startsWith("NR transport block"));
  test.each(sizes.map((entry) => [title(entry), entry] as const))("%s", (_, { inputs, expected }) => {
    const { n_PRB, N_symb, Qm, Rx1024, layers, N_DMRS_RE_per_PRB, N_oh } = inputs as Record<string, number>;
    expect(transportBlock(n_PRB!, N_symb!, Qm!, Rx1024!, layers!, N_DMRS_RE_per_PRB, N_oh)).toBe(expected);
  });
});

test("the small sizes are the 93 of the printed table", () => {
  expect(SMALL_SIZES).toEqual(printed.smallTransportBlocks.sizes);
});

/** The procedure again, in whole numbers of 1/2048 bit, step by step as the clause has it. */
function byTheClause(
  blocks: number,
  symbols: number,
  bits: number,
  rate: number,
  layers: number,
  dmrs: number,
  oh: number,
): number {
  const elements = BigInt(Math.min(156, 12 * symbols - dmrs - oh) * blocks);
  const info = elements * BigInt(Math.round(rate * 2)) * BigInt(bits * layers);
  const UNIT = 2048n;
  const log2 = (x: bigint): number => (x / UNIT).toString(2).length - 1;
  if (info <= 3824n * UNIT) {
    const n = BigInt(Math.max(3, (info >= UNIT ? log2(info) : -1) - 6));
    const quantised = Math.max(24, Number((info / (UNIT << n)) << n));
    return printed.smallTransportBlocks.sizes.find((size) => size >= quantised)!;
  }
  const above = info - 24n * UNIT;
  const n = BigInt(log2(above) - 5);
  // Round half up: add half a unit, drop the fraction.
  const quantised = Math.max(3840, Number(((above + (UNIT << n) / 2n) / (UNIT << n)) << n));
  const split = (codeBlocks: number): number => 8 * codeBlocks * Math.ceil((quantised + 24) / (8 * codeBlocks)) - 24;
  if (rate <= 256) return split(Math.ceil((quantised + 24) / 3816));
  return quantised > 8424 ? split(Math.ceil((quantised + 24) / 8424)) : split(1);
}

const standardRates = NR_TABLE_NAMES.flatMap((name) =>
  NR_TABLES[name].rows.map(([bits, rate]) => [bits, rate] as const),
);
const allocation = fc.record({
  blocks: fc.integer({ min: 1, max: 275 }),
  symbols: fc.integer({ min: 1, max: 14 }),
  modulation: fc.constantFrom(...standardRates),
  layers: fc.integer({ min: 1, max: 4 }),
  dmrs: fc.constantFrom(0, 4, 6, 11),
});

test("agrees with whole-number arithmetic for the code rates of every table", () => {
  fc.assert(
    fc.property(allocation, ({ blocks, symbols, modulation: [bits, rate], layers, dmrs }) => {
      expect(transportBlock(blocks, symbols, bits, rate, layers, dmrs)).toBe(
        byTheClause(blocks, symbols, bits, rate, layers, dmrs, 0),
      );
    }),
    { seed: 1, numRuns: 3000 },
  );
});

test("more blocks and more layers never shrink it; it is a multiple of 8 and near the information bits", () => {
  fc.assert(
    fc.property(allocation, ({ blocks, symbols, modulation: [bits, rate], layers, dmrs }) => {
      const size = transportBlock(blocks, symbols, bits, rate, layers, dmrs);
      expect(size % 8).toBe(0);
      if (blocks < 275)
        expect(transportBlock(blocks + 1, symbols, bits, rate, layers, dmrs)).toBeGreaterThanOrEqual(size);
      if (layers < 4)
        expect(transportBlock(blocks, symbols, bits, rate, layers + 1, dmrs)).toBeGreaterThanOrEqual(size);
      const information = (Math.min(156, 12 * symbols - dmrs) * blocks * bits * rate * layers) / 1024;
      expect(Math.abs(size - information)).toBeLessThanOrEqual(32 + 0.04 * information);
    }),
    { seed: 2, numRuns: 500 },
  );
});

describe("the branches, one by one", () => {
  test.each([
    ["fewest bits", [1, 1, 2, 30, 1, 6, 0], 24],
    ["3824 information bits are still the table", [2, 14, 8, 478, 4, 40, 0], 3824],
    ["4184 bits less 24 are 32.5 units of 128: the tie is rounded up", [2, 14, 8, 523, 4, 40, 0], 4224],
    ["156 elements a block at most", [10, 14, 4, 616, 1, 0, 0], undefined],
    ["the lowest rate in code blocks of 3816", [275, 14, 2, 256, 4, 12, 0], undefined],
    ["just above that rate, code blocks of 8424", [275, 14, 2, 256.5, 4, 12, 0], undefined],
    ["one code block", [60, 12, 2, 490, 1, 12, 0], undefined],
  ] as [string, [number, number, number, number, number, number, number], number | undefined][])(
    "%s",
    (_, args, expected) => {
      expect(transportBlock(...args)).toBe(expected ?? byTheClause(...args));
    },
  );

  test("all but 156 elements of a block are ignored", () => {
    expect(transportBlock(50, 14, 6, 873, 2, 0)).toBe(transportBlock(50, 14, 6, 873, 2, 12));
    expect(transportBlock(50, 14, 6, 873, 2, 12)).toBeGreaterThan(transportBlock(50, 14, 6, 873, 2, 18));
  });
});

test.each([
  [() => transportBlock(0, 12, 2, 308, 1), "blocks is 0; allowed: a whole number of resource blocks from 1 to 275."],
  [() => transportBlock(1, 15, 2, 308, 1), "symbols is 15"],
  [() => transportBlock(1, 12, 3, 308, 1), "modulationBits is 3; allowed: 1, 2, 4, 6, 8 or 10 bits a symbol."],
  [() => transportBlock(1, 12, 2, 1024, 1), "codeRate1024 is 1024"],
  [() => transportBlock(1, 12, 2, 308, 5), "layers is 5; allowed: 1 to 4 layers (of one codeword)."],
  [
    () => transportBlock(1, 1, 2, 308, 1, 12),
    "dmrsPerBlock is 12; allowed: with overheadPerBlock 0 fewer than the 12 resource elements of 1 symbols.",
  ],
  [() => transportBlock(1, 12, 2, 308, 1, 12, -1), "overheadPerBlock is -1"],
])("bad input %# is named", (call, message) => {
  expect(call).toThrow(message);
});
