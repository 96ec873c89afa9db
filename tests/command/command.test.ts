/** The command line end to end, on a small plan in a folder of its own. */
import {
  chmodSync,
  copyFileSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  writeFileSync,
} from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { functionTable } from "../../functions/generated/function-table";
import { run } from "../../src/command/main";
import { loadBook } from "../../src/workbook/engine/library";
import { planOf, plainValue } from "../../src/workbook/plan-in-book";
import { SMALL_PLAN } from "../support/small-plan";

let folder: string;
const path = (name: string): string => join(folder, name);

interface Result {
  readonly code: number;
  readonly out: string;
  readonly err: string;
}

async function capacity(...argv: string[]): Promise<Result> {
  const out: string[] = [];
  const err: string[] = [];
  const code = await run(argv, {
    out: (line) => void out.push(line),
    err: (line) => void err.push(line),
    functions: functionTable,
    version: "0.0.0",
    now: () => new Date("2026-12-01T00:00:00Z"),
  });
  return { code, out: out.join("\n"), err: err.join("\n") };
}

/** A refusal is one line that ends the command with the exit code, and leaves no file behind. */
async function refused(message: string | RegExp, code: number, ...argv: string[]): Promise<void> {
  const before = readdirSync(folder).sort();
  const result = await capacity(...argv);
  expect(result.code).toBe(code);
  const last = result.err.split("\n").at(-1)!;
  expect(last).toMatch(message);
  expect(readdirSync(folder).sort()).toEqual(before);
}

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), "capacity-"));
  mkdirSync(path("tables"));
  for (const [name, text] of Object.entries(SMALL_PLAN)) writeFileSync(path(`tables/${name}`), text);
  const made = await capacity("new", path("tables"), "--out", path("plan.xlsx"));
  expect(made).toMatchObject({ code: 0 });
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

async function planIn(file: string): Promise<unknown[][]> {
  return planOf(await loadBook(new Uint8Array(readFileSync(file))));
}

test("new writes a plan workbook whose plan is that of the function on the same tables", async () => {
  const plan = await planIn(path("plan.xlsx"));
  const rows = Object.fromEntries(
    Object.entries(SMALL_PLAN).map(([name, text]) => [
      name,
      text
        .trim()
        .split("\n")
        .map((line) =>
          line.split(",").map((cell) => (cell !== "" && Number.isFinite(Number(cell)) ? Number(cell) : cell || null)),
        ),
    ]),
  );
  const tables = ["cells", "demand", "services", "routing", "radio", "installed"].map((name) => rows[`${name}.csv`]!);
  const direct = functionTable["PLAN.TABLE"]!.call(tables);
  expect(plan.map((row) => row.map((cell) => cell ?? ""))).toEqual(direct);
  expect(plan).toHaveLength(1 + 3 * 2 * 2);
});
test("the workbook records what made it, and its checks agree", async () => {
  const book = await loadBook(new Uint8Array(readFileSync(path("plan.xlsx"))));
  expect((book as unknown as { keywords: string }).keywords).toMatch(/demand\.csv sha256:[0-9a-f]{64}/);
  const checks = book.getWorksheet("Checks")!;
  const verdicts = Array.from({ length: 20 }, (_, i) => plainValue(checks, 6 + i, 5)).filter((cell) => cell !== null);
  expect(verdicts.length).toBeGreaterThan(5);
  expect(new Set(verdicts)).toEqual(new Set(["agrees"]));
});
test("recalc gives the same values again", async () => {
  expect(await capacity("recalc", path("plan.xlsx"), "--out", path("again.xlsx"))).toMatchObject({ code: 0 });
  expect(await planIn(path("again.xlsx"))).toEqual(await planIn(path("plan.xlsx")));
});

describe("refresh", () => {
  beforeAll(async () => {
    const moved = "area,2027,2028,2029\nEbb Quay,600,700,800\nNew Pier,10,20,30\n";
    writeFileSync(path("moved.csv"), moved);
    writeFileSync(
      path("moved-known.csv"),
      "area,year,users\nEbb Quay,2027,600\nEbb Quay,2028,700\nMoor Relay,2027,90\nMoor Relay,2028,95\n",
    );
    expect(await capacity("refresh", path("plan.xlsx"), "--forecast", path("moved-known.csv"))).toMatchObject({
      code: 0,
    });
  });
  test("replaces users by area and year, leaves the source alone and lists only what moved", async () => {
    const plan = await planIn(path("plan-refreshed.xlsx"));
    const old = await planIn(path("plan.xlsx"));
    const users = ([heading, ...rows]: unknown[][]): number =>
      rows.reduce((sum, row) => sum + (row[heading!.indexOf("users")] as number), 0);
    expect(users(plan)).toBeCloseTo(600 + 700 + 90 + 95, 6);
    expect(users(old)).toBeCloseTo(400 + 520 + 90 + 95, 6);
    const changes = (await loadBook(new Uint8Array(readFileSync(path("plan-refreshed.xlsx"))))).getWorksheet(
      "Changes",
    )!;
    expect(plainValue(changes, 5, 1)).toBe("cell");
    const cells = new Set(Array.from({ length: changes.rowCount - 5 }, (_, i) => plainValue(changes, 6 + i, 1)));
    expect(cells).toEqual(new Set(["Q1", "Q2"]));
  });
  test("a second refresh clears the list of the first", async () => {
    expect(
      await capacity(
        "refresh",
        path("plan-refreshed.xlsx"),
        "--forecast",
        path("moved-known.csv"),
        "--out",
        path("twice.xlsx"),
      ),
    ).toMatchObject({ code: 0 });
    const changes = (await loadBook(new Uint8Array(readFileSync(path("twice.xlsx"))))).getWorksheet("Changes")!;
    expect(plainValue(changes, 6, 1)).toBeNull();
  });
  test("an area that the plan has no cells for is an error in the plan, and said", async () => {
    const result = await capacity(
      "refresh",
      path("plan.xlsx"),
      "--forecast",
      path("moved.csv"),
      "--out",
      path("never.xlsx"),
    );
    expect(result.code).toBe(1);
    expect(existsSync(path("never.xlsx"))).toBe(false);
  });
  test("compare lists the same changes in words", async () => {
    const result = await capacity("compare", path("plan.xlsx"), path("plan-refreshed.xlsx"));
    expect(result.code).toBe(0);
    expect(result.out).toContain("values moved");
    expect((await capacity("compare", path("plan.xlsx"), path("plan.xlsx"))).out).toBe("nothing moved.");
  });
});

test("handover keeps every value, no formula but as text, and locks every sheet", async () => {
  expect(await capacity("handover", path("plan.xlsx"), "--out", path("copy.xlsx"))).toMatchObject({ code: 0 });
  const book = await loadBook(new Uint8Array(readFileSync(path("copy.xlsx"))));
  expect(await planIn(path("copy.xlsx"))).toEqual(await planIn(path("plan.xlsx")));
  let formulas = 0;
  for (const sheet of book.worksheets)
    sheet.eachRow((row) => row.eachCell((cell) => void (formulas += (cell.type as number) === 6 ? 1 : 0)));
  expect(formulas).toBe(0);
  const kept = book.getWorksheet("Formulas")!;
  const texts = Array.from({ length: kept.rowCount }, (_, i) => String(plainValue(kept, i + 1, 3)));
  expect(texts.some((text) => text.startsWith("=CAP.PLAN.TABLE(CellsTable,DemandTable"))).toBe(true);
  expect(texts.some((text) => text.includes("Plan!$A$5#"))).toBe(true);
});

test("eval prints a number with all its digits, a table as a table, an error as an error", async () => {
  expect(await capacity("eval", "=CAP.ERLANGB.BLOCKING(10, 15)")).toMatchObject({
    code: 0,
    out: String(functionTable["ERLANGB.BLOCKING"]!.call([[[10]], [[15]]])[0]![0]),
  });
  expect((await capacity("eval", "=CAP.ERLANGB.CHANNELS({1;10},0.01)")).out).toBe(" 5\n18".trimStart());
  expect((await capacity("eval", "=1+1")).out).toBe("2");
  await refused(/#N\/A: The queue never settles/, 1, "eval", "=CAP.ERLANGC.WAIT(12,10,5)");
  await refused(/there is no function CAP.NO.SUCH/, 1, "eval", "=CAP.NO.SUCH(1)");
});
test("functions lists, narrows to a subject, explains one, and helps with a misspelling", async () => {
  expect((await capacity("functions")).out.split("\n")).toHaveLength(Object.keys(functionTable).length);
  expect((await capacity("functions", "erlangb")).out).toContain("CAP.ERLANGB.OFFERED");
  expect((await capacity("functions", "CAP.ERLANGB.BLOCKING")).out).toContain("Poisson arrivals");
  await refused(/did you mean CAP.ERLANGB.BLOCKING/, 1, "functions", "ERLANGB.BLOKING");
});

describe("wrong calls end with 2 and a usage line", () => {
  test.each([
    [["nosuch"], /no command nosuch/],
    [["new"], /give a folder/],
    [["recalc"], /the workbook is missing.*Usage: capacity recalc/],
    [["refresh", "x.xlsx"], /--forecast NEW.csv is missing/],
    [["recalc", "x.xlsx", "--nosuch"], /nosuch.*Usage/],
  ])("%p", async (argv, message) => {
    await refused(message, 2, ...argv);
  });
  test("help is no wrong call", async () => {
    expect(await capacity("--help")).toMatchObject({ code: 0 });
    expect((await capacity("refresh", "--help")).out).toContain("usage: capacity refresh");
    expect(await capacity()).toMatchObject({ code: 2 });
  });
});

describe("bad input is one line, exit 1, nothing written and nothing lost", () => {
  test("a missing file", () => refused(/nosuch\.xlsx: there is no such file/, 1, "recalc", path("nosuch.xlsx")));
  test("a missing folder of tables", () =>
    refused(/there is no demand\.csv/, 1, "new", path("nosuch"), "--out", path("a.xlsx")));
  test("a missing folder to write to", () =>
    refused(/no such folder/, 1, "recalc", path("plan.xlsx"), "--out", path("no/such/out.xlsx")));
  test("an existing target", async () => {
    const before = readFileSync(path("plan.xlsx"));
    await refused(
      /exists already; give another --out, or --force/,
      1,
      "new",
      path("tables"),
      "--out",
      path("plan.xlsx"),
    );
    expect(readFileSync(path("plan.xlsx")).equals(before)).toBe(true);
  });
  test("a text file as workbook", () =>
    refused(
      /demand\.csv: this is not an \.xlsx workbook/,
      1,
      "recalc",
      path("tables/demand.csv"),
      "--out",
      path("a.xlsx"),
    ));
  test("a damaged workbook", async () => {
    writeFileSync(path("half.xlsx"), readFileSync(path("plan.xlsx")).subarray(0, 5000));
    await refused(/half\.xlsx: .*damaged/, 1, "recalc", path("half.xlsx"));
  });
  test("a password-protected workbook", async () => {
    writeFileSync(path("locked.xlsx"), Buffer.from([0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1]));
    await refused(/locked\.xlsx: .*password/, 1, "recalc", path("locked.xlsx"));
  });
  test("a bad forecast", async () => {
    writeFileSync(path("bad.csv"), "area,year,users\nEbb Quay,2027,many\n");
    await refused(
      /bad\.csv row 2, column users/,
      1,
      "refresh",
      path("plan.xlsx"),
      "--forecast",
      path("bad.csv"),
      "--out",
      path("a.xlsx"),
    );
  });
  test("a folder as workbook", () => refused(/is a folder, not a file/, 1, "recalc", path("tables")));
  test("a read-only folder", async () => {
    mkdirSync(path("readonly"));
    copyFileSync(path("plan.xlsx"), path("readonly/plan.xlsx"));
    chmodSync(path("readonly"), 0o555);
    // The superuser may write anyway; then there is nothing to refuse.
    if (process.getuid?.() !== 0) await refused(/permission is denied/, 1, "recalc", path("readonly/plan.xlsx"));
    chmodSync(path("readonly"), 0o755);
  });
});
