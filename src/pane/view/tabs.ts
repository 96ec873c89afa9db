/** A row of tabs with their panels: arrow keys move between them. */
import { h } from "./dom";

export interface Tab {
  readonly id: string;
  readonly title: string;
  readonly panel: HTMLElement;
}

export function tabList(label: string, tabs: readonly Tab[]): HTMLElement[] {
  const buttons = tabs.map(({ id, title }) =>
    h(
      "button",
      { type: "button", role: "tab", id: `tab-${id}`, "aria-controls": `panel-${id}`, onclick: () => choose(id) },
      title,
    ),
  );
  const choose = (chosen: string): void => {
    tabs.forEach(({ id, panel }, i) => {
      const button = buttons[i]!;
      button.setAttribute("aria-selected", String(id === chosen));
      button.tabIndex = id === chosen ? 0 : -1;
      panel.hidden = id !== chosen;
    });
  };
  const STEPS: Readonly<Record<string, (at: number) => number>> = {
    ArrowRight: (at) => (at + 1) % tabs.length,
    ArrowLeft: (at) => (at + tabs.length - 1) % tabs.length,
    Home: () => 0,
    End: () => tabs.length - 1,
  };
  const list = h(
    "div",
    {
      role: "tablist",
      "aria-label": label,
      onkeydown: (event: KeyboardEvent) => {
        const step = STEPS[event.key];
        if (!step) return;
        event.preventDefault();
        const next = step(buttons.findIndex((button) => button === document.activeElement));
        choose(tabs[next]!.id);
        buttons[next]!.focus();
      },
    },
    ...buttons,
  );
  for (const { id, panel } of tabs) {
    panel.id = `panel-${id}`;
    panel.setAttribute("role", "tabpanel");
    panel.setAttribute("aria-labelledby", `tab-${id}`);
  }
  choose(tabs[0]!.id);
  return [list, ...tabs.map(({ panel }) => panel)];
}
