/** The changes that a forecast brought, as a table. */
import { sayCount, shownValue, texts } from "../say";
import { h } from "../view/dom";

const MOST_SHOWN = 60;

/** @param changes cell, year, scheme, column, before, after, change; headings first */
export function changesTable(changes: readonly (readonly unknown[])[]): HTMLElement {
  const { plan } = texts;
  const headings = [plan.changesWhere, plan.changesColumn, plan.changesMoved];
  const rows = changes.slice(1, 1 + MOST_SHOWN);
  const cells = ([cell, year, scheme, column, before, after]: readonly unknown[]): string[] => [
    `${String(cell)}, ${String(year)}, ${String(scheme)}`,
    String(column),
    `${shownValue(before)} → ${shownValue(after)}`,
  ];
  return h(
    "div",
    { class: "scroll", role: "region", tabindex: 0, "aria-label": plan.forecastTitle },
    h(
      "table",
      {},
      h("caption", {}, sayCount(plan.changesShown, rows.length)),
      h("thead", {}, h("tr", {}, ...headings.map((heading) => h("th", { scope: "col" }, heading)))),
      h("tbody", {}, ...rows.map((row) => h("tr", {}, ...cells(row).map((cell) => h("td", {}, cell))))),
    ),
  );
}
