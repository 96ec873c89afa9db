import { DomainError } from "../../../src/model/errors";
import * as timing from "../../../src/model/codes/timing";
import { profile, STANDARD_NAMES } from "../../../src/model/standards/profiles";
import { standardProfile } from "../../../functions/standard";
import { checkPublished } from "../../support/published-check";

function fact(standard: string, parameter: string): number {
  const found = profile(standard).find(([name]) => name === parameter);
  if (typeof found?.[1] !== "number") throw new Error(`${standard} has no number ${parameter}`);
  return found[1];
}

describe("published values", () => {
  checkPublished("TT-01", () => fact("GSM", "stepUs"));
  checkPublished("TT-02", () => fact("GSM", "slotUs") / 1000);
  checkPublished("TT-03", () => fact("GSM", "frameMs"));
  checkPublished("TT-04", () => fact("GSM", "grossRateKbps"));
  checkPublished("TT-10", () => fact("GSM", "guardTimeUs"));
  checkPublished("TT-17", () => fact("TETRA", "frameMs"));
  checkPublished("TT-20", () => fact("TETRA", "slotsPerCarrier"));
  checkPublished("TT-21", () => timing.radius(fact("TETRA", "guardTimeUs"), 0, 0));
  checkPublished("TT-22", () => fact("DMR", "channelSpacingKHz"));
  checkPublished("TT-24", () => fact("DMR", "slotUs") / 1000);
  checkPublished("TT-26", () => fact("dPMR", "channelSpacingKHz"));
  checkPublished("TT-28", () => fact("P25", "grossRateKbps") * 1000);
  checkPublished("TT-31", () => fact("DECT", "carrierSpacingKHz"));
  checkPublished("TT-33", () => fact("DECT", "grossRateKbps"));
  checkPublished("TT-42", () => timing.radius(0, fact("LTE", "advanceSteps"), fact("LTE", "stepUs")));
  checkPublished("TT-44m0", () => timing.radius(0, fact("NR", "advanceSteps"), fact("NR", "stepUs")));
});

test("slots fill the frame of every time-division standard, for DECT in both directions", () => {
  for (const [name, directions] of [
    ["TETRA", 1],
    ["DMR", 1],
    ["GSM", 1],
    ["DECT", 2],
  ] as const) {
    const filled = directions * fact(name, "slotsPerCarrier") * fact(name, "slotUs");
    expect(Math.abs(filled - 1000 * fact(name, "frameMs"))).toBeLessThan(1e-9);
  }
});

test.each(STANDARD_NAMES)("%s names its scheme, the facts of it, and a source for each", (name) => {
  const scheme = profile(name).find(([parameter]) => parameter === "scheme")![1];
  const needed = {
    FDMA: "channelSpacingKHz",
    TDMA: "slotsPerCarrier",
    CDMA: "chipRateMcps",
    OFDMA: "blockBandwidthKHz",
  };
  expect(fact(name, needed[scheme as keyof typeof needed])).toBeGreaterThan(0);
  for (const [, , source] of profile(name)) expect(source).toMatch(/^(ETSI (EN|TS)|3GPP TS|TIA-102)/);
  expect(new Set(profile(name).map(([parameter]) => parameter)).size).toBe(profile(name).length);
});

test("names in any case; others are refused", () => {
  expect(standardProfile([["dpmr"]])).toEqual(standardProfile([["dPMR"]]));
  expect(standardProfile([["gsm"]])[0]).toEqual(["parameter", "value", "source"]);
  expect(() => profile("WIRE")).toThrow(DomainError);
  expect(String(standardProfile([["WIRE"]])[0]![0])).toBe("#VALUE!");
});
