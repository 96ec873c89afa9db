import fc from "fast-check";
import { DomainError } from "../../../src/model/errors";
import * as load from "../../../src/model/interference/load";
import * as margin from "../../../src/model/interference/margin";
import * as sinr from "../../../src/model/interference/sinr";
import { publishedValue, title, type Published } from "../../checks/published";
import { relativeError } from "../../support/relative-error";

function within({ expected, tolerance }: Published, actual: number): void {
  expect(Math.abs(actual - expected)).toBeLessThanOrEqual(tolerance!);
}

/** Load of one user of one service, whatever the entry calls its inputs. */
function oneUser(inputs: Record<string, number>): number {
  const other = inputs["i_other_to_own"] ?? inputs["other_cell"] ?? 0;
  const db = inputs["EbN0_dB"]!;
  return load.uplink([db], [inputs["R_bps"]! / 1000], [inputs["activity"]!], [1], inputs["W_cps"]! / 1e6, other);
}

describe("uplink load beside published values", () => {
  test.each(["CB-07", "CD-10"].map((id) => [title(publishedValue(id)), publishedValue(id)] as const))(
    "%s",
    (_, entry) => within(entry, oneUser(entry.inputs as Record<string, number>)),
  );

  test(title(publishedValue("CD-11")), () => {
    const perUser = oneUser(publishedValue("CD-10").inputs as Record<string, number>);
    within(publishedValue("CD-11"), Math.floor(0.5 / perUser));
  });

  test(title(publishedValue("CD-70")), () => {
    const entry = publishedValue("CD-70");
    const services = entry.inputs["services"] as unknown as Record<"n" | "R_bps" | "EbN0_dB" | "activity", number>[];
    within(
      entry,
      load.uplink(
        services.map(({ EbN0_dB }) => EbN0_dB),
        services.map(({ R_bps }) => R_bps / 1000),
        services.map(({ activity }) => activity),
        services.map(({ n }) => n),
        (entry.inputs["W_cps"] as number) / 1e6,
        entry.inputs["i_other"] as number,
      ),
    );
  });

  test.each(["CD-13", "CD-14"].map((id) => [title(publishedValue(id)), publishedValue(id)] as const))(
    "%s",
    (_, entry) => {
      const { W_cps, EbN0_dB, other_cell, load: share } = entry.inputs as Record<string, number>;
      // The source leaves the own signal out of the load, which a vanishing bit rate does as well.
      const perKbps = load.uplink([EbN0_dB!], [1e-9], [1], [1e9], W_cps! / 1e6, other_cell!);
      const throughput = share! / perKbps;
      expect(relativeError(throughput, entry.expected)).toBeLessThan(1e-10);
    },
  );

  test(title(publishedValue("CD-02")), () => {
    const { W_Hz, R_bps, EbN0_linear, activity, sectors } = publishedValue("CD-02").inputs as Record<string, number>;
    const db = 10 * Math.log10(EbN0_linear!);
    const perUser = load.uplink([db], [R_bps! / 1000], [activity!], [1], W_Hz! / 1e6, 0);
    within(publishedValue("CD-02"), sectors! / perUser);
  });

  test(title(publishedValue("CD-01")), () => {
    const { W_Hz, R_bps, EbN0_linear } = publishedValue("CD-01").inputs as Record<string, number>;
    const perUser = load.uplink([10 * Math.log10(EbN0_linear!)], [R_bps! / 1000], [1], [1], W_Hz! / 1e6, 0);
    within(publishedValue("CD-01"), 1 / perUser);
  });
});

describe("downlink load beside published values", () => {
  test(title(publishedValue("CD-75")), () => {
    const inputs = publishedValue("CD-75").inputs as Record<string, number>;
    const { EbN0_dB, R_bps, activity, N_users, W_cps, i_other, alpha_orthogonality } = inputs;
    within(
      publishedValue("CD-75"),
      load.downlink([EbN0_dB!], [R_bps! / 1000], [activity!], [N_users!], W_cps! / 1e6, i_other!, alpha_orthogonality!),
    );
  });

  test.each(["CD-12", "CD-17", "CD-74"].map((id) => [title(publishedValue(id)), publishedValue(id)] as const))(
    "%s",
    (_, entry) => {
      const inputs = entry.inputs as Record<string, number>;
      const { EbN0_dB, R_bps, activity, W_cps } = inputs;
      const other = inputs["other_cell"] ?? inputs["i_other"]!;
      // The pole without the own signal in the load is the downlink form with codes that are not orthogonal at all.
      const perUser = load.downlink([EbN0_dB!], [R_bps! / 1000], [activity!], [1], W_cps! / 1e6, other, 0);
      within(entry, Number.isInteger(entry.expected) ? Math.floor(1 / perUser) : 1 / perUser);
    },
  );
});

describe("what the formulas mean", () => {
  const service = {
    ebN0Db: fc.double({ min: -5, max: 15, noNaN: true }),
    bitRateKbps: fc.double({ min: 1, max: 2000, noNaN: true }),
    activity: fc.double({ min: 0.01, max: 1, noNaN: true }),
  };

  test("K users at the load of their own requirement meet exactly that requirement", () => {
    // Without activity and other cells: SINR.UPLINK of K users with the noise that the margin leaves gives back Eb/N0.
    fc.assert(
      fc.property(
        service.ebN0Db,
        service.bitRateKbps,
        fc.integer({ min: 1, max: 200 }),
        (ebN0Db, bitRateKbps, users) => {
          const factor = load.uplink([ebN0Db], [bitRateKbps], [1], [users], 3.84, 0);
          fc.pre(factor < 0.999);
          const perUser = factor / users;
          // Received power of one user over noise: his share of the total, times the rise.
          const snrDb = 10 * Math.log10(perUser) + margin.fromLoad(factor);
          expect(sinr.uplink(users, 3.84, bitRateKbps, 1, 0, snrDb)).toBeCloseTo(ebN0Db, 8);
        },
      ),
      { seed: 1 },
    );
  });

  test("services add up, and a multi-user receiver with full efficiency leaves the other cells alone", () => {
    fc.assert(
      fc.property(service.ebN0Db, service.bitRateKbps, service.activity, (a, r, v) => {
        const one = load.uplink([a], [r], [v], [7], 3.84, 0.55);
        const two = load.uplink([3], [64], [1], [2], 3.84, 0.55);
        expect(relativeError(load.uplink([a, 3], [r, 64], [v, 1], [7, 2], 3.84, 0.55), one + two)).toBeLessThan(1e-14);
        expect(load.uplink([a], [r], [v], [7], 3.84, 0, 1)).toBe(0);
        expect(load.downlink([a], [r], [v], [7], 3.84, 0, 1)).toBe(0);
      }),
      { seed: 2 },
    );
  });

  test("nobody, or users who never send, are no load", () => {
    expect(load.uplink([5], [12.2], [0.5], [0], 3.84, 0.55)).toBe(0);
    expect(load.uplink([5], [12.2], [0], [30], 3.84, 0.55)).toBe(0);
    expect(load.downlink([5], [12.2], [0], [30], 3.84, 0.55, 0.5)).toBe(0);
  });
});

test("errors name the parameter", () => {
  expect(() => load.uplink([5], [0], [0.5], [1], 3.84, 0.5)).toThrow("bitRateKbps is 0");
  expect(() => load.uplink([5], [12.2], [1.5], [1], 3.84, 0.5)).toThrow(
    "activity is 1.5; allowed: a share from 0 to 1.",
  );
  expect(() => load.uplink([5], [12.2], [0.5], [1], 3.84, -1)).toThrow("otherCellRatio is -1");
  expect(() => load.uplink([5, 6], [12.2], [0.5], [1], 3.84, 0.5)).toThrow(
    "number of bitRateKbps is 1; allowed: 2, as many as ebN0Db.",
  );
  expect(() => load.downlink([5], [12.2], [0.5], [1], 3.84, 0.5, 2)).toThrow(DomainError);
});
