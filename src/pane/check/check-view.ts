/** Checks the workbook and lists where its errors begin. */
import type { Around } from "../around";
import { say, sayCount, texts } from "../say";
import { h, replaceChildren, type Child } from "../view/dom";
import { areaOfCell, placeText } from "../workbook/address";
import type { OpenWorkbook } from "../workbook/workbook";
import { meaningOf, messagesOf } from "./explain";
import { scanWorkbook, type ErrorRoot, type Scan } from "./scan";
import { tryOneFormula } from "./self-test";

const MOST_LISTED = 50;
const LONGEST_FORMULA = 160;

function shortened(formula: string): string {
  return formula.length > LONGEST_FORMULA ? `${formula.slice(0, LONGEST_FORMULA)} …` : formula;
}

function rootItem(root: ErrorRoot, messages: readonly string[], book: OpenWorkbook, { jobs }: Around): HTMLElement {
  const place = placeText(root.place);
  const goTo = (): void =>
    void jobs.run(async () => {
      await book.select(areaOfCell(root.place));
      return undefined;
    });
  return h(
    "li",
    {},
    h(
      "p",
      { class: "place" },
      h("span", { class: "code" }, root.code),
      h("button", { type: "button", class: "link", onclick: goTo }, say(texts.check.goTo, { place })),
    ),
    root.formula === undefined ? undefined : h("p", {}, h("code", {}, shortened(root.formula))),
    ...(messages.length > 0 ? messages : [texts.check.noMessage]).map((message) => h("p", {}, message)),
    root.spilled > 0 ? h("p", { class: "hint" }, sayCount(texts.check.spilled, root.spilled)) : undefined,
    root.passedOn > 0 ? h("p", { class: "hint" }, sayCount(texts.check.passedOn, root.passedOn)) : undefined,
  );
}

function meanings(scan: Scan): HTMLElement {
  const codes = [...new Set(scan.errors.map(({ code }) => code))];
  const entries = codes.flatMap((code) => [h("dt", { class: "code" }, code), h("dd", {}, meaningOf(code))]);
  return h("div", {}, h("h3", {}, texts.check.meaningTitle), h("dl", { class: "meanings" }, ...entries));
}

function summary(scan: Scan, namespace: string): string {
  const { sheets, cells, formulas, own, errors, roots } = scan;
  return errors.length === 0
    ? say(texts.check.clean, { cells, sheets, formulas, own, namespace })
    : `${sayCount(texts.check.found, errors.length)} ${sayCount(texts.check.begin, roots.length)}`;
}

async function report(scan: Scan, book: OpenWorkbook, around: Around): Promise<Child[]> {
  const external = scan.external > 0 ? h("p", {}, sayCount(texts.check.external, scan.external)) : undefined;
  if (scan.errors.length === 0) return [external];
  const listed = scan.roots.slice(0, MOST_LISTED);
  const items: HTMLElement[] = [];
  for (const root of listed) {
    // #NAME? and the like come from the program; only our own answers carry messages.
    const ours = root.code === "#VALUE!" || root.code === "#N/A";
    const messages = ours ? await messagesOf(book, root, around.functions, around.namespace) : [meaningOf(root.code)];
    items.push(rootItem(root, messages, book, around));
  }
  const more = scan.roots.length - listed.length;
  return [
    meanings(scan),
    h("h3", {}, texts.check.rootsTitle),
    h("ol", { class: "roots" }, ...items),
    more > 0 ? h("p", {}, sayCount(texts.check.more, more)) : undefined,
    external,
  ];
}

export function checkView(around: Around): HTMLElement {
  const { book, jobs, namespace } = around;
  if (!book) return h("section", {}, h("p", { class: "hint" }, texts.host.outside));
  const result = h("div", { class: "result" });
  const check = (): void =>
    void jobs.run(async (work) => {
      replaceChildren(result);
      const scan = await scanWorkbook(book, namespace, work);
      replaceChildren(result, ...(await report(scan, book, around)));
      return summary(scan, namespace);
    });
  const tryOne = (): void => void jobs.run((work) => tryOneFormula(book, namespace, work));
  const { check: words } = texts;
  return h(
    "section",
    {},
    h(
      "section",
      { class: "task" },
      h("h2", {}, words.title),
      h("p", {}, words.text),
      h("div", { class: "actions" }, h("button", { type: "button", class: "main", onclick: check }, words.run)),
      result,
    ),
    h(
      "section",
      { class: "task" },
      h("h2", {}, words.selfTitle),
      h("p", {}, words.selfText),
      h("div", { class: "actions" }, h("button", { type: "button", onclick: tryOne }, words.selfRun)),
    ),
  );
}
