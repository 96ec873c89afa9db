/** Hostile input for every function: a typed error with a message or a real answer, never NaN, and never a long wait. */
import fc from "fast-check";
import { functionTable } from "../../functions/generated/function-table";
import { CellError } from "../../src/sheet/cell-error";

const SEED = Number(process.env["FUZZ_SEED"] ?? 20261201);
const RUNS = Number(process.env["FUZZ_RUNS"] ?? 60);
const LONGEST_CALL_MS = 1000;

const number = fc.oneof(
  fc.double({ noNaN: false }),
  fc.double({ min: 0, max: 1, noNaN: true }),
  fc.double({ min: 0, max: 1000, noNaN: true }),
  fc.integer({ min: -5, max: 5000 }),
  fc.constantFrom(0, -0, 1, 1e308, -1e308, 5e-324, 2 ** 53, 1e-9, 1e7, 1e12, Infinity, -Infinity, NaN),
);
const words = fc.oneof(
  fc.string({ maxLength: 20 }),
  fc.constantFrom(
    "__proto__",
    "constructor",
    "toString",
    "hasOwnProperty",
    "=1+1",
    "x".repeat(5000),
    "5",
    "TRUE",
    " ",
    "ERLANGB.BLOCKING",
  ),
);
const cell = fc.oneof(
  { weight: 8, arbitrary: number },
  { weight: 2, arbitrary: words },
  { weight: 1, arbitrary: fc.constantFrom<unknown>(null, undefined, "", true, false) },
  { weight: 1, arbitrary: fc.constantFrom<unknown>({}, [], new CellError("#N/A", "from elsewhere")) },
);
const range = fc.oneof(
  { weight: 6, arbitrary: cell.map((value) => [[value]]) },
  {
    weight: 2,
    arbitrary: fc
      .tuple(fc.integer({ min: 1, max: 6 }), fc.integer({ min: 1, max: 4 }))
      .chain(([rows, columns]) =>
        fc.array(fc.array(cell, { minLength: columns, maxLength: columns }), { minLength: rows, maxLength: rows }),
      ),
  },
  { weight: 1, arbitrary: fc.constantFrom<unknown>(null, undefined, [], [[]]) },
);

function faults(result: unknown): string[] {
  if (!Array.isArray(result) || result.length === 0) return ["not a range"];
  const width = (result[0] as unknown[]).length;
  const found: string[] = [];
  for (const row of result as unknown[][]) {
    if (row.length !== width || width === 0) found.push("ragged");
    for (const value of row) {
      if (value instanceof CellError) {
        if (!/^#(VALUE!|N\/A)$/.test(value.code)) found.push(`code ${value.code}`);
        if (value.message.length === 0) found.push("no message");
        if (value.message.length > 600) found.push(`message of ${value.message.length} characters`);
        if (value.message.includes("Internal fault")) found.push(value.message);
      } else if (typeof value === "number") {
        if (!Number.isFinite(value)) found.push(String(value));
      } else if (typeof value !== "string" && typeof value !== "boolean") found.push(`a ${typeof value}`);
    }
  }
  return found;
}

test.each(Object.keys(functionTable))("%s", (id) => {
  const entry = functionTable[id]!;
  const args = fc.array(range, { minLength: entry.parameters.length, maxLength: entry.parameters.length });
  fc.assert(
    fc.property(args, (values) => {
      const start = process.cpuUsage();
      const result = entry.call(values as unknown[][][]);
      const spent = process.cpuUsage(start);
      expect(faults(result)).toEqual([]);
      expect((spent.user + spent.system) / 1000).toBeLessThan(LONGEST_CALL_MS);
    }),
    { seed: SEED, numRuns: RUNS },
  );
});
