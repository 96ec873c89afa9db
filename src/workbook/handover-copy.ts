/**
 * A copy for people without the add-in: values instead of formulas, the formulas kept as text, everything locked. The
 * values are those that the workbook was saved with.
 */
import { SHEETS } from "./build/sheet-names";
import type { FunctionTable } from "./function-table";
import { Package } from "./package/archive";
import { addSheet, sheetParts } from "./package/sheets";
import { unescapeXml } from "./package/xml";
import { toWritten } from "./stored-names";

const FORMULA_CELL = /<c\b([^>]*)>(<f\b[^>]*?(?:\/>|>(.*?)<\/f>))(.*?)<\/c>/gs;
/** Elements that come after the protection in a sheet's XML. */
const AFTER_PROTECTION =
  /<(?:protectedRanges|scenarios|autoFilter|sortState|dataConsolidate|customSheetViews|mergeCells|phoneticPr|conditionalFormatting|dataValidations|hyperlinks|printOptions|pageMargins|pageSetup|headerFooter|rowBreaks|colBreaks|customProperties|cellWatches|ignoredErrors|smartTags|drawing|legacyDrawing|legacyDrawingHF|drawingHF|picture|oleObjects|controls|webPublishItems|tableParts|extLst)\b|<\/worksheet>/;

interface KeptFormula {
  readonly sheet: string;
  readonly cell: string;
  readonly formula: string;
}

/** Takes the formulas out of a sheet; their values stay. */
function withoutFormulas(xml: string, sheet: string, functions: FunctionTable, kept: KeptFormula[]): string {
  return xml.replace(
    FORMULA_CELL,
    (_, attributes: string, _formula: string, text: string | undefined, value: string) => {
      const cell = /\sr="([A-Z]+\d+)"/.exec(attributes)?.[1] ?? "";
      // A formula shared with cells above has no text of its own.
      if (text) kept.push({ sheet, cell, formula: toWritten(unescapeXml(text), functions) });
      return `<c${attributes.replace(/\scm="\d+"/, "")}>${value}</c>`;
    },
  );
}

/** Locks a sheet without a password; cells that were inputs are locked with it. */
function locked(xml: string): string {
  const bare = xml.replace(/<sheetProtection\b[^>]*\/>/, "");
  const protection = '<sheetProtection sheet="1" objects="1" scenarios="1"/>';
  return bare.replace(AFTER_PROTECTION, (next) => protection + next);
}

/** A cell style that was unlocked for input is locked in the copy. */
function lockedStyles(xml: string): string {
  return xml.replace(/<protection\b[^>]*\blocked="(?:0|false)"[^>]*\/>/g, '<protection locked="1"/>');
}

export interface HandoverCopy {
  readonly bytes: Uint8Array;
  /** How many formulas are kept as text. */
  readonly formulas: number;
}

/**
 * @param bytes a workbook, calculated
 * @param functions our functions
 */
export function handoverCopy(bytes: Uint8Array, functions: FunctionTable): HandoverCopy {
  const file = Package.open(bytes);
  const kept: KeptFormula[] = [];
  const parts = sheetParts(file);
  for (const { name, part } of parts) {
    file.set(part, locked(withoutFormulas(file.text(part), name, functions, kept)));
  }
  if (file.has("xl/styles.xml")) file.set("xl/styles.xml", lockedStyles(file.text("xl/styles.xml")));
  removeCalculationChain(file);
  const rows = kept.map(({ sheet, cell, formula }) => [sheet, cell, formula]);
  let name: string = SHEETS.formulas;
  while (parts.some((sheet) => sheet.name === name)) name += " (handover)";
  addSheet(file, name, [["sheet", "cell", "formula (as text)"], ...rows], [18, 10, 120]);
  const added = sheetParts(file).at(-1)!;
  file.set(added.part, locked(file.text(added.part)));
  return { bytes: file.bytes(), formulas: kept.length };
}

/** The chain lists formula cells, of which there are none any more. */
function removeCalculationChain(file: Package): void {
  if (!file.has("xl/calcChain.xml")) return;
  file.remove("xl/calcChain.xml");
  for (const part of ["[Content_Types].xml", "xl/_rels/workbook.xml.rels"]) {
    file.set(part, file.text(part).replace(/<(?:Override|Relationship)\b[^>]*calcChain[^>]*\/>/g, ""));
  }
}
