/** Gathers single edits into rectangles, so that the program gets few writes. */
import type { Edit } from "./workbook";

/** Edits of one column in rows that follow each other. */
export interface Run {
  readonly row: number;
  readonly column: number;
  readonly contents: readonly Edit["content"][];
}

export function runsOf(edits: readonly Edit[]): Run[] {
  const sorted = [...edits].sort((a, b) => a.column - b.column || a.row - b.row);
  const runs: { row: number; column: number; contents: Edit["content"][] }[] = [];
  for (const { row, column, content } of sorted) {
    const last = runs.at(-1);
    if (last && last.column === column && last.row + last.contents.length === row) last.contents.push(content);
    else runs.push({ row, column, contents: [content] });
  }
  return runs;
}

/** A name of letters alone; anything else might be taken for a date, a number or a formula. */
const PLAIN_TEXT = /^\p{L}[\p{L} .,&()_-]*$/u;

/** Content as the program's own input line takes it. */
export function typedContent(content: Edit["content"]): string | number | boolean {
  if (content === null) return "";
  if (typeof content === "object") return content.formula;
  if (typeof content !== "string" || content === "") return content;
  return PLAIN_TEXT.test(content) && !/^(true|false)$/i.test(content) ? content : `'${content}`;
}
