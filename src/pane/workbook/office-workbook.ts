/// <reference types="office-js" />
/** The open workbook behind Office.js; the only file of the pane that knows Office.js. */
import { PaneFailure } from "../failure";
import { say, texts } from "../say";
import { Stopped, stopIfAsked, type Work } from "../work";
import { absoluteFormula, localAddress } from "./address";
import { toBase64 } from "./base64";
import { runsOf, typedContent, type Run } from "./runs";
import {
  ChartsRefused,
  type Abilities,
  type Area,
  type Cells,
  type Edit,
  type OpenWorkbook,
  type Place,
} from "./workbook";

/** The web program takes about 5 MB a request, which this many cells never reach. */
const CELLS_A_PIECE = 20_000;
const FILE_SLICE_BYTES = 1_048_576;
const IN_CELL_EDIT = "InvalidOperationInCellEditMode";
const UNSUPPORTED = "UnsupportedFeature";

function supports(version: string): boolean {
  return Office.context.requirements.isSetSupported("ExcelApi", version);
}

function codeOf(fault: unknown): string {
  return fault instanceof Error && "code" in fault && typeof fault.code === "string" ? fault.code : "";
}

/** Runs a batch; the program's own refusals become one line each. */
async function batch<T>(steps: (context: Excel.RequestContext) => Promise<T>): Promise<T> {
  try {
    return await Excel.run(steps);
  } catch (fault) {
    if (fault instanceof PaneFailure || fault instanceof Stopped || fault instanceof ChartsRefused) throw fault;
    if (codeOf(fault) === IN_CELL_EDIT) throw new PaneFailure(texts.host.cellEdit);
    throw new PaneFailure(say(texts.host.refused, { message: fault instanceof Error ? fault.message : String(fault) }));
  }
}

const PLACE = "rowIndex,columnIndex,rowCount,columnCount,worksheet/name";

function areaFrom(range: Excel.Range): Area {
  return {
    sheet: range.worksheet.name,
    row: range.rowIndex,
    column: range.columnIndex,
    rows: range.rowCount,
    columns: range.columnCount,
  };
}

/** Takes the protection of a sheet off for a while; the answer puts it back. */
async function unlock(context: Excel.RequestContext, sheet: Excel.Worksheet, name: string): Promise<() => void> {
  const { protection } = sheet;
  protection.load("protected,options");
  await context.sync();
  if (!protection.protected) return () => undefined;
  const options = { ...protection.options };
  protection.unprotect();
  try {
    await context.sync();
  } catch {
    throw new PaneFailure(say(texts.plan.protected, { sheet: name }));
  }
  return () => protection.protect(options);
}

function queueRun(sheet: Excel.Worksheet, { row, column, contents }: Run): void {
  sheet.getRangeByIndexes(row, column, contents.length, 1).formulas = contents.map((content) => [
    typedContent(content),
  ]);
}

export class OfficeWorkbook implements OpenWorkbook {
  readonly can: Abilities = {
    insertSheets: supports("1.13"),
    openWorkbook: supports("1.8"),
    readFile: Office.context.requirements.isSetSupported("CompressedFile", "1.1"),
  };

  sheetNames(): Promise<string[]> {
    return batch(async (context) => {
      const { worksheets } = context.workbook;
      worksheets.load("items/name");
      await context.sync();
      return worksheets.items.map(({ name }) => name);
    });
  }

  selected(): Promise<Place> {
    return batch(async (context) => {
      const range = context.workbook.getSelectedRange();
      range.load(PLACE);
      await context.sync();
      const { sheet, row, column } = areaFrom(range);
      return { sheet, row, column };
    });
  }

  select(area: Area): Promise<void> {
    return batch(async (context) => {
      const sheet = context.workbook.worksheets.getItem(area.sheet);
      sheet.activate();
      sheet.getRangeByIndexes(area.row, area.column, area.rows, area.columns).select();
      await context.sync();
    });
  }

  usedArea(name: string): Promise<Area | undefined> {
    return batch(async (context) => {
      const range = context.workbook.worksheets.getItem(name).getUsedRangeOrNullObject(true);
      range.load(PLACE);
      await context.sync();
      return range.isNullObject ? undefined : areaFrom(range);
    });
  }

  async read(area: Area, work?: Work): Promise<Cells> {
    const values: unknown[][] = [];
    const formulas: unknown[][] = [];
    const isError: boolean[][] = [];
    const step = Math.max(1, Math.floor(CELLS_A_PIECE / area.columns));
    for (let from = 0; from < area.rows; from += step) {
      if (work) stopIfAsked(work);
      await batch(async (context) => {
        const range = context.workbook.worksheets
          .getItem(area.sheet)
          .getRangeByIndexes(area.row + from, area.column, Math.min(step, area.rows - from), area.columns);
        range.load("values,formulas,valueTypes");
        await context.sync();
        values.push(...range.values);
        formulas.push(...range.formulas);
        isError.push(...range.valueTypes.map((row) => row.map((type) => type === Excel.RangeValueType.error)));
      });
    }
    return { values, formulas, isError };
  }

  async write(name: string, edits: readonly Edit[], work?: Work): Promise<void> {
    const runs = runsOf(edits).flatMap((run) => pieces(run));
    await batch(async (context) => {
      const sheet = context.workbook.worksheets.getItem(name);
      const lock = await unlock(context, sheet, name);
      try {
        let queued = 0;
        for (const run of runs) {
          queueRun(sheet, run);
          queued += run.contents.length;
          if (queued < CELLS_A_PIECE) continue;
          // One calculation at the end, not one a piece.
          context.workbook.application.suspendApiCalculationUntilNextSync();
          await context.sync();
          queued = 0;
          if (work) stopIfAsked(work);
        }
      } finally {
        lock();
        await context.sync();
      }
    });
  }

  namedArea(name: string): Promise<Area | undefined> {
    return batch(async (context) => {
      const item = context.workbook.names.getItemOrNullObject(name);
      await context.sync();
      if (item.isNullObject) return undefined;
      const range = item.getRangeOrNullObject();
      range.load(PLACE);
      await context.sync();
      return range.isNullObject ? undefined : areaFrom(range);
    });
  }

  setNamedArea(name: string, area: Area): Promise<void> {
    return batch(async (context) => {
      const { names } = context.workbook;
      const item = names.getItemOrNullObject(name);
      await context.sync();
      if (item.isNullObject) names.add(name, absoluteFormula(area));
      else item.formula = absoluteFormula(area);
      await context.sync();
    });
  }

  spillParents(places: readonly Place[]): Promise<(Place | undefined)[]> {
    if (!supports("1.12")) return Promise.resolve(places.map(() => undefined));
    return batch(async (context) => {
      const parents = places.map(({ sheet, row, column }) =>
        context.workbook.worksheets.getItem(sheet).getCell(row, column).getSpillParentOrNullObject(),
      );
      parents.forEach((parent) => parent.load(PLACE));
      await context.sync();
      return parents.map((parent) => (parent.isNullObject ? undefined : areaFrom(parent)));
    });
  }

  spilledArea({ sheet, row, column }: Place): Promise<Area | undefined> {
    if (!supports("1.12")) return Promise.resolve(undefined);
    return batch(async (context) => {
      const range = context.workbook.worksheets.getItem(sheet).getCell(row, column).getSpillingToRangeOrNullObject();
      range.load(PLACE);
      await context.sync();
      return range.isNullObject ? undefined : areaFrom(range);
    });
  }

  recalculate(): Promise<void> {
    return batch(async (context) => {
      context.workbook.application.calculate(Excel.CalculationType.recalculate);
      await context.sync();
    });
  }

  isCalculated(): Promise<boolean> {
    if (!supports("1.9")) return Promise.resolve(true);
    return batch(async (context) => {
      const { application } = context.workbook;
      application.load("calculationState");
      await context.sync();
      return application.calculationState === Excel.CalculationState.done;
    });
  }

  addSheet(name: string): Promise<void> {
    return batch(async (context) => {
      context.workbook.worksheets.add(name);
      await context.sync();
    });
  }

  addValueSheet(sourceName: string, name: string): Promise<void> {
    return batch(async (context) => {
      const source = context.workbook.worksheets.getItem(sourceName);
      const used = source.getUsedRangeOrNullObject();
      used.load(PLACE);
      const copy = source.copy(Excel.WorksheetPositionType.end);
      copy.name = name;
      await context.sync();
      await unlock(context, copy, sourceName);
      if (!used.isNullObject) {
        const target = copy.getRange(localAddress(areaFrom(used)));
        target.copyFrom(used, Excel.RangeCopyType.values);
        target.format.protection.locked = true;
      }
      copy.protection.protect({ allowFormatColumns: true, allowFormatRows: true });
      await context.sync();
    });
  }

  deleteSheets(names: readonly string[]): Promise<void> {
    return batch(async (context) => {
      const sheets = names.map((name) => context.workbook.worksheets.getItemOrNullObject(name));
      await context.sync();
      for (const sheet of sheets) if (!sheet.isNullObject) sheet.delete();
      await context.sync();
    });
  }

  insertSheets(file: Uint8Array, only?: readonly string[]): Promise<void> {
    return batch(async (context) => {
      context.workbook.insertWorksheetsFromBase64(toBase64(file), {
        positionType: Excel.WorksheetPositionType.end,
        ...(only ? { sheetNamesToInsert: [...only] } : {}),
      });
      try {
        await context.sync();
      } catch (fault) {
        throw codeOf(fault) === UNSUPPORTED ? new ChartsRefused() : fault;
      }
    });
  }

  async openWorkbook(file: Uint8Array): Promise<void> {
    await batch(() => Excel.createWorkbook(toBase64(file)));
  }

  file(work: Work): Promise<Uint8Array> {
    return new Promise((resolve, reject) => {
      const refuse = (message: string): void => reject(new PaneFailure(say(texts.host.fileFailed, { message })));
      Office.context.document.getFileAsync(
        Office.FileType.Compressed,
        { sliceSize: FILE_SLICE_BYTES },
        ({ status, value, error }) => {
          if (status !== Office.AsyncResultStatus.Succeeded) refuse(error.message);
          else readSlices(value, work).then(resolve, reject);
        },
      );
    });
  }
}

/** A run as runs that the program takes at once. */
function pieces({ row, column, contents }: Run): Run[] {
  const parts: Run[] = [];
  for (let from = 0; from < contents.length; from += CELLS_A_PIECE)
    parts.push({ row: row + from, column, contents: contents.slice(from, from + CELLS_A_PIECE) });
  return parts;
}

async function readSlices(file: Office.File, work: Work): Promise<Uint8Array> {
  try {
    const bytes = new Uint8Array(file.size);
    let at = 0;
    for (let index = 0; index < file.sliceCount; index++) {
      stopIfAsked(work);
      const share = index / file.sliceCount;
      work.progress(say(texts.plan.handoverReading, { percent: 100 * share }), share);
      const slice = await new Promise<number[]>((resolve, reject) =>
        file.getSliceAsync(index, ({ status, value, error }) =>
          status === Office.AsyncResultStatus.Succeeded
            ? resolve(value.data as number[])
            : reject(new PaneFailure(say(texts.host.fileFailed, { message: error.message }))),
        ),
      );
      bytes.set(slice, at);
      at += slice.length;
    }
    return bytes.subarray(0, at);
  } finally {
    file.closeAsync();
  }
}
