/** Runs one piece of long work at a time, shows how far it is, and lets it be stopped. */
import { PaneFailure } from "../failure";
import { say, texts } from "../say";
import { Stopped, type Work } from "../work";
import { h } from "./dom";

type Kind = "done" | "failed" | "stopped";

export class Jobs {
  private readonly progressText = h("span", { class: "progress-text" });
  private readonly bar = h("progress", { "aria-label": texts.title, max: 1 });
  private readonly stop = h("button", { type: "button", onclick: () => this.askToStop() }, texts.work.stop);
  private readonly running = h("div", { class: "running", hidden: true }, this.progressText, this.bar, this.stop);
  private readonly told = h("p", { class: "told", hidden: true });
  private current: AbortController | undefined;

  /** The place where progress and outcome are shown. */
  readonly element = h(
    "footer",
    { class: "work" },
    this.running,
    h("div", { role: "status", "aria-live": "polite" }, this.told),
  );

  /**
   * Runs work and tells its outcome.
   *
   * @param steps the work; what it answers is told, nothing is told where it answers nothing
   */
  async run(steps: (work: Work) => Promise<string | undefined>): Promise<void> {
    if (this.current) {
      this.tell(texts.work.busy, "failed");
      return;
    }
    const control = (this.current = new AbortController());
    this.told.hidden = true;
    this.stop.disabled = false;
    const work: Work = {
      signal: control.signal,
      progress: (text, share) => this.show(control.signal.aborted ? texts.work.stopping : text, share),
    };
    try {
      const outcome = await steps(work);
      if (outcome !== undefined) this.tell(outcome, "done");
    } catch (fault) {
      this.tellFault(fault);
    } finally {
      this.current = undefined;
      this.running.hidden = true;
    }
  }

  tell(text: string, kind: Kind): void {
    this.told.textContent = text;
    this.told.dataset["kind"] = kind;
    this.told.hidden = false;
  }

  /** Takes the last outcome away once it is no longer of interest. */
  forget(): void {
    this.told.hidden = true;
  }

  private tellFault(fault: unknown): void {
    if (fault instanceof Stopped) {
      this.tell(say(texts.work.stopped, { what: fault.what ?? texts.work.nothingChanged }), "stopped");
    } else if (fault instanceof PaneFailure) this.tell(fault.message, "failed");
    else {
      const message = fault instanceof Error ? fault.message : String(fault);
      this.tell(say(texts.work.fault, { message }), "failed");
    }
  }

  private show(text: string, share: number | undefined): void {
    this.running.hidden = false;
    this.progressText.textContent = text;
    // Without a value the bar moves to and fro.
    if (share === undefined) this.bar.removeAttribute("value");
    else this.bar.value = share;
  }

  private askToStop(): void {
    this.current?.abort();
    this.stop.disabled = true;
    this.show(texts.work.stopping, undefined);
  }
}
