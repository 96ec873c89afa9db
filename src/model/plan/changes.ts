/** What differs between two plans. PLAN.CHANGES. */

/** One plan as columns of cells, rows found by a key. */
export interface ComparedPlan {
  /** Key of each row: cell, year and scheme. */
  readonly keys: readonly (readonly [string, number, string])[];
  readonly columns: ReadonlyMap<string, readonly unknown[]>;
}

export interface Change {
  readonly cell: string;
  readonly year: number;
  readonly scheme: string;
  readonly column: string;
  readonly before: unknown;
  readonly after: unknown;
  /** Difference of numbers; "" for texts and for rows that only one plan has. */
  readonly change: number | "";
}

/** Relative difference below which two computations of one plan agree. */
export const ROUNDING = 1e-9;

function keyText(key: readonly [string, number, string]): string {
  return JSON.stringify(key);
}

function differs(before: unknown, after: unknown, tolerance: number): boolean {
  if (typeof before === "number" && typeof after === "number") {
    return Math.abs(after - before) > tolerance * Math.max(Math.abs(before), Math.abs(after));
  }
  return before !== after;
}

/**
 * The cells that differ, in the order of the later plan, then the rows that it no longer has.
 *
 * @param before earlier plan
 * @param after later plan
 * @param tolerance relative difference that does not count
 */
export function changesBetween(before: ComparedPlan, after: ComparedPlan, tolerance = ROUNDING): Change[] {
  const rowBefore = new Map(before.keys.map((key, row) => [keyText(key), row]));
  const shared = [...after.columns].filter(([name]) => before.columns.has(name));
  const changes: Change[] = [];
  after.keys.forEach((key, row) => {
    const [cell, year, scheme] = key;
    const text = keyText(key);
    const old = rowBefore.get(text);
    rowBefore.delete(text);
    if (old === undefined) {
      changes.push({ cell, year, scheme, column: "row", before: "absent", after: "present", change: "" });
      return;
    }
    for (const [column, values] of shared) {
      const was = before.columns.get(column)![old];
      const is = values[row];
      if (!differs(was, is, tolerance)) continue;
      const change = typeof was === "number" && typeof is === "number" ? is - was : "";
      changes.push({ cell, year, scheme, column, before: was, after: is, change });
    }
  });
  for (const row of rowBefore.values()) {
    const [cell, year, scheme] = before.keys[row]!;
    changes.push({ cell, year, scheme, column: "row", before: "present", after: "absent", change: "" });
  }
  return changes;
}
