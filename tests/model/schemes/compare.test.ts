import { schemeCompare } from "../../../functions/scheme";
import { standardProfile } from "../../../functions/standard";
import * as erlangB from "../../../src/model/blocking/erlang-b";
import { DomainError } from "../../../src/model/errors";
import * as cdma from "../../../src/model/schemes/cdma";
import { compare } from "../../../src/model/schemes/compare";
import * as fdma from "../../../src/model/schemes/fdma";
import * as ofdma from "../../../src/model/schemes/ofdma";
import * as tdma from "../../../src/model/schemes/tdma";

/** An invented service on 10 MHz. */
const FACTS = {
  bandwidthMHz: 10,
  bitRateKbps: 12.2,
  trafficPerUserE: 0.025,
  blocking: 0.02,
  activity: 0.67,
  ebN0Db: 5,
  clusterSize: 4,
  sectors: 3,
  channelSpacingKHz: 25,
  carrierSpacingKHz: 200,
  slotsPerCarrier: 8,
  chipRateMcps: 3.84,
  otherCellRatio: 0.55,
  blockBandwidthKHz: 180,
  spectralEfficiency: 1.5,
};
const rows = (changes: Record<string, number> = {}): ReturnType<typeof compare> =>
  compare(new Map(Object.entries({ ...FACTS, ...changes })));

describe("each row is that of the single functions", () => {
  test.each([0, 3])("with %d control channels", (control) => {
    const [f, t, c, o] = rows({ controlChannels: control, guardKHz: 400 });
    const channels = fdma.channels(10, 25, 4, 3, 400, control);
    expect(f).toEqual([
      "FDMA",
      channels,
      erlangB.traffic(channels, 0.02),
      fdma.subscribers(10, 25, 4, 0.025, 0.02, 3, 400, control),
      "frequency channels",
    ]);
    expect(t!.slice(1, 4)).toEqual([
      tdma.channels(10, 200, 8, 4, 3, 400, control),
      erlangB.traffic(tdma.channels(10, 200, 8, 4, 3, 400, control), 0.02),
      tdma.subscribers(10, 200, 8, 4, 0.025, 0.02, 3, 400, control),
    ]);
    const bearers = ofdma.channels(Math.floor(9600 / 180), 180, 12.2, 1.5) - control;
    const erlangs = erlangB.traffic(bearers, 0.02);
    expect(o).toEqual(["OFDMA", bearers, erlangs, Math.floor(erlangs / 0.025), "resource blocks"]);
    // The guard leaves room for one carrier of 5 MHz.
    const users = 0.75 * cdma.pole(3.84, 12.2, 5, 0.67, 0.55) - control;
    expect(c!.slice(1, 3)).toEqual([Math.floor(users), cdma.softTraffic(users, 0.55, 0.02)]);
    expect(c![4]).toBe("uplink load");
  });
  test("one carrier without control is CDMA.SUBSCRIBERS, and 10 MHz hold two", () => {
    const one = rows({ bandwidthMHz: 5 })[2]!;
    expect(one[3]).toBe(cdma.subscribers(3.84, 12.2, 5, 0.67, 0.55, 0.025, 0.02));
    expect(rows()[2]![1]).toBe(Math.floor(2 * 0.75 * cdma.pole(3.84, 12.2, 5, 0.67, 0.55)));
    expect(rows({ codeCarrierSpacingKHz: 2500 })[2]![1]).toBe(
      Math.floor(4 * 0.75 * cdma.pole(3.84, 12.2, 5, 0.67, 0.55)),
    );
  });
  test("the downlink limits where it serves fewer", () => {
    const row = rows({ downlinkEbN0Db: 7, orthogonality: 0.6 })[2]!;
    const channels = 2 * cdma.downlinkChannels(3.84, 12.2, 7, 0.67, 0.55, 0.6);
    expect(row.slice(1, 3)).toEqual([channels, erlangB.traffic(channels, 0.02)]);
    expect(row[4]).toBe("downlink power");
    expect(rows({ downlinkEbN0Db: 1, orthogonality: 0.9 })[2]![4]).toBe("uplink load");
  });
});

test("a scheme without its parameters says which; the others are answered", () => {
  const facts = new Map(Object.entries(FACTS));
  facts.delete("slotsPerCarrier");
  facts.set("orthogonality", 0.6);
  const answer = compare(facts);
  expect(answer[1]).toEqual(["TDMA", "", "", "", "missing: slotsPerCarrier"]);
  expect(answer[2]![4]).toBe("missing: downlinkEbN0Db");
  expect(answer[0]![1]).toBeGreaterThan(0);
});

test("no spectrum beside the guard leaves no channel in any scheme", () => {
  for (const row of rows({ guardKHz: 10_000 })) expect(row.slice(1)).toEqual([0, 0, 0, "no channel is left"]);
});

test("more blocks than the spectrum holds are not the same spectrum", () => {
  expect(() => rows({ blocks: 56 })).toThrow(DomainError);
  expect(rows({ blocks: 50 })[3]![1]).toBe(ofdma.channels(50, 180, 12.2, 1.5));
});

describe("as a table", () => {
  const table = [["parameter", "value"], ...Object.entries(FACTS)];
  test("headings first, four schemes, further rows ignored", () => {
    const answer = schemeCompare([...table, ["colour", "red"], ["", ""]]);
    expect(answer[0]).toEqual(["scheme", "channels", "erlangs", "subscribers", "limitedBy"]);
    expect(answer.slice(1)).toEqual(rows().map((row) => [...row]));
  });
  test("a profile of a standard goes in as it is", () => {
    const service = Object.entries(FACTS).slice(0, 4);
    const answer = schemeCompare([
      ...standardProfile([["GSM"]]),
      ...[...service, ["clusterSize", 4]].map((r) => [...r, ""]),
    ]);
    expect(answer[2]!.slice(0, 2)).toEqual(["TDMA", tdma.channels(10, 200, 8, 4, 1, 0, 0)]);
  });
  test.each([
    [[...table.slice(0, -1), ["spectralEficiency", 1.5]], /spectralEfficiency, misspelt/],
    [[...table, ["sectors", 3]], /sectors twice/],
    [[...table.slice(0, 1), ["blocking", 2]], /blocking is 2/],
    [[...table.slice(0, 1), ["sectors", "three"]], /sectors is the text/],
    [table.slice(1), /first row/],
  ])("refused: %#", (cells, message) => {
    expect((schemeCompare(cells)[0]![0] as { message: string }).message).toMatch(message);
  });
  test("blank in, blank out", () => {
    expect(schemeCompare([["", ""]])).toEqual([[""]]);
  });
});
