import { noAnswer, type CellError } from "../sheet/cell-error";

/** The functions that take whole tables and so can meet the host's limit on one call. */
const TABLE_FUNCTIONS = new Set(["PLAN.DEMAND", "PLAN.TABLE", "PLAN.EXPANSION", "PLAN.SUMMARY", "PLAN.CHANGES"]);

/** The host refuses calls of about 5 MB without a word; this leaves room for the answer's wrapping. */
const LARGEST_CALL_BYTES = 4_000_000;

function bytesOf(cell: unknown): number {
  if (typeof cell === "string") return cell.length + 3;
  return typeof cell === "number" ? 12 : 5;
}

/** Why a call is too large for the host, or undefined where it is not. */
export function refuseTooLarge(
  id: string,
  args: readonly (readonly (readonly unknown[])[] | null)[],
): CellError | undefined {
  if (!TABLE_FUNCTIONS.has(id)) return undefined;
  let bytes = 0;
  for (const cells of args) {
    if (!Array.isArray(cells)) continue;
    for (const row of cells) for (const cell of row as unknown[]) bytes += bytesOf(cell);
  }
  if (bytes <= LARGEST_CALL_BYTES) return undefined;
  const size = (bytes / 1e6).toFixed(1);
  return noAnswer(
    `The tables of this call hold about ${size} MB and the spreadsheet program takes at most 4 MB in one call. Split it: one year at a time, or fewer cells.`,
  );
}
