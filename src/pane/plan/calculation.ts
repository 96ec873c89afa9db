/** Waits until the workbook has its values. */
import { say, texts } from "../say";
import { pause, stopIfAsked, type Work } from "../work";
import type { OpenWorkbook } from "../workbook/workbook";

const POLL_MILLISECONDS = 250;
/** What a cell shows while its function is being computed. */
const UNFINISHED: ReadonlySet<unknown> = new Set(["#BUSY!", "#GETTING_DATA"]);

export function isUnfinished(value: unknown): boolean {
  return UNFINISHED.has(value);
}

/**
 * @param ready whether the values that matter are there, asked once the program says that it is done
 * @param stopped what stays behind when the waiting is stopped
 */
export async function untilCalculated(
  book: OpenWorkbook,
  work: Work,
  ready: () => Promise<boolean>,
  stopped: string,
): Promise<void> {
  const start = performance.now();
  for (;;) {
    stopIfAsked(work, stopped);
    if ((await book.isCalculated()) && (await ready())) return;
    const seconds = (performance.now() - start) / 1000;
    work.progress(say(texts.plan.forecastCalculating, { seconds }));
    await pause(POLL_MILLISECONDS, work);
  }
}
