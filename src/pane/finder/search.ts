/** Ranks the functions by how well their texts answer a question. */
import type { FunctionText } from "../../sheet/registry";
import { editDistance } from "../../sheet/spelling";

/** What a match in each part of a function's texts is worth. */
const WEIGHTS = {
  id: 4,
  asked: 3.5,
  description: 3,
  about: 2.5,
  parameters: 1,
  returns: 1,
  method: 0.5,
  assumes: 0.5,
  source: 0.3,
};
type Part = keyof typeof WEIGHTS;

const EXACT = 1;
const BEGINNING = 0.7;
const MISSPELT = 0.5;
/** "blocking" asked, "block" found. */
const ENDING_MORE = 0.4;
/** A word of the same meaning counts a little less than the word itself. */
const SAME_MEANING = 0.8;
/** Short words are close to everything, so beginnings and misspellings count from these lengths on. */
const SHORTEST_BEGINNING = 3;
const SHORTEST_MISSPELT = 5;
/** A second slip is forgiven in words of this length. */
const LONG_WORD = 9;

export interface Language {
  /** Words that say nothing about the subject. */
  readonly stopWords: readonly string[];
  /** Groups of words and phrases that people use for the same thing. */
  readonly synonyms: readonly (readonly string[])[];
  /** Questions as people ask them, with the functions that answer, best first. */
  readonly questions: readonly { readonly ask: string; readonly functions: readonly string[] }[];
  /** What each subject is about. */
  readonly subjects: Readonly<Record<string, string>>;
}

/** Lower-case words, plurals as singulars. */
export function wordsOf(text: string): string[] {
  return (text.toLowerCase().match(/[\p{L}\d]+(?:\/[\p{L}\d]+)*/gu) ?? []).map((word) =>
    word.length > 3 ? word.replace(/ies$/, "y").replace(/([^su])s$/, "$1") : word,
  );
}

/** "trafficPerUserE" as "traffic Per User E". */
function spelledOut(name: string): string {
  return name.replace(/([a-z\d])([A-Z])/g, "$1 $2");
}

/** A part of a function's texts as words with blanks between and around, for finding phrases. */
interface Line {
  readonly entry: number;
  readonly weight: number;
  readonly words: string;
}

/** How well a word of a question fits a word of a text, 0 to 1. */
function fit(asked: string, word: string): number {
  if (asked === word) return EXACT;
  if (asked.length >= SHORTEST_BEGINNING && word.startsWith(asked)) return BEGINNING;
  if (asked.length < SHORTEST_MISSPELT || word.length < SHORTEST_MISSPELT) return 0;
  const slips = asked.length >= LONG_WORD ? 2 : 1;
  // First letters are rarely wrong, and comparing words that share none would cost the most.
  if (asked[0] === word[0] && editDistance(asked, word, slips) <= slips) return MISSPELT;
  return asked.startsWith(word) ? ENDING_MORE : 0;
}

/** One thing that a question asks for: a word, or phrases of one meaning. */
interface Term {
  readonly phrases: readonly { readonly words: readonly string[]; readonly worth: number }[];
}

export class FunctionSearch {
  private readonly lines: Line[] = [];
  /** For each word the weight of the best part that has it, by function. */
  private readonly weightsOf = new Map<string, Map<number, number>>();
  private readonly stopWords: ReadonlySet<string>;
  private readonly groups: readonly (readonly (readonly string[])[])[];

  constructor(
    private readonly texts: readonly FunctionText[],
    private readonly language: Language,
  ) {
    this.stopWords = new Set(language.stopWords);
    this.groups = language.synonyms.map((group) => group.map(wordsOf));
    texts.forEach((text, entry) => {
      for (const [part, content] of Object.entries(this.partsOf(text))) {
        const words = wordsOf(content);
        const weight = WEIGHTS[part as Part];
        this.lines.push({ entry, weight, words: ` ${words.join(" ")} ` });
        for (const word of words) this.note(word, entry, weight);
      }
    });
  }

  private partsOf(text: FunctionText): Record<Part, string> {
    const { questions, subjects } = this.language;
    return {
      id: text.id.replace(/\./g, " ").replace(/^ERLANG([BC])\b/, "ERLANG$1 ERLANG $1"),
      asked: questions.flatMap(({ ask, functions }) => (functions.includes(text.id) ? [ask] : [])).join(" "),
      description: text.description,
      about: subjects[text.id.split(".")[0]!] ?? "",
      parameters: text.parameters.map((parameter) => `${spelledOut(parameter.name)} ${parameter.text}`).join(" "),
      returns: text.returns,
      method: text.method,
      assumes: text.assumes,
      source: text.source,
    };
  }

  private note(word: string, entry: number, weight: number): void {
    const weights = this.weightsOf.get(word) ?? new Map<number, number>();
    this.weightsOf.set(word, weights);
    weights.set(entry, Math.max(weight, weights.get(entry) ?? 0));
  }

  /** How well each function fits a term. */
  private fitsOf({ phrases }: Term): Float64Array {
    const fits = new Float64Array(this.texts.length);
    const raise = (entry: number, value: number): void => void (fits[entry] = Math.max(fits[entry]!, value));
    for (const { words, worth } of phrases) {
      if (words.length > 1) {
        const phrase = ` ${words.join(" ")} `;
        for (const line of this.lines) if (line.words.includes(phrase)) raise(line.entry, worth * line.weight);
        continue;
      }
      for (const [word, weights] of this.weightsOf) {
        const value = worth * fit(words[0]!, word);
        if (value > 0) for (const [entry, weight] of weights) raise(entry, value * weight);
      }
    }
    return fits;
  }

  /** What a question asks for: phrases of a known meaning first, then the words that remain. */
  private termsOf(question: string): Term[] {
    let rest = ` ${wordsOf(question).join(" ")} `;
    const terms: Term[] = [];
    const known = this.groups
      .flatMap((group) => group.map((words) => ({ words, group })))
      .sort((a, b) => b.words.length - a.words.length);
    for (const { words, group } of known) {
      const phrase = ` ${words.join(" ")} `;
      if (!rest.includes(phrase)) continue;
      rest = rest.replace(phrase, " | ");
      terms.push({ phrases: group.map((other) => ({ words: other, worth: other === words ? 1 : SAME_MEANING })) });
    }
    for (const word of rest.split(/[\s|]+/)) {
      if (word !== "" && !this.stopWords.has(word)) terms.push({ phrases: [{ words: [word], worth: 1 }] });
    }
    return terms;
  }

  /** Functions that fit, best first. */
  find(question: string): FunctionText[] {
    const upper = question.trim().toUpperCase();
    const typed = upper.replace(/^=?(CAP(DEV)?\.)?/, "");
    const asked = this.language.questions.find(({ ask }) => ask.toUpperCase() === typed);
    const first = asked?.functions.flatMap((id) => this.texts.find((text) => text.id === id) ?? []) ?? [];
    const isName = typed !== "" && (typed !== upper || /^[A-Z]+\.[A-Z]*$/.test(typed));
    const named = isName ? this.texts.filter(({ id }) => id.startsWith(typed)) : [];
    if (named.length > 0) return named;
    const terms = this.termsOf(question);
    if (terms.length === 0) return [];
    const fits = terms.map((term) => this.fitsOf(term));
    // A term that few functions know says more than one that all of them know.
    const rarity = fits.map((column) => {
      const sum = column.reduce((total, value) => total + Math.min(1, value / WEIGHTS.about), 0);
      return Math.log(1 + this.texts.length / (1 + sum));
    });
    const ranked = this.texts
      .map((text, i) => {
        const known = fits.filter((column) => column[i]! > 0).length;
        const score = fits.reduce((sum, column, t) => sum + column[i]! * rarity[t]!, 0);
        return { text, order: i, score: score * (known / terms.length) ** 2 };
      })
      .filter(({ score }) => score > 0)
      .sort((a, b) => b.score - a.score || a.order - b.order)
      .map(({ text }) => text);
    return [...first, ...ranked.filter((text) => !first.includes(text))];
  }

  /** Functions of one subject, in their own order. */
  ofSubject(subject: string): FunctionText[] {
    return this.texts.filter(({ id }) => id.startsWith(`${subject}.`));
  }

  /** Subjects in the order of what they are about. */
  subjects(): string[] {
    const present = new Set(this.texts.map(({ id }) => id.split(".")[0]!));
    const known = Object.keys(this.language.subjects).filter((subject) => present.has(subject));
    return [...known, ...[...present].filter((subject) => !known.includes(subject)).sort()];
  }
}
