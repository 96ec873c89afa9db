import * as load from "../../../src/model/interference/load";
import * as margin from "../../../src/model/interference/margin";
import * as sinr from "../../../src/model/interference/sinr";
import * as noise from "../../../src/model/radio/noise";
import * as power from "../../../src/model/radio/power";
import reference from "../../fixtures/interference/closed-forms.json";
import { decibelError } from "../../support/decibel-error";
import { relativeError } from "../../support/relative-error";

type Row = readonly [unknown[], number];

function worst(rows: unknown, f: (...args: never[]) => number, error = decibelError): number {
  return Math.max(
    ...(rows as Row[]).map(([args, expected]) =>
      error(f(...(args.map((value) => value ?? undefined) as never[])), expected),
    ),
  );
}

describe("formulas against 50-digit values", () => {
  test.each([
    ["sum", power.sum],
    ["floor", noise.floor],
    ["cascade", noise.cascade],
    ["fromPowers", sinr.fromPowers],
    ["ebN0", sinr.ebN0],
    ["reuse", sinr.reuse],
    ["uplink", sinr.uplink],
    ["downlink", sinr.downlink],
    ["adjacent", sinr.adjacent],
  ] as const)("%s, in decibel, stays within 2e-14", (name, f) => {
    expect(worst(reference[name], f)).toBeLessThan(2e-14);
  });

  test.each([
    ["marginFromLoad", margin.fromLoad],
    ["marginToLoad", margin.toLoad],
    ["marginFromPowers", margin.fromPowers],
    ["neighbourLoad", margin.neighbourLoad],
    ["loadUplink", load.uplink],
    ["loadDownlink", load.downlink],
  ] as const)("%s keeps relative accuracy down to the smallest values", (name, f) => {
    expect(worst(reference[name], f, relativeError)).toBeLessThan(2e-15);
  });
});
