/** Everything about one function, and the buttons that put it into the workbook. */
import type { FunctionText } from "../../sheet/registry";
import type { Around } from "../around";
import { say, shownValue, texts } from "../say";
import { h, type Child } from "../view/dom";
import { answerOf, exampleOf } from "./example";
import { insertExample, insertMethodText } from "./insert";
import { unitOf } from "./unit";

function fact(heading: string, content: string): Child[] {
  return content === "" ? [] : [h("h3", {}, heading), h("p", {}, content)];
}

function parameters(text: FunctionText): HTMLElement {
  const rows = text.parameters.flatMap(({ name, optional, text: meaning }) => {
    const unit = unitOf(name, texts.find.units);
    return [
      h(
        "dt",
        {},
        h("code", {}, name),
        unit === undefined ? undefined : h("span", { class: "unit" }, unit),
        optional ? h("span", { class: "optional" }, texts.find.optional) : undefined,
      ),
      h("dd", {}, meaning),
    ];
  });
  return h("dl", { class: "parameters" }, ...rows);
}

/** The answer in one line: the first value, and how many cells there are. */
function answerLine(answer: readonly (readonly unknown[])[]): string {
  const first = shownValue(answer[0]?.[0]).split("\n")[0]!;
  const [rows, columns] = [answer.length, answer[0]?.length ?? 0];
  const result = rows * columns > 1 ? say(texts.find.multiple, { first, rows, columns }) : first;
  return say(texts.find.exampleIs, { result });
}

function worked(text: FunctionText, { functions, namespace }: Around): Child[] {
  const example = exampleOf(text, namespace);
  const entry = functions?.functionTable[text.id];
  const answer = example && entry && answerOf(example, entry);
  if (!example || !answer) return [];
  return [
    h("h3", {}, texts.find.example),
    h("p", { class: "example" }, h("code", {}, example.formula), " ", answerLine(answer)),
  ];
}

/** @param back leads back to the list */
export function detailView(text: FunctionText, around: Around, back: () => void): HTMLElement {
  const { book, functions, namespace, jobs } = around;
  const names = text.parameters.map(({ name, optional }) => (optional ? `[${name}]` : name)).join(", ");
  const entry = functions?.functionTable[text.id];
  const buttons =
    book && entry
      ? [
          h(
            "div",
            { class: "actions" },
            h(
              "button",
              {
                type: "button",
                class: "main",
                title: texts.find.insertHint,
                onclick: () => void jobs.run(() => insertExample(book, text, entry, namespace)),
              },
              texts.find.insert,
            ),
            h(
              "button",
              { type: "button", onclick: () => void jobs.run(() => insertMethodText(book, text.id, namespace)) },
              texts.find.insertMethod,
            ),
          ),
          h("p", { class: "hint" }, texts.find.insertHint),
        ]
      : [];
  return h(
    "article",
    {
      class: "detail",
      onkeydown: (event: KeyboardEvent) => {
        if (event.key === "Escape") back();
      },
    },
    h("button", { type: "button", class: "back", onclick: back }, texts.find.back),
    h("h2", {}, `${namespace}.${text.id}`),
    h("p", { class: "lead" }, text.description),
    h("p", { class: "signature" }, h("code", {}, `=${namespace}.${text.id}(${names})`)),
    ...buttons,
    parameters(text),
    ...fact(texts.find.result, text.returns),
    ...worked(text, around),
    ...fact(texts.find.method, text.method),
    ...fact(texts.find.source, text.source),
    ...fact(texts.find.assumes, text.assumes),
    ...fact(texts.find.errors, text.errors),
  );
}
