/** Finds out whether the functions answer in cells, and whether it is ours that do. */
import { say, texts } from "../say";
import { pause, stopIfAsked, type Work } from "../work";
import { areaOfCell } from "../workbook/address";
import type { OpenWorkbook } from "../workbook/workbook";
import { freeName } from "../plan/handover";
import { isUnfinished } from "../plan/calculation";
import { meaningOf } from "./explain";

const EXPECTED = 20;
const LONGEST_SECONDS = 15;
const POLL_MILLISECONDS = 250;

/** Writes one formula on a sheet of its own, reads its answer, deletes the sheet; answers with what to tell. */
export async function tryOneFormula(book: OpenWorkbook, namespace: string, work: Work): Promise<string> {
  const formula = say(texts.check.selfFormula, { namespace });
  const sheet = freeName(texts.title, "", await book.sheetNames());
  const start = performance.now();
  await book.addSheet(sheet);
  try {
    await book.write(sheet, [{ row: 0, column: 0, content: { formula } }]);
    for (;;) {
      const value = (await book.read(areaOfCell({ sheet, row: 0, column: 0 }))).values[0]?.[0];
      const seconds = (performance.now() - start) / 1000;
      const shown = { formula, namespace, value: String(value), seconds: seconds.toFixed(1), expected: EXPECTED };
      if (value === EXPECTED) return say(texts.check.selfGood, shown);
      const settled = value !== "" && !isUnfinished(value);
      // A function list that is just arriving shows #NAME? for a moment.
      if (settled && value !== "#NAME?") return say(texts.check.selfWrong, shown);
      if (seconds > LONGEST_SECONDS) return `${say(texts.check.selfSlow, shown)} ${meaningOf(String(value))}`;
      stopIfAsked(work, texts.work.nothingChanged);
      work.progress(say(texts.check.selfRunning, { seconds }), seconds / LONGEST_SECONDS);
      await pause(POLL_MILLISECONDS, work);
    }
  } finally {
    await book.deleteSheets([sheet]);
  }
}
