import { DomainError } from "../../../src/model/errors";
import * as tdd from "../../../src/model/standards/tdd";
import { relativeError } from "../../support/relative-error";

/** Counts of subframes as the table is often restated, and OFDM symbols of the special subframe: both independent of Ts. */
describe("3GPP TS 36.211, table 4.2-2, uplink-downlink configurations: D, S and U subframes of ten", () => {
  test.each([
    [0, 2, 2, 6],
    [1, 4, 2, 4],
    [2, 6, 2, 2],
    [3, 6, 1, 3],
    [4, 7, 1, 2],
    [5, 8, 1, 1],
    [6, 3, 2, 5],
  ])("configuration %i: %i, %i, %i", (configuration, down, special, up) => {
    const [downlink, uplink, guard] = tdd.share(configuration, 7);
    expect(relativeError(downlink, (down + (special * 21952) / 30720) / 10)).toBeLessThan(1e-15);
    expect(relativeError(uplink, (up + (special * 4384) / 30720) / 10)).toBeLessThan(1e-15);
    expect(relativeError(guard, (special * 4384) / 307200)).toBeLessThan(1e-15);
  });
});

describe("3GPP TS 36.211, table 4.2-1, special subframes: DwPTS, GP and UpPTS in OFDM symbols", () => {
  // The first symbol of each slot has a cyclic prefix of 160 Ts, the others 144 Ts, beside 2048 Ts of the symbol itself.
  const lengths = Array.from({ length: 14 }, (_, symbol) => 2048 + (symbol % 7 === 0 ? 160 : 144));
  const sum = (from: number, to: number): number => lengths.slice(from, to).reduce((a, b) => a + b, 0);
  test.each([
    [0, 3, 10, 1],
    [1, 9, 4, 1],
    [2, 10, 3, 1],
    [3, 11, 2, 1],
    [4, 12, 1, 1],
    [5, 3, 9, 2],
    [6, 9, 3, 2],
    [7, 10, 2, 2],
    [8, 11, 1, 2],
    [9, 6, 6, 2],
    [10, 6, 2, 6],
  ])("special configuration %i: %i, %i, %i", (special, down, guard, up) => {
    const shares = tdd.share(5, special);
    const inSubframe = [shares[0] * 10 - 8, shares[2] * 10, shares[1] * 10 - 1].map((part) => Math.round(part * 30720));
    expect(inSubframe).toEqual([sum(0, down), sum(down, down + guard), sum(14 - up, 14)]);
  });
});

test("the shares fill the time whatever the configurations", () => {
  for (let configuration = 0; configuration <= 6; configuration++) {
    for (let special = 0; special <= 10; special++) {
      const [downlink, uplink, guard] = tdd.share(configuration, special);
      expect(Math.abs(downlink + uplink + guard - 1)).toBeLessThan(1e-15);
    }
  }
});

test("special configuration 7 is the default", () => {
  expect(tdd.share(1)).toEqual(tdd.share(1, 7));
});

test.each([
  [7, 0],
  [-1, 0],
  [1.5, 0],
  [0, 11],
])("configuration %d with special %d is not in the tables", (configuration, special) => {
  expect(() => tdd.share(configuration, special)).toThrow(DomainError);
});
