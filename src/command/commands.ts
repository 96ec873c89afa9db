/** What each command does; files in, files out, thin over src/workbook. */
import { createHash } from "node:crypto";
import { join } from "node:path";
import { compose } from "../sheet/method-text";
import { canonicalId, textOf } from "../sheet/registry";
import { closest } from "../sheet/spelling";
import { CellError } from "../sheet/cell-error";
import { planWorkbook } from "../workbook/build/plan-workbook";
import { SHEETS } from "../workbook/build/sheet-names";
import { compare } from "../workbook/compare";
import { readForecast } from "../workbook/csv/forecast";
import { readPlanFiles } from "../workbook/csv/plan-files";
import { loadBook } from "../workbook/engine/library";
import { evaluate } from "../workbook/evaluate";
import { WorkbookFailure } from "../workbook/failure";
import { handover } from "../workbook/handover";
import { planOf, tableOf } from "../workbook/plan-in-book";
import { recalculate } from "../workbook/recalculate";
import { refresh } from "../workbook/refresh";
import { DEMO_FILES } from "./demo-tables";
import { makeFolder, readBytes, readText, readTextIfThere, requireTarget, writeFileWhole } from "./files";
import { WrongCall, type Surroundings } from "./io";
import { aligned, expansionLines, summaryOf } from "./summary-text";

/** Options and words of a call. */
export interface Call {
  readonly words: readonly string[];
  readonly options: Readonly<Record<string, string | boolean | undefined>>;
}

export type Command = (call: Call, around: Surroundings) => Promise<void>;

function option(call: Call, name: string): string | undefined {
  const value = call.options[name];
  return typeof value === "string" ? value : undefined;
}

function word(call: Call, index: number, what: string): string {
  const found = call.words[index];
  if (found === undefined) throw new WrongCall(`${what} is missing.`);
  return found;
}

function target(call: Call, fallback: string): string {
  const path = option(call, "out") ?? fallback;
  requireTarget(path, call.options["force"] === true);
  return path;
}

/** "plan.xlsx" with a word before the ending: the input itself is never the target unless asked. */
function beside(path: string, addition: string): string {
  return path.replace(/(\.xlsx)?$/i, `-${addition}.xlsx`);
}

function hashOf(content: string | Uint8Array): string {
  return createHash("sha256").update(content).digest("hex");
}

async function inFile<T>(path: string, work: Promise<T>): Promise<T> {
  try {
    return await work;
  } catch (fault) {
    if (fault instanceof WorkbookFailure) throw new WorkbookFailure(`${path}: ${fault.message}`);
    throw fault;
  }
}

async function makePlan(
  files: Readonly<Record<string, string>>,
  invented: boolean,
  around: Surroundings,
): Promise<Uint8Array> {
  const tables = readPlanFiles((file) => files[file]);
  around.err("computing the plan …");
  const hashes = Object.fromEntries(Object.entries(files).map(([name, text]) => [name, hashOf(text)]));
  const { bytes } = await planWorkbook(tables, around.functions, {
    version: around.version,
    time: around.now(),
    hashes,
    invented,
  });
  return bytes;
}

async function printSummary(bytes: Uint8Array, around: Surroundings): Promise<void> {
  const book = await loadBook(bytes);
  for (const line of summaryOf(planOf(book))) around.out(line);
  const expansion = tableOf(book, SHEETS.expansion);
  if (expansion && expansion.length > 0) for (const line of expansionLines(expansion)) around.out(line);
}

export const newPlan: Command = async (call, around) => {
  const demo = call.options["demo"] === true;
  const folder = call.words[0];
  if (demo === (folder !== undefined)) throw new WrongCall("give a folder of CSV tables, or --demo.");
  const path = target(call, "plan.xlsx");
  let files = DEMO_FILES;
  if (folder !== undefined) {
    files = {};
    const found: Record<string, string> = {};
    for (const name of Object.keys(DEMO_FILES)) {
      const text = readTextIfThere(join(folder, name));
      if (text !== undefined) found[name] = text;
    }
    files = found;
  }
  const bytes = await makePlan(files, demo, around);
  writeFileWhole(path, bytes);
  await printSummary(bytes, around);
  around.out(`wrote ${path}`);
};

export const recalculatePlan: Command = async (call, around) => {
  const source = word(call, 0, "the workbook");
  const path = target(call, beside(source, "recalculated"));
  const input = readBytes(source);
  around.err("recalculating …");
  const { bytes, outcome } = await inFile(source, recalculate(input, around.functions));
  writeFileWhole(path, bytes);
  around.out(`${outcome.formulas} formulas recalculated.`);
  for (const { id, code, message, count } of outcome.messages.slice(0, 10))
    around.out(`CAP.${id} ${code} (${count} cells): ${message}`);
  around.out(`wrote ${path}`);
};

export const refreshPlan: Command = async (call, around) => {
  const source = word(call, 0, "the workbook");
  const forecastPath = option(call, "forecast");
  if (forecastPath === undefined) throw new WrongCall("--forecast NEW.csv is missing.");
  const path = target(call, beside(source, "refreshed"));
  const forecast = readForecast(readText(forecastPath), forecastPath);
  const input = readBytes(source);
  around.err("replacing the forecast and recalculating …");
  const result = await inFile(source, refresh(input, forecast, around.functions));
  writeFileWhole(path, result.bytes);
  around.out(`forecast rows: ${result.matched} matched, ${result.added} new, ${result.gone} gone.`);
  for (const line of changeLines(result.changes)) around.out(line);
  around.out(`wrote ${path}`);
};

const SHOWN_CHANGES = 12;

/** Changes by column, then the verdicts that turned, which matter most. */
function changeLines(changes: readonly (readonly unknown[])[]): string[] {
  const rows = changes.slice(1);
  if (rows.length === 0) return ["nothing moved."];
  const counts = new Map<string, number>();
  for (const row of rows) counts.set(String(row[3]), (counts.get(String(row[3])) ?? 0) + 1);
  const moved = [...counts].sort((a, b) => b[1] - a[1]).map(([column, count]) => `${column} ${count}`);
  const verdicts = rows.filter((row) => row[3] === "limitedBy" || row[3] === "row");
  const lines = [`${rows.length} values moved: ${moved.join(", ")}.`];
  if (verdicts.length > 0) {
    lines.push("", `verdicts that changed (${Math.min(SHOWN_CHANGES, verdicts.length)} of ${verdicts.length}):`);
    lines.push(
      ...aligned([
        ["cell", "year", "scheme", "before", "after"],
        ...verdicts.slice(0, SHOWN_CHANGES).map((row) => [row[0], String(row[1] as number), row[2], row[4], row[5]]),
      ]),
    );
  }
  return lines;
}

export const comparePlans: Command = async (call, around) => {
  const [first, second] = [word(call, 0, "the earlier workbook"), word(call, 1, "the later workbook")];
  const changes = await compare(readBytes(first), readBytes(second));
  for (const line of changeLines(changes)) around.out(line);
};

export const handOver: Command = async (call, around) => {
  const source = word(call, 0, "the workbook");
  const path = target(call, beside(source, "handover"));
  const input = readBytes(source);
  around.err("writing values instead of formulas …");
  const { bytes, formulas } = await inFile(source, handover(input, around.functions));
  writeFileWhole(path, bytes);
  around.out(`${formulas} formulas kept as text in the last sheet; every sheet is locked, without a password.`);
  around.out(`wrote ${path}`);
};

export const evaluateFormula: Command = (call, around) => {
  const formula = word(call, 0, "the formula");
  const { cells, messages } = evaluate(formula, around.functions);
  const rows = cells.map((row) => row.map((value) => (value instanceof CellError ? value.code : (value ?? ""))));
  const single = rows.length === 1 && rows[0]!.length === 1;
  // A single number is printed with all its digits, a table so that it can be read.
  if (single) around.out(String(rows[0]![0]));
  else for (const line of aligned(rows)) around.out(line);
  const failed = cells.flat().some((value) => value instanceof CellError);
  if (failed && single) throw new WorkbookFailure(messages[0] ?? `the formula gives ${String(rows[0]![0])}.`);
  for (const message of messages) around.err(message);
  return Promise.resolve();
};

export const listFunctions: Command = (call, around) => {
  const name = call.words[0];
  if (name !== undefined) {
    const text = textOf(name);
    if (!text) {
      const id = canonicalId(name);
      const subject = Object.keys(around.functions).filter((other) => other.startsWith(`${id}.`));
      if (subject.length > 0) {
        for (const member of subject) around.out(`CAP.${member}  ${textOf(member)?.description ?? ""}`);
        return Promise.resolve();
      }
      const near = closest(id, Object.keys(around.functions));
      throw new WorkbookFailure(
        `there is no function ${name}${near ? `; did you mean CAP.${near}?` : "; the command functions lists them."}`,
      );
    }
    around.out(compose(text));
    for (const example of text.examples) around.out(`Example: ${example}`);
    return Promise.resolve();
  }
  for (const id of Object.keys(around.functions)) around.out(`CAP.${id}  ${textOf(id)?.description ?? ""}`);
  return Promise.resolve();
};

const OUTPUT = "plan-output";
/** By how much the demonstration moves the forecast of each kind of area. */
const PORT_FACTOR = 1.18;
const OTHER_FACTOR = 0.97;
const PORTS = /Quay|Basin|Wharf|Pier|Terminal|Lock|Dock|Yard/;

/** A moved forecast for the demonstration: the port's areas grow faster than thought, the others a little slower. */
function movedForecast(): string {
  const [heading = "", ...rows] = DEMO_FILES["demand.csv"]!.trim().split("\n");
  const moved = rows.map((row) => {
    const [area = "", year = "", users = "", error = ""] = row.split(",");
    const factor = PORTS.test(area) ? PORT_FACTOR : OTHER_FACTOR;
    return [area, year, Math.round(Number(users) * factor), error].join(",");
  });
  return `${[heading, ...moved].join("\n")}\n`;
}

/** The whole way on the demo scenario: plan, moved forecast, handover. */
export const demonstrate: Command = async (call, around) => {
  const folder = option(call, "out") ?? OUTPUT;
  makeFolder(folder);
  const path = (name: string): string => join(folder, name);
  around.out("Demo scenario: an invented coast with a port, towns, a railway and utilities; no real network.");
  const made = await makePlan(DEMO_FILES, true, around);
  writeFileWhole(path("plan.xlsx"), made);
  around.err("recalculating it …");
  const { bytes } = await recalculate(made, around.functions);
  writeFileWhole(path("plan-recalculated.xlsx"), bytes);
  around.out("");
  await printSummary(bytes, around);
  const forecast = movedForecast();
  writeFileWhole(path("moved-forecast.csv"), forecast);
  around.err("refreshing it with a moved forecast …");
  const refreshed = await refresh(bytes, readForecast(forecast, "moved-forecast.csv"), around.functions);
  writeFileWhole(path("plan-refreshed.xlsx"), refreshed.bytes);
  around.out("");
  around.out(
    `Moved forecast (port ${((PORT_FACTOR - 1) * 100).toFixed(0)} % up, others ${((1 - OTHER_FACTOR) * 100).toFixed(0)} % down):`,
  );
  for (const line of changeLines(refreshed.changes)) around.out(line);
  around.err("writing the handover copy …");
  const copy = await handover(refreshed.bytes, around.functions);
  writeFileWhole(path("plan-handover.xlsx"), copy.bytes);
  around.out("");
  around.out(
    "Planning figures only: emergency traffic, radiated power and masts are governed by local regulation and licensed practice.",
  );
  around.out("");
  around.out(`Files in ${folder}/:`);
  around.out("  plan.xlsx               the plan workbook: inputs, formulas, charts, method, checks");
  around.out("  plan-recalculated.xlsx  the same, recalculated in place");
  around.out("  moved-forecast.csv      the forecast that moved");
  around.out("  plan-refreshed.xlsx     the plan with it; its sheet Changes lists only what moved");
  around.out("  plan-handover.xlsx      values instead of formulas, for people without the add-in");
};
