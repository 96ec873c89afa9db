import fc from "fast-check";
import * as erlangB from "../../../src/model/blocking/erlang-b";
import * as multiservice from "../../../src/model/blocking/multiservice";
import { DomainError, NoAnswerError } from "../../../src/model/errors";
import { published, title, type Published } from "../../checks/published";
import reference from "../../fixtures/blocking/multiservice.json";
import { relativeError } from "../../support/relative-error";

/** The promise is 1e-12; the recursion keeps within this up to 100,000 units. */
const TIGHT = 5e-14;

interface Shared {
  readonly units: number;
  readonly trafficE: number[];
  readonly width: number[];
  readonly reserved?: number[];
  readonly blocking: number[];
  readonly utilisation: number;
}

describe("50-digit values", () => {
  const shared: [string, Shared[]][] = [
    ["few units", reference["few units"]],
    ["too wide", reference["too wide"]],
    ["rare blocking", reference["rare blocking"]],
    ["heavy load", reference["heavy load"]],
    ["ten thousand units", reference["ten thousand units"]],
    ["hundred thousand units", reference["hundred thousand units"]],
  ];

  test.each(shared)("%s", (_, cases) => {
    for (const { units, trafficE, width, blocking, utilisation } of cases) {
      const actual = multiservice.blocking(units, trafficE, width);
      const worst = Math.max(...blocking.map((expected, i) => relativeError(actual[i]!, expected)));
      if (!(worst < TIGHT)) expect([units, ...actual]).toEqual([units, ...blocking]);
      expect(relativeError(multiservice.utilisation(units, trafficE, width), utilisation)).toBeLessThan(TIGHT);
    }
  });

  test("tails are among them", () => {
    const all = shared.flatMap(([, cases]) => cases.flatMap(({ blocking }) => blocking));
    expect(Math.min(...all)).toBeLessThan(1e-200);
  });

  test("reservation", () => {
    for (const { units, trafficE, width, reserved, blocking } of reference.reservation) {
      const actual = multiservice.blocking(units, trafficE, width, reserved);
      const worst = Math.max(...blocking.map((expected, i) => relativeError(actual[i]!, expected)));
      if (!(worst < TIGHT)) expect([units, ...actual]).toEqual([units, ...blocking]);
    }
  });
});

describe("published values", () => {
  type Inputs = Record<string, number & number[]>;
  const inputs = (entry: Published): Inputs => entry.inputs as Inputs;
  const check = (entry: Published, actual: number): void => {
    expect(Math.abs(actual - entry.expected)).toBeLessThanOrEqual(entry.tolerance ?? 0);
  };
  const sharing = published("MS-0").map((entry) => [title(entry), entry] as const);

  test.each(sharing.filter(([, { quantity }]) => quantity.startsWith("blocking of class")))("%s", (_, entry) => {
    const { C_capacity_units: c, A_erlang_per_class: a, d_units_per_class: d } = inputs(entry);
    const service = Number(/class (\d)/.exec(entry.quantity)![1]) - 1;
    check(entry, multiservice.blocking(c!, a!, d!)[service]!);
  });
  test.each(sharing.filter(([, { quantity }]) => quantity === "mean occupied units"))("%s", (_, entry) => {
    const { C_capacity_units: c, A_erlang_per_class: a, d_units_per_class: d } = inputs(entry);
    check(entry, multiservice.utilisation(c!, a!, d!) * c!);
  });
  const reserving = published("TR-").filter(({ quantity }) => quantity.endsWith("Roberts approximation"));
  test.each(reserving.map((entry) => [title(entry), entry] as const))("%s", (_, entry) => {
    const { C_capacity_units: c, A_erlang: a, d_units: d, t_reserved_units: t } = inputs(entry);
    const service = Number(/class (\d)/.exec(entry.quantity)![1]) - 1;
    check(entry, multiservice.blocking(c!, a!, d!, t)[service]!);
  });
  // The exact chain differs from the recursion: what the method text calls an approximation is within a tenth here.
  const exact = published("TR-").filter(({ quantity }) => quantity.endsWith("exact 2-D chain"));
  test.each(exact.map((entry) => [title(entry), entry] as const))("near %s", (_, entry) => {
    const { C_capacity_units: c, A_erlang: a, d_units: d, t_reserved_units: t } = inputs(entry);
    const service = Number(/class (\d)/.exec(entry.quantity)![1]) - 1;
    const approximate = multiservice.blocking(c!, a!, d!, t)[service]!;
    expect(relativeError(approximate, entry.expected)).toBeLessThan(0.1);
    expect(relativeError(approximate, entry.expected)).toBeGreaterThan(0.001);
  });
});

const options = { seed: 20261201, numRuns: 150 };
const service = fc.record({
  traffic: fc.double({ min: 0, max: 30, noNaN: true }),
  width: fc.integer({ min: 1, max: 12 }),
});
const services = fc.array(service, { minLength: 1, maxLength: 5 });
const lists = (list: { traffic: number; width: number }[]): [number[], number[]] => [
  list.map(({ traffic }) => traffic),
  list.map(({ width }) => width),
];

describe("identities", () => {
  test("one service of one unit is Erlang B, of d units Erlang B of whole calls", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-3, max: 300, noNaN: true }),
        fc.integer({ min: 0, max: 400 }),
        fc.integer({ min: 1, max: 9 }),
        (traffic, units, width) => {
          const [actual] = multiservice.blocking(units, [traffic], [width]);
          const expected = erlangB.blocking(traffic, Math.floor(units / width));
          if (expected > 1e-300) expect(relativeError(actual!, expected)).toBeLessThan(TIGHT);
        },
      ),
      options,
    );
  });

  test("services of one width are one service", () => {
    const [a, b] = multiservice.blocking(40, [12, 5], [2, 2]);
    expect(a).toBe(b);
    expect(relativeError(a!, erlangB.blocking(17, 20))).toBeLessThan(TIGHT);
  });

  test("a reservation of 0 is none; two services are equally blocked where each leaves what the other needs", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 80 }), services, (units, list) => {
        const [traffic, width] = lists(list);
        const none = multiservice.blocking(units, traffic, width);
        expect(
          multiservice.blocking(
            units,
            traffic,
            width,
            width.map(() => 0),
          ),
        ).toEqual(none);
        const widest = Math.max(...width);
        const equal = multiservice.blocking(
          units,
          traffic,
          width,
          width.map((w) => widest - w),
        );
        expect(new Set(equal).size).toBe(1);
      }),
      options,
    );
  });

  test("the occupied units are those of the calls that are not blocked", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 200 }), services, (units, list) => {
        const [traffic, width] = lists(list);
        const blocking = multiservice.blocking(units, traffic, width);
        const carried = blocking.reduce((sum, b, i) => sum + traffic[i]! * width[i]! * (1 - b), 0);
        const occupied = multiservice.utilisation(units, traffic, width) * units;
        const offered = traffic.reduce((sum, a, i) => sum + a * width[i]!, 0);
        expect(Math.abs(carried - occupied)).toBeLessThanOrEqual(1e-13 * offered + 1e-300);
      }),
      options,
    );
  });

  test("wider calls are blocked more, and reservation shifts blocking to the service that reserves", () => {
    fc.assert(
      fc.property(fc.integer({ min: 12, max: 120 }), services, fc.integer({ min: 1, max: 12 }), (units, list, kept) => {
        const [traffic, width] = lists(list);
        const blocking = multiservice.blocking(units, traffic, width);
        width.forEach((w, i) =>
          width.forEach((v, k) => w <= v && expect(blocking[i]!).toBeLessThanOrEqual(blocking[k]!)),
        );
        const reserved = multiservice.blocking(
          units,
          traffic,
          width,
          width.map((_, i) => (i === 0 ? kept : 0)),
        );
        expect(reserved[0]!).toBeGreaterThanOrEqual(blocking[0]! * (1 - TIGHT));
        for (let i = 1; i < width.length; i++) expect(reserved[i]!).toBeLessThanOrEqual(blocking[i]! * (1 + TIGHT));
      }),
      options,
    );
  });
});

describe("smallest units", () => {
  const targets = fc.double({ min: -12, max: -0.1, noNaN: true }).map((e) => 10 ** e);

  test("is the first number that meets every target", () => {
    fc.assert(
      fc.property(services, fc.array(targets, { minLength: 5, maxLength: 5 }), (list, wanted) => {
        const [traffic, width] = lists(list);
        const blocking = wanted.slice(0, width.length);
        const found = multiservice.units(traffic, width, blocking);
        const meets = (units: number): boolean =>
          multiservice.blocking(units, traffic, width).every((b, i) => b <= blocking[i]!);
        expect(meets(found)).toBe(true);
        for (let units = 0; units < found; units++) if (meets(units)) expect(units).toBe(found);
      }),
      { ...options, numRuns: 60 },
    );
  });

  test("blocking of a wide service may rise with a unit, and the first number still counts", () => {
    // From 5 to 6 units the second service finds its room taken by a third call of the first one more often.
    const [traffic, width] = [
      [10, 0.01],
      [3, 5],
    ] as const;
    const at5 = multiservice.blocking(5, traffic, width)[1]!;
    const at6 = multiservice.blocking(6, traffic, width)[1]!;
    expect(at6).toBeGreaterThan(at5);
    const target = (at5 + at6) / 2;
    expect(multiservice.units(traffic, width, [0.999, target])).toBe(5);
  });

  test("agrees with one service's channels", () => {
    expect(multiservice.units([100], [1], [0.01])).toBe(erlangB.channels(100, 0.01));
    expect(multiservice.units([5000], [3], [1e-9])).toBe(3 * erlangB.channels(5000, 1e-9));
    expect(multiservice.units([20], [7], [1e-250])).toBe(7 * erlangB.channels(20, 1e-250));
    expect(multiservice.units([40000], [1], [1e-250])).toBe(erlangB.channels(40000, 1e-250));
  });

  test("a service without traffic still needs room for a call", () => {
    expect(multiservice.units([0, 0], [4, 9], [0.01, 0.01])).toBe(9);
  });

  test("says how much is needed where 100,000 units are too few", () => {
    expect(() => multiservice.units([1e6], [1], [0.01])).toThrow(NoAnswerError);
    expect(() => multiservice.units([1e6], [1], [0.01])).toThrow("1000000 units of traffic are offered");
    expect(() => multiservice.units([1], [200000], [0.01])).toThrow("widest call takes 200000");
    expect(() => multiservice.units([99900], [1], [1e-9])).toThrow(NoAnswerError);
  });
});

describe("edges", () => {
  test("no units, no traffic, no room", () => {
    expect(multiservice.blocking(0, [1, 0], [1, 2])).toEqual([1, 1]);
    expect(multiservice.blocking(5, [0, 0], [1, 5])).toEqual([0, 0]);
    expect(multiservice.blocking(5, [0, 0], [1, 6])).toEqual([0, 1]);
    expect(multiservice.blocking(5, [3], [1], [5])).toEqual([1]);
    expect(multiservice.utilisation(5, [0], [1])).toBe(0);
    expect(multiservice.utilisation(5, [3], [6])).toBe(0);
  });
  test("an overload beyond all bounds stays within 0 and 1", () => {
    const blocking = multiservice.blocking(100000, [1e9, 1e9, 1e-9], [1, 7, 90000]);
    for (const b of blocking) expect(b > 0.99 && b <= 1).toBe(true);
    expect(multiservice.utilisation(100000, [1e9], [1])).toBeGreaterThan(0.9999);
    expect(multiservice.utilisation(100000, [1e9], [1])).toBeLessThanOrEqual(1);
  });
  test.each([
    ["units", () => multiservice.blocking(-1, [1], [1])],
    ["units", () => multiservice.blocking(1.5, [1], [1])],
    ["units", () => multiservice.blocking(100001, [1], [1])],
    ["units", () => multiservice.blocking(100000, Array<number>(1001).fill(1), Array<number>(1001).fill(1))],
    ["units", () => multiservice.utilisation(0, [1], [1])],
    ["trafficE", () => multiservice.blocking(5, [-1], [1])],
    ["trafficE", () => multiservice.blocking(5, [NaN], [1])],
    ["width", () => multiservice.blocking(5, [1], [0])],
    ["width", () => multiservice.blocking(5, [1], [1.5])],
    ["width", () => multiservice.blocking(5, [1, 2], [1])],
    ["reserved", () => multiservice.blocking(5, [1], [1], [-1])],
    ["reserved", () => multiservice.blocking(5, [1], [1], [1, 2])],
    ["blocking", () => multiservice.units([1], [1], [0])],
    ["blocking", () => multiservice.units([1], [1], [])],
  ])("bad input names %s", (parameter, call) => {
    expect(call).toThrow(DomainError);
    expect(call).toThrow(parameter);
  });
});
