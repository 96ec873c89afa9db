/** A row of tabs with their panels: arrow keys move between them. */
import { h } from "./dom";

export interface Tab {
  readonly id: string;
  readonly title: string;
  readonly panel: HTMLElement;
}

/** @param chosen told whenever a person chooses a tab */
export function tabList(label: string, tabs: readonly Tab[], chosen: () => void): HTMLElement[] {
  const buttons = tabs.map(({ id, title }) =>
    h(
      "button",
      { type: "button", role: "tab", id: `tab-${id}`, "aria-controls": `panel-${id}`, onclick: () => select(id) },
      title,
    ),
  );
  const show = (shown: string): void => {
    tabs.forEach(({ id, panel }, i) => {
      const button = buttons[i]!;
      button.setAttribute("aria-selected", String(id === shown));
      button.tabIndex = id === shown ? 0 : -1;
      panel.hidden = id !== shown;
    });
  };
  const select = (id: string): void => {
    show(id);
    chosen();
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
        select(tabs[next]!.id);
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
  show(tabs[0]!.id);
  return [list, ...tabs.map(({ panel }) => panel)];
}
