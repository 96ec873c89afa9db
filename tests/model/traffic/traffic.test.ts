import fc from "fast-check";
import { DomainError } from "../../../src/model/errors";
import * as traffic from "../../../src/model/traffic/traffic";
import { checkPublished } from "../../support/published-check";
import { relativeError } from "../../support/relative-error";

describe("published values", () => {
  checkPublished("TA-02", (i) => traffic.calls(1, i["calls_per_h"]!, i["holding_s"]!));
  checkPublished("TA-05", (i) => traffic.perUser(i["calls_per_h"]!, i["holding_s"]!));
  checkPublished("TA-09", (i) => traffic.calls(i["calls_per_h"]!, 1, i["holding_s"]!));
  checkPublished("TA-08", (i) => {
    const lines = i["population"]! * i["penetration"]!;
    const toLine = traffic.calls(lines * i["share_ML"]!, i["calls_ML"]!, i["h_ML_s"]!);
    return toLine + traffic.calls(lines * (1 - i["share_ML"]!), i["calls_MM"]!, i["h_MM_s"]!);
  });
});

test("data: 500 users with 200 MB a day, 8 % of it in the busy hour, send 500 x 16 MB in 3600 s", () => {
  expect(relativeError(traffic.data(500, 200, 0.08), (500 * 16 * 8) / 3600)).toBeLessThan(1e-15);
});
test("peakLevel: the median is the mean, the quantile of 97.725 % lies two deviations above, and no level is negative", () => {
  expect(traffic.peakLevel(50, 0.3, 0.5)).toBe(50);
  expect(traffic.peakLevel(50, 0.1, 0.977249868051821)).toBeCloseTo(60, 10);
  expect(traffic.peakLevel(50, 2, 0.01)).toBe(0);
});
test("group: a call to every site loads each site as if it were alone", () => {
  fc.assert(
    fc.property(fc.integer({ min: 1, max: 50 }), fc.double({ min: 0, max: 100, noNaN: true }), (sites, groups) => {
      expect(relativeError(traffic.group(groups, 6, 20, sites, sites), traffic.calls(groups, 6, 20))).toBeLessThan(
        1e-14,
      );
    }),
    { seed: 11 },
  );
});
test.each([
  () => traffic.calls(-1, 1, 1),
  () => traffic.calls(1, NaN, 1),
  () => traffic.data(1, 1, 1.01),
  () => traffic.peakLevel(1, 1, 1),
  () => traffic.group(1, 1, 1, 1, 0),
])("outside the domain: %#", (call) => {
  expect(call).toThrow(DomainError);
});
