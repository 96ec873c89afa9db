/**
 * What CAP.ERLANGB.CHANNELS costs over long columns, against a bare pass and against the textbook recursion.
 *
 * npx esbuild tests/benchmarks/erlang-b.bench.ts --bundle --platform=node --outfile=/tmp/erlang-b.bench.cjs && node /tmp/erlang-b.bench.cjs
 */
import { erlangbBlocking, erlangbChannels } from "../../functions/erlangb";
import { blocking } from "../../src/model/blocking/erlang-b";

const ROWS = 1_048_576;
const REPEATS = 7;
const MOST_TRAFFIC_E = 1000;

/** Numbers from 0 to 1, the same at every run (Park and Miller 1988). */
function uniform(seed: number): () => number {
  let state = seed;
  return () => (state = (state * 48271) % 2147483647) / 2147483647;
}

/** Shortest time of some repeats, in nanoseconds a row. */
function time(rows: number, run: () => unknown): number {
  let best = Infinity;
  for (let repeat = 0; repeat < REPEATS; repeat++) {
    const start = process.hrtime.bigint();
    run();
    best = Math.min(best, Number(process.hrtime.bigint() - start) / rows);
  }
  return best;
}

function doubled(cells: unknown[][]): unknown[][] {
  const out = new Array<unknown[]>(cells.length);
  for (let r = 0; r < cells.length; r++) out[r] = [(cells[r]![0] as number) * 2];
  return out;
}

/** The recursion as textbooks give it, from no channel up. */
function counted(trafficE: number, target: number): number {
  let channels = 0;
  for (let b = 1; b > target; b = (trafficE * b) / (channels + trafficE * b)) channels++;
  return channels;
}

function textbookColumn(traffic: number[][], target: number[][]): number[][] {
  return traffic.map((row, r) => [counted(row[0]!, target[r]![0]!)]);
}

const next = uniform(20261201);
const traffic = Array.from({ length: ROWS }, () => [next() * MOST_TRAFFIC_E]);
const targets = Array.from({ length: ROWS }, () => [0.001 * 100 ** next()]);
const first = (rows: number, cells: number[][]): number[][] => cells.slice(0, rows);
const report = (label: string, value: string): void => console.log(`${label.padEnd(64)} ${value}`);

const start = process.hrtime.bigint();
erlangbChannels([[500]], [[0.02]]);
report("first call of all", `${(Number(process.hrtime.bigint() - start) / 1e6).toFixed(1)} ms`);

const bare = time(ROWS, () => doubled(traffic));
const same = time(ROWS, () => erlangbChannels(traffic, [[0.02]]));
report(`bare pass that doubles ${ROWS} cells`, `${bare.toFixed(0)} ns a row`);
report(
  "CHANNELS at one target",
  `${same.toFixed(0)} ns a row: ${(same / bare).toFixed(2)} times the bare pass (at most 3)`,
);

const few = ROWS >> 4;
const own = time(ROWS, () => erlangbChannels(traffic, targets));
const textbook = time(few, () => textbookColumn(first(few, traffic), first(few, targets)));
report("textbook recursion, a target in every row", `${textbook.toFixed(0)} ns a row`);
report(
  "CHANNELS, a target in every row",
  `${own.toFixed(0)} ns a row: ${(textbook / own).toFixed(1)} times faster (at least 4)`,
);

for (const rows of [ROWS >> 6, ROWS >> 3, ROWS]) {
  const column = first(rows, traffic);
  const plain = time(rows, () => doubled(column));
  const each = time(rows, () => erlangbChannels(column, [[0.02]]));
  report(
    `growth: ${rows} rows at one target`,
    `${each.toFixed(0)} ns a row, bare pass ${plain.toFixed(0)}: ${(each / plain).toFixed(2)} times`,
  );
}
for (const size of [10, 1000, 100_000, 10_000_000]) {
  const column = traffic.slice(0, few).map(([part]) => [size * (0.9 + 0.2 * (part! / MOST_TRAFFIC_E))]);
  const each = time(few, () => erlangbBlocking(column, [[size]]));
  report(`growth: BLOCKING near ${size} channels`, `${each.toFixed(0)} ns a row`);
}
const again = textbookColumn(first(1000, traffic), first(1000, targets));
const ours = erlangbChannels(first(1000, traffic), first(1000, targets));
if (again.some(([n], r) => n !== ours[r]![0])) throw new Error("the column differs from the textbook recursion");
report("blocking of the last row", String(blocking(traffic[0]![0]!, ours[0]![0])));
