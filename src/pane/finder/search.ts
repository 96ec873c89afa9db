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

interface Entry {
  readonly text: FunctionText;
  readonly parts: readonly { readonly weight: number; readonly words: readonly string[]; readonly line: string }[];
}

/** How well a word of a question fits a word of a text, 0 to 1. */
function fit(asked: string, word: string): number {
  if (asked === word) return EXACT;
  if (asked.length >= SHORTEST_BEGINNING && word.startsWith(asked)) return BEGINNING;
  if (asked.length < SHORTEST_MISSPELT || word.length < SHORTEST_MISSPELT) return 0;
  const slips = asked.length >= LONG_WORD ? 2 : 1;
  if (editDistance(asked, word, slips) <= slips) return MISSPELT;
  return asked.startsWith(word) ? ENDING_MORE : 0;
}

/** One thing that a question asks for: a word, or phrases of one meaning. */
interface Term {
  readonly phrases: readonly { readonly words: readonly string[]; readonly worth: number }[];
}

function phraseFit(words: readonly string[], part: Entry["parts"][number]): number {
  if (words.length === 1) return part.words.reduce((best, word) => Math.max(best, fit(words[0]!, word)), 0);
  return ` ${part.line} `.includes(` ${words.join(" ")} `) ? EXACT : 0;
}

function termFit(term: Term, entry: Entry): number {
  let best = 0;
  for (const part of entry.parts) {
    for (const { words, worth } of term.phrases) {
      const value = part.weight * worth;
      if (value > best) best = Math.max(best, value * phraseFit(words, part));
    }
  }
  return best;
}

export class FunctionSearch {
  private readonly entries: readonly Entry[];
  private readonly stopWords: ReadonlySet<string>;
  private readonly groups: readonly (readonly (readonly string[])[])[];

  constructor(
    texts: readonly FunctionText[],
    private readonly language: Language,
  ) {
    this.stopWords = new Set(language.stopWords);
    this.groups = language.synonyms.map((group) => group.map(wordsOf));
    this.entries = texts.map((text) => {
      const parts: Record<Part, string> = {
        id: text.id.replace(/\./g, " ").replace(/^ERLANG([BC])\b/, "ERLANG$1 ERLANG $1"),
        asked: language.questions.flatMap(({ ask, functions }) => (functions.includes(text.id) ? [ask] : [])).join(" "),
        description: text.description,
        about: language.subjects[text.id.split(".")[0]!] ?? "",
        parameters: text.parameters.map((parameter) => `${spelledOut(parameter.name)} ${parameter.text}`).join(" "),
        returns: text.returns,
        method: text.method,
        assumes: text.assumes,
        source: text.source,
      };
      return {
        text,
        parts: Object.entries(parts).map(([name, content]) => {
          const words = wordsOf(content);
          return { weight: WEIGHTS[name as Part], words, line: words.join(" ") };
        }),
      };
    });
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
    const first = asked?.functions.flatMap((id) => this.entries.find(({ text }) => text.id === id)?.text ?? []) ?? [];
    const isName = typed !== "" && (typed !== upper || /^[A-Z]+\.[A-Z]*$/.test(typed));
    const named = isName ? this.entries.filter(({ text }) => text.id.startsWith(typed)) : [];
    if (named.length > 0) return named.map(({ text }) => text);
    const terms = this.termsOf(question);
    if (terms.length === 0) return [];
    const fits = terms.map((term) => this.entries.map((entry) => termFit(term, entry)));
    // A term that few functions know says more than one that all of them know.
    const rarity = fits.map((column) => {
      const sum = column.reduce((total, value) => total + Math.min(1, value / WEIGHTS.about), 0);
      return Math.log(1 + this.entries.length / (1 + sum));
    });
    const ranked = this.entries
      .map((entry, i) => {
        const known = fits.filter((column) => column[i]! > 0).length;
        const score = fits.reduce((sum, column, t) => sum + column[i]! * rarity[t]!, 0);
        return { text: entry.text, order: i, score: score * (known / terms.length) ** 2 };
      })
      .filter(({ score }) => score > 0)
      .sort((a, b) => b.score - a.score || a.order - b.order)
      .map(({ text }) => text);
    return [...first, ...ranked.filter((text) => !first.includes(text))];
  }

  /** Functions of one subject, in their own order. */
  ofSubject(subject: string): FunctionText[] {
    return this.entries.flatMap(({ text }) => (text.id.startsWith(`${subject}.`) ? [text] : []));
  }

  /** Subjects in the order of what they are about. */
  subjects(): string[] {
    const present = new Set(this.entries.map(({ text }) => text.id.split(".")[0]!));
    const known = Object.keys(this.language.subjects).filter((subject) => present.has(subject));
    return [...known, ...[...present].filter((subject) => !known.includes(subject)).sort()];
  }
}
