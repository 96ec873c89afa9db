/** What the engine calls for custom functions, and for the few built-ins of which its own are off by up to 1.4e-7. */
import { erf, erfc } from "../../model/numerics/erfc";
import * as normal from "../../model/numerics/normal";
import { CellError } from "../../sheet/cell-error";
import type { FunctionTable } from "../function-table";
import { storedName } from "../stored-names";
import { fromCells, toCells } from "./values";

export interface EngineFunction {
  readonly minArity: number;
  readonly maxArity: number;
  invoke(args: Parameters<typeof toCells>[0][]): ReturnType<typeof fromCells>;
}

/** Messages that functions gave with their errors, as people see them beside the cells. */
export type Report = (id: string, error: CellError) => void;

const MOST_ARGUMENTS = 255;

type Numeric = (...values: number[]) => number;

function builtIn(fn: Numeric): EngineFunction {
  return {
    minArity: 0,
    maxArity: MOST_ARGUMENTS,
    invoke(args) {
      const cells = args.map((argument) => toCells(argument)[0]![0]);
      const error = cells.find((cell) => cell instanceof CellError);
      if (error) return fromCells([[error]]);
      return fromCells([[fn(...cells.map(Number))]]);
    },
  };
}

const distribution: Numeric = (x, mean, deviation, cumulative) => {
  const z = (x - mean) / deviation;
  return cumulative ? normal.cdf(z) : normal.density(z) / deviation;
};

const BUILT_INS: Readonly<Record<string, EngineFunction>> = {
  "NORM.S.DIST": builtIn((z, cumulative) => (cumulative ? normal.cdf(z) : normal.density(z))),
  NORMSDIST: builtIn(normal.cdf),
  "NORM.DIST": builtIn(distribution),
  NORMDIST: builtIn(distribution),
  "NORM.S.INV": builtIn(normal.quantile),
  NORMSINV: builtIn(normal.quantile),
  "NORM.INV": builtIn((p, mean, deviation) => mean + deviation * normal.quantile(p)),
  NORMINV: builtIn((p, mean, deviation) => mean + deviation * normal.quantile(p)),
  ERF: builtIn((from, to) => (to === undefined ? erf(from) : erf(to) - erf(from))),
  ERFC: builtIn(erfc),
};

/** Engine functions by upper-case name: ours in the written and in the stored form, and the built-ins above. */
export function engineFunctions(functions: FunctionTable, report: Report): Map<string, EngineFunction> {
  const table = new Map(Object.entries(BUILT_INS));
  for (const [id, entry] of Object.entries(functions)) {
    const engineFunction: EngineFunction = {
      minArity: 0,
      maxArity: MOST_ARGUMENTS,
      invoke(args) {
        const answer = entry.call(args.map(toCells));
        for (const row of answer) for (const cell of row) if (cell instanceof CellError) report(id, cell);
        return fromCells(answer);
      },
    };
    table.set(`CAP.${id}`.toUpperCase(), engineFunction);
    table.set(storedName(id).toUpperCase(), engineFunction);
  }
  return table;
}
