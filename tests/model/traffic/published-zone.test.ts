/** A zone of a published example from subscribers to sites: growth, traffic, hexagons. */
import * as cell from "../../../src/model/radio/cell";
import * as forecast from "../../../src/model/traffic/forecast";
import * as traffic from "../../../src/model/traffic/traffic";
import { checkPublished } from "../../support/published-check";
import { relativeError } from "../../support/relative-error";

// A subscriber's traffic as calls of one second: its erlang are its calls an hour times 1/3600.
const offered = (subscribers: number, perSubscriberE: number): number =>
  traffic.calls(subscribers, 3600 * perSubscriberE, 1);

// Tolerances are those of the exact values.
checkPublished("FC-03", (i) => offered(i["subs"]!, i["erl_per_sub"]!) / i["A_per_BTS_erlang"]!);
checkPublished("FC-05", (i) => offered(i["subs"]!, i["erl_per_sub"]!) / (i["BTS"]! * i["sectors"]!));
checkPublished("FC-04", (i) => {
  const areaOfSite = i["area_km2"]! / i["BTS"]!;
  // The print rounds the area of a hexagon, 1.5 sqrt(3) R^2, to 2.6 R^2.
  const printed = Math.sqrt(areaOfSite / 2.6);
  const exact = printed * Math.sqrt(2.6 / (1.5 * Math.sqrt(3)));
  expect(relativeError(cell.area(exact), areaOfSite)).toBeLessThan(1e-14);
  return printed;
});

test("the same zone from its first figure to its last: every step takes what the one before gives", () => {
  const subscribers = forecast.compound(50_000, 0.05, 4);
  const sites = offered(subscribers, traffic.perUser(1 / (24 * 6), 150 * 60)) / 24.6;
  expect(sites).toBeCloseTo(42.89133955792683, 9);
  // Sites are whole.
  const radius = Math.sqrt(500 / sites / (1.5 * Math.sqrt(3)));
  expect(cell.sites(500, radius)).toBe(43);
});
