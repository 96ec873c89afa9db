/** The functions by name, for those that act on other functions (what if, method texts). Entry points fill it once. */

/** A worksheet function as other functions see it. */
export interface RegisteredFunction {
  /** Name without the namespace: "ERLANGB.BLOCKING". */
  readonly id: string;
  readonly parameters: readonly { readonly name: string; readonly optional: boolean }[];
  call(args: readonly (readonly (readonly unknown[])[] | null)[]): unknown[][];
}

/** Texts of a function for people: tooltip, reference and method statement have one source. */
export interface FunctionText {
  readonly id: string;
  readonly description: string;
  readonly parameters: readonly { readonly name: string; readonly optional: boolean; readonly text: string }[];
  readonly returns: string;
  readonly method: string;
  readonly source: string;
  readonly assumes: string;
  readonly errors: string;
  readonly examples: readonly string[];
}

const functions = new Map<string, RegisteredFunction>();
const texts = new Map<string, FunctionText>();

export const NAMESPACE = "CAP";

/** The id for a name as typed: any case, with or without "=", namespace and brackets. */
export function canonicalId(name: string): string {
  return name
    .trim()
    .toUpperCase()
    .replace(/^=/, "")
    .replace(/\(.*$/s, "")
    .replace(new RegExp(`^${NAMESPACE}(DEV)?\\.`), "");
}

export function register(entry: RegisteredFunction, text: FunctionText): void {
  functions.set(entry.id, entry);
  texts.set(text.id, text);
}

export function lookup(name: string): RegisteredFunction | undefined {
  return functions.get(canonicalId(name));
}

export function textOf(name: string): FunctionText | undefined {
  return texts.get(canonicalId(name));
}

export function registeredIds(): string[] {
  return [...functions.keys()];
}
