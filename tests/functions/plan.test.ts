/** The plan as tables: recomputed by single functions, conserved, minimal, and honest about wrong input. */
import { readFileSync } from "node:fs";
import { join } from "node:path";
import fc from "fast-check";
import Papa from "papaparse";
import { functionTable } from "../../functions/generated/function-table";
import { CellError } from "../../src/sheet/cell-error";
import { relativeError } from "../support/relative-error";

type Table = unknown[][];

const demo = (name: string): Table =>
  Papa.parse<unknown[]>(readFileSync(join(__dirname, `../../src/workbook/demo/${name}.csv`), "utf8"), {
    dynamicTyping: true,
    skipEmptyLines: true,
  }).data;

const tables = {
  cells: demo("cells"),
  demand: demo("demand"),
  services: demo("services"),
  routing: demo("routing"),
  radio: demo("radio"),
  installed: demo("installed"),
};
type Inputs = typeof tables;

const call = (id: string, ...args: unknown[]): Table =>
  functionTable[id]!.call(args.map((argument) => (Array.isArray(argument) ? (argument as Table) : [[argument]])));
const one = (id: string, ...args: unknown[]): number => {
  const answer = call(id, ...args)[0]![0];
  if (answer instanceof CellError) throw new Error(`${id}: ${answer.message}`);
  return answer as number;
};
const planOf = (inputs: Inputs, year?: number, percentile?: number): Table =>
  call(
    "PLAN.TABLE",
    inputs.cells,
    inputs.demand,
    inputs.services,
    inputs.routing,
    inputs.radio,
    inputs.installed,
    year ?? null,
    percentile ?? null,
  );

type Row = Record<string, any>;
const rowsOf = (table: Table): Row[] => {
  const [heading, ...rows] = table;
  return rows.map((row) => Object.fromEntries(heading!.map((name, i) => [String(name), row[i]])));
};
const sum = (rows: Row[], column: string): number => rows.reduce((total, row) => total + (Number(row[column]) || 0), 0);
const errorOf = (table: Table): string => {
  expect(table[0]![0]).toBeInstanceOf(CellError);
  return (table[0]![0] as CellError).message;
};

const plan = rowsOf(planOf(tables));
const demand = rowsOf(call("PLAN.DEMAND", tables.demand, tables.services));
const radio = (scheme: string): Row => {
  const column = tables.radio[0]!.indexOf(scheme);
  return Object.fromEntries(tables.radio.slice(1).map((row) => [String(row[0]), row[column]]));
};
const find = (cell: string, year: number, scheme: string): Row =>
  plan.find((row) => row["cell"] === cell && row["year"] === year && row["scheme"] === scheme)!;

describe("blind recalculation by single functions", () => {
  const cell = rowsOf(tables.cells)[0]!;
  const users = (year: number): number =>
    rowsOf(tables.demand).find((row) => row["area"] === cell["area"] && row["year"] === year)!["users"] *
    cell["shareOfArea"];
  const service = (name: string, year = NaN): Row =>
    rowsOf(tables.services).find(
      (row) => row["service"] === name && (Number.isNaN(year) ? true : row["year"] === year),
    )!;
  const routed = (name: string, scheme: string, year: number): number =>
    rowsOf(tables.routing).find(
      (row) => row["service"] === name && row["scheme"] === scheme && (row["year"] === year || row["year"] === null),
    )?.["share"] ?? 0;

  test("trunked calls: Erlang B for voice, Erlang C for dispatch and messages, carriers by PLAN.CARRIERS", () => {
    const year = 2030;
    const scheme = "Narrowband TDMA";
    const facts = radio(scheme);
    const row = find(cell["cell"], year, scheme);
    const voice = service("voice");
    const voiceE =
      one("TRAFFIC.CALLS", users(year) * voice["userShare"], voice["callsPerHour"], voice["holdingTimeS"]) *
      routed("voice", scheme, year);
    expect(relativeError(row["callTrafficE"], voiceE)).toBeLessThan(1e-12);
    const group = service("dispatch");
    const groupE =
      one(
        "TRAFFIC.GROUP",
        users(year) * group["userShare"],
        group["callsPerHour"],
        group["holdingTimeS"],
        group["sitesPerCall"],
        1,
      ) * routed("dispatch", scheme, year);
    const message = service("status messages");
    const messageS = (8 * message["messageBytes"]) / (1000 * facts["bitRateKbps"]);
    const messageE = one(
      "TRAFFIC.CALLS",
      users(year) * message["userShare"] * message["coincidence"],
      message["messagesPerHour"],
      messageS,
    );
    expect(relativeError(row["waitingTrafficE"], groupE + messageE)).toBeLessThan(1e-12);
    // An arrival waits for the calls that it finds, the long ones in proportion to their time.
    const holding = (groupE * group["holdingTimeS"] + messageE * messageS) / (groupE + messageE);
    const waiting = Math.max(
      one("ERLANGC.CHANNELS", groupE + messageE, holding, group["targetWaitS"], 1 - group["targetWaitShare"]),
      one("ERLANGC.CHANNELS", groupE + messageE, holding, message["targetWaitS"], 1 - message["targetWaitShare"]),
    );
    const lost = one("ERLANGB.CHANNELS", voiceE, voice["targetBlocking"]);
    expect(row["channelsRequired"]).toBe(lost + waiting);
    expect(row["carriersRequired"]).toBe(
      Math.ceil((lost + waiting + facts["controlChannels"]) / facts["slotsPerCarrier"]),
    );
    const installed = row["carriersInstalled"] * facts["slotsPerCarrier"] - facts["controlChannels"];
    expect(relativeError(row["blocking"], one("ERLANGB.BLOCKING", voiceE, installed - waiting))).toBeLessThan(1e-12);
    expect(relativeError(row["waitS"], one("ERLANGC.WAIT", groupE + messageE, waiting, holding))).toBeLessThan(1e-12);
  });

  test("its reach: link budget with shadowing and interference margins, by the smaller direction and the timing", () => {
    const row = find(cell["cell"], 2030, "Narrowband TDMA");
    const facts = radio("Narrowband TDMA");
    const edge = one("SHADOWING.EDGE", facts["areaProbability"], facts["shadowingDb"], facts["pathLossExponent"]);
    const shadow = one("SHADOWING.MARGIN", edge, facts["shadowingDb"]);
    const reach = (eirp: number, noiseFigure: number): number => {
      const sensitivity = one(
        "LINK.SENSITIVITY",
        one("NOISE.FLOOR", facts["channelSpacingKHz"] / 1000, noiseFigure),
        facts["requiredSinrDb"],
      );
      const loss = one(
        "LINK.MAXLOSS",
        eirp,
        sensitivity,
        facts["gainsDb"],
        facts["lossesDb"],
        shadow + row["interferenceMarginDb"],
      );
      return one(
        "RANGE.HATA",
        loss,
        facts["frequencyMHz"],
        facts["baseHeightM"],
        facts["mobileHeightM"],
        cell["environment"],
      );
    };
    const expected = Math.min(
      reach(facts["uplinkEirpDbm"], facts["noiseFigureDb"]),
      reach(facts["eirpDbm"], facts["mobileNoiseFigureDb"]),
      one("TIMING.RADIUS", facts["guardTimeUs"]),
    );
    expect(relativeError(row["radiusKm"], expected)).toBeLessThan(1e-12);
    expect(relativeError(one("CELL.AREA", row["radiusNeededKm"]), cell["areaKm2"])).toBeLessThan(1e-12);
  });

  test("CDMA: uplink and downlink load and the margin, from the data routed to it", () => {
    const year = 2028;
    const facts = radio("Wideband CDMA");
    const row = find(cell["cell"], year, "Wideband CDMA");
    const data = service("field data", year);
    const share = routed("field data", "Wideband CDMA", year);
    const down =
      one("TRAFFIC.DATA", users(year) * data["userShare"], data["downMBPerDay"], data["busyHourShare"]) * share;
    const up = one("TRAFFIC.DATA", users(year) * data["userShare"], data["upMBPerDay"], data["busyHourShare"]) * share;
    expect(relativeError(row["downMbps"], down)).toBeLessThan(1e-12);
    const bearers = (mbps: number, kbps: number): number => (1000 * mbps) / (kbps * data["activity"]);
    const rise = Math.exp(((facts["powerControlErrorDb"] * Math.LN10) / 10) ** 2 / 2);
    const uplink =
      one(
        "LOAD.UPLINK",
        data["ebN0Db"],
        data["upKbps"],
        data["activity"],
        bearers(up, data["upKbps"]),
        facts["chipRateMcps"],
        facts["otherCellRatio"],
      ) * rise;
    const downlink = one(
      "LOAD.DOWNLINK",
      data["downlinkEbN0Db"],
      data["downKbps"],
      data["activity"],
      bearers(down, data["downKbps"]),
      facts["chipRateMcps"],
      facts["otherCellRatio"],
      facts["orthogonality"],
    );
    expect(relativeError(row["uplinkLoad"], uplink / row["carriersInstalled"])).toBeLessThan(1e-12);
    expect(relativeError(row["downlinkLoad"], downlink / row["carriersInstalled"])).toBeLessThan(1e-12);
    expect(relativeError(row["interferenceMarginDb"], one("MARGIN.FROMLOAD", row["uplinkLoad"]))).toBeLessThan(1e-12);
  });

  test("OFDMA data alone: capacity by the harmonic mean, a transfer sees what traffic leaves", () => {
    const year = 2027;
    const facts = radio("Broadband OFDMA");
    const row = find(cell["cell"], year, "Broadband OFDMA");
    expect(row["callTrafficE"]).toBe(0);
    const harmonic = one(
      "RATE.CELLCAPACITY",
      facts["pathLossExponent"],
      facts["clusterSize"],
      facts["sectors"],
      1,
      facts["edgeSnrDb"],
      facts["shadowingDb"],
    );
    const mbps = (facts["blocks"] * facts["blockBandwidthKHz"] * harmonic * (1 - facts["overheadShare"])) / 1000;
    const expected = Math.min(
      one("SHARING.THROUGHPUT", mbps * row["carriersInstalled"], row["downMbps"]),
      one("SHARING.THROUGHPUT", mbps * row["carriersInstalled"], row["upMbps"]),
    );
    expect(relativeError(row["throughputMbps"], expected)).toBeLessThan(1e-9);
  });
});

describe("conservation", () => {
  const years = [...new Set(plan.map((row) => row["year"]))];
  test.each(years)("users and data of %p reconcile from forecast to cells", (year) => {
    const rows = plan.filter((row) => row["year"] === year);
    expect(
      relativeError(
        sum(rows, "users"),
        sum(
          rowsOf(tables.demand).filter((row) => row["year"] === year),
          "users",
        ),
      ),
    ).toBeLessThan(1e-10);
    const offered = demand.filter((row) => row["year"] === year);
    const narrow = offered.filter((row) => row["service"] === "status messages");
    expect(relativeError(sum(rows, "downMbps"), sum(offered, "downMbps") - sum(narrow, "downMbps"))).toBeLessThan(
      1e-10,
    );
    const messagesE = (1000 * sum(narrow, "upMbps")) / radio("Narrowband TDMA")["bitRateKbps"];
    expect(
      relativeError(sum(rows, "callTrafficE") + sum(rows, "waitingTrafficE"), sum(offered, "trafficE") + messagesE),
    ).toBeLessThan(1e-10);
  });
  test("summaries by year, area and scheme have the same totals", () => {
    const table = planOf(tables);
    for (const by of ["year", "area", "scheme"]) {
      const rows = rowsOf(call("PLAN.SUMMARY", table, by));
      for (const column of [
        "users",
        "callTrafficE",
        "waitingTrafficE",
        "downMbps",
        "upMbps",
        "carriersRequired",
        "carriersInstalled",
      ]) {
        expect(relativeError(sum(rows, column), sum(plan, column))).toBeLessThan(1e-10);
      }
    }
  });
  test("a broken share complains, by table and service or area", () => {
    const routing = tables.routing.map((row) => [...row]);
    routing[1]![3] = 0.5;
    expect(errorOf(planOf({ ...tables, routing }))).toMatch(
      /Routing shares of voice in 2027 is 0\.5; allowed: shares that add up to 1/,
    );
    const cells = tables.cells.map((row) => [...row]);
    cells[1]![3] = 0.9;
    expect(errorOf(planOf({ ...tables, cells }))).toContain("Cells shareOfArea of Ebbstone Quay");
  });
});

describe("minimality and direction", () => {
  const withInstalled = (rows: Row[], change: number): Inputs => ({
    ...tables,
    installed: [
      ["cell", "scheme", "carriers", "fromYear", "toYear"],
      ...rows.map((row) => [
        row["cell"],
        row["scheme"],
        Math.max(0, row["carriersRequired"] + change),
        row["year"],
        row["year"],
      ]),
    ],
  });
  test("with what is required every promise is kept, with one carrier less it is not", () => {
    const sample = plan.filter((row) => [2027, 2031, 2036].includes(row["year"]));
    const enough = rowsOf(planOf(withInstalled(sample, 0)));
    const checked = enough.filter((row) => [2027, 2031, 2036].includes(row["year"]));
    expect(checked.length).toBeGreaterThan(100);
    for (const row of checked) expect(row["capacityMet"]).toBe(true);
    const fewer = rowsOf(planOf(withInstalled(sample, -1))).filter((row) => [2027, 2031, 2036].includes(row["year"]));
    for (const row of fewer) if (row["carriersRequired"] > 0) expect(row["capacityMet"]).toBe(false);
  });
  test("more demand never lowers a need", () => {
    const more = {
      ...tables,
      demand: tables.demand.map((row, i) => (i === 0 ? row : [row[0], row[1], (row[2] as number) * 1.1, row[3]])),
    };
    const grown = rowsOf(planOf(more));
    grown.forEach((row, i) => {
      expect(row["carriersRequired"]).toBeGreaterThanOrEqual(plan[i]!["carriersRequired"]);
      expect(row["channelsRequired"]).toBeGreaterThanOrEqual(plan[i]!["channelsRequired"]);
    });
  });
  test("the median plan is the plan; a higher percentile needs no less and a lower one no more", () => {
    expect(planOf(tables, 2033, 0.5)).toEqual(planOf(tables, 2033));
    const [low, middle, high] = [0.1, 0.5, 0.9].map((percentile) => rowsOf(planOf(tables, 2033, percentile)));
    middle!.forEach((row, i) => {
      expect(low![i]!["carriersRequired"]).toBeLessThanOrEqual(row["carriersRequired"]);
      expect(high![i]!["carriersRequired"]).toBeGreaterThanOrEqual(row["carriersRequired"]);
    });
    const area = rowsOf(tables.demand).filter((row) => row["year"] === 2033)[0]!;
    const raised = one("FORECAST.BAND", area["users"], area["errorPerYear"], 2033 - 2027, 0.9);
    expect(
      relativeError(
        sum(
          high!.filter((row) => row["area"] === area["area"]),
          "users",
        ),
        raised,
      ),
    ).toBeLessThan(1e-10);
  });
  test("one year is that year of the whole", () => {
    expect(planOf(tables, 2030).slice(1)).toEqual(
      planOf(tables)
        .slice(1)
        .filter((row) => row[3] === 2030),
    );
  });
});

describe("the shape of the inputs", () => {
  test("columns in any order, extra columns and blank rows make no difference", () => {
    const shuffled = tables.demand.map((row, i) => [i === 0 ? "my note" : "seen", row[2], row[0], row[3], row[1]]);
    shuffled.splice(3, 0, [null, null, null, null, null], ["", "", "", "", ""]);
    expect(planOf({ ...tables, demand: shuffled }, 2027)).toEqual(planOf(tables, 2027));
  });
  test.each<[string, Partial<Inputs>, RegExp]>([
    [
      "an area without cells",
      {
        demand: [
          ["area", "year", "users"],
          ["Nowhere", 2027, 5],
        ],
      },
      /Demand area is the text "Nowhere"/,
    ],
    [
      "a scheme that radio lacks",
      {
        routing: [
          ["service", "scheme", "share"],
          ["voice", "Smoke", 1],
          ["dispatch", "Smoke", 1],
          ["status messages", "Smoke", 1],
          ["field data", "Smoke", 1],
          ["telemetry", "Smoke", 1],
        ],
      },
      /Routing scheme is the text "Smoke"/,
    ],
    [
      "an area and year given twice",
      { demand: [...tables.demand, tables.demand[1]!] },
      /Demand row 402, column area: Ebbstone Quay has year 2027 already in row 2/,
    ],
    [
      "a misspelt parameter",
      { radio: [...tables.radio, ["frequencyMHtz", 1, 1, 1]] },
      /"frequencyMHtz" looks like frequencyMHz/,
    ],
    [
      "text in a number",
      { cells: tables.cells.map((row, i) => (i === 3 ? [...row.slice(0, 4), "big", row[5]] : row)) },
      /Cells row 4, column areaKm2: the text "big"/,
    ],
  ])("%s is refused by name", (_, change, message) => {
    expect(errorOf(planOf({ ...tables, ...change }))).toMatch(message);
  });
});

describe("changes", () => {
  const table = planOf(tables, 2030);
  test("a plan against itself has none", () => {
    expect(call("PLAN.CHANGES", table, table)).toHaveLength(1);
  });
  test("lists exactly the cells that were altered, with both values", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: table.length - 1 }), fc.constantFrom(5, 9, 10, 23), (row, column) => {
        const altered = table.map((cells) => [...cells]);
        altered[row]![column] = column === 23 ? "spectrum" : (Number(altered[row]![column]) || 0) + 3;
        fc.pre(altered[row]![column] !== table[row]![column]);
        const changes = call("PLAN.CHANGES", table, altered);
        expect(changes).toHaveLength(2);
        expect(changes[1]!.slice(0, 6)).toEqual([
          table[row]![0],
          table[row]![3],
          table[row]![4],
          table[0]![column],
          table[row]![column],
          altered[row]![column],
        ]);
      }),
      { seed: 17, numRuns: 40 },
    );
  });
  test("rows that only one plan has are listed as absent and present", () => {
    const changes = call(
      "PLAN.CHANGES",
      table,
      table.filter((_, i) => i !== 2),
    );
    expect(changes.slice(1).map((row) => row.slice(3))).toEqual([["row", "present", "absent", ""]]);
  });
});

describe("expansion", () => {
  const heading = ["cell", "year", "scheme", "carriersRequired", "carriersInstalled"];
  const ladder: Table = [
    [
      "step",
      "fromScheme",
      "toScheme",
      "carriersAdded",
      "sectorsAdded",
      "requires",
      "maxTimes",
      "cost",
      "costPerYear",
      "leadTimeMonths",
    ],
    ["carrier", "F", null, 1, null, null, 2, 100, 10, 6],
    ["split", "F", null, null, 1, "carrier", 1, 150, 0, 18],
  ];
  const steps = (...rows: unknown[][]): unknown[][] => call("PLAN.EXPANSION", [heading, ...rows], ladder).slice(1);
  test("a cell that lacks nothing has no row", () => {
    expect(steps(["Q", 2027, "F", 2, 2])).toEqual([]);
  });
  test("carriers beyond the licensed spectrum count only from steps that bring their own", () => {
    const limited: Table = [
      [...heading, "maximumCarriers"],
      ["Q", 2027, "F", 4, 2, 2],
    ];
    expect(call("PLAN.EXPANSION", limited, ladder)[1]![1]).not.toBe("carrier");
    const licensed = ladder.map((row, i) => [...row, i === 0 ? "needsSpectrumMHz" : 5]);
    expect(
      call("PLAN.EXPANSION", limited, licensed)
        .slice(1)
        .map((row) => row[1]),
    ).toEqual(["carrier", "carrier"]);
  });
  test("a year that nothing can mend does not leave the other years without steps", () => {
    const found = steps(["Q", 2027, "F", 99, 2], ["Q", 2028, "F", 3, 2]);
    expect(found.map((row) => row[1])).toEqual(["carrier", "no step suffices: F lacks 97 carriers in 2027"]);
  });
  test("a step comes as late as it may, ordered by its lead time, and pays its yearly cost to the end", () => {
    expect(steps(["Q", 2027, "F", 2, 2], ["Q", 2028, "F", 3, 2], ["Q", 2029, "F", 3, 2])).toEqual([
      ["Q", "carrier", "2027-07", "2028-01", 120],
    ]);
  });
  test("the cheapest of all ways is found: it agrees with trying every schedule", () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 1, max: 6 }), { minLength: 3, maxLength: 3 }), (needs) => {
        const rows = needs.map((need, i) => ["Q", 2027 + i, "F", need, 1]);
        const found = steps(...rows);
        let best = Infinity;
        const schedules = [0, 1, 2, 3];
        // Year index at which the first carrier, the second and the split come; 3 means never.
        for (const first of schedules) {
          for (const second of schedules.filter((year) => year >= first)) {
            for (const split of schedules.filter((year) => year >= first)) {
              if (split < 3 && first === 3) continue;
              const ok = needs.every(
                (need, i) => Math.ceil(need / (split <= i ? 2 : 1)) <= 1 + Number(first <= i) + Number(second <= i),
              );
              if (!ok) continue;
              const carrier = (year: number): number => (year < 3 ? 100 + 10 * (3 - year) : 0);
              best = Math.min(best, carrier(first) + carrier(second) + (split < 3 ? 150 : 0));
            }
          }
        }
        if (best === Infinity) expect(String(found.at(-1)![1])).toMatch(/^no step suffices: F lacks/);
        else expect(found.reduce((total, row) => total + (row[4] as number), 0)).toBe(best);
      }),
      { seed: 29, numRuns: 150 },
    );
  });
  test("what is installed plus the steps meets every year of the demo, or the row says why not", () => {
    const found = rowsOf(call("PLAN.EXPANSION", planOf(tables), demo("ladder")));
    const helpless = new Set(
      found.filter((row) => String(row["step"]).startsWith("no step")).map((row) => row["cell"]),
    );
    const added = (cell: string, step: string, year: number): number =>
      found.filter(
        (row) => row["cell"] === cell && row["step"] === step && Number(String(row["inServiceBy"]).slice(0, 4)) <= year,
      ).length;
    for (const row of plan.filter((candidate) => candidate["scheme"] === "Narrowband TDMA")) {
      if (helpless.has(row["cell"]) || added(row["cell"], "move TDMA to OFDMA", row["year"]) > 0) continue;
      expect(row["carriersInstalled"] + added(row["cell"], "add TDMA carrier", row["year"])).toBeGreaterThanOrEqual(
        row["carriersRequired"],
      );
    }
  });
});
