/**
 * The part of Excel's own interface that the pane uses, over a workbook in memory. As in the program, nothing happens
 * before `sync`, a property that was not loaded cannot be read, and refusals carry their code.
 */
import { absoluteFormula, areaOf, contains, placeText } from "../../../src/pane/workbook/address";
import type { Area, Place } from "../../../src/pane/workbook/workbook";
import { isErrorValue, shown, type Book, type Scalar, type Sheet } from "./book";
import { insertFile } from "./file";

export class Refusal extends Error {
  constructor(
    readonly code: string,
    message: string,
  ) {
    super(message);
  }
}

/** How the program behaves beyond its workbook. */
export interface Behaviour {
  /** Milliseconds that a calculation takes after a write. */
  calculation: number;
  /** Whether anything is computed at all; a workbook keeps the values that it came with where not. */
  calculates: boolean;
  /** Whether sheets with charts are refused on insertion, as in a browser. */
  refusesCharts: boolean;
  /** Whether names come along with inserted sheets. */
  bringsNames: boolean;
  /** Newest set of the interface that is there. */
  newestSet: number;
  /** Whether a cell is being edited, which blocks everything. */
  editing: boolean;
  /** Most cells in one read or write. */
  mostCells: number;
}

export const USUAL: Behaviour = {
  calculation: 0,
  calculates: true,
  refusesCharts: false,
  bringsNames: true,
  newestSet: 17,
  editing: false,
  mostCells: 30_000,
};

type Step = () => void;

class Context {
  readonly steps: Step[] = [];
  readonly workbook: unknown;

  constructor(readonly program: Program) {
    this.workbook = workbookOf(this);
  }

  async sync(): Promise<void> {
    await Promise.resolve();
    if (this.program.behaviour.editing) {
      throw new Refusal("InvalidOperationInCellEditMode", "Excel is in cell-editing mode.");
    }
    for (const step of this.steps.splice(0)) step();
    this.program.book.recalculateSoon();
  }
}

/** Properties that can be read once they were loaded. */
function loadable(context: Context, read: Readonly<Record<string, () => unknown>>): Record<string, unknown> {
  const loaded = new Map<string, unknown>();
  const item: Record<string, unknown> = {
    load(properties: string) {
      for (const name of properties.split(",")) {
        const reader = read[name];
        if (!reader) throw new Error(`the pretended Excel has no property ${name}`);
        context.steps.push(() => loaded.set(name, exists(item) ? reader() : undefined));
      }
    },
  };
  for (const name of Object.keys(read)) {
    const [first, second] = name.split("/");
    const get = (): unknown => {
      if (!loaded.has(name)) throw new Refusal("PropertyNotLoaded", `The property '${name}' is not available.`);
      return loaded.get(name);
    };
    if (second === undefined) Object.defineProperty(item, name, { get, configurable: true });
    else item[first!] = Object.defineProperty({}, second, { get });
  }
  return item;
}

function getter(item: object, name: string): (this: void) => unknown {
  const { get } = Object.getOwnPropertyDescriptor(item, name) as { get: (this: void) => unknown };
  return get;
}

const exists = (item: Record<string, unknown>): boolean => item["isNullObject"] !== true;

/** Marks an item that may turn out not to exist, at the next sync. */
function orNull(context: Context, item: Record<string, unknown>, there: () => boolean): Record<string, unknown> {
  context.steps.push(() => (item["isNullObject"] = !there()));
  return item;
}

function rangeOf(context: Context, where: () => Area): any {
  const { book, behaviour } = context.program;
  let place: Area | undefined;
  const area = (): Area => (place ??= where());
  const sheet = (): Sheet => {
    const found = book.find(area().sheet);
    if (!found) throw new Refusal("ItemNotFound", "The requested resource doesn't exist.");
    return found;
  };
  const limited = (): Area => {
    if (area().rows * area().columns > behaviour.mostCells)
      throw new Refusal("ResponsePayloadSizeLimitExceeded", "The response payload size has exceeded the limit.");
    return area();
  };
  const each = <T>(cell: (row: number, column: number) => T): T[][] =>
    Array.from({ length: limited().rows }, (_, r) =>
      Array.from({ length: area().columns }, (_, c) => cell(area().row + r, area().column + c)),
    );
  const value = (row: number, column: number) => sheet().at(row, column)?.value ?? "";
  const range = loadable(context, {
    values: () => each((row, column) => shown(value(row, column))),
    formulas: () => each((row, column) => sheet().at(row, column)?.formula ?? shown(value(row, column))),
    valueTypes: () => each((row, column) => typeName(value(row, column))),
    rowIndex: () => area().row,
    columnIndex: () => area().column,
    rowCount: () => area().rows,
    columnCount: () => area().columns,
    "worksheet/name": () => area().sheet,
  }) as any;
  const formulas = getter(range, "formulas");
  Object.defineProperty(range, "formulas", {
    get: () => formulas(),
    set(contents: unknown[][]) {
      context.steps.push(() => write(context.program, sheet(), limited(), contents));
    },
  });
  range.select = () => context.steps.push(() => (book.selection = area()));
  range.getSpillParentOrNullObject = () => {
    const parent = (): Place | undefined => {
      const text = sheet().at(area().row, area().column)?.parent;
      if (text === undefined) return undefined;
      const cut = text.lastIndexOf("!");
      return areaOf(area().sheet, text.slice(cut + 1));
    };
    return orNull(
      context,
      rangeOf(context, () => ({ rows: 1, columns: 1, ...parent()! })),
      () => parent() !== undefined,
    );
  };
  range.getSpillingToRangeOrNullObject = () => {
    const spilled = (): Area | undefined => book.spilledArea(area());
    return orNull(
      context,
      rangeOf(context, () => spilled()!),
      () => spilled() !== undefined,
    );
  };
  range.copyFrom = (source: { area: () => Area }, kind: string) =>
    context.steps.push(() => {
      if (kind !== "Values") throw new Error(`the pretended Excel copies no ${kind}`);
      requireWritable(sheet(), area());
      const from = book.sheet(source.area().sheet);
      for (let r = 0; r < area().rows; r++) {
        for (let c = 0; c < area().columns; c++) {
          const cell = from.at(source.area().row + r, source.area().column + c);
          if (cell) sheet().put(area().row + r, area().column + c, { value: cell.value });
        }
      }
    });
  range.area = area;
  range.format = { protection: {} };
  Object.defineProperty(range.format.protection, "locked", {
    set: (locked: boolean) =>
      context.steps.push(() => {
        if (locked) sheet().unlocked = undefined;
      }),
  });
  return range;
}

function typeName(value: unknown): string {
  if (isErrorValue(value)) return "Error";
  if (value === "") return "Empty";
  return { number: "Double", string: "String", boolean: "Boolean" }[typeof value as "string"];
}

function requireWritable(sheet: Sheet, area: Area): void {
  if (!sheet.isProtected) return;
  const { unlocked } = sheet;
  const last = { sheet: sheet.name, row: area.row + area.rows - 1, column: area.column + area.columns - 1 };
  if (unlocked && contains(unlocked, area) && contains(unlocked, last)) return;
  throw new Refusal("AccessDenied", "You can't do this while the sheet is protected.");
}

function write(program: Program, sheet: Sheet, area: Area, contents: readonly (readonly unknown[])[]): void {
  requireWritable(sheet, area);
  if (contents.length !== area.rows || contents.some((row) => row.length !== area.columns))
    throw new Refusal("InvalidArgument", "The number of rows or columns doesn't match the range.");
  contents.forEach((line, r) =>
    line.forEach((content, c) => {
      const [row, column] = [area.row + r, area.column + c];
      const old = sheet.at(row, column);
      if (old?.parent !== undefined) throw new Refusal("InvalidOperation", "You can't change part of an array.");
      if (old?.formula !== undefined) {
        const place = placeText({ sheet: sheet.name, row, column });
        for (const [key] of program.book.spill(place, sheet)) sheet.cells.delete(key);
      }
      if (content === null) return;
      const text = typeof content === "string" ? content : undefined;
      if (content === "") sheet.clear(row, column);
      else if (text?.startsWith("=")) sheet.put(row, column, { value: "", formula: text });
      else sheet.put(row, column, { value: typed(content as Scalar) });
    }),
  );
}

/** What the input line makes of a typed text: a leading apostrophe keeps a text, numbers and dates are guessed. */
function typed(content: Scalar): Scalar {
  if (typeof content !== "string") return content;
  if (content.startsWith("'")) return content.slice(1);
  if (/^(true|false)$/i.test(content)) return content.toLowerCase() === "true";
  if (/^[+-]?\d+(\.\d+)?$/.test(content)) return Number(content);
  return /^\d+[-/]\d+/.test(content) || /^[a-z]{3,9}[ -]\d+$/i.test(content) ? 45_000 : content;
}

function worksheetOf(context: Context, find: () => Sheet | undefined): any {
  const sheet = (): Sheet => {
    const found = find();
    if (!found) throw new Refusal("ItemNotFound", "The requested resource doesn't exist.");
    return found;
  };
  const { book } = context.program;
  const item = loadable(context, { name: () => sheet().name }) as any;
  const name = getter(item, "name");
  Object.defineProperty(item, "name", {
    get: () => name(),
    set: (wanted: string) => context.steps.push(() => (sheet().name = wanted)),
  });
  const range = (where: (own: Sheet) => Area): any => rangeOf(context, () => where(sheet()));
  item.getRangeByIndexes = (row: number, column: number, rows: number, columns: number) =>
    range((own) => ({ sheet: own.name, row, column, rows, columns }));
  item.getCell = (row: number, column: number) => item.getRangeByIndexes(row, column, 1, 1);
  item.getRange = (address: string) => range((own) => areaOf(own.name, address)!);
  item.getUsedRangeOrNullObject = () =>
    orNull(
      context,
      range((own) => own.used()!),
      () => sheet().used() !== undefined,
    );
  item.activate = () => context.steps.push(() => void sheet());
  item.delete = () => context.steps.push(() => (book.sheets = book.sheets.filter((other) => other !== sheet())));
  item.copy = () => {
    let copy: Sheet | undefined;
    context.steps.push(() => {
      const source = sheet();
      copy = book.addSheet(`${source.name} (2)`);
      for (const [key, cell] of source.cells) copy.cells.set(key, { ...cell });
      copy.isProtected = source.isProtected;
      copy.password = source.password;
      copy.unlocked = source.unlocked;
    });
    return worksheetOf(context, () => copy);
  };
  const protection = loadable(context, {
    protected: () => sheet().isProtected,
    options: () => ({ allowSort: true }),
  }) as any;
  protection.protect = () => context.steps.push(() => (sheet().isProtected = true));
  protection.unprotect = () =>
    context.steps.push(() => {
      if (sheet().password) throw new Refusal("AccessDenied", "The password is wrong.");
      sheet().isProtected = false;
    });
  item.protection = protection;
  return item;
}

function nameOf(context: Context, name: string): any {
  const { book } = context.program;
  const item: any = {};
  item.getRangeOrNullObject = () =>
    orNull(
      context,
      rangeOf(context, () => book.names.get(name)!),
      () => book.names.has(name),
    );
  Object.defineProperty(item, "formula", {
    set: (formula: string) => context.steps.push(() => setName(book, name, formula)),
  });
  return item;
}

function setName(book: Book, name: string, formula: string): void {
  const match = /^=(?:'((?:[^']|'')+)'|([^'!]+))!(.+)$/.exec(formula);
  const area = match && areaOf(match[1]?.replace(/''/g, "'") ?? match[2]!, match[3]!.replace(/\$/g, ""));
  if (!area || absoluteFormula(area) !== formula) throw new Refusal("InvalidArgument", `${formula} is no area`);
  book.names.set(name, area);
}

function workbookOf(context: Context): unknown {
  const { program } = context;
  const { book, behaviour } = program;
  const sheet = (name: string): any => worksheetOf(context, () => book.find(name));
  let items: unknown[] | undefined;
  return {
    worksheets: {
      load: () =>
        context.steps.push(() => {
          items = book.sheets.map(({ name }) => ({ name }));
        }),
      get items() {
        if (!items) throw new Refusal("PropertyNotLoaded", "The property 'items' is not available.");
        return items;
      },
      getItem: sheet,
      getItemOrNullObject: (name: string) => orNull(context, sheet(name), () => book.find(name) !== undefined),
      add: (name: string) => {
        context.steps.push(() => void book.addSheet(name));
        return sheet(name);
      },
    },
    names: {
      getItemOrNullObject: (name: string) => orNull(context, nameOf(context, name), () => book.names.has(name)),
      add: (name: string, formula: string) => context.steps.push(() => setName(book, name, formula)),
    },
    application: Object.assign(
      loadable(context, { calculationState: () => (book.isCalculating ? "Calculating" : "Done") }),
      {
        calculate: () => context.steps.push(() => undefined),
        suspendApiCalculationUntilNextSync: () => undefined,
      },
    ),
    getSelectedRange: () => rangeOf(context, () => book.selection),
    insertWorksheetsFromBase64: (base64: string, options: { sheetNamesToInsert?: string[] } = {}) =>
      context.steps.push(() => insertFile(book, base64, options.sheetNamesToInsert, behaviour, refuseCharts)),
  };
}

function refuseCharts(): never {
  throw new Refusal("UnsupportedFeature", "Charts are not supported.");
}

/** A workbook whose calculation takes its time. */
export interface SlowBook extends Book {
  isCalculating: boolean;
  recalculateSoon(): void;
}

export class Program {
  readonly book: SlowBook;

  constructor(
    book: Book,
    readonly behaviour: Behaviour,
  ) {
    let timer: ReturnType<typeof setTimeout> | undefined;
    this.book = Object.assign(book, {
      isCalculating: false,
      recalculateSoon: () => {
        if (!behaviour.calculates || timer !== undefined || !isStale(book)) return;
        if (behaviour.calculation === 0) return book.recalculate();
        this.book.isCalculating = true;
        timer = setTimeout(() => {
          timer = undefined;
          book.recalculate();
          this.book.isCalculating = false;
        }, behaviour.calculation);
        // A calculation that never ends must not keep the tests from ending.
        if (typeof timer === "object") timer.unref();
      },
    });
  }

  /** The program's global `Excel`. */
  excel(): unknown {
    return {
      run: async (steps: (context: Context) => Promise<unknown>) => {
        const context = new Context(this);
        const answer = await steps(context);
        await context.sync();
        return answer;
      },
      createWorkbook: (base64: string) => {
        this.book.opened.push(base64);
        return Promise.resolve();
      },
      RangeValueType: { error: "Error" },
      CalculationType: { recalculate: "Recalculate" },
      CalculationState: { done: "Done" },
      WorksheetPositionType: { end: "End" },
      RangeCopyType: { values: "Values" },
    };
  }
}

/** Whether a calculation would change anything: only then does the program begin one. */
function isStale(book: Book): boolean {
  const now = contentOf(book);
  if (now === lastContent.get(book)) return false;
  lastContent.set(book, now);
  return true;
}

const lastContent = new WeakMap<Book, string>();

function contentOf(book: Book): string {
  const inputs = book.sheets.map(({ name, cells }) => [
    name,
    [...cells]
      .filter(([, { parent }]) => parent === undefined)
      .map(([key, { formula, value }]) => [key, formula ?? value]),
  ]);
  return JSON.stringify([inputs, [...book.names], book.broken]);
}
