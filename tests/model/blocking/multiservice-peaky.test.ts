import fc from "fast-check";
import * as engset from "../../../src/model/blocking/engset";
import * as erlangB from "../../../src/model/blocking/erlang-b";
import * as multiservice from "../../../src/model/blocking/multiservice";
import { isTooSmooth } from "../../../src/model/blocking/smooth-stream";
import { DomainError, NoAnswerError } from "../../../src/model/errors";
import { published, title, type Published } from "../../checks/published";
import reference from "../../fixtures/blocking/multiservice.json";
import { relativeError } from "../../support/relative-error";

const TIGHT = 3e-14;

describe("50-digit values", () => {
  test.each(["any peakedness", "few sources, heavy load", "large peaky"] as const)("%s", (regime) => {
    expect(reference[regime].length).toBeGreaterThan(3);
    for (const { units, trafficE, width, peakedness, congestions } of reference[regime]) {
      const actual = multiservice.peaky(units, trafficE, width, peakedness);
      const worst = congestions.flatMap((row, i) => row.map((expected, k) => relativeError(actual[i]![k]!, expected)));
      if (!(Math.max(...worst) < TIGHT)) expect(actual).toEqual(congestions);
    }
  });
});

describe("published values", () => {
  interface Streams {
    readonly C_capacity_units: number;
    readonly streams: readonly {
      kind: string;
      units: number;
      A?: number;
      S?: number;
      beta?: number;
      r?: number;
      b?: number;
    }[];
  }
  const entries = published("MS-2").map((entry): [string, Published] => [title(entry), entry]);
  const column = { time: 0, call: 1, traffic: 2 };

  test.each(entries)("%s", (_, entry) => {
    const { C_capacity_units: units, streams } = entry.inputs as unknown as Streams;
    const [, kind, stream] = /^(time|call|traffic) congestion of stream (\d)/.exec(entry.quantity)!;
    const mean = streams.map(({ kind, A, S, beta, r, b }) =>
      kind === "poisson" ? A! : kind === "engset" ? (S! * beta!) / (1 + beta!) : (r! * b!) / (1 - b!),
    );
    const peakedness = streams.map(({ kind, beta, b }) =>
      kind === "poisson" ? 1 : kind === "engset" ? 1 / (1 + beta!) : 1 / (1 - b!),
    );
    const rows = multiservice.peaky(
      units,
      mean,
      streams.map((s) => s.units),
      peakedness,
    );
    const actual = rows[Number(stream) - 1]![column[kind as keyof typeof column]];
    expect(Math.abs(actual! - entry.expected)).toBeLessThanOrEqual(entry.tolerance!);
  });
});

describe("identities", () => {
  const options = { seed: 20261201, numRuns: 120 };
  const stream = fc.record({
    traffic: fc.double({ min: 1, max: 40, noNaN: true }),
    width: fc.integer({ min: 1, max: 6 }),
    peakedness: fc.oneof(fc.double({ min: 0.05, max: 6, noNaN: true }), fc.constantFrom(0.5, 0.75, 1)),
  });
  const possible = stream.filter(({ traffic, peakedness }) => !isTooSmooth(traffic, peakedness));
  const streams = fc.array(possible, { minLength: 1, maxLength: 4 });
  const units = fc.integer({ min: 1, max: 150 });

  test("Poisson streams meet Kaufman-Roberts, in all three congestions", () => {
    fc.assert(
      fc.property(units, streams, (n, list) => {
        const traffic = list.map((s) => s.traffic);
        const width = list.map((s) => s.width);
        const blocking = multiservice.blocking(n, traffic, width);
        multiservice
          .peaky(
            n,
            traffic,
            width,
            width.map(() => 1),
          )
          .forEach((row, i) => {
            for (const congestion of row) expect(relativeError(congestion, blocking[i]!)).toBeLessThan(TIGHT);
          });
      }),
      options,
    );
  });

  test("one smooth stream of whole sources is Engset, sources scarce or plenty", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 400 }),
        fc.constantFrom(0.25, 0.5, 0.75, 0.875),
        fc.integer({ min: 0, max: 300 }),
        (sources, z, n) => {
          const mean = sources * (1 - z);
          const [row] = multiservice.peaky(n, [mean], [1], [z]);
          const odds = (1 - z) / z;
          const expected = [
            engset.timeCongestion(sources, odds, n),
            engset.callCongestion(sources, odds, n),
            engset.trafficCongestion(sources, odds, n),
          ];
          // A trial call beyond all sources finds room.
          expected.forEach((e, k) => (e === 0 || e > 1e-300) && expect(relativeError(row![k]!, e)).toBeLessThan(TIGHT));
        },
      ),
      options,
    );
  });

  test("one peaky stream: the Pascal distribution cut off at the channels", () => {
    for (const [mean, z, n] of [
      [10, 2, 12],
      [3, 5, 40],
      [50, 1.25, 60],
    ] as const) {
      const r = mean / (z - 1);
      const b = (z - 1) / z;
      let weight = 1;
      let all = 1;
      let calls = r * b;
      for (let x = 1; x <= n; x++) {
        weight *= ((r + x - 1) * b) / x;
        all += weight;
        calls += (r + x) * b * weight;
      }
      const [[time, call]] = multiservice.peaky(n, [mean], [1], [z]) as [[number, number, number]];
      expect(relativeError(time, weight / all)).toBeLessThan(TIGHT);
      expect(relativeError(call, ((r + n) * b * weight) / calls)).toBeLessThan(TIGHT);
    }
  });

  test("a stream split in two of the same kind behaves the same", () => {
    fc.assert(
      fc.property(
        units,
        stream,
        fc.double({ min: 0.2, max: 0.8, noNaN: true }),
        (n, { traffic, width, peakedness }, part) => {
          // Fractions of sources do not add up to the same; whole ones and endless ones do.
          const z = peakedness < 1 ? 0.5 : peakedness;
          const parts =
            z < 1 ? [Math.ceil(traffic * part), Math.ceil(traffic)] : [traffic * part, traffic * (1 - part)];
          const together = multiservice.peaky(n, [parts[0]! + parts[1]!], [width], [z])[0]!;
          const split = multiservice.peaky(n, parts, [width, width], [z, z]);
          if (together[0] < 1e-290) return;
          for (const [time, call, lost] of split) {
            expect(relativeError(time, together[0])).toBeLessThan(TIGHT);
            expect(call >= 0 && call <= 1 && lost >= 0 && lost <= 1).toBe(true);
          }
          const lost = split.reduce((sum, row, i) => sum + row[2] * parts[i]!, 0);
          expect(relativeError(lost, together[2] * (parts[0]! + parts[1]!))).toBeLessThan(TIGHT);
        },
      ),
      options,
    );
  });

  test("all congestions fall between 0 and 1, and at one width call congestion between the other two", () => {
    // Of different widths this is no law: a full group may mean that a smooth stream's sources are all free to call.
    fc.assert(
      fc.property(units, streams, fc.boolean(), (n, list, oneWidth) => {
        const width = list.map((s) => (oneWidth ? 1 : s.width));
        const rows = multiservice.peaky(
          n,
          list.map((s) => s.traffic),
          width,
          list.map((s) => s.peakedness),
        );
        rows.forEach(([time, call, lost], i) => {
          for (const congestion of [time, call, lost]) expect(congestion >= 0 && congestion <= 1).toBe(true);
          if (!oneWidth || time < 1e-290) return;
          const [small, large] = list[i]!.peakedness > 1 ? [time, lost] : [lost, time];
          expect(small).toBeLessThanOrEqual(call * (1 + TIGHT));
          expect(call).toBeLessThanOrEqual(large * (1 + TIGHT));
        });
      }),
      options,
    );
  });

  test("peakedness close to 1 from either side is Poisson in the limit", () => {
    const poisson = erlangB.blocking(20, 30);
    for (const z of [1 - 1e-9, 1 + 1e-9]) {
      for (const congestion of multiservice.peaky(30, [20], [1], [z])[0]!) {
        expect(relativeError(congestion, poisson)).toBeLessThan(1e-7);
        expect(congestion).not.toBe(poisson);
      }
    }
  });
});

describe("edges", () => {
  test("no units, no traffic, no room", () => {
    expect(multiservice.peaky(0, [1, 2], [1, 1], [1, 2])).toEqual([
      [1, 1, 1],
      [1, 1, 1],
    ]);
    expect(multiservice.peaky(4, [1, 2], [1, 5], [1, 2])[1]).toEqual([1, 1, 1]);
    // A stream without calls: its trial call meets what is there.
    const [here, none] = multiservice.peaky(4, [1, 0], [1, 1], [1, 0.5]);
    expect(none).toEqual([here![0], here![0], here![0]]);
  });
  test("many streams of few sources in overload", () => {
    const count = 12;
    const rows = multiservice.peaky(
      500,
      Array<number>(count).fill(400),
      Array<number>(count).fill(2),
      Array<number>(count).fill(0.2),
    );
    for (const row of rows)
      row.forEach((congestion, k) => expect(relativeError(congestion, rows[0]![k]!)).toBeLessThan(TIGHT));
    // All together are 6000 sources; carried plus lost traffic is what is offered.
    expect(relativeError(rows[0]![0], engset.timeCongestion(6000, 4, 250))).toBeLessThan(TIGHT);
    expect(relativeError(rows[0]![2], engset.trafficCongestion(6000, 4, 250))).toBeLessThan(TIGHT);
  });
  test("too smooth for whole calls", () => {
    expect(() => multiservice.peaky(10, [0.2], [1], [0.6])).toThrow(NoAnswerError);
    expect(() => multiservice.peaky(10, [0.2], [1], [0.6])).toThrow("at least 0.8");
    expect(() => multiservice.peaky(10, [2.5], [1], [0.0999])).toThrow("at least 0.1");
  });
  test("as smooth as whole calls can be: always two calls, and a third for half the time", () => {
    expect(Math.abs(multiservice.peaky(3, [2.5], [1], [0.1])[0]![0] - 0.5)).toBeLessThan(1e-9);
    expect(multiservice.peaky(4, [2.5], [1], [0.1])).toEqual([[0, 0, 0]]);
  });
  test("a mean of three tenths of ten users is ten sources, whatever rounding makes of 1 - 0.7", () => {
    const [row] = multiservice.peaky(10, [10 * (1 - 0.7)], [1], [0.7]);
    expect(row![1]).toBe(0);
    expect(multiservice.peaky(11, [3], [1], [0.9])[0]![0]).toBeGreaterThan(0);
    expect(multiservice.peaky(31, [3], [1], [0.9])[0]).toEqual([0, 0, 0]);
  });
  test("a fractional number of sources loses nothing where all find room", () => {
    // 1.86 sources are two, one less busy than the other.
    const [congestions] = multiservice.peaky(2, [1.3], [1], [0.3]);
    expect(congestions![0]).toBeGreaterThan(0.1);
    expect(congestions!.slice(1)).toEqual([0, 0]);
    expect(multiservice.peaky(3, [1.3], [1], [0.3])).toEqual([[0, 0, 0]]);
  });
  test("too large to convolve", () => {
    const many = Array<number>(40).fill(4000);
    expect(() =>
      multiservice.peaky(
        20000,
        many,
        many.map(() => 1),
        many.map(() => 0.5),
      ),
    ).toThrow(DomainError);
    expect(() =>
      multiservice.peaky(
        20000,
        many,
        many.map(() => 1),
        many.map(() => 0.5),
      ),
    ).toThrow("smooth streams");
  });
  test.each([
    ["units", () => multiservice.peaky(0.5, [1], [1], [1])],
    [
      "units",
      () => multiservice.peaky(100000, Array<number>(51).fill(1), Array<number>(51).fill(1), Array<number>(51).fill(1)),
    ],
    ["trafficE", () => multiservice.peaky(5, [-1], [1], [1])],
    ["width", () => multiservice.peaky(5, [1], [0], [1])],
    ["peakedness", () => multiservice.peaky(5, [1], [1], [0])],
    ["peakedness", () => multiservice.peaky(5, [1], [1], [2000])],
    ["peakedness", () => multiservice.peaky(5, [1], [1], [1, 1])],
  ])("bad input names %s", (parameter, call) => {
    expect(call).toThrow(DomainError);
    expect(call).toThrow(parameter);
  });
});
