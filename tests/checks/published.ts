import entries from "./published.json";

/** One published value: inputs with units in their key names, and where it was printed. */
export interface Published {
  readonly id: string;
  readonly topic: string;
  readonly quantity: string;
  readonly inputs: Readonly<Record<string, number | string | boolean | number[]>>;
  readonly expected: number;
  readonly tolerance?: number;
  readonly source: string;
  /** "V" seen in a copy of the source, "C" recomputed only, "M" from memory. */
  readonly how: string;
  readonly note?: string;
}

const all = entries as unknown as Published[];

/** The published values whose id starts with one of the prefixes. */
export function published(...prefixes: string[]): Published[] {
  const found = all.filter((entry) => prefixes.some((prefix) => entry.id.startsWith(prefix)));
  if (found.length === 0) throw new Error(`no published value starts with ${prefixes.join(", ")}`);
  return found;
}

/** The published value of exactly this id. */
export function publishedValue(id: string): Published {
  const found = all.find((entry) => entry.id === id);
  if (!found) throw new Error(`no published value ${id}`);
  return found;
}

/** How a test title names a published value: id, quantity and source. */
export function title(entry: Published): string {
  const memory = entry.how === "M" ? ", from memory" : "";
  return `${entry.id} ${entry.quantity} [${entry.source}${memory}]`;
}
