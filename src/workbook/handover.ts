/** The handover copy of a workbook, recalculated first so that its values are those of its inputs. */
import type { FunctionTable } from "./function-table";
import { handoverCopy, type HandoverCopy } from "./handover-copy";
import { recalculate } from "./recalculate";

/**
 * @param bytes a workbook
 * @param functions our functions
 * @returns the copy, and how many formulas it keeps as text
 */
export async function handover(bytes: Uint8Array, functions: FunctionTable): Promise<HandoverCopy> {
  return handoverCopy((await recalculate(bytes, functions)).bytes, functions);
}
