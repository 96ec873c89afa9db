/** The cells that a formula refers to by address, outside its texts. */
import { areaOf } from "../workbook/address";
import type { Area } from "../workbook/workbook";

const REFERENCE =
  /(?:(?:'((?:[^'[]|'')+)'|([\p{L}_][\p{L}\d_.]*))!)?(?<![\p{L}\d_.$])(\$?[A-Z]{1,3}\$?[1-9]\d{0,6}(?::\$?[A-Z]{1,3}\$?[1-9]\d{0,6})?)(?![\p{L}\d_.(])/giu;

/** @param sheet where the formula stands */
export function referencedAreas(formula: string, sheet: string): Area[] {
  const withoutTexts = formula.replace(/"(?:[^"]|"")*"/g, '""');
  return [...withoutTexts.matchAll(REFERENCE)].flatMap(([, quoted, plain, range = ""]) => {
    const area = areaOf(quoted?.replace(/''/g, "'") ?? plain ?? sheet, range.replace(/\$/g, ""));
    return area ? [area] : [];
  });
}

/** Whether a formula refers to another workbook. */
export function isExternal(formula: string): boolean {
  return /\[[^\]]+\][^!'"]*'?!/.test(formula.replace(/"(?:[^"]|"")*"/g, '""'));
}
