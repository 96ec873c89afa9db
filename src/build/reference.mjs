// @ts-check
/** Writes the function reference from the declarations' own texts. */
import { readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import prettier from "prettier";

/** @typedef {import("./declarations.mjs").Declaration} Declaration */

const NAMESPACE = "CAP";

/** @param {string} text */
function cell(text) {
  return text.replace(/\|/g, "\\|").replace(/\*/g, "\\*").replace(/_/g, "\\_").replace(/</g, "&lt;");
}

/** @param {Omit<Declaration, "file" | "functionName">} entry */
function section(entry) {
  const names = entry.parameters.map(({ name, optional }) => (optional ? `[${name}]` : name)).join(", ");
  const facts = [
    ["Result", entry.returns],
    ["Method", entry.method],
    ["Source", entry.source],
    ["Assumes", entry.assumes],
    ["Errors", entry.errors],
  ].filter(([, text]) => text);
  return [
    `### ${NAMESPACE}.${entry.id}`,
    "",
    `\`=${NAMESPACE}.${entry.id}(${names})\``,
    "",
    cell(entry.description),
    "",
    ...entry.parameters.map(({ name, text }) => `- \`${name}\`: ${cell(text)}`),
    "",
    ...facts.map(([heading, text]) => `**${heading}.** ${cell(/** @type {string} */ (text))}\n`),
    ...entry.examples.map((example) => `**Example.** \`${example.replace(" is ", "` is `")}\`\n`),
  ].join("\n");
}

/**
 * @param {Omit<Declaration, "file" | "functionName">[]} entries
 * @returns {Promise<string>} Markdown
 */
export async function referenceText(entries) {
  const subjects = [...new Set(entries.map(({ id }) => id.split(".")[0] ?? ""))];
  const text = [
    "# Function reference",
    "",
    `Generated from the declarations in this folder by \`npm run reference\`; ${entries.length} functions. Every example is computed`,
    "by a test. Conventions (ranges, blanks, errors) are in the [README](../README.md).",
    "",
    subjects.map((subject) => `[${subject}](#${subject.toLowerCase()})`).join(" · "),
    "",
    ...subjects.flatMap((subject) => [
      `## ${subject}`,
      "",
      ...entries.filter(({ id }) => id.startsWith(`${subject}.`)).map(section),
    ]),
  ].join("\n");
  return prettier.format(text, { parser: "markdown", printWidth: 120 });
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  const functions = join(fileURLToPath(import.meta.url), "../../../functions");
  const entries = JSON.parse(readFileSync(join(functions, "generated", "texts.json"), "utf8"));
  writeFileSync(join(functions, "REFERENCE.md"), await referenceText(entries));
  console.log("Wrote functions/REFERENCE.md.");
}
