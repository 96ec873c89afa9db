import * as nr from "../../../src/model/standards/nr";
import { publishedValue, title } from "../../checks/published";

const cases = (...ids: string[]): [string, string][] => ids.map((id) => [title(publishedValue(id)), id]);
const within = (id: string, value: number): void => {
  const { expected, tolerance } = publishedValue(id);
  expect(Math.abs(value - expected)).toBeLessThanOrEqual(tolerance!);
};
/** Channel whose resource blocks a published value starts from. */
const BANDWIDTH: Record<string, number> = { "273/1": 100, "106/0": 20, "25/0": 5, "24/2": 20 };

function peakOf(id: string): number {
  const { N_RB, mu, layers, Qm, OH, f } = publishedValue(id).inputs as Record<string, number>;
  const bandwidth = BANDWIDTH[`${N_RB}/${mu}`]!;
  expect(nr.blocks(bandwidth, 15 * 2 ** mu!)).toBe(N_RB);
  return nr.peak(bandwidth, 15 * 2 ** mu!, layers, Qm, f ?? 1, OH);
}

describe("published values", () => {
  test.each(cases("OF-P1", "OF-P2", "OF-P3", "OF-P6", "OF-P7"))("%s", (_, id) => within(id, peakOf(id)));

  // The source leaves the highest code rate out.
  test.each(cases("OF-P10", "OF-P12"))("%s", (_, id) => within(id, (peakOf(id) * 1024) / 948));
});

test("every factor of the peak rate is a factor", () => {
  const whole = nr.peak(100, 30, 4, 8, 1, 0, 1, 1);
  expect(nr.peak(100, 30, 2, 8, 1, 0)).toBeCloseTo(whole / 2, 9);
  expect(nr.peak(100, 30, 4, 6, 1, 0)).toBeCloseTo(0.75 * whole, 9);
  expect(nr.peak(100, 30, 4, 8, 0.75, 0)).toBeCloseTo(0.75 * whole, 9);
  expect(nr.peak(100, 30, 4, 8, 1, 0.14, 1, 0.7)).toBeCloseTo(0.86 * 0.7 * whole, 9);
  expect(nr.peak(400, 120, 2, 6, 1, 0.18, 2)).toBeCloseTo(264 * 168 * 8 * 2 * 6 * (948 / 1024) * 0.82 * 1e-3, 9);
  expect(nr.peak(100, 30, 4, 8, 1, 1)).toBe(0);
});

test.each([
  [() => nr.peak(100, 30, 9), "layers is 9; allowed: a whole number of layers from 1 to 8."],
  [() => nr.peak(100, 30, 4, 7), "modulationBits is 7"],
  [() => nr.peak(100, 30, 4, 8, 0), "scaling is 0"],
  [() => nr.peak(100, 30, 4, 8, 1, 1.1), "overheadShare is 1.1"],
  [() => nr.peak(100, 30, 4, 8, 1, 0.14, 1, 2), "timeShare is 2"],
  [() => nr.peak(100, 240), "subcarrierKHz is 240"],
])("bad input %# is named", (call, message) => {
  expect(call).toThrow(message);
});
