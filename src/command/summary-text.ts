/** The summary of a plan as lines for a terminal. */

type Row = readonly unknown[];

function shown(value: unknown): string {
  if (value === null || value === undefined) return "";
  if (typeof value !== "number") return String(value);
  if (Number.isInteger(value)) return value.toLocaleString("en-US", { useGrouping: Math.abs(value) >= 10_000 });
  return Math.abs(value) >= 1000 ? value.toFixed(0) : String(Number(value.toPrecision(4)));
}

/** Rows as aligned columns. */
export function aligned(rows: readonly Row[]): string[] {
  const texts = rows.map((row) => row.map(shown));
  const widths = texts[0]!.map((_, c) => Math.max(...texts.map((row) => (row[c] ?? "").length)));
  return texts.map((row) =>
    row
      .map((text, c) => (c === 0 ? text.padEnd(widths[c]!) : text.padStart(widths[c]!)))
      .join("  ")
      .trimEnd(),
  );
}

function column(plan: readonly Row[], name: string): number {
  return plan[0]!.indexOf(name);
}

/** What a planner wants to know first: when cells run out, and why. */
export function summaryOf(
  plan: readonly Row[],
  percent = (value: number): string => `${(100 * value).toFixed(2)} %`,
): string[] {
  const at = (name: string): number => column(plan, name);
  const years = [...new Set(plan.slice(1).map((row) => row[at("year")] as number))].sort((a, b) => a - b);
  const table: unknown[][] = [
    [
      "year",
      "users",
      "calls E",
      "data down Mbit/s",
      "carriers needed",
      "installed",
      "cells short",
      "cells out of reach",
      "blocking",
    ],
  ];
  for (const year of years) {
    const rows = plan.slice(1).filter((row) => row[at("year")] === year);
    const sum = (name: string): number => rows.reduce((total, row) => total + ((row[at(name)] as number) || 0), 0);
    const cells = (met: string): number =>
      new Set(rows.filter((row) => row[at(met)] === false).map((row) => row[at("cell")])).size;
    const lost = rows.reduce(
      (total, row) => total + ((row[at("blocking")] as number) || 0) * (row[at("callTrafficE")] as number),
      0,
    );
    const calls = sum("callTrafficE");
    table.push([
      String(year),
      Math.round(sum("users")),
      Number(calls.toFixed(1)),
      Number(sum("downMbps").toFixed(1)),
      sum("carriersRequired"),
      sum("carriersInstalled"),
      cells("capacityMet"),
      cells("coverageMet"),
      calls > 0 ? percent(lost / calls) : "",
    ]);
  }
  return [...aligned(table), "", ...firstShort(plan)];
}

/** In which year each scheme first has a cell that falls short, and what is missing most often. */
function firstShort(plan: readonly Row[]): string[] {
  const at = (name: string): number => column(plan, name);
  const schemes = [...new Set(plan.slice(1).map((row) => String(row[at("scheme")] as string)))];
  return schemes.map((scheme) => {
    const short = plan.slice(1).filter((row) => row[at("scheme")] === scheme && row[at("capacityMet")] === false);
    if (short.length === 0) return `${scheme}: what is installed suffices in every year.`;
    const first = Math.min(...short.map((row) => row[at("year")] as number));
    const counts = new Map<string, number>();
    for (const row of short) {
      const reason = String(row[at("limitedBy")]);
      counts.set(reason, (counts.get(reason) ?? 0) + 1);
    }
    const [reason] = [...counts].sort((a, b) => b[1] - a[1])[0]!;
    const cells = new Set(short.map((row) => row[at("cell")])).size;
    return `${scheme}: ${cells} cells fall short, the first in ${first}; missing most often: ${reason}.`;
  });
}

/** What the ladder makes of it: steps, costs, and what to order next. */
export function expansionLines(expansion: readonly Row[]): string[] {
  const at = (name: string): number => expansion[0]!.indexOf(name);
  const steps = expansion.slice(1).filter((row) => row[at("orderBy")] !== "" && row[at("orderBy")] !== null);
  const helpless = expansion.length - 1 - steps.length;
  if (expansion.length === 1) return ["Ladder: no cell needs a step."];
  const cost = steps.reduce((sum, row) => sum + (row[at("cost")] as number), 0);
  const cells = new Set(steps.map((row) => row[at("cell")])).size;
  const first = steps.map((row) => String(row[at("orderBy")])).sort()[0];
  const lines = [
    `Ladder: ${steps.length} steps in ${cells} cells cost ${cost.toLocaleString("en-US")} to the end of the plan; the first is to be ordered by ${first}.`,
  ];
  if (helpless > 0)
    lines.push(`${helpless} cells keep a shortage that no step of the ladder mends; the sheet Expansion says which.`);
  return lines;
}
