/** Stands in for Office.js in a page: a pretended program over a workbook in memory that computes with the page's functions. */
import type { PageFunctions } from "../../src/pane/functions-on-page";
import { Book, officeOf, Program, USUAL, type Behaviour } from "../pane/office/office";

declare global {
  interface Window {
    /** Set before the page loads. */
    behaviour?: Partial<Behaviour> & { readonly theme?: string };
    program: Program;
  }
}

const onPage = (): PageFunctions["functionTable"] => globalThis.capacityFunctions?.functionTable ?? {};

/** functions.js loads after Office.js, so its table is looked up when it is needed. */
const functions = new Proxy(
  {},
  {
    get: (_, id: string) => onPage()[id],
    ownKeys: () => Object.keys(onPage()),
    getOwnPropertyDescriptor: (_, id) => Object.getOwnPropertyDescriptor(onPage(), id),
  },
);

const { theme, ...changes } = window.behaviour ?? {};
const namespace = document.documentElement.dataset["namespace"]!;
window.program = new Program(new Book(functions, namespace), { ...USUAL, ...changes });
Object.assign(window, {
  Excel: window.program.excel(),
  Office: officeOf(window.program, theme),
  // What Office.js itself offers until the rest of it has come.
  CustomFunctions: { associate: () => undefined },
});
