/** From the cells of a plan's tables to the model's rows and back. */
import { changesBetween, ROUNDING, type ComparedPlan } from "../model/plan/changes";
import { demandTable } from "../model/plan/demand";
import { expansionOf, type LadderStep } from "../model/plan/expansion";
import type { NeedRow } from "../model/plan/expansion-needs";
import type {
  CellRow,
  DemandRow,
  InstalledRow,
  PlanRow,
  RadioColumn,
  RoutingRow,
  ServiceKind,
  ServiceRow,
} from "../model/plan/records";
import { summarise, type Grouping, type SummedRow } from "../model/plan/summary";
import { planRows } from "../model/plan/table";
import { contains } from "../model/domain";
import { DomainError } from "../model/errors";
import { isBlank } from "./argument";
import { CellError, wrongInput } from "./cell-error";
import * as schema from "./plan-schema";
import { closest } from "./spelling";
import { labelled, readTable, type Schema, type TableRows } from "./table";

type Cells = readonly (readonly unknown[])[];

/** Reads a table of which every row must be right, since rows of a plan hang together. */
function readWhole(cells: Cells, name: string, columns: Schema, mayBeEmpty = false): TableRows {
  const table = readTable(cells, name, columns);
  const [first] = table.problems;
  if (first) {
    const more = table.problems.length - 1;
    throw wrongInput(more > 0 ? `${first.message} (${more} more wrong cells in ${name}.)` : first.message);
  }
  if (table.count === 0 && !mayBeEmpty) throw wrongInput(`${name} has headings but no rows.`);
  return table;
}

/** The rows of a table as objects, by its schema. */
function rowsOf<Row>(table: TableRows, columns: Schema): Row[] {
  const readers = Object.entries(columns).map(([name, column]) => {
    const values = column.kind === "number" ? table.numbers(name) : table.texts(name);
    return [name, values] as const;
  });
  return Array.from({ length: table.count }, (_, i) => {
    const row: Record<string, unknown> = {};
    for (const [name, values] of readers) row[name] = values[i];
    return row as Row;
  });
}

function readRows<Row>(cells: Cells, name: string, columns: Schema): Row[] {
  return rowsOf<Row>(readWhole(cells, name, columns), columns);
}

function readDemand(cells: Cells): DemandRow[] {
  const table = readWhole(cells, "Demand", schema.DEMAND);
  const rows = rowsOf<DemandRow>(table, schema.DEMAND);
  const seen = new Map<string, number>();
  rows.forEach(({ area, year }, i) => {
    const key = `${area} ${year}`;
    const before = seen.get(key);
    if (before !== undefined) {
      throw wrongInput(
        `Demand row ${table.rowNumbers[i]}, column area: ${area} has year ${year} already in row ${before}.`,
      );
    }
    seen.set(key, table.rowNumbers[i]!);
  });
  return rows;
}

/** What a service of each kind cannot do without. */
const NEEDS: Readonly<Record<ServiceKind, readonly string[]>> = {
  call: ["callsPerHour", "holdingTimeS"],
  "group call": ["callsPerHour", "holdingTimeS"],
  data: ["busyHourShare"],
  message: ["messagesPerHour", "messageBytes"],
};

function readServices(cells: Cells): ServiceRow[] {
  const table = readWhole(cells, "Services", schema.SERVICES);
  const rows = rowsOf<ServiceRow>(table, schema.SERVICES);
  rows.forEach((row, i) => {
    for (const column of NEEDS[row.kind]) {
      if (!table.present.has(column))
        throw wrongInput(`Services lacks the column ${column}, which a ${row.kind} needs.`);
    }
    if (row.targetWaitS > 0 && Number.isNaN(row.targetWaitShare)) {
      throw wrongInput(`Services row ${table.rowNumbers[i]}, column targetWaitShare: missing beside targetWaitS.`);
    }
    if (row.kind === "message" && Number.isNaN(row.targetWaitShare)) {
      throw wrongInput(`Services row ${table.rowNumbers[i]}, column targetWaitShare: missing; a message waits.`);
    }
    if (!Number.isNaN(row.targetWaitShare) && Number.isNaN(row.targetWaitS)) {
      throw wrongInput(`Services row ${table.rowNumbers[i]}, column targetWaitS: missing beside targetWaitShare.`);
    }
  });
  return rows;
}

/** The radio table lies on its side: a row a parameter, a column a scheme. */
function readRadio(cells: Cells): Map<string, RadioColumn> {
  const [heading, ...rows] = cells;
  if (!heading || String(heading[0]).trim().toLowerCase() !== "parameter") {
    throw wrongInput('Radio must begin with a heading row: "parameter", then a column for each scheme.');
  }
  const known = [...Object.keys(schema.RADIO_NUMBERS), ...schema.RADIO_TEXTS];
  const byLower = new Map(known.map((name) => [name.toLowerCase(), name]));
  const schemes = heading.map((name) => (isBlank(name) || name === 0 ? "" : String(name).trim()));
  const radio = new Map<string, Map<string, number | string>>();
  for (const name of schemes.slice(1)) {
    if (name === "") continue;
    if (radio.has(name)) throw wrongInput(`Radio has the scheme ${name} twice.`);
    radio.set(name, new Map());
  }
  if (radio.size === 0) throw wrongInput("Radio names no scheme in its first row.");
  rows.forEach((row, r) => {
    if (isBlank(row[0]) || row[0] === 0) return;
    const heading = String(row[0]).trim();
    const parameter = byLower.get(heading.toLowerCase());
    if (parameter === undefined) {
      const meant = closest(heading, known);
      if (meant) throw wrongInput(`Radio row ${r + 2}, column parameter: "${heading}" looks like ${meant}, misspelt.`);
      return;
    }
    schemes.forEach((scheme, c) => {
      const cell = row[c];
      if (c === 0 || scheme === "" || isBlank(cell)) return;
      if (cell instanceof CellError) throw cell;
      if (schema.RADIO_TEXTS.includes(parameter)) {
        // An empty cell that arrives as 0 is no text.
        if (cell !== 0) radio.get(scheme)!.set(parameter, String(cell).trim());
        return;
      }
      const allowed = schema.RADIO_NUMBERS[parameter]!;
      if (cell === 0 && (!contains(allowed, 0) || schema.RADIO_ZERO_IS_BLANK.has(parameter))) return;
      if (typeof cell !== "number" || !contains(allowed, cell)) {
        const where = `Radio row ${r + 2}, column ${scheme}: ${parameter}`;
        throw wrongInput(new DomainError(where, cell, allowed.words).message);
      }
      radio.get(scheme)!.set(parameter, cell);
    });
  });
  return radio;
}

/** PLAN.DEMAND on cells. */
export function demandCells(demand: Cells, services: Cells): unknown[][] {
  const rows = demandTable(readDemand(demand), readServices(services));
  const table: unknown[][] = [["area", "year", "service", "trafficE", "downMbps", "upMbps"]];
  for (const row of rows) table.push([row.area, row.year, row.service, row.trafficE, row.downMbps, row.upMbps]);
  return table;
}

type PlanCell = string | number | boolean | undefined;

/** Columns of the plan, in the order in which they are written. */
const PLAN_COLUMNS: readonly (readonly [name: keyof PlanRow, of: (row: PlanRow) => PlanCell])[] = [
  ["cell", (row) => row.cell],
  ["site", (row) => row.site],
  ["area", (row) => row.area],
  ["year", (row) => row.year],
  ["scheme", (row) => row.scheme],
  ["callTrafficE", (row) => row.callTrafficE],
  ["waitingTrafficE", (row) => row.waitingTrafficE],
  ["downMbps", (row) => row.downMbps],
  ["upMbps", (row) => row.upMbps],
  ["channelsRequired", (row) => row.channelsRequired],
  ["carriersRequired", (row) => row.carriersRequired],
  ["carriersInstalled", (row) => row.carriersInstalled],
  ["blocking", (row) => row.blocking],
  ["worstService", (row) => row.worstService],
  ["waitS", (row) => row.waitS],
  ["throughputMbps", (row) => row.throughputMbps],
  ["uplinkLoad", (row) => row.uplinkLoad],
  ["downlinkLoad", (row) => row.downlinkLoad],
  ["interferenceMarginDb", (row) => row.interferenceMarginDb],
  ["radiusKm", (row) => row.radiusKm],
  ["radiusNeededKm", (row) => row.radiusNeededKm],
  ["coverageMet", (row) => row.coverageMet],
  ["capacityMet", (row) => row.capacityMet],
  ["limitedBy", (row) => row.limitedBy],
  ["spareShare", (row) => row.spareShare],
  ["users", (row) => row.users],
  ["maximumCarriers", (row) => row.maximumCarriers],
];

/** PLAN.TABLE on cells. */
export function planCells(
  cells: Cells,
  demand: Cells,
  services: Cells,
  routing: Cells,
  radio: Cells,
  installed: Cells,
  year?: number,
  percentile?: number,
): unknown[][] {
  const rows = planRows(
    {
      cells: readRows<CellRow>(cells, "Cells", schema.CELLS),
      demand: readDemand(demand),
      services: readServices(services),
      routing: readRows<RoutingRow>(routing, "Routing", schema.ROUTING),
      radio: readRadio(radio),
      installed: readRows<InstalledRow>(installed, "Installed", schema.INSTALLED),
    },
    year,
    percentile,
  );
  const table: unknown[][] = [PLAN_COLUMNS.map(([name]) => name)];
  for (const row of rows) {
    const line = new Array<unknown>(PLAN_COLUMNS.length);
    for (let c = 0; c < line.length; c++) line[c] = PLAN_COLUMNS[c]![1](row) ?? "";
    table.push(line);
  }
  return table;
}

function flagAt(cells: Cells, plan: TableRows, column: string): (row: number) => boolean {
  const at = cells[0]!.findIndex((name) => String(name).trim().toLowerCase() === column.toLowerCase());
  return (row) => {
    const cell = at < 0 ? true : cells[plan.rowNumbers[row]! - 1]![at];
    return cell === true || (typeof cell === "string" && cell.trim().toLowerCase() === "true") || cell === 1;
  };
}

/** Rows made as they are asked for, so that none is kept. */
function* each<Row>(count: number, rowAt: (i: number) => Row): Generator<Row, void> {
  for (let i = 0; i < count; i++) yield rowAt(i);
}

/** PLAN.SUMMARY on cells. */
export function summaryCells(planCells: Cells, by: Grouping): unknown[][] {
  const plan = readWhole(planCells, "Plan", schema.PLAN);
  const capacityMet = flagAt(planCells, plan, "capacityMet");
  const coverageMet = flagAt(planCells, plan, "coverageMet");
  const key = by === "year" ? plan.numbers("year") : plan.texts(by);
  const cell = plan.texts("cell");
  const users = plan.numbers("users");
  const callTrafficE = plan.numbers("callTrafficE");
  const waitingTrafficE = plan.numbers("waitingTrafficE");
  const downMbps = plan.numbers("downMbps");
  const upMbps = plan.numbers("upMbps");
  const carriersRequired = plan.numbers("carriersRequired");
  const carriersInstalled = plan.numbers("carriersInstalled");
  const blocking = plan.numbers("blocking");
  const rowAt = (i: number): SummedRow => ({
    key: key[i]!,
    cell: cell[i]!,
    users: users[i]!,
    callTrafficE: callTrafficE[i]!,
    waitingTrafficE: waitingTrafficE[i]!,
    downMbps: downMbps[i]!,
    upMbps: upMbps[i]!,
    carriersRequired: carriersRequired[i]!,
    carriersInstalled: carriersInstalled[i]!,
    blocking: blocking[i]!,
    capacityMet: capacityMet(i),
    coverageMet: coverageMet(i),
  });
  const summary = summarise(each(plan.count, rowAt));
  return labelled(
    [
      by,
      "users",
      "callTrafficE",
      "waitingTrafficE",
      "downMbps",
      "upMbps",
      "cells",
      "cellsShort",
      "cellsUncovered",
      "carriersRequired",
      "carriersInstalled",
      "blocking",
    ],
    summary.map((row) => [
      row.key,
      row.users,
      row.callTrafficE,
      row.waitingTrafficE,
      row.downMbps,
      row.upMbps,
      row.cells,
      row.cellsShort,
      row.cellsUncovered,
      row.carriersRequired,
      row.carriersInstalled,
      Number.isNaN(row.blocking) ? "" : row.blocking,
    ]),
  );
}

/** PLAN.EXPANSION on cells. */
export function expansionCells(planCells: Cells, ladderCells: Cells): unknown[][] {
  const plan = readWhole(planCells, "Plan", schema.PLAN);
  const coverageMet = flagAt(planCells, plan, "coverageMet");
  const cell = plan.texts("cell");
  const year = plan.numbers("year");
  const scheme = plan.texts("scheme");
  const users = plan.numbers("users");
  const callTrafficE = plan.numbers("callTrafficE");
  const waitingTrafficE = plan.numbers("waitingTrafficE");
  const maximumCarriers = plan.numbers("maximumCarriers");
  const channelsRequired = plan.numbers("channelsRequired");
  const carriersRequired = plan.numbers("carriersRequired");
  const carriersInstalled = plan.numbers("carriersInstalled");
  const radiusKm = plan.numbers("radiusKm");
  const radiusNeededKm = plan.numbers("radiusNeededKm");
  const rowAt = (i: number): NeedRow => ({
    cell: cell[i]!,
    year: year[i]!,
    scheme: scheme[i]!,
    users: users[i]!,
    callTrafficE: callTrafficE[i]!,
    waitingTrafficE: waitingTrafficE[i]!,
    maximumCarriers: maximumCarriers[i]!,
    channelsRequired: channelsRequired[i]!,
    carriersRequired: carriersRequired[i]!,
    carriersInstalled: carriersInstalled[i]!,
    radiusKm: radiusKm[i]!,
    radiusNeededKm: radiusNeededKm[i]!,
    coverageMet: coverageMet(i),
  });
  const steps = expansionOf(
    cell,
    rowAt,
    rowsOf<LadderStep>(readWhole(ladderCells, "Ladder", schema.LADDER, true), schema.LADDER),
  );
  return labelled(
    ["cell", "step", "orderBy", "inServiceBy", "cost"],
    steps.map((row) => [row.cell, row.step, row.orderBy, row.inServiceBy, row.cost]),
  );
}

const KEY_COLUMNS = { cell: schema.PLAN.cell, year: schema.PLAN.year, scheme: schema.PLAN.scheme } satisfies Schema;

function comparedPlan(cells: Cells, name: string): ComparedPlan {
  const table = readWhole(cells, name, KEY_COLUMNS);
  const year = table.numbers("year");
  const scheme = table.texts("scheme");
  const keys = table.texts("cell").map((cell, i): [string, number, string] => [cell, year[i]!, scheme[i]!]);
  const columns = new Map<string, unknown[]>();
  cells[0]!.forEach((heading, c) => {
    if (isBlank(heading) || String(heading).trim().toLowerCase() in KEY_COLUMNS) return;
    columns.set(
      String(heading).trim(),
      table.rowNumbers.map((row) => plain(cells[row - 1]![c])),
    );
  });
  return { keys, columns };
}

/** Blank cells arrive as null, as a text or as nothing, all the same here. */
function plain(cell: unknown): unknown {
  if (isBlank(cell)) return "";
  return cell instanceof CellError ? cell.code : cell;
}

/** PLAN.CHANGES on cells. */
export function changeCells(before: Cells, after: Cells, tolerance = ROUNDING): unknown[][] {
  const changes = changesBetween(comparedPlan(before, "before"), comparedPlan(after, "after"), tolerance);
  return labelled(
    ["cell", "year", "scheme", "column", "before", "after", "change"],
    changes.map((row) => [row.cell, row.year, row.scheme, row.column, row.before, row.after, row.change]),
  );
}
