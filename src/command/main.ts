/** The command line: finds the command, reads its options, and turns faults into one line and an exit code. */
import { parseArgs } from "node:util";
import { CellError } from "../sheet/cell-error";
import { WorkbookFailure } from "../workbook/failure";
import * as commands from "./commands";
import { EXIT, WrongCall, type Surroundings } from "./io";

interface Entry {
  readonly run: commands.Command;
  readonly usage: string;
  readonly purpose: string;
  readonly options: Readonly<Record<string, { readonly type: "string" | "boolean"; readonly text: string }>>;
}

const OUT = {
  out: { type: "string", text: "file to write" },
  force: { type: "boolean", text: "replace the file if it exists" },
} as const;

const ENTRIES: Readonly<Record<string, Entry>> = {
  new: {
    run: commands.newPlan,
    usage: "new FOLDER | --demo [--out FILE] [--force]",
    purpose:
      "Writes a plan workbook from a folder with demand.csv, services.csv, routing.csv, radio.csv, cells.csv, installed.csv and, if there, ladder.csv; or from the invented demo scenario.",
    options: { demo: { type: "boolean", text: "the invented demo scenario" }, ...OUT },
  },
  recalc: {
    run: commands.recalculatePlan,
    usage: "recalc WORKBOOK [--out FILE] [--force]",
    purpose: "Recalculates a workbook; everything but values stays as it is.",
    options: OUT,
  },
  refresh: {
    run: commands.refreshPlan,
    usage: "refresh WORKBOOK --forecast NEW.csv [--out FILE] [--force]",
    purpose:
      "Replaces the forecast (long: area, year, users; or wide: area and a column for each year), recalculates, and fills the sheet Changes with what moved.",
    options: { forecast: { type: "string", text: "the new forecast, CSV" }, ...OUT },
  },
  compare: {
    run: commands.comparePlans,
    usage: "compare EARLIER LATER",
    purpose: "Lists what differs between the plans of two workbooks, as last calculated.",
    options: {},
  },
  handover: {
    run: commands.handOver,
    usage: "handover WORKBOOK [--out FILE] [--force]",
    purpose:
      "Writes a copy with values instead of formulas, the formulas kept as text, locked; for people without the add-in.",
    options: OUT,
  },
  eval: {
    run: commands.evaluateFormula,
    usage: "eval '=CAP.ERLANGB.BLOCKING(10, 15)'",
    purpose: "Computes one formula.",
    options: {},
  },
  functions: {
    run: commands.listFunctions,
    usage: "functions [NAME]",
    purpose: "Lists the functions, those of a subject, or explains one.",
    options: {},
  },
  plan: {
    run: commands.demonstrate,
    usage: "plan [--out FOLDER]",
    purpose:
      "The whole way on the demo scenario: plan, moved forecast, handover copy; replaces the files of an earlier run.",
    options: { out: { type: "string", text: "folder to write to" } },
  },
};

function overview(): string[] {
  const width = Math.max(...Object.keys(ENTRIES).map((name) => name.length));
  return [
    "capacity: plan workbooks for the capacity of multi-user radio networks",
    "",
    ...Object.entries(ENTRIES).map(([name, { purpose }]) => `  ${name.padEnd(width)}  ${purpose.split(/[;.]/)[0]}`),
    "",
    "capacity COMMAND --help explains a command. Exit codes: 0 done, 1 bad input, 2 wrong call.",
  ];
}

function helpOn({ usage, purpose, options }: Entry): string[] {
  const list = Object.entries(options).map(
    ([name, { type, text }]) => `  --${name}${type === "string" ? " …" : ""}  ${text}`,
  );
  return [`usage: capacity ${usage}`, "", purpose, ...(list.length > 0 ? ["", ...list] : [])];
}

function firstLine(text: string): string {
  return text.split("\n")[0]!;
}

/**
 * Runs one command.
 *
 * @param argv words after the program's name
 * @param around where lines go, which functions there are, and the time
 * @returns exit code
 */
export async function run(argv: readonly string[], around: Surroundings): Promise<number> {
  const [name, ...rest] = argv;
  if (name === undefined || name === "help" || name === "--help" || name === "-h") {
    for (const line of overview()) around.out(line);
    return name === undefined ? EXIT.wrongCall : EXIT.success;
  }
  if (name === "--version") {
    around.out(around.version);
    return EXIT.success;
  }
  const entry = Object.hasOwn(ENTRIES, name) ? ENTRIES[name] : undefined;
  if (!entry) {
    around.err(`capacity: there is no command ${name}; capacity --help lists them.`);
    return EXIT.wrongCall;
  }
  try {
    const { values, positionals } = parseArgs({
      args: [...rest],
      options: { ...entry.options, help: { type: "boolean" } },
      allowPositionals: true,
    });
    if (values["help"] === true) {
      for (const line of helpOn(entry)) around.out(line);
      return EXIT.success;
    }
    await entry.run({ words: positionals, options: values }, around);
    return EXIT.success;
  } catch (fault) {
    if (fault instanceof WorkbookFailure || fault instanceof CellError) {
      around.err(`capacity: ${firstLine(fault.message)}`);
      return EXIT.badInput;
    }
    const wrong =
      fault instanceof WrongCall || String((fault as NodeJS.ErrnoException).code).startsWith("ERR_PARSE_ARGS");
    if (!wrong) throw fault;
    around.err(`capacity ${name}: ${firstLine((fault as Error).message)} Usage: capacity ${entry.usage}`);
    return EXIT.wrongCall;
  }
}
