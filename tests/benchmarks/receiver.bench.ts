/**
 * RECEIVER.SINR beside a straightforward dense solve with mathjs: the symbols of a short window as one matrix, inverted whole.
 *
 * The window of the dense solve is fixed at three symbols, the shortest that sees both neighbours; the product's grows until the
 * answer settles, so the comparison favours the dense solve. Run:
 * npx esbuild tests/benchmarks/receiver.bench.ts --bundle --platform=node --outfile=/tmp/receiver.cjs && node /tmp/receiver.cjs
 */
import { inv } from "mathjs";
import { symbolCorrelations } from "../../src/model/codes/symbol-correlations";
import * as receiver from "../../src/model/codes/receiver";
import { SeededRandom } from "../support/seeded-random";

function milliseconds(run: () => unknown, times: number): number {
  let best = Infinity;
  for (let i = 0; i < times; i++) {
    const start = process.hrtime.bigint();
    run();
    best = Math.min(best, Number(process.hrtime.bigint() - start) / 1e6);
  }
  return best;
}

function denseMmse(codes: number[][], powersDbm: number[], delays: number[], noiseDbm: number): number[] {
  const chips = codes.map((code) => Int8Array.from(code));
  const { size, same, next } = symbolCorrelations(chips, delays);
  const amplitude = powersDbm.map((power) => 10 ** ((power - noiseDbm) / 20));
  const rows = Array.from({ length: 3 * size }, (_, r) =>
    Array.from({ length: 3 * size }, (_, c) => {
      const [k, j] = [r % size, c % size];
      const ahead = Math.floor(c / size) - Math.floor(r / size);
      const rho =
        ahead === 0 ? same[k * size + j]! : ahead === 1 ? next[k * size + j]! : ahead === -1 ? next[j * size + k]! : 0;
      return rho * amplitude[k]! * amplitude[j]! + (r === c ? 1 : 0);
    }),
  );
  const inverse = inv(rows);
  return powersDbm.map((_, k) => 10 * Math.log10(1 / inverse[size + k]![size + k]! - 1));
}

for (const [users, chips] of [
  [8, 32],
  [16, 64],
  [32, 128],
  [64, 256],
] as const) {
  const random = new SeededRandom(users);
  const codes = Array.from({ length: users }, () => Array.from({ length: chips }, () => random.sign()));
  const powers = codes.map(() => -100 + 10 * random.uniform());
  const delays = codes.map(() => chips * random.uniform());
  const ours = milliseconds(() => receiver.sinr(codes, powers, delays, -110, "mmse"), 10);
  const dense = milliseconds(() => denseMmse(codes, powers, delays, -110), users < 32 ? 3 : 1);
  const short = denseMmse(codes, powers, delays, -110);
  const gap = Math.max(
    ...receiver.sinr(codes, powers, delays, -110, "mmse").map((value, k) => Math.abs((value as number) - short[k]!)),
  );
  console.log(
    `${users} users, ${chips} chips, mmse: ${ours.toFixed(2)} ms; dense, 3 symbols: ${dense.toFixed(1)} ms; ` +
      `ratio ${(dense / ours).toFixed(0)}; largest difference ${gap.toExponential(1)} dB`,
  );
}
