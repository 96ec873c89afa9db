import { perCell, text } from "../src/sheet/call";
import { describe } from "../src/sheet/method-text";

/**
 * How a function of this set counts: formula, source, assumptions, for the method statement of a workbook.
 * @customfunction METHOD.TEXT
 * @param functionName Name of the function, with or without CAP. in front, such as "ERLANGB.BLOCKING".
 * @returns Text with meaning, inputs, method, source, assumptions and errors.
 * @method The text is the documentation of the function itself, the same that feeds its tooltip and the function reference.
 * @source The source named in the text.
 * @errors #VALUE! for a name that is not in the set; the message names the closest ones.
 * @example =CAP.METHOD.TEXT("POWER.DB") is text
 */
export function methodText(functionName: any[][]): any[][] {
  return perCell(describe, { functionName: text(functionName) });
}
