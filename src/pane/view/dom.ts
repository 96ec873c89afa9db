/** Makes page elements; texts go in as text, never as markup. */

type Attributes = Readonly<Record<string, string | number | boolean | ((event: never) => void) | undefined>>;
export type Child = Node | string | undefined;

/**
 * @param tag name of the element
 * @param attributes attributes by name; a function under "onclick" and the like listens to that event
 * @param children elements and texts
 */
export function h<Tag extends keyof HTMLElementTagNameMap>(
  tag: Tag,
  attributes: Attributes = {},
  ...children: readonly Child[]
): HTMLElementTagNameMap[Tag] {
  const element = document.createElement(tag);
  for (const [name, value] of Object.entries(attributes)) {
    if (typeof value === "function") element.addEventListener(name.slice(2), value as (event: Event) => void);
    else if (value === true) element.setAttribute(name, "");
    else if (value !== false && value !== undefined) element.setAttribute(name, String(value));
  }
  element.append(...children.filter((child): child is Node | string => child !== undefined));
  return element;
}

export function replaceChildren(element: Element, ...children: readonly Child[]): void {
  element.replaceChildren(...children.filter((child): child is Node | string => child !== undefined));
}

/** Moves the focus to something that is not a control, such as a new heading. */
export function focusOn(element: HTMLElement): void {
  element.tabIndex = -1;
  element.focus();
}
