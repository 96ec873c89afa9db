import * as randomAccess from "../../../src/model/blocking/random-access";
import { DomainError } from "../../../src/model/errors";
import { published, publishedValue, title, type Published } from "../../checks/published";
import { relativeError } from "../../support/relative-error";

describe("published values", () => {
  const input = (entry: Published, name: string): number => entry.inputs[name] as number;
  const check = (entry: Published, actual: number): void => {
    expect(Math.abs(actual - entry.expected)).toBeLessThanOrEqual(entry.tolerance!);
  };
  const of = (start: string): (readonly [string, Published])[] =>
    published("RA-")
      .filter(({ quantity }) => quantity.startsWith(start))
      .map((entry) => [title(entry), entry] as const);

  test.each(of("slotted ALOHA throughput"))("%s", (_, entry) =>
    check(entry, randomAccess.throughput(input(entry, "G"))),
  );
  test.each(of("slotted ALOHA maximum"))("%s", (_, entry) => check(entry, randomAccess.throughput(1)));
  // A pure ALOHA attempt is open to others for two slots.
  test.each(of("pure ALOHA maximum"))("%s", (_, entry) => check(entry, randomAccess.throughput(1) / 2));
  test.each(of("pure ALOHA throughput"))("%s", (_, entry) =>
    check(entry, (input(entry, "R_bps") / 1000) * (randomAccess.throughput(2 * input(entry, "G")) / 2)),
  );
  test.each(of("multichannel slotted ALOHA"))("%s", (_, entry) =>
    check(entry, randomAccess.throughput(input(entry, "L_attempts_per_RAO"), input(entry, "M_preambles"))),
  );
  test.each(of("device-view collision"))("%s", (_, entry) =>
    check(entry, 1 - randomAccess.success(input(entry, "L_attempts_per_RAO"), input(entry, "M_preambles"))),
  );
  test.each(of("preamble-view collision"))("%s", (_, entry) => {
    const perChannel = input(entry, "L_attempts_per_RAO") / input(entry, "M_preambles");
    // Neither none nor one on a channel.
    check(entry, 1 - randomAccess.success(perChannel) - randomAccess.throughput(perChannel));
  });
  test(title(publishedValue("RA-17")), () => {
    const entry = publishedValue("RA-17");
    const channels = input(entry, "M_channels");
    check(entry, randomAccess.throughput(channels, channels));
  });
});

test("the largest throughput is at one attempt for each channel", () => {
  for (const channels of [1, 3, 54]) {
    const top = randomAccess.throughput(channels, channels);
    for (const factor of [0.5, 0.999, 1.001, 2])
      expect(randomAccess.throughput(channels * factor, channels)).toBeLessThan(top);
  }
});

test("deep in overload", () => {
  // exp(-700) from mpmath 1.2.1, 20 digits.
  expect(relativeError(randomAccess.success(700), 9.8596765437597708567e-305)).toBeLessThan(1e-13);
  expect(randomAccess.success(1e6)).toBe(0);
  expect(randomAccess.throughput(Number.MAX_VALUE)).toBe(0);
  expect(randomAccess.success(0)).toBe(1);
  expect(randomAccess.throughput(0, 5)).toBe(0);
});

test.each([
  ["attemptsPerSlot", () => randomAccess.success(-1)],
  ["attemptsPerSlot", () => randomAccess.throughput(NaN)],
  ["channels", () => randomAccess.success(1, 0)],
  ["channels", () => randomAccess.throughput(1, 1.5)],
])("bad input names %s", (parameter, call) => {
  expect(call).toThrow(DomainError);
  expect(call).toThrow(parameter);
});
