/** The built functions.js in a browser, under Microsoft's own custom-functions runtime, called through its bridge. */
import { readFileSync } from "node:fs";
import { join } from "node:path";
import type { Page } from "playwright-core";
import declared from "../../functions/generated/texts.json";
import { cellsOf, exampleOf } from "../../src/pane/finder/example";
import type { EmptyCell, HostCell, HostError, Metadata } from "../host/bridge";
import {
  BROWSER_TIMEOUT,
  bundled,
  describeInBrowser,
  newPage,
  root,
  startSession,
  type Misdeeds,
  type Session,
} from "./support";

const runtime = readFileSync(join(root, "node_modules/@microsoft/office-js/dist/custom-functions-runtime.js"), "utf8");
const PAGE = `<!doctype html><html lang="en"><head><meta charset="utf-8"><title>contract</title>
<script src="/bridge.js"></script><script src="/custom-functions-runtime.js"></script><script src="/functions.js"></script>
</head><body></body></html>`;

describeInBrowser("functions under the maker's runtime", () => {
  let session: Session;
  let metadata: Metadata;
  beforeAll(async () => {
    metadata = JSON.parse(readFileSync(join(root, "dist/functions.json"), "utf8"));
    session = await startSession();
  }, BROWSER_TIMEOUT);
  afterAll(() => session.end());

  async function open(empty: EmptyCell): Promise<{ page: Page; misdeeds: Misdeeds }> {
    const opened = await newPage(session, {
      "/contract.html": PAGE,
      "/bridge.js": bundled("tests/browser/bridge-in-page.ts"),
      "/custom-functions-runtime.js": runtime,
    });
    await opened.page.goto(`${session.address}/contract.html`);
    await opened.page.evaluate(([list, cell]) => window.startBridge(list, cell), [metadata, empty] as const);
    return opened;
  }
  const call = (page: Page, id: string, args: readonly unknown[]): Promise<HostCell[][]> =>
    page.evaluate(([name, given]) => window.callFunction(name, given), [id, args] as const);

  test("no function streams, so that none needs cancelling", () => {
    expect(metadata.functions.filter(({ options }) => options?.["stream"] ?? options?.["cancelable"])).toEqual([]);
  });

  describe.each([
    ["an empty cell as 0", 0],
    ["an empty cell as null", null],
  ] as [string, EmptyCell][])("%s", (_, empty) => {
    let page: Page;
    let misdeeds: Misdeeds;
    beforeAll(async () => {
      ({ page, misdeeds } = await open(empty));
    }, BROWSER_TIMEOUT);
    afterAll(() => page.close());

    test(
      "every function answers its example, alone and filled down as ranges",
      async () => {
        const examples = declared.map((text) => exampleOf(text, "CAP")!);
        const calls = declared.map(
          ({ id }, i) => [id, examples[i]!.args.map((argument) => cellsOf(argument)!)] as const,
        );
        const answers = await page.evaluate((list) => window.callMany(list), calls);
        answers.forEach((answer, i) => {
          const [id] = calls[i]!;
          const first = answer[0]![0]!;
          expect({ id, first: typeof first === "object" ? first : "value" }).toEqual({ id, first: "value" });
          const said = /^-?[\d.]+$/.exec(declared[i]!.examples[0]!.split(" is ").at(-1)!)?.[0];
          if (said === undefined) return;
          const digits = said.split(".")[1]?.length ?? 0;
          expect(`${id} ${Number(first).toFixed(digits)}`).toBe(`${id} ${Number(said).toFixed(digits)}`);
        });
        // Where the example is made of single values, three equal rows of them give its answer three times.
        const single = calls.flatMap((_, i) =>
          examples[i]!.args.every(({ kind }) => kind === "value") && answers[i]!.length === 1 ? [i] : [],
        );
        const filled = single.map((i) => {
          const [id, args] = calls[i]!;
          return [id, args.map((cells) => [cells[0]!, cells[0]!, cells[0]!])] as const;
        });
        const columns = await page.evaluate((list) => window.callMany(list), filled);
        columns.forEach((column, i) => {
          const alone = answers[single[i]!]![0];
          const [id] = filled[i]!;
          expect({ id, column }).toEqual({ id, column: column.length === 1 ? [alone] : [alone, alone, alone] });
        });
        expect(columns.filter(({ length }) => length === 3).length).toBeGreaterThan(80);
      },
      BROWSER_TIMEOUT,
    );

    test("blanks alone give blanks; a blank among filled inputs is named where 0 makes no sense", async () => {
      expect(
        await call(page, "ERLANGB.CHANNELS", [
          [[null], [10]],
          [[null], [0.01]],
        ]),
      ).toEqual([[""], [18]]);
      const [[missing]] = (await call(page, "ERLANGB.CHANNELS", [10, [[null]]])) as [[HostError]];
      expect(missing).toMatchObject({ error: "#VALUE!", message: expect.stringContaining("blocking") });
    });

    test("optional arguments may be left out, be empty, or be given", async () => {
      const left = await call(page, "NOISE.FLOOR", [10, 5]);
      expect(await call(page, "NOISE.FLOOR", [10, 5, [[null]]])).toEqual(left);
      expect(await call(page, "NOISE.FLOOR", [10, 5, 290])).toEqual(left);
      expect(await call(page, "NOISE.FLOOR", [10, 5, 400])).not.toEqual(left);
    });

    test("errors carry their messages: wrong input, no answer, and each in its own cell", async () => {
      const [[wrong], [fine], [,]] = (await call(page, "ERLANGB.BLOCKING", [[[-1], [10], ["x"]], 15])) as any;
      expect(wrong).toMatchObject({ error: "#VALUE!", message: expect.stringMatching(/trafficE.*-1/) });
      expect(fine).toBeCloseTo(0.0365, 4);
      const [[none]] = (await call(page, "ERLANGC.DELAYED", [12, 10])) as [[HostError]];
      expect(none).toMatchObject({ error: "#N/A", message: expect.stringContaining("12") });
    });

    test("texts where numbers belong are refused by every function, with a message", async () => {
      const calls = metadata.functions
        .filter(({ parameters }) => parameters.length > 0)
        .map(({ id, parameters }) => [id, parameters.map(() => [["§ not an input §"]])] as const);
      const answers = await page.evaluate((list) => window.callMany(list), calls);
      answers.forEach((answer, i) => {
        const first = answer[0]![0] as HostError;
        expect({ id: calls[i]![0], error: first.error, told: (first.message ?? "").length > 0 }).toEqual({
          id: calls[i]![0],
          error: "#VALUE!",
          told: true,
        });
      });
    });

    test(
      "ten thousand calls in one batch come back complete and right",
      async () => {
        const batch = await page.evaluate(async () => {
          const calls = Array.from({ length: 10_000 }, (_, i) => ["ERLANGB.BLOCKING", [i / 100, 20]] as const);
          const answers = await window.callMany(calls);
          return answers.map((answer) => answer[0]![0]);
        });
        expect(batch).toHaveLength(10_000);
        expect(batch.every((value) => typeof value === "number")).toBe(true);
        const numbers = batch as number[];
        expect(numbers.every((value, i) => i === 0 || value >= numbers[i - 1]!)).toBe(true);
        expect(numbers[2000]).toBeCloseTo(0.1589, 4);
      },
      BROWSER_TIMEOUT,
    );

    test("the page asked nobody else for anything, and nothing failed", () => {
      const startUp = /MicrosoftAjax|office_strings|excel-|Failed to load resource|parseXdmInfo|o15app/;
      expect(misdeeds.requests.filter((url) => !startUp.test(url))).toEqual([]);
      expect(misdeeds.errors.filter((error) => !startUp.test(error))).toEqual([]);
    });
  });
});
