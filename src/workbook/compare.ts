/** What differs between the plans of two workbooks, as they were last calculated. */
import { changeCells } from "../sheet/plan-tables";
import { loadBook } from "./engine/library";
import { Package } from "./package/archive";
import { planOf } from "./plan-in-book";

/** The changes, headings first. */
export async function compare(before: Uint8Array, after: Uint8Array): Promise<unknown[][]> {
  // Opening each checks it before the library sees it.
  Package.open(before);
  Package.open(after);
  return changeCells(planOf(await loadBook(before)), planOf(await loadBook(after)));
}
