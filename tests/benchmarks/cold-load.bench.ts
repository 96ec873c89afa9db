/**
 * How long the built scripts take from their arrival to the last function associated, in a fresh browser each time, so
 * that nothing is compiled beforehand: time of the clock, and time of the page's own thread, which a busy machine does
 * not stretch. Needs Chromium; build first.
 */
import { readFileSync } from "node:fs";
import { join } from "node:path";
import { gzipSync } from "node:zlib";
import { chromium } from "playwright-core";

const RUNS = 15;
const dist = join(process.cwd(), "dist");

interface Times {
  readonly clock: number;
  readonly thread: number;
}

async function loadOnce(script: string, name: string): Promise<Times> {
  const browser = await chromium.launch({
    executablePath: process.env["CHROMIUM"] ?? "/usr/bin/chromium",
    args: ["--no-sandbox", "--disable-gpu", "--disable-dev-shm-usage", "--disable-background-networking"],
  });
  const page = await browser.newPage();
  await page.route("**/*", (route) => {
    const isScript = route.request().url().endsWith(".js");
    return route.fulfill(
      isScript
        ? { body: script, contentType: "text/javascript" }
        : {
            contentType: "text/html",
            body: `<script>CustomFunctions = { associate() {} }; start = performance.now();</script><script src="/${name}"></script><script>end = performance.now();</script>`,
          },
    );
  });
  const tools = await page.context().newCDPSession(page);
  await tools.send("Performance.enable", { timeDomain: "threadTicks" });
  const threadTime = async (): Promise<number> => {
    const { metrics } = await tools.send("Performance.getMetrics");
    const seconds = (metric: string): number => metrics.find((entry) => entry.name === metric)?.value ?? 0;
    return 1000 * (seconds("ScriptDuration") + seconds("V8CompileDuration"));
  };
  const before = await threadTime();
  await page.goto("http://cold.example/");
  const thread = (await threadTime()) - before;
  const clock = await page.evaluate(() => {
    const [entry] = performance.getEntriesByType("resource") as PerformanceResourceTiming[];
    const { start, end } = window as unknown as { start: number; end: number };
    return end - Math.max(start, entry!.responseEnd);
  });
  await browser.close();
  return { clock, thread };
}

async function main(): Promise<void> {
  for (const name of ["functions.js", "pane.js"]) {
    const script = readFileSync(join(dist, name), "utf8");
    const times: Times[] = [];
    for (let run = 0; run < RUNS; run++) times.push(await loadOnce(script, name));
    const summary = (kind: keyof Times): string => {
      const sorted = times.map((time) => time[kind]).sort((a, b) => a - b);
      return `${sorted[RUNS >> 1]!.toFixed(1)} ms (median of ${RUNS}, ${sorted[0]!.toFixed(1)} to ${sorted.at(-1)!.toFixed(1)})`;
    };
    console.log(`${name}: ${(gzipSync(script).length / 1024).toFixed(0)} KB gzipped, cold compile and run`);
    console.log(`  clock  ${summary("clock")}`);
    console.log(`  thread ${summary("thread")}`);
    if (name === "functions.js") console.log("  aim: at most 100 ms and 120 KB");
  }
}

void main();
