/** The functions as functions.js, loaded by the same page, offers them. */
import type { FunctionText, RegisteredFunction } from "../sheet/registry";

export interface PageFunctions {
  readonly functionTable: Readonly<Record<string, RegisteredFunction>>;
  textOf(name: string): FunctionText | undefined;
}

declare global {
  var capacityFunctions: PageFunctions | undefined;
}

/** Texts of every function, in the order of their names' subjects; none where functions.js did not load. */
export function allTexts(functions: PageFunctions | undefined): FunctionText[] {
  if (!functions) return [];
  return Object.keys(functions.functionTable).flatMap((id) => functions.textOf(id) ?? []);
}
