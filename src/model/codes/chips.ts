import { domain } from "../domain";
import { DomainError } from "../errors";

/** What a cell of a code may hold: 1 or -1; 0 stands for an empty cell, since some hosts pass empty cells as 0. */
export const chip = domain(-1, 1, "1 or -1", { whole: true });

/** A code without the empty cells at its end. */
export function chipsOf(values: readonly number[], parameter: string): Int8Array {
  let length = values.length;
  while (length > 0 && values[length - 1] === 0) length--;
  if (length === 0) throw new DomainError(`number of chips of ${parameter}`, 0, "at least 1");
  const chips = new Int8Array(length);
  for (let k = 0; k < length; k++) {
    const value = values[k]!;
    if (value !== 1 && value !== -1) throw new DomainError(`${parameter} chip ${k + 1}`, value, chip.words);
    chips[k] = value;
  }
  return chips;
}

/** Codes of one length, one a row, without the empty rows and columns at the end. */
export function codesOf(rows: readonly (readonly number[])[], parameter: string): Int8Array[] {
  let count = rows.length;
  while (count > 0 && rows[count - 1]!.every((value) => value === 0)) count--;
  if (count === 0) throw new DomainError(`number of ${parameter}`, 0, "at least 1 row");
  const codes = rows.slice(0, count).map((row, i) => chipsOf(row, `${parameter} row ${i + 1}`));
  codes.forEach((code, i) => {
    if (code.length !== codes[0]!.length) {
      throw new DomainError(
        `number of chips of ${parameter} row ${i + 1}`,
        code.length,
        `${codes[0]!.length}, as in row 1`,
      );
    }
  });
  return codes;
}
