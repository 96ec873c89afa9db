/** The pane as a person uses it, in a browser, over a pretended spreadsheet program. */
import { mkdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import type { Page } from "playwright-core";
import { texts } from "../../src/pane/say";
import type { Behaviour } from "../pane/office/office";
import {
  BROWSER_TIMEOUT,
  bundled,
  describeInBrowser,
  newPage,
  officeAddress,
  officeFile,
  startSession,
  type Misdeeds,
  type Session,
} from "./support";

const NARROW = { width: 320, height: 640 };
const WIDE = { width: 900, height: 700 };
const axe = readFileSync(require.resolve("axe-core/axe.min.js"), "utf8");
const pictures = process.env["SCREENSHOTS"];
if (pictures) mkdirSync(pictures, { recursive: true });

const CSV = "area,year,users\nQuay,2027,900\nQuay,2028,420\nOld town,2027,300\nOld town,2028,310\n";

interface Opened {
  readonly page: Page;
  readonly misdeeds: Misdeeds;
}

describeInBrowser("the pane", () => {
  let session: Session;
  let office: string;
  let pretended: Record<string, string>;
  const opened: Opened[] = [];
  beforeAll(async () => {
    session = await startSession();
    office = bundled("tests/browser/office-in-page.ts");
    pretended = { [officeAddress]: office };
  }, BROWSER_TIMEOUT);
  afterAll(() => session.end());
  afterEach(async () => {
    for (const { page, misdeeds } of opened.splice(0)) {
      await page.close();
      expect(misdeeds).toEqual({ requests: [], errors: [] });
    }
  });

  interface Way {
    readonly size?: { readonly width: number; readonly height: number };
    readonly dark?: boolean;
    readonly behaviour?: Partial<Behaviour> & { readonly theme?: string };
  }
  async function open({ size = NARROW, dark = false, behaviour = {} }: Way = {}): Promise<Page> {
    const one = await newPage(session, pretended, { viewport: size, colorScheme: dark ? "dark" : "light" });
    opened.push(one);
    await one.page.addInitScript((wanted) => void (window.behaviour = wanted), behaviour);
    await one.page.goto(`${session.address}/pane.html`);
    await one.page.getByRole("combobox").waitFor();
    return one.page;
  }
  /** Rules of the page's accessibility that are broken. */
  async function violations(page: Page): Promise<string[]> {
    await page.evaluate(axe);
    return page.evaluate(async () => {
      const { axe: checker } = window as unknown as {
        axe: { run(): Promise<{ violations: { id: string; nodes: { html: string }[] }[] }> };
      };
      const { violations: found } = await checker.run();
      return found.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html.slice(0, 120)).join(" | ")}`);
    });
  }
  async function picture(page: Page, name: string): Promise<void> {
    if (pictures) await page.screenshot({ path: join(pictures, `${name}.png`) });
  }
  const told = (page: Page, pattern: RegExp | string) => page.locator(".told").filter({ hasText: pattern }).waitFor();
  const cells = (page: Page, sheet: string, row: number, column: number, rows: number, columns: number) =>
    page.evaluate((area) => window.program.book.content(area), { sheet, row, column, rows, columns });
  const tab = (page: Page, name: string) => page.getByRole("tab", { name }).click();
  /** A plan of two cells, small enough to compute at once. */
  async function smallPlan(page: Page): Promise<void> {
    await page.evaluate(async () => {
      const { book } = window.program;
      const put = (sheet: string, name: string, rows: (string | number)[][], columns = rows[0]!.length): void => {
        book.fill(sheet, 4, 0, rows);
        book.names.set(name, { sheet, row: 4, column: 0, rows: rows.length + 1, columns });
      };
      const forecast = [
        ["Quay", 2027, 400],
        ["Quay", 2028, 420],
        ["Old town", 2027, 300],
        ["Old town", 2028, 310],
      ];
      put("Forecast", "DemandTable", [["area", "year", "users"], ...forecast]);
      const service = ["service", "kind", "userShare", "callsPerHour", "holdingTimeS", "targetBlocking"];
      put("Services", "ServicesTable", [service, ["voice", "call", 1, 1, 90, 0.02]]);
      put("Routing", "RoutingTable", [
        ["service", "scheme", "share"],
        ["voice", "FDMA", 1],
      ]);
      put("Radio", "RadioTable", [
        ["parameter", "FDMA"],
        ["channelSpacingKHz", 12.5],
      ]);
      const places = [
        ["Q1", "Q", "Quay", 1, 4],
        ["O1", "O", "Old town", 1, 3],
      ];
      put("Cells", "CellsTable", [["cell", "site", "area", "shareOfArea", "areaKm2"], ...places]);
      put("Installed", "InstalledTable", [
        ["cell", "scheme", "carriers"],
        ["Q1", "FDMA", 20],
        ["O1", "FDMA", 14],
      ]);
      const tables = "CellsTable,DemandTable,ServicesTable,RoutingTable,RadioTable,InstalledTable";
      book.fill("Plan", 4, 0, [[`=${book.namespace}.PLAN.TABLE(${tables})`]]);
      book.recalculate();
      await Promise.resolve();
    });
  }
  const namespace = (page: Page) => page.evaluate(() => document.documentElement.dataset["namespace"]!);

  test(
    "a question typed, arrow keys and Enter lead to a function; its button puts it into the sheet",
    async () => {
      const page = await open();
      expect(await page.evaluate(() => document.activeElement?.id)).toBe("finder-question");
      await page.keyboard.type("grade of service");
      const options = page.getByRole("option");
      expect(await options.first().innerText()).toContain("ERLANGB.BLOCKING");
      await page.keyboard.press("ArrowDown");
      await page.keyboard.press("ArrowUp");
      await picture(page, "narrow-light-results");
      await page.keyboard.press("Enter");
      const heading = page.getByRole("heading", { name: "ERLANGB.BLOCKING" });
      await heading.waitFor();
      expect(await page.evaluate(() => document.activeElement?.textContent)).toContain("ERLANGB.BLOCKING");
      expect(await page.locator(".example").innerText()).toMatch(/BLOCKING\(10, 15\) gives 0.036/);
      await picture(page, "narrow-light-detail");
      expect(await violations(page)).toEqual([]);
      await page.getByRole("button", { name: texts.find.insert }).click();
      await told(page, "stands in Sheet1!C2");
      expect(await cells(page, "Sheet1", 0, 0, 2, 3)).toEqual([
        ["trafficE", "channels", "result"],
        [10, 15, `=${await namespace(page)}.ERLANGB.BLOCKING(A2,B2)`],
      ]);
      // The selection has moved to the formula, where the cells are in use.
      await page.getByRole("button", { name: texts.find.insert }).click();
      await told(page, "is not empty");
      expect(await page.locator(".told").getAttribute("data-kind")).toBe("failed");
      await page.getByRole("heading", { name: "ERLANGB.BLOCKING" }).press("Escape");
      expect(await page.evaluate(() => document.activeElement?.id)).toBe("finder-question");
      await page.keyboard.press("Escape");
      expect(await page.getByRole("combobox").inputValue()).toBe("");
    },
    BROWSER_TIMEOUT,
  );

  test(
    "every function has a page without an accessibility fault of its own making",
    async () => {
      const page = await open({ size: WIDE });
      const subjects = await page.locator(".subjects button").allInnerTexts();
      expect(subjects.length).toBeGreaterThan(30);
      for (const subject of subjects) {
        await page.getByRole("button", { name: subject, exact: true }).click();
        const options = page.getByRole("option");
        const count = await options.count();
        expect(count).toBeGreaterThan(0);
        for (let i = 0; i < count; i++) {
          const name = await options.nth(i).locator("code").innerText();
          await options.nth(i).click();
          expect(await page.locator(".detail h2").innerText()).toBe(name);
          expect(await page.locator(".detail .example").count()).toBe(1);
        }
        await page.getByRole("combobox").fill("");
      }
      expect(await violations(page)).toEqual([]);
    },
    BROWSER_TIMEOUT,
  );

  test.each([
    ["narrow-light", NARROW, false],
    ["narrow-dark", NARROW, true],
    ["wide-light", WIDE, false],
    ["wide-dark", WIDE, true],
  ] as const)(
    "%s: every part is accessible, nothing is wider than the pane",
    async (name, size, dark) => {
      const page = await open({ size, dark });
      await smallPlan(page);
      await page.evaluate(() =>
        window.program.book.fill("Sheet1", 0, 0, [
          [-1, `=${window.program.book.namespace}.ERLANGB.BLOCKING(A1,5)`, "=B1"],
        ]),
      );
      for (const part of [texts.tabs.find, texts.tabs.plan, texts.tabs.check]) {
        await tab(page, part);
        if (part === texts.tabs.check) {
          await page.getByRole("button", { name: texts.check.run }).click();
          await told(page, "2 error cells. It all begins in one place.");
        }
        if (part === texts.tabs.plan) {
          await page.setInputFiles("#forecast-file", {
            name: "new.csv",
            mimeType: "text/csv",
            buffer: Buffer.from(CSV),
          });
          await page.getByRole("button", { name: texts.plan.forecastApply }).click();
          await told(page, "values of the plan moved");
        }
        expect({ part, found: await violations(page) }).toEqual({ part, found: [] });
        const wider = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
        expect(wider).toBeLessThanOrEqual(0);
        await picture(page, `${name}-${part}`);
      }
      await tab(page, texts.tabs.find);
      await page.getByRole("combobox").fill("users of a cell");
      await page.keyboard.press("Enter");
      expect(await violations(page)).toEqual([]);
      await picture(page, `${name}-function`);
    },
    BROWSER_TIMEOUT,
  );

  test(
    "tabs move with arrow keys; a slash leads to the question from anywhere in the finder",
    async () => {
      const page = await open();
      await tab(page, texts.tabs.find);
      await page.keyboard.press("ArrowRight");
      expect(await page.getByRole("tab", { selected: true }).innerText()).toBe(texts.tabs.plan);
      await page.keyboard.press("End");
      expect(await page.getByRole("tab", { selected: true }).innerText()).toBe(texts.tabs.check);
      await page.keyboard.press("ArrowRight");
      expect(await page.getByRole("tab", { selected: true }).innerText()).toBe(texts.tabs.find);
      await page.keyboard.press("/");
      expect(await page.evaluate(() => document.activeElement?.id)).toBe("finder-question");
      await page.keyboard.type("a/b");
      expect(await page.getByRole("combobox").inputValue()).toBe("a/b");
    },
    BROWSER_TIMEOUT,
  );

  test(
    "the program's dark background makes the pane dark, whatever the system says",
    async () => {
      const page = await open({ behaviour: { theme: "#262626" } });
      expect(await page.evaluate(() => document.documentElement.dataset["theme"])).toBe("dark");
      const light = await open({ dark: true, behaviour: { theme: "#ffffff" } });
      expect(await light.evaluate(() => document.documentElement.dataset["theme"])).toBe("light");
    },
    BROWSER_TIMEOUT,
  );

  test(
    "the starter sheets come from the pane's own server and stand in the workbook",
    async () => {
      const page = await open({ behaviour: { calculates: false } });
      await tab(page, texts.tabs.plan);
      await page.getByRole("button", { name: texts.plan.starterInsert }).click();
      await told(page, "sheets inserted");
      const sheets = await page.evaluate(() => window.program.book.sheets.map(({ name }) => name));
      expect(sheets).toEqual(expect.arrayContaining(["Forecast", "Plan", "Summary"]));
      expect(String((await cells(page, "Plan", 4, 0, 1, 1))[0]![0])).toContain("PLAN_TABLE(");
      await page.getByRole("button", { name: texts.plan.starterInsert }).click();
      await told(page, "already has the sheets");
      await page.getByRole("button", { name: texts.plan.starterNew }).click();
      await told(page, texts.plan.starterOpened);
      expect(await page.evaluate(() => window.program.book.opened.length)).toBe(1);
    },
    BROWSER_TIMEOUT,
  );

  test(
    "a forecast is previewed, loaded, shown as changes, and put back",
    async () => {
      const page = await open({ behaviour: { calculation: 600 } });
      await smallPlan(page);
      await tab(page, texts.tabs.plan);
      await page.setInputFiles("#forecast-file", { name: "new.csv", mimeType: "text/csv", buffer: Buffer.from(CSV) });
      await page.getByText("rows replaced 4, new 0, gone 0.").waitFor();
      expect(await cells(page, "Forecast", 5, 2, 1, 1)).toEqual([[400]]);
      await page.getByRole("button", { name: texts.plan.forecastApply }).click();
      await page.getByText("The workbook is calculating").waitFor();
      await picture(page, "narrow-light-progress");
      await told(page, /values of the plan moved. They stand in one row. The verdict changed in one of them/);
      const first = page.locator(".result tbody tr").first();
      expect(await first.innerText()).toMatch(/Q1, 2027, FDMA\s+limitedBy\s+nothing → blocking/);
      expect(await cells(page, "Changes", 4, 0, 1, 7)).toEqual([
        ["cell", "year", "scheme", "column", "before", "after", "change"],
      ]);
      await page.getByRole("button", { name: texts.plan.forecastUndo }).click();
      await told(page, texts.plan.forecastUndone);
      expect(await cells(page, "Forecast", 5, 2, 1, 1)).toEqual([[400]]);
      await page.setInputFiles("#forecast-file", {
        name: "bad.csv",
        mimeType: "text/csv",
        buffer: Buffer.from("area,year,users\nQuay,2027,lots\n"),
      });
      await told(page, "bad.csv row 2, column users");
    },
    BROWSER_TIMEOUT,
  );

  test(
    "long work shows how far it is, refuses a second piece, and stops when asked",
    async () => {
      const page = await open({ behaviour: { calculation: 1_000_000 } });
      await smallPlan(page);
      await page.evaluate(() => (window.program.book.isCalculating = false));
      await tab(page, texts.tabs.plan);
      await page.setInputFiles("#forecast-file", { name: "new.csv", mimeType: "text/csv", buffer: Buffer.from(CSV) });
      await page.getByRole("button", { name: texts.plan.forecastApply }).click();
      await page.getByText("The workbook is calculating").waitFor();
      await page.getByRole("button", { name: texts.plan.handoverHere }).click();
      await told(page, texts.work.busy);
      await page.getByRole("button", { name: texts.work.stop }).click();
      await told(page, "Stopped.");
      expect(await page.locator(".running").isHidden()).toBe(true);
    },
    BROWSER_TIMEOUT,
  );

  test(
    "the handover copy opens as a new workbook without formulas, or stands beside as values",
    async () => {
      const page = await open();
      await smallPlan(page);
      await tab(page, texts.tabs.plan);
      await page.getByRole("button", { name: texts.plan.handoverNew }).click();
      await told(page, "1 formula is kept as text");
      expect(await page.evaluate(() => window.program.book.opened[0]!.slice(0, 4))).toBe("UEsD");
      await page.getByRole("button", { name: texts.plan.handoverHere }).click();
      await told(page, "Value sheets added: 1.");
      const shown = await cells(page, "Plan", 4, 0, 3, 12);
      expect((await cells(page, "Plan (values)", 4, 0, 3, 12)).slice(1)).toEqual(shown.slice(1));
    },
    BROWSER_TIMEOUT,
  );

  test(
    "the check lists where errors begin, with the functions' own messages, and leads there",
    async () => {
      const page = await open();
      await page.evaluate(() => {
        const { book } = window.program;
        book.fill("Sheet1", 0, 0, [[-1, `=${book.namespace}.ERLANGB.BLOCKING(A1,5)`, "=B1"], ["=CAP.NOSUCH(1)"]]);
      });
      await tab(page, texts.tabs.check);
      await page.getByRole("button", { name: texts.check.run }).click();
      await told(page, "3 error cells. They begin in 2 places.");
      const items = page.locator(".roots li");
      expect(await items.first().innerText()).toMatch(/#VALUE!.*Go to Sheet1!B1.*trafficE.*-1.*1 cell passes it on/s);
      expect(await items.nth(1).innerText()).toMatch(/#NAME\?.*Sheet1!A2.*does not know the function/s);
      await page.getByRole("button", { name: "Go to Sheet1!B1" }).click();
      expect(await page.evaluate(() => window.program.book.selection)).toMatchObject({ row: 0, column: 1 });
      await page.getByRole("button", { name: texts.check.selfRun }).click();
      await told(page, "The functions answer");
    },
    BROWSER_TIMEOUT,
  );

  test(
    "outside the spreadsheet program, under the real Office.js, the finder works and the rest says why it does not",
    async () => {
      const one = await newPage(session, {
        ...officeFile("office.js"),
        ...officeFile("o15apptofilemappingtable.js"),
        ...officeFile("en-us/office_strings.js"),
      });
      const { page } = one;
      await page.goto(`${session.address}/pane.html`);
      await page.getByText(texts.host.outside).first().waitFor();
      await page.getByRole("combobox").fill("erlang b");
      expect(await page.getByRole("option").first().innerText()).toContain("ERLANGB.BLOCKING");
      const associated = await page.evaluate(
        () => Object.keys((window as any).CustomFunctions._association.mappings).length,
      );
      expect(associated).toBe(
        await page.evaluate(() => Object.keys(globalThis.capacityFunctions!.functionTable).length),
      );
      expect(one.misdeeds.requests).toEqual([]);
      await page.close();
    },
    BROWSER_TIMEOUT,
  );

  test(
    "where Office.js cannot be reached, the pane says so and the finder works",
    async () => {
      const { page } = await newPage(session, {}, { viewport: NARROW });
      await page.goto(`${session.address}/pane.html`);
      await page.getByText(texts.host.missing).waitFor();
      await page.getByRole("combobox").fill("noise rise");
      expect(await page.getByRole("option").first().innerText()).toContain("MARGIN.FROMLOAD");
      await picture(page, "narrow-light-alone");
      expect(await violations(page)).toEqual([]);
      await page.close();
    },
    BROWSER_TIMEOUT,
  );

  test(
    "the help page is accessible and needs nothing from elsewhere",
    async () => {
      const one = await newPage(session, {}, { viewport: WIDE });
      opened.push(one);
      await one.page.goto(`${session.address}/help.html`);
      expect(await violations(one.page)).toEqual([]);
      await picture(one.page, "help");
    },
    BROWSER_TIMEOUT,
  );
});
