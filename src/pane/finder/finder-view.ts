/** The function finder: a question above, the functions that answer it below, one of them in full. */
import type { FunctionText } from "../../sheet/registry";
import type { Around } from "../around";
import { allTexts } from "../functions-on-page";
import { say, sayCount, texts } from "../say";
import { focusOn, h, replaceChildren } from "../view/dom";
import { detailView } from "./detail-view";
import { FunctionSearch } from "./search";

const MOST_SHOWN = 40;
const LIST_ID = "finder-list";

export class FinderView {
  private readonly search: FunctionSearch;
  private readonly input = h("input", {
    type: "search",
    id: "finder-question",
    role: "combobox",
    "aria-expanded": "false",
    "aria-controls": LIST_ID,
    "aria-autocomplete": "list",
    "aria-describedby": "finder-hint",
    autocomplete: "off",
    spellcheck: "false",
    oninput: () => this.showFor(this.input.value),
    onkeydown: (event: KeyboardEvent) => this.onKey(event),
  });
  private readonly count = h("p", { class: "count", role: "status" });
  private readonly list = h("ul", { id: LIST_ID, role: "listbox", "aria-label": texts.find.listLabel, hidden: true });
  private readonly start = h("div", { class: "start" });
  private readonly detail = h("div", { class: "detail-place", hidden: true });
  private shown: readonly FunctionText[] = [];
  private active = -1;

  readonly element: HTMLElement;

  constructor(private readonly around: Around) {
    this.search = new FunctionSearch(allTexts(around.functions), texts.find);
    this.element = h(
      "section",
      { class: "finder" },
      h(
        "div",
        { class: "choose" },
        h("label", { for: "finder-question" }, texts.find.label),
        this.input,
        h("p", { id: "finder-hint", class: "hint" }, texts.find.hint),
        this.count,
        this.list,
        this.start,
      ),
      this.detail,
    );
    replaceChildren(this.start, ...this.startingPoints());
  }

  focus(): void {
    this.input.focus();
    this.input.select();
  }

  private startingPoints(): HTMLElement[] {
    const questions = texts.find.questions
      .filter(({ functions }) => functions.some((id) => this.around.functions?.functionTable[id]))
      .map(({ ask }) => h("li", {}, h("button", { type: "button", onclick: () => this.ask(ask) }, ask)));
    const about: Readonly<Record<string, string>> = texts.find.subjects;
    const subjects = this.search
      .subjects()
      .map((subject) =>
        h(
          "li",
          {},
          h(
            "button",
            { type: "button", onclick: () => this.ask(`${subject}.`) },
            say(texts.find.subject, { subject, about: about[subject] ?? "" }),
          ),
        ),
      );
    return [
      h("h2", {}, texts.find.questionsTitle),
      h("ul", { class: "questions" }, ...questions),
      h("h2", {}, texts.find.subjectsTitle),
      h("ul", { class: "subjects" }, ...subjects),
    ];
  }

  private ask(question: string): void {
    this.input.value = question;
    this.showFor(question);
    this.input.focus();
  }

  private showFor(question: string): void {
    const empty = question.trim() === "";
    this.shown = empty ? [] : this.search.find(question);
    this.start.hidden = !empty;
    this.list.hidden = this.shown.length === 0;
    this.input.setAttribute("aria-expanded", String(this.shown.length > 0));
    this.count.textContent = empty
      ? ""
      : this.shown.length === 0
        ? texts.find.none
        : sayCount(texts.find.results, this.shown.length);
    replaceChildren(
      this.list,
      ...this.shown
        .slice(0, MOST_SHOWN)
        .map((text, i) =>
          h(
            "li",
            { role: "option", id: `finder-option-${i}`, "aria-selected": "false", onclick: () => this.open(i) },
            h("code", {}, `${this.around.namespace}.${text.id}`),
            h("span", {}, text.description),
          ),
        ),
    );
    this.activate(this.shown.length > 0 ? 0 : -1);
  }

  private activate(index: number): void {
    this.list.children[this.active]?.setAttribute("aria-selected", "false");
    this.active = index;
    const option = this.list.children[index];
    option?.setAttribute("aria-selected", "true");
    option?.scrollIntoView({ block: "nearest" });
    if (option) this.input.setAttribute("aria-activedescendant", option.id);
    else this.input.removeAttribute("aria-activedescendant");
  }

  private onKey(event: KeyboardEvent): void {
    const count = this.list.children.length;
    if ((event.key === "ArrowDown" || event.key === "ArrowUp") && count > 0) {
      event.preventDefault();
      this.activate((this.active + (event.key === "ArrowDown" ? 1 : count - 1)) % count);
    } else if (event.key === "Enter" && this.active >= 0) {
      event.preventDefault();
      this.open(this.active);
    } else if (event.key === "Escape" && this.input.value !== "") {
      event.preventDefault();
      this.ask("");
    }
  }

  private open(index: number): void {
    const text = this.shown[index];
    if (!text) return;
    this.activate(index);
    const view = detailView(text, this.around, () => this.close());
    replaceChildren(this.detail, view);
    this.detail.hidden = false;
    this.element.classList.add("has-detail");
    focusOn(view.querySelector("h2")!);
  }

  private close(): void {
    this.detail.hidden = true;
    this.element.classList.remove("has-detail");
    this.input.focus();
  }
}
