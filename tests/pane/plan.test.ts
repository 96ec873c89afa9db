/** Starter sheets, a new forecast and the handover copy, over a workbook in memory that computes with our functions. */
import { readFileSync } from "node:fs";
import { join } from "node:path";
import { functionTable } from "../../functions/generated/function-table";
import { PaneFailure } from "../../src/pane/failure";
import { loadForecast, prepareForecast, undoForecast } from "../../src/pane/plan/forecast";
import { addHandoverSheets, freeName, openHandover } from "../../src/pane/plan/handover";
import { describeStarter, insertStarter, openStarter } from "../../src/pane/plan/starter";
import { Stopped } from "../../src/pane/work";
import { OfficeWorkbook } from "../../src/pane/workbook/office-workbook";
import type { OpenWorkbook } from "../../src/pane/workbook/workbook";
import { Package } from "../../src/workbook/package/archive";
import { partOf, sheetParts } from "../../src/workbook/package/sheets";
import { fromBase64 } from "./office/file";
import { openProgram, type Behaviour, type Program } from "./office/office";
import { watched } from "./work";

const starter = readFileSync(join(__dirname, "../../dist/starter.xlsx"));
const { sheets, sheetsWithCharts } = describeStarter(starter);
let program: Program;

function open(changes: Partial<Behaviour> = {}, namespace = "CAP"): OpenWorkbook {
  program = openProgram(functionTable, changes, namespace);
  return new OfficeWorkbook();
}

/** The pane's own server, with the starter or without. */
function serve(bytes: Buffer | undefined): void {
  globalThis.fetch = ((address: string) => {
    expect(address).toBe("starter.xlsx");
    const answer = bytes ? new Response(new Uint8Array(bytes)) : new Response(null, { status: 404 });
    return Promise.resolve(answer);
  }) as typeof fetch;
}
beforeEach(() => serve(starter));

/** A plan of two cells on sheets of its own, small enough to compute in no time. */
function smallPlan(): void {
  const { book } = program;
  const tables: Record<string, { name: string; rows: (string | number | null)[][]; spare: number }> = {
    Forecast: {
      name: "DemandTable",
      rows: [
        ["area", "year", "users", "my note"],
        ["Quay", 2027, 400, "from the harbour office"],
        ["Quay", 2028, 420, null],
        ["Old town", 2027, 300, "mine"],
        ["Old town", 2028, 310, null],
      ],
      spare: 1,
    },
    Services: {
      name: "ServicesTable",
      rows: [
        ["service", "kind", "userShare", "callsPerHour", "holdingTimeS", "targetBlocking"],
        ["voice", "call", 1, 1, 90, 0.02],
      ],
      spare: 1,
    },
    Routing: {
      name: "RoutingTable",
      rows: [
        ["service", "scheme", "share"],
        ["voice", "FDMA", 1],
      ],
      spare: 1,
    },
    Radio: {
      name: "RadioTable",
      rows: [
        ["parameter", "FDMA"],
        ["channelSpacingKHz", 12.5],
      ],
      spare: 1,
    },
    Cells: {
      name: "CellsTable",
      rows: [
        ["cell", "site", "area", "shareOfArea", "areaKm2"],
        ["Q1", "Q", "Quay", 1, 4],
        ["O1", "O", "Old town", 1, 3],
      ],
      spare: 1,
    },
    Installed: {
      name: "InstalledTable",
      rows: [
        ["cell", "scheme", "carriers"],
        ["Q1", "FDMA", 20],
        ["O1", "FDMA", 14],
      ],
      spare: 1,
    },
  };
  for (const [sheet, { name, rows, spare }] of Object.entries(tables)) {
    book.fill(sheet, 4, 0, rows);
    const columns = name === "DemandTable" ? 3 : rows[0]!.length;
    book.names.set(name, { sheet, row: 4, column: 0, rows: rows.length + spare, columns });
  }
  book.fill("Plan", 0, 0, [["Plan"]]);
  const formula = `=${book.namespace}.PLAN.TABLE(CellsTable,DemandTable,ServicesTable,RoutingTable,RadioTable,InstalledTable)`;
  book.fill("Plan", 4, 0, [[formula]]);
}

describe("starter sheets", () => {
  test("are inserted whole, with the names that their formulas need, and compute", async () => {
    const book = open();
    expect(await insertStarter(book, "CAP", watched())).toBe(`${sheets.length} sheets inserted.`);
    const names = program.book.sheets.map(({ name }) => name);
    expect(names).toEqual(expect.arrayContaining(["Sheet1", "Forecast", "Plan", "Dashboard", "Checks"]));
    expect(program.book.names.get("DemandTable")).toMatchObject({ sheet: "Forecast", row: 4, column: 0 });
    expect(program.book.read("Plan", 4, 0)).toBe("cell");
    const codes = program.book.sheets.flatMap(({ cells }) =>
      [...cells.values()].filter(({ value }) => typeof value === "object"),
    );
    expect(codes).toEqual([]);
  }, 60_000);
  test("names that did not come along are added", async () => {
    const book = open({ bringsNames: false, calculates: false });
    expect(await insertStarter(book, "CAP", watched())).toContain("The names of the tables were added.");
    expect([...program.book.names.keys()].sort()).toEqual([
      "CellsTable",
      "DemandTable",
      "InstalledTable",
      "LadderTable",
      "RadioTable",
      "RoutingTable",
      "ServicesTable",
    ]);
  });
  test("where charts are refused, the sheets without charts are inserted and the rest is named", async () => {
    const book = open({ refusesCharts: true, calculates: false });
    expect(sheetsWithCharts).toContain("Dashboard");
    const told = await insertStarter(book, "CAP", watched());
    expect(told).toContain(`${sheets.length - sheetsWithCharts.length} sheets inserted.`);
    expect(told).toContain(`${sheetsWithCharts.join(", ")} left out`);
    expect(program.book.find("Dashboard")).toBeUndefined();
  });
  test("sheets or names that are taken refuse it, and nothing is inserted", async () => {
    const book = open();
    program.book.addSheet("plan");
    await expect(insertStarter(book, "CAP", watched())).rejects.toThrow("already has the sheets Plan.");
    program.book.sheets.pop();
    program.book.names.set("RadioTable", { sheet: "Sheet1", row: 0, column: 0, rows: 1, columns: 1 });
    await expect(insertStarter(book, "CAP", watched())).rejects.toThrow("already uses the names RadioTable.");
    expect(program.book.sheets).toHaveLength(1);
  });
  test("a development copy gets its own names for the functions", async () => {
    const book = open({}, "CAPDEV");
    await openStarter(book, "CAPDEV", watched());
    const file = Package.open(fromBase64(program.book.opened[0]!));
    const plan = file.text(partOf(file, "Plan"));
    expect(plan).toContain("_xldudf_CAPDEV_PLAN_TABLE(");
    expect(plan).not.toContain("_xldudf_CAP_");
  });
  test("opened as a new workbook the starter comes as it was built", async () => {
    const book = open();
    expect(await openStarter(book, "CAP", watched())).toBe("The starter opened as a new workbook.");
    expect(Buffer.compare(Buffer.from(fromBase64(program.book.opened[0]!)), starter)).toBe(0);
  });
  test("a missing file, an older program and a stop are told", async () => {
    serve(undefined);
    await expect(insertStarter(open(), "CAP", watched())).rejects.toThrow("not on the server (404)");
    serve(starter);
    await expect(insertStarter(open({ newestSet: 12 }), "CAP", watched())).rejects.toThrow("cannot insert sheets");
    await expect(openStarter(open({ newestSet: 7 }), "CAP", watched())).rejects.toThrow("cannot open");
    await expect(insertStarter(open(), "CAP", watched(1))).rejects.toThrow(Stopped);
    expect(program.book.sheets).toHaveLength(1);
  });
});

const CSV = "area,year,users\nQuay,2027,900\nQuay,2028,420\nHarbour,2027,50\nHarbour,2028,60\n";

describe("a new forecast", () => {
  test("is previewed without a change, then loaded, and what moved is listed with verdicts first", async () => {
    const book = open();
    smallPlan();
    await book.sheetNames();
    program.behaviour.calculation = 20;
    const before = program.book.content({ sheet: "Forecast", row: 4, column: 0, rows: 6, columns: 4 });
    const prepared = await prepareForecast(book, CSV, "new.csv");
    expect(prepared.edit).toMatchObject({ matched: 2, added: 2, gone: 2 });
    expect(prepared.users).toEqual({ year: "2028", before: 730, after: 480 });
    expect(program.book.content({ sheet: "Forecast", row: 4, column: 0, rows: 6, columns: 4 })).toEqual(before);

    const work = watched();
    const outcome = await loadForecast(book, { ...prepared }, work).catch((fault: unknown) => fault);
    // Harbour has no cells, which the plan refuses in its first cell.
    expect(outcome).toMatchObject({ error: expect.stringMatching(/^#/) });
    // A mended forecast can follow at once; there is no plan to compare it with.
    const mended = await prepareForecast(book, CSV.replace(/Harbour/g, "Old town"), "mended.csv");
    expect(await loadForecast(book, mended, watched())).toMatchObject({ compared: false, error: undefined });
    await undoForecast(book, mended);
    await undoForecast(book, prepared);
    expect(program.book.content({ sheet: "Forecast", row: 4, column: 0, rows: 6, columns: 4 })).toEqual(before);

    const known = await prepareForecast(book, CSV.replace(/Harbour/g, "Old town"), "new.csv");
    const loaded = await loadForecast(book, known, watched());
    expect(loaded.error).toBeUndefined();
    expect(loaded.changes[0]).toEqual(["cell", "year", "scheme", "column", "before", "after", "change"]);
    const [first] = loaded.changes.slice(1);
    expect(first!.slice(0, 6)).toEqual(["Q1", 2027, "FDMA", "limitedBy", "nothing", "blocking"]);
    expect(loaded.verdicts).toBeGreaterThan(0);
    expect(work.told.some((text) => text.startsWith("The workbook is calculating"))).toBe(true);
    // Notes beside the table stay where they are.
    expect(program.book.read("Forecast", 5, 3)).toBe("from the harbour office");
    expect(program.book.read("Forecast", 5, 2)).toBe(900);
    expect(program.book.read("Changes", 4, 0)).toBe("cell");
    expect(program.book.read("Changes", 2, 0)).toContain("Values that moved");
    expect(program.book.sheet("Changes").used()!.rows).toBe(loaded.changes.length + 2);
  });

  test("a shorter list of changes leaves nothing of the former one", async () => {
    const book = open();
    smallPlan();
    await loadForecast(book, await prepareForecast(book, CSV.replace(/Harbour/g, "Old town"), "a.csv"), watched());
    const small = "area,year,users\nQuay,2027,900\nQuay,2028,420\nOld town,2027,50\nOld town,2028,61\n";
    const { changes } = await loadForecast(book, await prepareForecast(book, small, "b.csv"), watched());
    expect(changes.length).toBeGreaterThan(1);
    expect(program.book.sheet("Changes").used()!.rows).toBe(changes.length + 2);
    const same = await loadForecast(book, await prepareForecast(book, small, "b.csv"), watched());
    expect(same.changes).toHaveLength(1);
  });

  test("more rows than the table has room for stretch it", async () => {
    const book = open();
    smallPlan();
    const years = [2027, 2028, 2029];
    const rows = ["Quay", "Old town"].flatMap((area) => years.map((year) => `${area},${year},100`));
    const prepared = await prepareForecast(book, ["area,year,users", ...rows].join("\n"), "long.csv");
    await loadForecast(book, prepared, watched());
    expect(program.book.names.get("DemandTable")).toMatchObject({ rows: 7, columns: 3 });
    expect(program.book.read("Plan", 5, 3)).toBe(2027);
    await undoForecast(book, prepared);
    expect(program.book.names.get("DemandTable")).toMatchObject({ rows: 6, columns: 3 });
  });

  test.each([
    ["area,users\nQuay,1", "year"],
    ["area,year,users\nQuay,2027,many", "row 2, column users"],
    ["", "empty"],
  ])("a wrong file is refused by row and column: %j", async (csv, told) => {
    const book = open();
    smallPlan();
    await expect(prepareForecast(book, csv, "bad.csv")).rejects.toThrow(PaneFailure);
    await expect(prepareForecast(book, csv, "bad.csv")).rejects.toThrow(told);
  });

  test("a workbook without the table or without a plan is told what it lacks", async () => {
    const book = open();
    await expect(prepareForecast(book, CSV, "new.csv")).rejects.toThrow("no table named DemandTable");
    smallPlan();
    program.book.sheets = program.book.sheets.filter(({ name }) => name !== "Plan");
    const prepared = await prepareForecast(book, CSV, "new.csv");
    await expect(loadForecast(book, prepared, watched())).rejects.toThrow("No sheet holds a plan");
    expect(program.book.read("Forecast", 5, 2)).toBe(400);
  });

  test("stopping before the write changes nothing; stopping the wait leaves the forecast and says so", async () => {
    const book = open();
    smallPlan();
    await book.sheetNames();
    const prepared = await prepareForecast(book, CSV.replace(/Harbour/g, "Old town"), "new.csv");
    await expect(loadForecast(book, prepared, watched(1))).rejects.toThrow(Stopped);
    expect(program.book.read("Forecast", 5, 2)).toBe(400);
    program.behaviour.calculation = 100_000;
    const waiting = loadForecast(book, prepared, watched(4));
    await expect(waiting).rejects.toMatchObject({
      what: "The forecast is in the sheet; what changed was not worked out.",
    });
    expect(program.book.read("Forecast", 5, 2)).toBe(900);
  });
});

describe("handover copy", () => {
  test("as a new workbook: values, formulas as text, nothing to compute", async () => {
    const book = open();
    smallPlan();
    await book.sheetNames();
    const work = watched();
    expect(await openHandover(book, functionTable, "CAP", work)).toBe(
      "The copy opened as a new workbook; 1 formula is kept as text. Save it there.",
    );
    const file = Package.open(fromBase64(program.book.opened[0]!));
    const texts = sheetParts(file).map(({ part }) => file.text(part));
    expect(texts.join("")).not.toContain("<f");
    const plan = file.text(partOf(file, "Plan"));
    expect(plan).toContain(`<v>${String(program.book.read("Plan", 5, 9))}</v>`);
    expect(file.text(partOf(file, "Formulas"))).toContain("=CAP.PLAN.TABLE(CellsTable,DemandTable");
    expect(work.told.some((text) => text.startsWith("Reading the workbook"))).toBe(true);
  });
  test("a development copy's formulas are written as everybody's", async () => {
    const book = open({}, "CAPDEV");
    smallPlan();
    await book.sheetNames();
    await openHandover(book, functionTable, "CAPDEV", watched());
    const file = Package.open(fromBase64(program.book.opened[0]!));
    expect(file.text(partOf(file, "Formulas"))).toContain("=CAPDEV.PLAN.TABLE(");
  });
  test("a workbook that is not done, or shows #BUSY!, is not copied", async () => {
    const book = open({ calculation: 10_000 });
    smallPlan();
    await book.sheetNames();
    await expect(openHandover(book, functionTable, "CAP", watched())).rejects.toThrow("still calculating");
    const settled = open();
    program.book.broken = "#BUSY!";
    smallPlan();
    await settled.sheetNames();
    await expect(openHandover(settled, functionTable, "CAP", watched())).rejects.toThrow("#BUSY!");
    expect(program.book.opened).toEqual([]);
  });
  test("a workbook without formulas needs no copy", async () => {
    const book = open();
    program.book.fill("Sheet1", 0, 0, [[1]]);
    await expect(openHandover(book, functionTable, "CAP", watched())).rejects.toThrow("has no formulas");
    await expect(addHandoverSheets(book, watched())).rejects.toThrow("has no formulas");
  });
  test("as sheets beside the others: locked values, and the formulas as text", async () => {
    const book = open();
    smallPlan();
    const plan = program.book.sheet("Plan");
    plan.isProtected = true;
    expect(await addHandoverSheets(book, watched())).toBe(
      "Value sheets added: 1. Formulas kept as text on the sheet Formulas: 1.",
    );
    const copy = program.book.sheet("Plan (values)");
    expect([...copy.cells.values()].every(({ formula }) => formula === undefined)).toBe(true);
    expect(copy.isProtected).toBe(true);
    expect(program.book.read("Plan (values)", 5, 9)).toBe(program.book.read("Plan", 5, 9));
    expect(program.book.content({ sheet: "Formulas", row: 0, column: 0, rows: 2, columns: 2 })).toEqual([
      ["sheet", "cell"],
      ["Plan", "A5"],
    ]);
    expect(program.book.read("Formulas", 1, 2)).toMatch(/^=CAP\.PLAN\.TABLE/);
    expect(program.book.sheet("Formulas").at(1, 2)?.formula).toBeUndefined();
  });
  test("a stop or a refusal halfway takes the added sheets out again", async () => {
    const book = open();
    smallPlan();
    program.book.fill("Later", 0, 0, [["=CAP.POWER.DB(100)"]]);
    const names = program.book.sheets.map(({ name }) => name);
    await expect(addHandoverSheets(book, watched(9))).rejects.toThrow(Stopped);
    expect(program.book.sheets.map(({ name }) => name)).toEqual(names);
    program.book.sheet("Later").isProtected = true;
    program.book.sheet("Later").password = true;
    await expect(addHandoverSheets(book, watched())).rejects.toThrow("Later is protected with a password");
    expect(program.book.sheets.map(({ name }) => name)).toEqual(names);
  });
  test("names are kept unique and within what a sheet may be called", () => {
    expect(freeName("Plan", " (values)", [])).toBe("Plan (values)");
    expect(freeName("Plan", " (values)", ["plan (VALUES)"])).toBe("Plan (values) 2");
    const long = freeName("A name of exactly 31 letters ok", " (values)", []);
    expect(long).toHaveLength(31);
    expect(long.endsWith(" (values)")).toBe(true);
  });
});
