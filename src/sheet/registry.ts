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

type Declared = (...args: any[]) => unknown; // eslint-disable-line @typescript-eslint/no-explicit-any

/**
 * Registers every declared function with its texts.
 *
 * @returns the registered functions by id
 */
export function registerAll(
  declared: Readonly<Record<string, Declared>>,
  described: readonly FunctionText[],
): Readonly<Record<string, RegisteredFunction>> {
  const table: Record<string, RegisteredFunction> = {};
  for (const text of described) {
    const fn = declared[text.id];
    if (!fn) throw new Error(`${text.id} has texts but no function`);
    const entry: RegisteredFunction = {
      id: text.id,
      parameters: text.parameters.map(({ name, optional }) => ({ name, optional })),
      call: (args) => fn(...args) as unknown[][],
    };
    register(entry, text);
    table[text.id] = entry;
  }
  return table;
}
