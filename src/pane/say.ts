/** The pane's words: all in texts.json, with numbers put in as the language writes them. */
import texts from "./texts.json";

export { texts };

export type Values = Readonly<Record<string, string | number>>;

/** A text that depends on a count. */
export interface Forms {
  readonly one: string;
  readonly other: string;
}

const wholeNumber = new Intl.NumberFormat(texts.language, { maximumFractionDigits: 0 });
const plural = new Intl.PluralRules(texts.language);

/** A text with its places filled; a value that must not be grouped, such as a year, is given as text. */
export function say(text: string, values: Values = {}): string {
  return text.replace(/\{(\w+)\}/g, (place, name: string) => {
    const value = values[name];
    if (value === undefined) return place;
    return typeof value === "number" ? wholeNumber.format(value) : value;
  });
}

export function sayCount(forms: Forms, count: number, values: Values = {}): string {
  return say(plural.select(count) === "one" ? forms.one : forms.other, { count, ...values });
}

const DIGITS = 6;
const fewDigits = new Intl.NumberFormat(texts.language, { maximumSignificantDigits: DIGITS });

/** A result for reading: six digits, very small and very large numbers with an exponent. */
export function shownValue(value: unknown): string {
  if (value === null || value === undefined || value === "") return texts.plan.blank;
  if (typeof value !== "number") return typeof value === "string" ? value : JSON.stringify(value);
  const size = Math.abs(value);
  if (size !== 0 && (size < 1e-4 || size >= 1e9)) return value.toExponential(DIGITS - 1).replace(/\.?0+e/, "e");
  return fewDigits.format(value);
}
