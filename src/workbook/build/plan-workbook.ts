/** Makes the workbook of a plan from its tables: inputs, a handful of spilled formulas, charts, method and checks. */
import type { PlanTables } from "../csv/plan-files";
import { newBook, writeBook, type Book } from "../engine/library";
import type { FunctionTable } from "../function-table";
import { recalculate, type Recalculated } from "../recalculate";
import { addChecks } from "./checks-sheet";
import { addDashboard } from "./dashboard-sheet";
import { addInputSheet, type InputTable } from "./input-sheet";
import { locked, printed, putHeading, putTitle } from "./look";
import { addMethod } from "./method-sheet";
import type { Origin } from "./origin";
import { addPurpose } from "./purpose-sheet";
import { addResultSheet } from "./result-sheet";
import { CHANGES_HEADINGS, SHEETS } from "./sheet-names";

const PLAN_HEADINGS = [
  ...["cell", "site", "area", "year", "scheme", "callTrafficE", "waitingTrafficE", "downMbps", "upMbps"],
  ...[
    "channelsRequired",
    "carriersRequired",
    "carriersInstalled",
    "blocking",
    "worstService",
    "waitS",
    "throughputMbps",
  ],
  ...["uplinkLoad", "downlinkLoad", "interferenceMarginDb", "radiusKm", "radiusNeededKm", "coverageMet", "capacityMet"],
  ...["limitedBy", "spareShare", "users", "maximumCarriers"],
];

const SUMMARY_HEADINGS = [
  ...["users", "callTrafficE", "waitingTrafficE", "downMbps", "upMbps", "cells", "cellsShort", "cellsUncovered"],
  ...["carriersRequired", "carriersInstalled", "blocking"],
];

function inputTables(tables: PlanTables): InputTable[] {
  return [
    {
      sheet: SHEETS.forecast,
      range: "DemandTable",
      title: "Forecast",
      purpose: "Users of each area, year by year. A new forecast replaces these rows and nothing else.",
      cells: tables.demand,
    },
    {
      sheet: SHEETS.services,
      range: "ServicesTable",
      title: "Services",
      purpose:
        "What users do in the busy hour and what they are promised. A row for one year goes before the row without a year.",
      cells: tables.services,
    },
    {
      sheet: SHEETS.routing,
      range: "RoutingTable",
      title: "Routing",
      purpose: "Which scheme carries which share of a service. A migration is a change of shares over the years.",
      cells: tables.routing,
    },
    {
      sheet: SHEETS.radio,
      range: "RadioTable",
      title: "Radio",
      purpose:
        "Facts of each scheme, a column a scheme, parameters named as in the functions. Radiated power: the local licence governs.",
      cells: tables.radio,
    },
    {
      sheet: SHEETS.cells,
      range: "CellsTable",
      title: "Cells",
      purpose: "Every cell (one sector of one site), its share of the area's users and the area that it must cover.",
      cells: tables.cells,
    },
    {
      sheet: SHEETS.installed,
      range: "InstalledTable",
      title: "Installed",
      purpose: "Carriers of each cell and scheme, with the years in which they stand.",
      cells: tables.installed,
    },
    {
      sheet: SHEETS.ladder,
      range: "LadderTable",
      title: "Ladder",
      purpose: "Steps by which a cell can grow, with cost and lead time.",
      cells: tables.ladder,
    },
  ];
}

async function addResults(book: Book, functions: FunctionTable): Promise<void> {
  await addResultSheet(
    book,
    SHEETS.traffic,
    "Traffic",
    "Busy-hour traffic of each service in each area and year, from forecast and services.",
    [
      {
        formula: "=CAP.PLAN.DEMAND(DemandTable,ServicesTable)",
        column: 1,
        headings: ["area", "year", "service", "trafficE", "downMbps", "upMbps"],
      },
    ],
    functions,
  );
  await addResultSheet(
    book,
    SHEETS.plan,
    "Plan",
    "For every cell, year and scheme: what is needed, what is installed, what users see, and what is missing first. One formula in A5 fills the sheet.",
    [
      {
        formula: "=CAP.PLAN.TABLE(CellsTable,DemandTable,ServicesTable,RoutingTable,RadioTable,InstalledTable)",
        column: 1,
        headings: PLAN_HEADINGS,
      },
    ],
    functions,
  );
  const plan = `_xlfn.ANCHORARRAY(${SHEETS.plan}!$A$5)`;
  await addResultSheet(
    book,
    SHEETS.summary,
    "Summary",
    "Totals of the plan by year and, to the right, by scheme (there years add up). Percentiles of cells do not add.",
    [
      { formula: `=CAP.PLAN.SUMMARY(${plan},"year")`, column: 1, headings: ["year", ...SUMMARY_HEADINGS] },
      { formula: `=CAP.PLAN.SUMMARY(${plan},"scheme")`, column: 14, headings: ["scheme", ...SUMMARY_HEADINGS] },
    ],
    functions,
  );
  await addResultSheet(
    book,
    SHEETS.expansion,
    "Expansion",
    "The cheapest steps of the ladder that keep every cell within its targets, with dates to order by; cells that need nothing are left out.",
    [
      {
        formula: `=CAP.PLAN.EXPANSION(${plan},LadderTable)`,
        column: 1,
        headings: ["cell", "step", "orderBy", "inServiceBy", "cost"],
      },
    ],
    functions,
  );
}

async function addChanges(book: Book): Promise<void> {
  const sheet = book.addWorksheet(SHEETS.changes);
  putTitle(sheet, "Changes", "Filled when a new forecast is loaded: only what moved, with both values.");
  CHANGES_HEADINGS.forEach((name, c) => {
    putHeading(sheet.getCell(5, c + 1), name);
    sheet.getColumn(c + 1).width = name === "column" || name === "scheme" ? 22 : 14;
    if (["before", "after", "change"].includes(name)) sheet.getColumn(c + 1).numFmt = "#,##0.0000";
  });
  printed(sheet, 5);
  await locked(sheet);
}

/**
 * The workbook of a plan, calculated.
 *
 * @param tables the plan's tables
 * @param functions our functions
 * @param origin what is recorded of its making
 */
export async function planWorkbook(
  tables: PlanTables,
  functions: FunctionTable,
  origin: Origin,
): Promise<Recalculated> {
  const book = newBook();
  Object.assign(book, {
    creator: `capacity ${origin.version}`,
    lastModifiedBy: `capacity ${origin.version}`,
    created: origin.time,
    modified: origin.time,
    title: "Radio capacity plan",
    subject: origin.invented ? "Invented scenario" : "Capacity plan",
    keywords: Object.entries(origin.hashes)
      .map(([name, hash]) => `${name} sha256:${hash}`)
      .join("; "),
  });
  await addPurpose(book, origin);
  for (const table of inputTables(tables)) await addInputSheet(book, table);
  await addResults(book, functions);
  const years = new Set(tables.demand.slice(1).map((row) => row[1])).size;
  await addDashboard(book, years);
  await addMethod(book, functions);
  await addChecks(book);
  await addChanges(book);
  return recalculate(await writeBook(book), functions);
}
