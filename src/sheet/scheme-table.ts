import { contains } from "../model/domain";
import { DomainError } from "../model/errors";
import { compare, COMPARED_FACTS, COMPARISON_COLUMNS } from "../model/schemes/compare";
import { isBlank } from "./argument";
import { CellError, wrongInput } from "./cell-error";
import { closest } from "./spelling";
import { labelled } from "./table";

type Cells = readonly (readonly unknown[])[];

/** Numbers by parameter name; names that mean nothing here are left out, unless they look like a misspelt one. */
function readFacts(cells: Cells): Map<string, number> {
  const heading = (cells[0] ?? []).map((cell) => (typeof cell === "string" ? cell.trim().toLowerCase() : ""));
  const nameAt = heading.indexOf("parameter");
  const valueAt = heading.indexOf("value");
  if (nameAt < 0 || valueAt < 0) throw wrongInput("profile needs a first row with the column names parameter, value.");
  const known = Object.keys(COMPARED_FACTS);
  const byLower = new Map(known.map((name) => [name.toLowerCase(), name]));
  const facts = new Map<string, number>();
  const seen = new Set<string>();
  const others: string[] = [];
  for (const cellsOfRow of cells.slice(1)) {
    const label = cellsOfRow[nameAt];
    if (label instanceof CellError) throw label;
    if (typeof label !== "string" || isBlank(label)) continue;
    const name = byLower.get(label.trim().toLowerCase());
    if (name === undefined) {
      others.push(label.trim());
      continue;
    }
    if (seen.has(name)) throw wrongInput(`profile has ${name} twice.`);
    seen.add(name);
    const value = cellsOfRow[valueAt];
    const allowed = COMPARED_FACTS[name]!;
    if (value instanceof CellError) throw value;
    if (isBlank(value) || (value === 0 && !contains(allowed, 0))) continue;
    if (typeof value !== "number" || !contains(allowed, value)) throw new DomainError(name, value, allowed.words);
    facts.set(name, value);
  }
  const absent = known.filter((name) => !seen.has(name));
  for (const other of others.filter((text) => text.length <= 64)) {
    const meant = closest(other, absent);
    if (meant !== undefined) throw wrongInput(`profile parameter "${other}" looks like ${meant}, misspelt.`);
  }
  return facts;
}

/** The comparison of schemes as a labelled table. */
export function schemeTable(profile: Cells): unknown[][] {
  if (profile.every((row) => row.every((cell) => isBlank(cell) || cell === 0))) return [[""]];
  return labelled(COMPARISON_COLUMNS, compare(readFacts(profile)));
}
