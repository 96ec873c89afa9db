/** Puts the pane together. */
import type { Around } from "./around";
import { checkView } from "./check/check-view";
import { FinderView } from "./finder/finder-view";
import { planView } from "./plan/plan-view";
import { say, texts } from "./say";
import { h, replaceChildren } from "./view/dom";
import { Jobs } from "./view/jobs";
import { tabList } from "./view/tabs";

export interface Installation {
  readonly namespace: string;
  readonly version: string;
  readonly environment: string;
}

function header({ version, environment }: Installation): HTMLElement {
  const words = environment === "production" ? texts.header.version : texts.header.development;
  return h(
    "header",
    {},
    h("img", { src: "icons/icon-32.png", alt: "", width: 24, height: 24 }),
    h("h1", {}, texts.title),
    h("span", { class: "version" }, say(words, { version })),
    h("a", { href: "help.html", target: "_blank", rel: "noopener" }, texts.header.help),
  );
}

/**
 * @param notice what is amiss with the program around the pane, if anything
 */
export function mount(
  root: HTMLElement,
  installation: Installation,
  parts: Pick<Around, "book" | "functions">,
  notice: string | undefined,
): void {
  const jobs = new Jobs();
  const around: Around = { ...parts, namespace: installation.namespace, jobs };
  const finder = new FinderView(around);
  const tabs = [
    { id: "find", title: texts.tabs.find, panel: finder.element },
    { id: "plan", title: texts.tabs.plan, panel: planView(around) },
    { id: "check", title: texts.tabs.check, panel: checkView(around) },
  ];
  const main = h(
    "main",
    {},
    notice === undefined ? undefined : h("p", { class: "notice", role: "note" }, notice),
    ...tabList(texts.tabs.label, tabs, () => jobs.forget()),
  );
  replaceChildren(root, header(installation), main, jobs.element);
  document.addEventListener("keydown", (event) => {
    const typing = event.target instanceof HTMLInputElement;
    if (event.key !== "/" || typing || finder.element.hidden) return;
    event.preventDefault();
    finder.focus();
  });
  finder.focus();
}
