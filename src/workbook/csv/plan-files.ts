/** The tables of a plan as CSV files: which there are, and reading them with checks. */
import { CELLS, INSTALLED, LADDER, ROUTING, SERVICES } from "../../sheet/plan-schema";
import type { Schema } from "../../sheet/table";
import { WorkbookFailure } from "../failure";
import { checkTable, readForecast } from "./forecast";
import { readCsv } from "./read";

export const PLAN_TABLES = ["demand", "services", "routing", "radio", "cells", "installed", "ladder"] as const;
export type PlanTable = (typeof PLAN_TABLES)[number];

/** Cells of each table, its heading first. */
export type PlanTables = Readonly<Record<PlanTable, unknown[][]>>;

const SCHEMAS: Readonly<Partial<Record<PlanTable, Schema>>> = {
  services: SERVICES,
  routing: ROUTING,
  cells: CELLS,
  installed: INSTALLED,
  ladder: LADDER,
};

/** A ladder is of use to the expansion alone, so a plan may come without one. */
const WITHOUT: Readonly<Partial<Record<PlanTable, unknown[][]>>> = {
  ladder: [Object.keys(LADDER)],
};

/**
 * Reads the tables of a plan.
 *
 * @param textOf content of a file by name, undefined where there is none
 */
export function readPlanFiles(textOf: (file: string) => string | undefined): PlanTables {
  const read = (table: PlanTable): unknown[][] => {
    const file = `${table}.csv`;
    const text = textOf(file);
    if (text === undefined) {
      const without = WITHOUT[table];
      if (without) return without;
      throw new WorkbookFailure(`there is no ${file} in the folder; it holds the table ${table} of the plan.`);
    }
    if (table === "demand") return readForecast(text, file);
    const cells = readCsv(text, file);
    const schema = SCHEMAS[table];
    if (schema) checkTable(cells, file, schema);
    else if (String(cells[0]![0]).toLowerCase() !== "parameter") {
      throw new WorkbookFailure(`${file} row 1, column 1: must be "parameter", followed by a column for each scheme.`);
    }
    return cells;
  };
  return Object.fromEntries(PLAN_TABLES.map((table) => [table, read(table)])) as Record<PlanTable, unknown[][]>;
}
