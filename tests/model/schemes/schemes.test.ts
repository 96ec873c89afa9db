import fc from "fast-check";
import * as erlangB from "../../../src/model/blocking/erlang-b";
import { DomainError, NoAnswerError } from "../../../src/model/errors";
import * as load from "../../../src/model/interference/load";
import { carriers } from "../../../src/model/plan/carriers";
import * as noise from "../../../src/model/radio/noise";
import * as cdma from "../../../src/model/schemes/cdma";
import * as fdma from "../../../src/model/schemes/fdma";
import * as ofdma from "../../../src/model/schemes/ofdma";
import { subscribersOf } from "../../../src/model/schemes/subscribers";
import * as tdma from "../../../src/model/schemes/tdma";
import * as voice from "../../../src/model/schemes/voice";
import { checkPublished } from "../../support/published-check";
import { relativeError } from "../../support/relative-error";

const MEGA = 1e6;
const KILO = 1e3;

describe("published values", () => {
  checkPublished("FD-01", (i) => fdma.channels(i["Bt_Hz"]! / MEGA, i["Bc_Hz"]! / KILO, 1, 1, (2 * i["Bg_Hz"]!) / KILO));
  checkPublished("FD-02", (i) => tdma.channels(i["Bt_Hz"]! / MEGA, i["Bc_Hz"]! / KILO, i["slots"]!, 1, 1, 0, 0));
  checkPublished("FD-03", (i) => fdma.channels(i["Bt_Hz"]! / MEGA, i["Bc_duplex_Hz"]! / KILO, i["N_cluster"]!));
  checkPublished("FD-05", (i) =>
    tdma.channels(i["Bt_Hz"]! / MEGA, i["Bc_Hz"]! / KILO, i["users_per_channel"]!, i["N_cluster"]!, 1, 0, 0),
  );
  checkPublished("FD-21", (i) => subscribersOf(i["N_channels"]!, i["Au_erlang"]!, i["B"]!));
  checkPublished("FD-22", (i) => fdma.channels(i["Bt_Hz"]! / MEGA, i["Bc_Hz"]! / KILO, i["N_cluster"]!));
  const decibels = (linear: number): number => 10 * Math.log10(linear);
  checkPublished("CD-01", (i) => cdma.pole(i["W_Hz"]! / MEGA, i["R_bps"]! / KILO, decibels(i["EbN0_linear"]!), 1, 0));
  checkPublished(
    "CD-02",
    (i) =>
      i["sectors"]! * cdma.pole(i["W_Hz"]! / MEGA, i["R_bps"]! / KILO, decibels(i["EbN0_linear"]!), i["activity"]!, 0),
  );
  checkPublished("CD-32", (i) => 1 / (cdma.pole(1, 1, 0, 1, 0, i["sigma_dB"]) / cdma.pole(1, 1, 0, 1, 0)));
  for (const id of ["CD-61s", "CD-63s", "CD-64s", "CD-65s"]) {
    checkPublished(id, (i) => cdma.softTraffic(i["N_channels_real"]!, i["i_other"]!, i["B"]!));
  }
  for (const id of ["CD-62h", "CD-64h", "CD-65h"]) {
    checkPublished(id, (i) => cdma.softTraffic(i["N_channels_real"]!, 0, i["B"]!));
  }
  // The published power has no common channels: -300 dBm is none.
  checkPublished("CD-50", (i) => {
    const floor = noise.floor(i["W_cps"]! / MEGA, i["NF_dB"]!, i["T_K"]);
    const args = [[i["EbN0_dB"]!], [i["R_bps"]! / KILO], [i["activity"]!], [i["N_users"]!]] as const;
    const orthogonality = i["alpha_orthogonality"]!;
    const dbm = cdma.downlinkPower(
      ...args,
      i["W_cps"]! / MEGA,
      i["i_other"]!,
      orthogonality,
      floor,
      i["L_mean_dB"]!,
      -300,
    );
    return 10 ** (dbm / 10) / 1000;
  });
  checkPublished("OF-V1", (i) => voice.bitRate(i["R_kbps"]!, i["T_ms"]!, 0) * i["T_ms"]!);
});

describe("carriers and slots", () => {
  test("decimal bandwidths that do not divide evenly in binary give whole channels", () => {
    expect(fdma.channels(1.1, 12.5, 1)).toBe(88);
    expect(fdma.channels(0.3, 0.1, 1)).toBe(3000);
    expect(tdma.channels(25.2, 0.2, 1, 1, 1, 0, 0)).toBe(126_000);
  });
  test("a cluster and its sectors share whole carriers; control comes off; nothing goes below 0", () => {
    expect(tdma.channels(10, 200, 8, 4, 3)).toBe(31);
    expect(tdma.channels(10, 200, 8, 4, 3, 400)).toBe(31);
    expect(fdma.channels(0.1, 25, 7)).toBe(0);
    expect(fdma.channels(1, 25, 4, 1, 0, 50)).toBe(0);
  });
  test("subscribers are floored Erlang-B traffic, and control slots keep the default of one", () => {
    const group = tdma.channels(10, 200, 8, 4);
    expect(group).toBe(12 * 8 - 1);
    expect(tdma.subscribers(10, 200, 8, 4, 0.025, 0.02)).toBe(Math.floor(erlangB.traffic(group, 0.02) / 0.025));
  });
  test("carriers are minimal", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.01, max: 500, noNaN: true }),
        fc.integer({ min: 1, max: 16 }),
        fc.integer({ min: 0, max: 3 }),
        (a, perCarrier, control) => {
          const n = carriers(a, 0.02, perCarrier, control);
          expect(erlangB.blocking(a, n * perCarrier - control)).toBeLessThanOrEqual(0.02);
          const fewer = (n - 1) * perCarrier - control;
          if (fewer >= 0) expect(erlangB.blocking(a, fewer)).toBeGreaterThan(0.02);
        },
      ),
      { seed: 3 },
    );
    expect(carriers(0, 0.02, 8, 1)).toBe(0);
  });
});

describe("code division", () => {
  test("at the pole the uplink load is 1", () => {
    const users = cdma.pole(3.84, 12.2, 5, 0.67, 0.55);
    expect(relativeError(load.uplink([5], [12.2], [0.67], [users], 3.84, 0.55), 1)).toBeLessThan(1e-14);
  });
  test("the users of a planned load do not exceed it and one more would", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.1, max: 0.9, noNaN: true }),
        fc.double({ min: 1, max: 9, noNaN: true }),
        (limit, ebN0) => {
          const users = cdma.channels(3.84, 12.2, ebN0, 0.5, 0.6, limit);
          const used = (n: number): number => load.uplink([ebN0], [12.2], [0.5], [n], 3.84, 0.6);
          expect(used(users)).toBeLessThanOrEqual(limit * (1 + 1e-11));
          expect(used(users + 1)).toBeGreaterThan(limit);
        },
      ),
      { seed: 5 },
    );
  });
  test("a perfect multi-user receiver with quiet neighbours has no limit", () => {
    expect(() => cdma.pole(3.84, 12.2, 5, 0.67, 0, 0, 1)).toThrow(NoAnswerError);
    expect(() => cdma.downlinkChannels(3.84, 12.2, 5, 0.67, 0, 1)).toThrow(NoAnswerError);
  });
  test("no power serves users at or above the pole", () => {
    expect(() => cdma.downlinkPower([7], [12.2], [0.58], [200], 3.84, 0.65, 0.6, -99, 130, 33)).toThrow(NoAnswerError);
  });
  test("power without users is that of the common channels", () => {
    expect(cdma.downlinkPower([7], [12.2], [0.58], [0], 3.84, 0.65, 0.6, -99, 130, 33)).toBeCloseTo(33, 12);
  });
  test("common channels beyond the load limit leave no users", () => {
    expect(cdma.downlinkChannels(3.84, 12.2, 7, 0.58, 0.65, 0.6, 0.2, 0.3)).toBe(0);
  });
});

describe("blocks and packets", () => {
  test("bearers share the blocks that overhead leaves", () => {
    expect(ofdma.channels(100, 180, 100, 1, 0)).toBe(180);
    expect(ofdma.channels(100, 180, 100, 1, 0.25, 3)).toBe(45);
  });
  test("voice packets take whole blocks", () => {
    expect(ofdma.packetVoice(50, 20, 1, 1, 1)).toBe(1000);
    expect(ofdma.packetVoice(50, 20, 3, 1, 1)).toBe(333);
  });
  test("compressed headers shrink a voice bearer", () => {
    expect(voice.bitRate(12.2, 20, 40)).toBeCloseTo(28.2, 12);
    expect(voice.bitRate(12.2, 20, 3, 0.5)).toBeCloseTo(6.7, 12);
  });
});

test.each([
  () => fdma.channels(0, 25, 1),
  () => fdma.channels(1, 25, 1.5),
  () => tdma.channels(1, 25, 0, 1),
  () => cdma.pole(3.84, 12.2, 5, 0, 0.5),
  () => cdma.channels(3.84, 12.2, 5, 0.5, 0.5, 1),
  () => ofdma.channels(50, 180, 64, 1, 1),
  () => voice.bitRate(12.2, 0, 40),
  () => carriers(1, 0.02, 0),
])("outside the domain: %#", (call) => {
  expect(call).toThrow(DomainError);
});
