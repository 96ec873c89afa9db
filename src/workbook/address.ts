/** Cell addresses: letters to numbers and back. */

export interface Place {
  readonly row: number;
  readonly column: number;
}

export function columnLetters(column: number): string {
  let letters = "";
  for (let n = column; n > 0; n = (n - 1 - ((n - 1) % 26)) / 26)
    letters = String.fromCharCode(65 + ((n - 1) % 26)) + letters;
  return letters;
}

export function columnNumber(letters: string): number {
  return [...letters].reduce((sum, letter) => sum * 26 + letter.charCodeAt(0) - 64, 0);
}

export function parseAddress(text: string): Place | undefined {
  const match = /^\$?([A-Z]{1,3})\$?([1-9]\d{0,6})$/.exec(text);
  return match ? { row: Number(match[2]), column: columnNumber(match[1]!) } : undefined;
}

export function addressOf(row: number, column: number): string {
  return `${columnLetters(column)}${row}`;
}

/** A range such as "A6:Z90"; a single cell is a range of one. */
export function parseRange(text: string): { from: Place; to: Place } | undefined {
  const [first = "", last = first] = text.split(":");
  const from = parseAddress(first);
  const to = parseAddress(last);
  return from && to ? { from, to } : undefined;
}
