/**
 * Time of the multi-service functions, with the recursion against a bare double loop of the same additions.
 *
 * npx esbuild tests/benchmarks/multiservice.bench.ts --bundle --platform=node --outfile=/tmp/bench.cjs && node /tmp/bench.cjs
 */
import { Bench } from "tinybench";
import * as multiservice from "../../src/model/blocking/multiservice";

const UNITS = 10_000;
const width = Array.from({ length: 30 }, (_, i) => 1 + 3 * i);
const trafficE = width.map((w) => (0.95 * UNITS) / width.length / w);
const peakedness = width.map((_, i) => 1 + (i % 4) / 2);
const targets = width.map(() => 0.01);

const widths = Int32Array.from(width);
const offered = Float64Array.from(width, (w, i) => w * trafficE[i]!);

/** The additions alone, on weights that stay near 1: no division, no scale, no probabilities. */
function bareDoubleLoop(): number {
  const weights = new Float64Array(UNITS + 1);
  weights[0] = 1;
  for (let state = 1; state <= UNITS; state++) {
    let sum = 0;
    for (let i = 0; i < widths.length && widths[i]! <= state; i++) sum += offered[i]! * weights[state - widths[i]!]!;
    weights[state] = sum / (0.95 * UNITS);
  }
  return weights[UNITS]!;
}

async function main(): Promise<void> {
  const bench = new Bench({ time: 1000 });
  bench
    .add("bare double loop", () => void bareDoubleLoop())
    .add("MULTISERVICE.BLOCKING", () => void multiservice.blocking(UNITS, trafficE, width))
    .add("MULTISERVICE.UTILISATION", () => void multiservice.utilisation(UNITS, trafficE, width))
    .add("MULTISERVICE.UNITS", () => void multiservice.units(trafficE, width, targets))
    .add("MULTISERVICE.PEAKY", () => void multiservice.peaky(UNITS, trafficE, width, peakedness));
  await bench.run();
  const median = (name: string): number => {
    const result = bench.getTask(name)!.result;
    return "latency" in result ? result.latency.p50 : NaN;
  };
  const bare = median("bare double loop");
  for (const { name } of bench.tasks) {
    const time = median(name);
    process.stdout.write(
      `${name.padEnd(26)} ${time.toFixed(3)} ms, ${(time / bare).toFixed(2)} times the bare double loop\n`,
    );
  }
}

void main();
