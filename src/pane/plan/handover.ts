/** Makes the copy for people without the add-in, as a new workbook or as sheets beside the others. */
import type { FunctionTable } from "../../workbook/function-table";
import { WorkbookFailure } from "../../workbook/failure";
import { handoverCopy } from "../../workbook/handover-copy";
import { Package } from "../../workbook/package/archive";
import { sheetParts } from "../../workbook/package/sheets";
import { PaneFailure } from "../failure";
import { say, sayCount, texts } from "../say";
import { stopIfAsked, type Work } from "../work";
import { addressOf } from "../../workbook/address";
import type { Edit, OpenWorkbook } from "../workbook/workbook";
import { renameNamespace } from "./namespace-in-file";

/** Namespace under which formulas are kept as text. */
const WRITTEN_NAMESPACE = "CAP";
const LONGEST_SHEET_NAME = 31;

/** Whether a saved workbook still waits for values. */
function isUnfinished(file: Uint8Array): boolean {
  const opened = Package.open(file);
  return sheetParts(opened).some(({ part }) => /<v>#(?:BUSY!|GETTING_DATA)<\/v>/.test(opened.text(part)));
}

/** Opens the handover copy as a new workbook; answers with what to tell. */
export async function openHandover(
  book: OpenWorkbook,
  functions: FunctionTable,
  namespace: string,
  work: Work,
): Promise<string> {
  if (!book.can.openWorkbook || !book.can.readFile) throw new PaneFailure(texts.plan.cannotOpen);
  if (!(await book.isCalculated())) throw new PaneFailure(texts.plan.handoverUnready);
  const saved = await book.file(work);
  stopIfAsked(work, texts.work.nothingChanged);
  work.progress(texts.plan.handoverMaking);
  let copy;
  try {
    if (isUnfinished(saved)) throw new PaneFailure(texts.plan.handoverUnready);
    copy = handoverCopy(renameNamespace(saved, namespace, WRITTEN_NAMESPACE), functions);
  } catch (fault) {
    throw fault instanceof WorkbookFailure ? new PaneFailure(fault.message) : fault;
  }
  if (copy.formulas === 0) throw new PaneFailure(texts.plan.handoverNoFormulas);
  await book.openWorkbook(copy.bytes);
  return sayCount(texts.plan.handoverOpened, copy.formulas);
}

/** A name that no sheet has yet, within what a sheet's name may be. */
export function freeName(wanted: string, ending: string, taken: readonly string[]): string {
  const lower = new Set(taken.map((name) => name.toLowerCase()));
  for (let number = 1; ; number++) {
    const tail = number === 1 ? ending : `${ending} ${number}`;
    const name = wanted.slice(0, LONGEST_SHEET_NAME - tail.length) + tail;
    if (!lower.has(name.toLowerCase())) return name;
  }
}

/** Adds a value sheet beside every sheet with formulas, and one sheet with the formulas as text. */
export async function addHandoverSheets(book: OpenWorkbook, work: Work): Promise<string> {
  if (!(await book.isCalculated())) throw new PaneFailure(texts.plan.handoverUnready);
  const names = await book.sheetNames();
  const added: string[] = [];
  const kept: [sheet: string, cell: string, formula: string][] = [];
  try {
    for (const [i, sheet] of names.entries()) {
      stopIfAsked(work, added.length > 0 ? texts.plan.handoverPartly : texts.work.nothingChanged);
      work.progress(say(texts.plan.handoverSheet, { sheet }), i / names.length);
      const formulas = await formulasOf(book, sheet, work);
      if (formulas.length === 0) continue;
      const copy = freeName(sheet, texts.plan.valuesSuffix, [...names, ...added]);
      added.push(copy);
      await book.addValueSheet(sheet, copy);
      kept.push(...formulas);
    }
    if (kept.length === 0) throw new PaneFailure(texts.plan.handoverNoFormulas);
    const list = freeName(texts.plan.formulasSheet, "", [...names, ...added]);
    added.push(list);
    await book.addSheet(list);
    await book.write(list, asEdits([texts.plan.formulasHeadings, ...kept]), work);
    return say(texts.plan.handoverHereDone, { sheets: added.length - 1, formulas: list, count: kept.length });
  } catch (fault) {
    if (added.length > 0) await book.deleteSheets(added);
    throw fault;
  }
}

async function formulasOf(
  book: OpenWorkbook,
  sheet: string,
  work: Work,
): Promise<[sheet: string, cell: string, formula: string][]> {
  const used = await book.usedArea(sheet);
  if (!used) return [];
  const { formulas } = await book.read(used, work);
  return formulas.flatMap((row, r) =>
    row.flatMap((cell, c): [string, string, string][] =>
      typeof cell === "string" && cell.startsWith("=")
        ? [[sheet, addressOf(used.row + r + 1, used.column + c + 1), cell]]
        : [],
    ),
  );
}

function asEdits(rows: readonly (readonly string[])[]): Edit[] {
  return rows.flatMap((row, r) => row.map((content, column) => ({ row: r, column, content })));
}
