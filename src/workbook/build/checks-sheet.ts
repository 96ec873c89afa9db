import type { Book } from "../engine/library";
import { HEADING_ROW } from "./input-sheet";
import { fitHeight, locked, printed, putHeading, putNote, putTitle } from "./look";
import { SHEETS } from "./sheet-names";

interface Check {
  readonly what: string;
  readonly found: string;
  readonly expected: string;
  /** Largest relative difference. */
  readonly within: number;
}

const { forecast, plan, cells, routing, traffic, summary } = SHEETS;

/** Built-in formulas only, so that the checks do not lean on what they check. */
const CHECKS: readonly Check[] = [
  {
    what: "Users of the plan add up to those of the forecast",
    found: `SUM(${plan}!Z:Z)`,
    expected: `SUM(${forecast}!C:C)`,
    within: 1e-9,
  },
  {
    what: "Users of the summary add up to those of the plan",
    found: `SUM(${summary}!B:B)`,
    expected: `SUM(${plan}!Z:Z)`,
    within: 1e-9,
  },
  {
    what: "Calls of the summary add up to those of the plan, erlang",
    found: `SUM(${summary}!C:C)`,
    expected: `SUM(${plan}!F:F)`,
    within: 1e-9,
  },
  {
    what: "Data of the plan, down, lies within that of the traffic sheet (messages on narrowband count as waiting), Mbit/s",
    found: `SUM(${plan}!H:H)`,
    expected: `SUM(${traffic}!E:E)`,
    within: 0.05,
  },
  {
    what: "Shares of the cells are whole areas",
    found: `SUM(${cells}!D:D)`,
    expected: `ROUND(SUM(${cells}!D:D),0)`,
    within: 1e-6,
  },
  {
    what: "Shares of the routing are whole services",
    found: `SUM(${routing}!D:D)`,
    expected: `ROUND(SUM(${routing}!D:D),0)`,
    within: 1e-6,
  },
  { what: "No error in the plan", found: `SUMPRODUCT(--ISERROR(${plan}!A5:Z5))`, expected: "0", within: 0 },
  { what: "No error in the traffic", found: `SUMPRODUCT(--ISERROR(${traffic}!A5:F5))`, expected: "0", within: 0 },
];

const WIDTHS = [84, 18, 18, 14, 10];

export async function addChecks(book: Book): Promise<void> {
  const sheet = book.addWorksheet(SHEETS.checks, { views: [{ state: "frozen", ySplit: HEADING_ROW }] } as never);
  putTitle(sheet, "Checks", "Sums that must agree. A row that says CHECK needs a look before the plan is used.");
  WIDTHS.forEach((width, i) => (sheet.getColumn(i + 1).width = width));
  ["check", "found", "expected", "may differ by", "verdict"].forEach((name, i) =>
    putHeading(sheet.getCell(HEADING_ROW, i + 1), name),
  );
  CHECKS.forEach(({ what, found, expected, within }, i) => {
    const row = HEADING_ROW + 1 + i;
    putNote(sheet.getCell(row, 1), what);
    fitHeight(sheet, row, what, WIDTHS[0]!);
    sheet.getCell(row, 2).value = { formula: found };
    sheet.getCell(row, 3).value = { formula: expected };
    sheet.getCell(row, 4).value = within;
    sheet.getCell(row, 5).value = {
      formula: `IF(ABS(B${row}-C${row})<=D${row}*MAX(ABS(B${row}),ABS(C${row})),"agrees","CHECK")`,
    };
    sheet.getCell(row, 2).numFmt = "#,##0.000";
    sheet.getCell(row, 3).numFmt = "#,##0.000";
    sheet.getCell(row, 4).numFmt = "0.0E+00";
  });
  printed(sheet, HEADING_ROW);
  await locked(sheet);
}
