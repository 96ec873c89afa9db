/** Makes the workbook of a plan from its tables: inputs, a handful of spilled formulas, charts, method and checks. */
import type { PlanTables } from "../csv/plan-files";
import { newBook, writeBook, type Book, type Sheet } from "../engine/library";
import type { FunctionTable } from "../function-table";
import { recalculate, type Recalculated } from "../recalculate";
import { addChecks } from "./checks-sheet";
import { addDashboard } from "./dashboard-sheet";
import { addInputSheet, type InputTable } from "./input-sheet";
import { locked, markInput, printed, putHeading, putNote, putTitle } from "./look";
import { addLinkBudget } from "./link-budget-sheet";
import { addMethod } from "./method-sheet";
import type { Origin } from "./origin";
import { addPurpose } from "./purpose-sheet";
import { addReceiver } from "./receiver-sheet";
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

const PERCENTILE_COLUMN = 27;
const PERCENTILE_CELL = "$AA$3";
const USUAL_PERCENTILE = 0.9;

/** The percentile of the second summary: an input beside the results. */
function addPercentile(sheet: Sheet): void {
  const cell = sheet.getCell(3, PERCENTILE_COLUMN);
  markInput(cell);
  cell.value = USUAL_PERCENTILE;
  cell.numFmt = "0 %";
  putNote(
    sheet.getCell(3, PERCENTILE_COLUMN + 1),
    "percentile of the forecast (errorPerYear); the table below is the plan with it. Percentiles of cells do not add: the sum is on the safe side.",
  );
  sheet.getCell(3, PERCENTILE_COLUMN + 1).alignment = { wrapText: false };
  (sheet.dataValidations as unknown as { add(area: string, rule: object): void }).add("AA3", {
    type: "decimal",
    operator: "between",
    formulae: [0.01, 0.99],
    showErrorMessage: true,
    errorTitle: "percentile",
    error: "A share from 1 % to 99 %.",
    showInputMessage: true,
    promptTitle: "percentile",
    prompt: "Usually 80 % to 95 %; 50 % is the forecast itself.",
  });
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
  const summary = await addResultSheet(
    book,
    SHEETS.summary,
    "Summary",
    "Totals of the plan by year; to the right by scheme (there years add up), and by year at the percentile of the forecast in AA3.",
    [
      { formula: `=CAP.PLAN.SUMMARY(${plan},"year")`, column: 1, headings: ["year", ...SUMMARY_HEADINGS] },
      { formula: `=CAP.PLAN.SUMMARY(${plan},"scheme")`, column: 14, headings: ["scheme", ...SUMMARY_HEADINGS] },
      {
        formula: `=CAP.PLAN.SUMMARY(CAP.PLAN.TABLE(CellsTable,DemandTable,ServicesTable,RoutingTable,RadioTable,InstalledTable,,${PERCENTILE_CELL}),"year")`,
        column: PERCENTILE_COLUMN,
        headings: ["year", ...SUMMARY_HEADINGS],
      },
    ],
    functions,
  );
  addPercentile(summary);
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
  await addLinkBudget(book, functions);
  await addReceiver(book, functions);
  await addMethod(book, functions);
  await addChecks(book);
  await addChanges(book);
  return recalculate(await writeBook(book), functions);
}
