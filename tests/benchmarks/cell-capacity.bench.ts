/**
 * What CAP.RATE.CELLCAPACITY costs, fresh and remembered, against drawing places at random to a hundred times its error bound.
 *
 * npx esbuild tests/benchmarks/cell-capacity.bench.ts --bundle --platform=node --outfile=/tmp/bench.cjs && node /tmp/bench.cjs
 */
import { rateCellcapacity } from "../../functions/rate";
import { cellAverages, type CellParameters } from "../../src/model/radio/cell-efficiency";
import { localSinr } from "../../src/model/radio/local-sinr";
import { attenuated } from "../../src/model/radio/rate";

const REPEATS = 15;
/** Draws for a relative error of about 1e-2 of the mean time a bit: its spread over the cell is about its mean. */
const DRAWS = 10_000;

const CASES: [label: string, parameters: Partial<CellParameters>][] = [
  ["reuse of one, no shadowing", {}],
  ["reuse of one, 8 dB", { shadowingDb: 8 }],
  ["reuse of one, 1 dB", { shadowingDb: 1 }],
  ["cluster of seven, three sectors, 6 dB, noise", { clusterSize: 7, sectors: 3, shadowingDb: 6, edgeSnrDb: 10 }],
  ["hard: 0.1 dB around a jump in the cell", { minimumDb: -2, shadowingDb: 0.1 }],
];

const BASE: CellParameters = {
  pathLossExponent: 3.5,
  clusterSize: 1,
  sectors: 1,
  load: 1,
  edgeSnrDb: undefined,
  shadowingDb: 0,
  attenuation: 0.6,
  minimumDb: -10,
  maximumBpsHz: 4.4,
};

/** Shortest time of some repeats, in milliseconds. */
function time(run: () => unknown): number {
  let best = Infinity;
  for (let repeat = 0; repeat < REPEATS; repeat++) {
    const start = process.hrtime.bigint();
    run();
    best = Math.min(best, Number(process.hrtime.bigint() - start) / 1e6);
  }
  return best;
}

/** Numbers from 0 to 1, the same at every run (Park and Miller 1988). */
function uniform(seed: number): () => number {
  let state = seed;
  return () => (state = (state * 48271) % 2147483647) / 2147483647;
}

function drawn(p: CellParameters): number {
  const next = uniform(20261201);
  const sinr = localSinr(p.pathLossExponent, p.clusterSize, p.sectors, p.load, p.edgeSnrDb);
  let seconds = 0;
  for (let n = 0; n < DRAWS; n++) {
    // A place in the sixth of the hexagon between its corners at -30 and 30 degrees.
    let [u, v] = [next(), next()];
    if (u + v > 1) [u, v] = [1 - u, 1 - v];
    const [x, y] = [((u + v) * Math.sqrt(3)) / 2, (v - u) / 2];
    const r = Math.hypot(x, y);
    const normal = Math.sqrt(-2 * Math.log(next())) * Math.cos(2 * Math.PI * next());
    const db = (sinr.at(Math.log(r), x / r, y / r) * 10) / Math.LN10 + p.shadowingDb * normal;
    const rate = attenuated(1, Math.min(db, 1000), p.attenuation, p.minimumDb, p.maximumBpsHz);
    if (rate > 0) seconds += 1 / rate;
  }
  return seconds / DRAWS;
}

for (const [label, change] of CASES) {
  const parameters = { ...BASE, ...change };
  const fresh = time(() => cellAverages(parameters));
  const random = time(() => drawn(parameters));
  console.log(`${label.padEnd(50)} ${fresh.toFixed(2)} ms, ${(random / fresh).toFixed(1)} of them for ${DRAWS} draws`);
}
const column = Array.from({ length: 10_000 }, () => [1]);
const remembered = time(() => rateCellcapacity([[3.5]], column)) / column.length;
console.log(`${"a remembered call, in a column of 10 000".padEnd(50)} ${(1000 * remembered).toFixed(2)} us`);
