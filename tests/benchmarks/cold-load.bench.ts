/**
 * How long the built scripts take from their arrival to the last function associated, in a fresh browser each time, so
 * that nothing is compiled beforehand: time of the clock, and time of the page's own thread, which a busy machine does
 * not stretch. Needs Chromium; build first.
 */
import { readFileSync } from "node:fs";
import { createServer, type Server } from "node:http";
import type { AddressInfo } from "node:net";
import { join } from "node:path";
import { gzipSync } from "node:zlib";
import { chromium } from "playwright-core";

const RUNS = 15;
const dist = join(process.cwd(), "dist");

interface Times {
  readonly clock: number;
  readonly thread: number;
}

async function loadOnce(address: string, name: string): Promise<Times> {
  const browser = await chromium.launch({
    executablePath: process.env["CHROMIUM"] ?? "/usr/bin/chromium",
    args: ["--no-sandbox", "--disable-gpu", "--disable-dev-shm-usage", "--disable-background-networking"],
  });
  const page = await browser.newPage();
  const tools = await page.context().newCDPSession(page);
  await tools.send("Performance.enable", { timeDomain: "threadTicks" });
  const threadTime = async (): Promise<number> => {
    const { metrics } = await tools.send("Performance.getMetrics");
    const seconds = (metric: string): number => metrics.find((entry) => entry.name === metric)?.value ?? 0;
    return 1000 * (seconds("ScriptDuration") + seconds("V8CompileDuration"));
  };
  const before = await threadTime();
  await page.goto(`${address}/${name}.html`);
  const thread = (await threadTime()) - before;
  const clock = await page.evaluate(() => {
    const [entry] = performance.getEntriesByType("resource") as PerformanceResourceTiming[];
    const { start, end } = window as unknown as { start: number; end: number };
    return end - Math.max(start, entry!.responseEnd);
  });
  await browser.close();
  return { clock, thread };
}

/** Serves each script with a page that loads it, from memory. */
async function serve(scripts: Readonly<Record<string, string>>): Promise<{ server: Server; address: string }> {
  const server = createServer((request, response) => {
    const path = (request.url ?? "/").slice(1);
    const script = scripts[path];
    const html = `<script>CustomFunctions = { associate() {} }; start = performance.now();</script><script src="/${path.replace(/\.html$/, "")}"></script><script>end = performance.now();</script>`;
    response.writeHead(200, { "Content-Type": script === undefined ? "text/html" : "text/javascript" });
    response.end(script ?? html);
  });
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  return { server, address: `http://127.0.0.1:${(server.address() as AddressInfo).port}` };
}

async function main(): Promise<void> {
  // An empty script shows what the browser and the measuring cost by themselves.
  const scripts = { "empty.js": "", "functions.js": "", "pane.js": "" };
  for (const name of ["functions.js", "pane.js"] as const) scripts[name] = readFileSync(join(dist, name), "utf8");
  const { server, address } = await serve(scripts);
  for (const [name, script] of Object.entries(scripts)) {
    const times: Times[] = [];
    for (let run = 0; run < RUNS; run++) times.push(await loadOnce(address, name));
    const summary = (kind: keyof Times): string => {
      const sorted = times.map((time) => time[kind]).sort((a, b) => a - b);
      return `${sorted[RUNS >> 1]!.toFixed(1)} ms (median of ${RUNS}, ${sorted[0]!.toFixed(1)} to ${sorted.at(-1)!.toFixed(1)})`;
    };
    console.log(`${name}: ${(gzipSync(script).length / 1024).toFixed(0)} KB gzipped, cold compile and run`);
    console.log(`  clock  ${summary("clock")}`);
    console.log(`  thread ${summary("thread")}`);
    if (name === "functions.js") console.log("  aim: at most 100 ms and 120 KB");
  }
  server.close();
}

void main();
