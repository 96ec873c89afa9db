/**
 * Time and memory of a whole plan: forecast to summary, over ten years, for growing numbers of cells.
 *
 * npx esbuild tests/benchmarks/plan.bench.ts --bundle --platform=node --outfile=/tmp/plan.cjs && node --expose-gc /tmp/plan.cjs
 * A number of cells as argument measures that size alone.
 */
import { planDemand, planExpansion, planSummary, planTable } from "../../functions/plan";
import { CellError } from "../../src/sheet/cell-error";

type Table = unknown[][];

const YEARS = 10;
const CELLS_OF_AREA = 5;
const SHARES = [0.3, 0.25, 0.2, 0.15, 0.1];
const services: Table = [
  [
    "service",
    "kind",
    "userShare",
    "callsPerHour",
    "holdingTimeS",
    "downMBPerDay",
    "upMBPerDay",
    "busyHourShare",
    "downKbps",
    "upKbps",
    "targetBlocking",
    "targetMbps",
  ],
  ["narrow voice", "call", 0.6, 0.8, 60, "", "", "", 12.2, 12.2, 0.02, ""],
  ["broad voice", "call", 0.4, 1, 90, "", "", "", 32, 32, 0.01, ""],
  ["data", "data", 0.5, "", "", 400, 80, 0.12, "", "", "", 2],
];
const routing: Table = [
  ["service", "scheme", "share"],
  ["narrow voice", "TDMA", 1],
  ["broad voice", "OFDMA", 1],
  ["data", "OFDMA", 1],
];
const radio: Table = [
  ["parameter", "TDMA", "OFDMA"],
  ["frequencyMHz", 420, 750],
  ["bandwidthMHz", 5, 10],
  ["channelSpacingKHz", 25, ""],
  ["slotsPerCarrier", 4, ""],
  ["bitRateKbps", 7.2, ""],
  ["controlChannels", 1, ""],
  ["blocks", "", 50],
  ["blockBandwidthKHz", "", 180],
  ["clusterSize", 7, 1],
  ["pathLossExponent", 3.6, 3.6],
  ["edgeSnrDb", "", 3],
  ["pathLossModel", "hata", "hata"],
  ["baseHeightM", 40, 40],
  ["eirpDbm", 47, 58],
  ["uplinkEirpDbm", 34, 23],
  ["gainsDb", 6, 16],
  ["lossesDb", 8, 10],
  ["noiseFigureDb", 5, 3],
  ["mobileNoiseFigureDb", 8, 8],
  ["requiredSinrDb", 10, -4],
  ["shadowingDb", 7, 7],
  ["areaProbability", 0.95, 0.95],
  ["guardTimeUs", 389, ""],
];
const ladder: Table = [
  ["step", "fromScheme", "carriersAdded", "sitesAdded", "maxTimes", "cost", "costPerYear", "leadTimeMonths"],
  ["add narrow carrier", "TDMA", 1, "", 8, 18000, 900, 6],
  ["add broad carrier", "OFDMA", 1, "", 3, 42000, 2500, 9],
  ["add broad site", "OFDMA", "", 1, 2, 160000, 9500, 24],
];

/** An invented network: areas of five unequal cells, users growing at a pace of their own in every area. */
function network(cellCount: number): { cells: Table; demand: Table; installed: Table } {
  const cells: Table = [["cell", "site", "area", "shareOfArea", "areaKm2", "environment"]];
  const demand: Table = [["area", "year", "users"]];
  const installed: Table = [["cell", "scheme", "carriers"]];
  for (let a = 0; a < cellCount / CELLS_OF_AREA; a++) {
    const area = `Area ${a}`;
    SHARES.forEach((share, i) => {
      const cell = `C${a}.${i}`;
      cells.push([cell, `S${a}.${i}`, area, share, 2 + ((a + 3 * i) % 17) / 4, i % 2 === 0 ? "urban" : "suburban"]);
      installed.push([cell, "TDMA", 2 + (a % 3)], [cell, "OFDMA", 1 + (i % 2)]);
    });
    for (let y = 0; y < YEARS; y++) {
      const users = (1500 + 37 * (a % 61)) * (1.03 + 0.01 * (a % 5)) ** y;
      demand.push([area, 2027 + y, users]);
    }
  }
  return { cells, demand, installed };
}

/** Rows of a table without its heading; a table that is an error ends the run. */
function rowCount(table: Table): number {
  const first = table[0]![0];
  if (first instanceof CellError) throw new Error(first.message);
  return table.length - 1;
}

interface Measurement {
  readonly planRows: number;
  readonly seconds: number;
}

function measure(cellCount: number): Measurement {
  const { cells, demand, installed } = network(cellCount);
  (globalThis as { gc?: () => void }).gc?.();
  const parts: Record<string, number> = { demand: 0, table: 0, expansion: 0, summary: 0 };
  const used = process.cpuUsage();
  const timed = (part: string, work: () => Table): Table => {
    const start = performance.now();
    const table = work();
    parts[part]! += (performance.now() - start) / 1000;
    return table;
  };
  rowCount(timed("demand", () => planDemand(demand, services)));
  const plan = timed("table", () => planTable(cells, demand, services, routing, radio, installed));
  const planRows = rowCount(plan);
  const steps = rowCount(timed("expansion", () => planExpansion(plan, ladder)));
  rowCount(timed("summary", () => planSummary(plan)));
  const seconds = Object.values(parts).reduce((sum, part) => sum + part, 0);
  // On a busy machine the processor time, which counts the collector's own threads too, tells more than the clock.
  const { user, system } = process.cpuUsage(used);
  const peakMB = process.resourceUsage().maxRSS / 1024;
  const detail = Object.entries(parts).map(([name, part]) => `${name} ${part.toFixed(2)}`);
  process.stdout.write(
    `${String(cellCount).padStart(7)} cells: ${planRows} rows, ${steps} steps, ${seconds.toFixed(2)} s, ` +
      `${((user + system) / 1e6).toFixed(2)} s of processor ` +
      `(${detail.join(", ")}), ${Math.round(planRows / seconds)} rows/s, peak ${Math.round(peakMB)} MB\n`,
  );
  return { planRows, seconds };
}

const only = Number(process.argv[2]);
const sizes = only > 0 ? [only] : [1_000, 10_000, 100_000];
let before: Measurement | undefined;
for (const size of sizes) {
  const now = measure(size);
  if (before) {
    const growth = now.seconds / before.seconds / (now.planRows / before.planRows);
    process.stdout.write(`        time for each row against the size before: ${growth.toFixed(2)}\n`);
  }
  before = now;
}
