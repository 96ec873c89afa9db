import * as lte from "../../../src/model/standards/lte";
import { publishedValue, title } from "../../checks/published";

describe("published values", () => {
  test.each(
    [
      ["OF-O6", lte.peak(20, 1, 6, 1, 0)],
      // One bit a symbol: the symbol rate.
      ["OF-O7", lte.peak(10, 1, 1, 1, 0)],
    ].map(([id, value]) => [title(publishedValue(id as string)), id, value] as [string, string, number]),
  )("%s", (_, id, value) => {
    const { expected, tolerance } = publishedValue(id);
    expect(Math.abs(value - expected)).toBeLessThanOrEqual(tolerance!);
  });
});

test("blocks, symbols, layers, bits, code rate and overhead", () => {
  expect(lte.peak(20)).toBeCloseTo(100 * 168 * 2 * 6 * 0.925781 * 0.75 * 1e-3, 10);
  expect(lte.peak(1.4, 4, 8, 1, 0)).toBeCloseTo(6 * 168 * 32 * 1e-3, 10);
});

test.each([
  [() => lte.peak(7), "bandwidthMHz is 7; allowed: 1.4, 3, 5, 10, 15 or 20 MHz."],
  [() => lte.peak(20, 0), "layers is 0; allowed: a whole number of layers from 1 to 8."],
  [() => lte.peak(20, 2, 5), "modulationBits is 5"],
  [() => lte.peak(20, 2, 6, 1.1), "codeRate is 1.1"],
  [() => lte.peak(20, 2, 6, 0.9, -0.1), "overheadShare is -0.1"],
])("bad input %# is named", (call, message) => {
  expect(call).toThrow(message);
});
