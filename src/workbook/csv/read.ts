/** Reads a table from CSV text as cells: numbers where a cell is one, text otherwise. */
import Papa from "papaparse";
import { WorkbookFailure } from "../failure";

/** A worksheet has room for no more, and a forecast of areas never comes near it. */
export const MOST_ROWS = 200_000;
const MOST_COLUMNS = 1_000;
const LARGEST_CELL = 32_767;

const DECIMAL = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;

/** A cell of a CSV file; what begins like a formula stays text. */
function cellOf(text: string): string | number | null {
  const trimmed = text.trim();
  if (trimmed === "") return null;
  return DECIMAL.test(trimmed) ? Number(trimmed) : text;
}

/**
 * @param text content of the file
 * @param file its name, for messages
 * @throws WorkbookFailure naming file, row and column
 */
export function readCsv(text: string, file: string): unknown[][] {
  if (text.includes("\u0000")) throw new WorkbookFailure(`${file} is not a CSV text file.`);
  const { data, errors, meta } = Papa.parse<string[]>(text.replace(/^\ufeff/, ""), { skipEmptyLines: "greedy" });
  const [fault] = errors.filter(({ type }) => type === "Quotes");
  if (fault) throw new WorkbookFailure(`${file} row ${(fault.row ?? 0) + 1}: ${fault.message.toLowerCase()}.`);
  if (data.length === 0) throw new WorkbookFailure(`${file} is empty; its first row must hold the column names.`);
  if (data.length - 1 > MOST_ROWS) {
    throw new WorkbookFailure(`${file} has ${data.length - 1} rows; at most ${MOST_ROWS} are taken.`);
  }
  const width = data[0]!.length;
  if (width > MOST_COLUMNS)
    throw new WorkbookFailure(`${file} has ${width} columns; at most ${MOST_COLUMNS} are taken.`);
  data.forEach((row, r) => {
    if (row.length > width && row.slice(width).some((cell) => cell.trim() !== "")) {
      const hint = meta.delimiter === "," ? "; a decimal comma needs quotes or a semicolon between columns" : "";
      throw new WorkbookFailure(`${file} row ${r + 1}: ${row.length} cells but the heading has ${width}${hint}.`);
    }
    const long = row.findIndex((cell) => cell.length > LARGEST_CELL);
    if (long >= 0)
      throw new WorkbookFailure(
        `${file} row ${r + 1}, column ${data[0]![long]}: longer than ${LARGEST_CELL} characters.`,
      );
  });
  const heading = data[0]!.map((cell) => cell.trim());
  return [heading, ...data.slice(1).map((row) => Array.from({ length: width }, (_, c) => cellOf(row[c] ?? "")))];
}
