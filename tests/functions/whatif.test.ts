import { functionTable } from "../../functions/generated/function-table";
import * as erlangB from "../../src/model/blocking/erlang-b";
import * as load from "../../src/model/interference/load";
import { CellError } from "../../src/sheet/cell-error";
import { relativeError } from "../support/relative-error";

const call = (id: string, ...args: (unknown[][] | null)[]): unknown[][] => functionTable[`WHATIF.${id}`]!.call(args);
const one = (value: unknown): unknown[][] => [[value]];
const message = (result: unknown[][]): string =>
  `${(result[0]![0] as CellError).code} ${(result[0]![0] as CellError).message}`;

describe("solve", () => {
  const solve = (name: string, inputs: unknown[][], unknown: string, target: unknown[][], low = 1, high = 100) =>
    call("SOLVE", one(name), inputs, one(unknown), target, one(low), one(high));

  test("a column of targets", () => {
    const column = solve("cap.erlangb.blocking", [["channels", 30]], "TrafficE", [[0.01], [0.02], [""]]);
    expect(relativeError(column[0]![0] as number, erlangB.traffic(30, 0.01))).toBeLessThan(1e-11);
    expect(relativeError(column[1]![0] as number, erlangB.traffic(30, 0.02))).toBeLessThan(1e-11);
    expect(column[2]![0]).toBe("");
  });
  test("a value in inputs for the unknown is not used; headings are skipped; a name on several rows is a range", () => {
    const inputs = [
      ["parameter", "value"],
      ["ebN0Db", 5],
      ["ebN0Db", 2],
      ["bitRateKbps", 12.2],
      ["bitRateKbps", 64],
      ["activity", 0.67],
      ["activity", 1],
      ["users", 30],
      ["users", 4],
      ["chipRateMcps", 3.84],
      ["otherCellRatio", 99],
    ];
    const found = solve("LOAD.UPLINK", inputs, "otherCellRatio", one(0.6), 0, 10)[0]![0] as number;
    expect(load.uplink([5, 2], [12.2, 64], [0.67, 1], [30, 4], 3.84, found)).toBeCloseTo(0.6, 12);
  });
  test.each([
    [solve("ERLANGB.BLOKING", [["channels", 30]], "trafficE", one(0.02)), /#VALUE! functionName .*ERLANGB.BLOCKING/],
    [solve("ERLANGB.BLOCKING", [["chanels", 30]], "trafficE", one(0.02)), /#VALUE! inputs row 1 .*trafficE, channels/],
    [solve("ERLANGB.BLOCKING", [["channels", 30]], "traffic", one(0.02)), /#VALUE! unknown .*trafficE, channels/],
    [solve("ERLANGB.BLOCKING", [["channels", 30]], "trafficE", one(0.9)), /#N\/A .*at low = 1 .*at high = 100/],
    [solve("ERLANGB.BLOCKING", [["channels", -3]], "trafficE", one(0.02)), /#VALUE! channels is -3/],
    [solve("ERLANGB.BLOCKING", [["", ""]], "trafficE", one(0.02)), /#VALUE! channels is missing/],
    [solve("METHOD.TEXT", [["functionName", "ERLANGB.BLOCKING"]], "functionName", one(2)), /#VALUE!/],
    [solve("STANDARD.PROFILE", [["standard", "GSM"]], "standard", one(2)), /#VALUE!/],
    [solve("WHATIF.SOLVE", [["low", 1]], "high", one(2)), /#VALUE! functionName/],
    [
      solve(
        "ERLANGB.BLOCKING",
        [
          ["channels", 30],
          ["trafficE", 1],
          ["trafficE", 2],
        ],
        "trafficE",
        one(2),
      ),
      /one value/,
    ],
    [solve("ERLANGB.BLOCKING", [["", 30]], "trafficE", one(2)), /without a parameter name/],
    [solve("ERLANGB.BLOCKING", [["channels"]], "trafficE", one(2)), /two columns/],
  ])("what is wrong is named: %#", (result, words) => {
    expect(message(result)).toMatch(words);
  });
});

describe("sweep", () => {
  const sweep = (...rest: (unknown[][] | null)[]): unknown[][] =>
    call("SWEEP", one("ERLANGB.BLOCKING"), [["channels", 15]], ...rest);
  test("one way: headings, then a row for each value, wrong values in their own cells", () => {
    const table = sweep(one("trafficE"), [[8], [-1], [10]]);
    expect(table[0]).toEqual(["trafficE", "ERLANGB.BLOCKING"]);
    expect(table[1]).toEqual([8, erlangB.blocking(8, 15)]);
    expect((table[2]![1] as CellError).message).toContain("trafficE is -1");
    expect(table[3]).toEqual([10, erlangB.blocking(10, 15)]);
  });
  test("two ways", () => {
    const table = sweep(one("trafficE"), [[8], [10]], one("channels"), [[12, 15, 20]]);
    expect(table[0]).toEqual(["trafficE / channels", 12, 15, 20]);
    expect(table[2]).toEqual([10, ...[12, 15, 20].map((n) => erlangB.blocking(10, n))]);
  });
  test("texts vary as well", () => {
    const inputs = [
      ["distanceKm", 5],
      ["frequencyMHz", 900],
      ["baseHeightM", 30],
      ["mobileHeightM", 1.5],
    ];
    const table = call("SWEEP", one("PATHLOSS.HATA"), inputs, one("environment"), [["urban"], ["open"]], null, null);
    expect(table[1]![1]).toBeGreaterThan(table[2]![1] as number);
  });
  test.each([
    [sweep(one("trafficE"), one("")), /values is missing/],
    [sweep(one("trafficE"), [[1]], one("trafficE"), [[1]]), /another parameter/],
    [sweep(one("trafficE"), [[1]], null, [[1]]), /values2 needs varied2/],
    [
      sweep(
        one("trafficE"),
        Array.from({ length: 2501 }, (_, i) => [i + 1]),
      ),
      /2501 answers/,
    ],
  ])("what is wrong is named: %#", (result, words) => {
    expect(message(result)).toMatch(words);
  });
});

describe("sensitivity", () => {
  test("the strongest first, with elasticities that the formula has", () => {
    const inputs = [
      ["users", 400],
      ["callsPerHour", 2],
      ["holdingTimeS", 90],
    ];
    const table = call("SENSITIVITY", one("TRAFFIC.CALLS"), inputs, null);
    expect(table[0]).toEqual(["parameter", "result at -10 %", "result at +10 %", "elasticity"]);
    for (const row of table.slice(1)) {
      expect((row.slice(1) as number[]).map((value) => value.toPrecision(9))).toEqual(
        [18, 22, 1].map((value) => value.toPrecision(9)),
      );
    }
    const sorted = call(
      "SENSITIVITY",
      one("ERLANGB.BLOCKING"),
      [
        ["trafficE", 10],
        ["channels", 15],
      ],
      one(0.05),
    );
    expect(sorted.slice(1).map(([name]) => name)).toEqual(["channels", "trafficE"]);
    expect(sorted[1]![3]).toBeLessThan(0);
    expect(sorted[2]![2]).toBe(erlangB.blocking(10.5, 15));
  });
  test("texts and zeros stay; a side without an answer shows why", () => {
    const table = call(
      "SENSITIVITY",
      one("ERLANGC.WAIT"),
      [
        ["trafficE", 9.5],
        ["channels", 10],
        ["holdingTimeS", 90],
      ],
      one(0.1),
    );
    const traffic = table.find(([name]) => name === "trafficE")!;
    expect((traffic[2] as CellError).code).toBe("#N/A");
    expect(typeof traffic[3]).toBe("number");
  });
  test("a wrong base is the error of the function", () => {
    expect(
      message(
        call(
          "SENSITIVITY",
          one("ERLANGB.BLOCKING"),
          [
            ["trafficE", -1],
            ["channels", 3],
          ],
          null,
        ),
      ),
    ).toMatch(/trafficE is -1/);
    expect(
      message(
        call(
          "SENSITIVITY",
          one("ERLANGB.BLOCKING"),
          [
            ["trafficE", 0],
            ["channels", 0],
          ],
          null,
        ),
      ),
    ).toMatch(/no number other than 0/);
  });
});
