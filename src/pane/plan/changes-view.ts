/** The changes that a forecast brought, as a table. */
import { sayCount, shownValue, texts } from "../say";
import { h } from "../view/dom";

const MOST_SHOWN = 60;

/** @param changes cell, year, scheme, column, before, after, change; headings first */
export function changesTable(changes: readonly (readonly unknown[])[]): HTMLElement {
  const { plan } = texts;
  const headings = [
    plan.changesCell,
    plan.changesYear,
    plan.changesScheme,
    plan.changesColumn,
    plan.changesBefore,
    plan.changesAfter,
  ];
  const rows = changes.slice(1, 1 + MOST_SHOWN);
  const cells = (row: readonly unknown[]): string[] =>
    headings.map((_, c) => (c === 1 ? String(row[c]) : shownValue(row[c])));
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
