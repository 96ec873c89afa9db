/** What the pane does with whole plans: starter sheets, a new forecast, the handover copy. */
import type { Around } from "../around";
import { say, sayCount, texts } from "../say";
import { h, replaceChildren, type Child } from "../view/dom";
import type { OpenWorkbook } from "../workbook/workbook";
import { changesTable } from "./changes-view";
import { loadForecast, prepareForecast, undoForecast, type Outcome, type Prepared } from "./forecast";
import { addHandoverSheets, openHandover } from "./handover";
import { insertStarter, openStarter } from "./starter";
import { SHEETS } from "../../workbook/build/sheet-names";

function button(text: string, onclick: () => void, main = false): HTMLButtonElement {
  return h("button", { type: "button", ...(main ? { class: "main" } : {}), onclick }, text);
}

function section(title: string, text: string, ...children: readonly Child[]): HTMLElement {
  return h("section", { class: "task" }, h("h2", {}, title), h("p", {}, text), ...children);
}

function starterSection(book: OpenWorkbook, { jobs, namespace }: Around): HTMLElement {
  const { plan } = texts;
  return section(
    plan.starterTitle,
    plan.starterText,
    h(
      "div",
      { class: "actions" },
      button(plan.starterInsert, () => void jobs.run((work) => insertStarter(book, namespace, work)), true),
      button(plan.starterNew, () => void jobs.run((work) => openStarter(book, namespace, work))),
    ),
  );
}

function previewText({ file, edit, users }: Prepared): string {
  const { matched, added, gone } = edit;
  return users
    ? say(texts.plan.forecastPreview, { file, matched, added, gone, ...users })
    : say(texts.plan.forecastPreviewShort, { file, matched, added, gone });
}

function outcomeText({ changes, rows, verdicts, compared, error }: Outcome): string {
  if (error !== undefined) return say(texts.plan.forecastErrors, { error });
  if (!compared) return texts.plan.forecastUncompared;
  const moved = changes.length - 1;
  if (moved === 0) return texts.plan.forecastUnmoved;
  return [
    sayCount(texts.plan.forecastDone, moved),
    sayCount(texts.plan.forecastRows, rows),
    verdicts === 0 ? texts.plan.forecastNoVerdicts : sayCount(texts.plan.forecastVerdicts, verdicts),
    say(texts.plan.forecastWritten, { sheet: SHEETS.changes }),
  ].join(" ");
}

class ForecastSection {
  private readonly file = h("input", {
    type: "file",
    id: "forecast-file",
    accept: ".csv,text/csv,text/plain",
    onchange: () => void this.prepare(),
  });
  private readonly preview = h("div", { class: "preview" });
  private readonly result = h("div", { class: "result" });
  readonly element: HTMLElement;

  constructor(
    private readonly book: OpenWorkbook,
    private readonly around: Around,
  ) {
    const { plan } = texts;
    this.element = section(
      plan.forecastTitle,
      plan.forecastText,
      h("label", { for: "forecast-file" }, plan.forecastFile),
      this.file,
      this.preview,
      this.result,
    );
  }

  private async prepare(): Promise<void> {
    const chosen = this.file.files?.[0];
    replaceChildren(this.preview);
    replaceChildren(this.result);
    if (!chosen) return;
    await this.around.jobs.run(async (work) => {
      work.progress(texts.plan.forecastReading);
      const prepared = await prepareForecast(this.book, await chosen.text(), chosen.name);
      replaceChildren(
        this.preview,
        h("p", { role: "status" }, previewText(prepared)),
        button(texts.plan.forecastApply, () => void this.load(prepared), true),
      );
      return undefined;
    });
    // The same file may be chosen again after it was mended.
    this.file.value = "";
  }

  private async load(prepared: Prepared): Promise<void> {
    await this.around.jobs.run(async (work) => {
      const undo = button(texts.plan.forecastUndo, () => void this.undo(prepared));
      replaceChildren(this.result, undo);
      const outcome = await loadForecast(this.book, prepared, work);
      replaceChildren(this.preview);
      replaceChildren(this.result, outcome.changes.length > 1 ? changesTable(outcome.changes) : undefined, undo);
      this.result.scrollIntoView({ block: "nearest" });
      return outcomeText(outcome);
    });
  }

  private async undo(prepared: Prepared): Promise<void> {
    await this.around.jobs.run(async () => {
      await undoForecast(this.book, prepared);
      replaceChildren(this.result);
      return texts.plan.forecastUndone;
    });
  }
}

function handoverSection(book: OpenWorkbook, { jobs, namespace, functions }: Around): HTMLElement {
  const { plan } = texts;
  const table = functions?.functionTable ?? {};
  return section(
    plan.handoverTitle,
    plan.handoverText,
    h(
      "div",
      { class: "actions" },
      button(plan.handoverNew, () => void jobs.run((work) => openHandover(book, table, namespace, work)), true),
      button(plan.handoverHere, () => void jobs.run((work) => addHandoverSheets(book, work))),
    ),
  );
}

export function planView(around: Around): HTMLElement {
  const { book } = around;
  if (!book) return h("section", {}, h("p", { class: "hint" }, texts.host.outside));
  return h(
    "section",
    {},
    starterSection(book, around),
    new ForecastSection(book, around).element,
    handoverSection(book, around),
  );
}
