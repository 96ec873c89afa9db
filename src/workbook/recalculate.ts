/** Recalculates a workbook in place: values and spills change, every other part stays byte for byte. */
import { calculate, type Outcome } from "./engine/calculate";
import { loadBook } from "./engine/library";
import type { FunctionTable } from "./function-table";
import { Package } from "./package/archive";
import { patchCells } from "./package/patch-cells";

export interface Recalculated {
  readonly bytes: Uint8Array;
  readonly outcome: Outcome;
}

/**
 * @param bytes an .xlsx file
 * @param functions our functions
 * @throws WorkbookFailure where it cannot be read or calculated
 */
export async function recalculate(bytes: Uint8Array, functions: FunctionTable): Promise<Recalculated> {
  const file = Package.open(bytes);
  const outcome = calculate(await loadBook(bytes), functions);
  patchCells(file, outcome.cells);
  return { bytes: file.bytes(), outcome };
}
