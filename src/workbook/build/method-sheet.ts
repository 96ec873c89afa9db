import type { Book } from "../engine/library";
import { compose } from "../../sheet/method-text";
import { textOf } from "../../sheet/registry";
import type { FunctionTable } from "../function-table";
import { HEADING_ROW } from "./input-sheet";
import { fitHeight, locked, printed, putHeading, putTitle } from "./look";
import { putSpill } from "./result-sheet";
import { SHEETS } from "./sheet-names";

/** Functions that the workbook calls, and the single functions by which a row of the plan can be recomputed by hand. */
const STATED = [
  ...["PLAN.DEMAND", "PLAN.TABLE", "PLAN.EXPANSION", "PLAN.SUMMARY", "PLAN.CHANGES", "METHOD.TEXT"],
  ...[
    "TRAFFIC.CALLS",
    "TRAFFIC.GROUP",
    "TRAFFIC.DATA",
    "ERLANGB.BLOCKING",
    "ERLANGB.CHANNELS",
    "ERLANGC.CHANNELS",
    "ERLANGC.WAIT",
  ],
  ...["MULTISERVICE.BLOCKING", "RATE.CELLCAPACITY", "CDMA.POLE", "CDMA.SOFTTRAFFIC", "LOAD.UPLINK", "LOAD.DOWNLINK"],
  ...["MARGIN.FROMLOAD", "MARGIN.NEIGHBOURLOAD", "NOISE.FLOOR", "LINK.SENSITIVITY", "LINK.MAXLOSS", "SHADOWING.EDGE"],
  ...["SHADOWING.MARGIN", "RANGE.HATA", "TIMING.RADIUS", "CELL.AREA"],
  ...["SINR.FROMEBN0", "CODE.SEQUENCE", "RECEIVER.SINR"],
];

const TEXT_WIDTH = 130;

export async function addMethod(book: Book, functions: FunctionTable): Promise<void> {
  const sheet = book.addWorksheet(SHEETS.method, { views: [{ state: "frozen", ySplit: HEADING_ROW }] } as never);
  putTitle(
    sheet,
    "Method",
    "How each number is counted: formula, source and assumptions, as the functions themselves state them.",
  );
  sheet.getColumn(1).width = 28;
  sheet.getColumn(2).width = TEXT_WIDTH;
  putHeading(sheet.getCell(HEADING_ROW, 1), "function");
  putHeading(sheet.getCell(HEADING_ROW, 2), "method statement");
  const stated = STATED.filter((id) => functions[id]);
  stated.forEach((id, i) => {
    const row = HEADING_ROW + 1 + i;
    sheet.getCell(row, 1).value = `CAP.${id}`;
    const text = textOf(id);
    if (text) fitHeight(sheet, row, compose(text), TEXT_WIDTH);
    for (const column of [1, 2]) sheet.getCell(row, column).alignment = { wrapText: true, vertical: "top" };
  });
  const first = HEADING_ROW + 1;
  putSpill(sheet, first, 2, `=CAP.METHOD.TEXT(A${first}:A${HEADING_ROW + stated.length})`, functions);
  sheet.getCell(first, 2).alignment = { wrapText: true, vertical: "top" };
  printed(sheet, HEADING_ROW);
  await locked(sheet);
}
