/** Published figures of quantities that no function of ours answers, but that follow from ours in a line. */
import * as erlangB from "../../../src/model/blocking/erlang-b";
import * as erlangC from "../../../src/model/blocking/erlang-c";
import * as overflow from "../../../src/model/blocking/overflow";
import { inverseTerm, sumsAbove } from "../../../src/model/numerics/poisson-ratio";
import { root } from "../../../src/model/numerics/root";
import { publishedValue, title } from "../../checks/published";

type Inputs = Record<string, number>;

const check = (id: string, compute: (inputs: Inputs) => number): void => {
  const entry = publishedValue(id);
  test(title(entry), () => {
    const actual = compute(entry.inputs as Inputs);
    expect(Math.abs(actual - entry.expected)).toBeLessThanOrEqual(entry.tolerance ?? 1e-10 * Math.abs(entry.expected));
  });
};
const a = (i: Inputs): number => i["A_offered_erlang"]!;
const n = (i: Inputs): number => i["n_servers"] ?? i["N_servers"]!;

// Lost calls held: the whole Poisson sum from N on.
for (const id of ["EB-P01", "EB-P03"]) check(id, (i) => (1 + sumsAbove(n(i), a(i)).total) / inverseTerm(n(i), a(i)));

check("EC-51", (i) => {
  const [h, t] = [i["h_mean_holding_s"]!, i["t_s"]!];
  return (i["C_delay_prob"]! * erlangC.late(a(i), n(i), h, t)) / erlangC.delayed(a(i), n(i));
});
check("EC-53", (i) => root((traffic) => erlangC.delayed(traffic, n(i)) - i["C_delay_prob"]!, 1, n(i) - 1));

// A call overflows every h / (A B) seconds.
for (const id of ["OV-11t", "OV-12t"]) check(id, (i) => i["h_mean_holding_s"]! / overflow.mean(a(i), n(i)));
check("OV-21", (i) => overflow.mean(a(i), n(i) + i["overflow_trunks"]!) / overflow.mean(a(i), n(i)));
check("OV-22", (i) => erlangB.blocking(overflow.mean(a(i), n(i)), i["overflow_trunks"]!));
// Variance of the busy channels: Y - m (N - Y).
check("OV-61", (i) => {
  const carried = erlangB.carried(a(i), n(i));
  return carried - overflow.mean(a(i), n(i)) * (n(i) - carried);
});
// What Rapp's approximation would give: the equation is ours, his group only approximates its solution.
check("OV-42r", (i) => {
  const stream = [1, 2].map((k) => [i[`A${k}`]!, i[`n${k}`]!] as const);
  const m = stream.reduce((sum, group) => sum + overflow.mean(...group), 0);
  const v = stream.reduce((sum, group) => sum + overflow.variance(...group), 0);
  const z = v / m;
  const traffic = v + 3 * z * (z - 1);
  return overflow.mean(traffic, (traffic * (m + z)) / (m + z - 1) - m - 1 + i["L_overflow_circuits"]!);
});
