// @ts-check
/** Reads the declarations in functions/: which functions there are, and their texts for people. */
import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import ts from "typescript";

/**
 * @typedef {{ name: string, optional: boolean, text: string }} ParameterText
 * @typedef {{ id: string, functionName: string, file: string, description: string, parameters: ParameterText[],
 *   returns: string, method: string, source: string, assumes: string, errors: string, examples: string[] }} Declaration
 */

/** @param {string} folder */
export function declarationFiles(folder) {
  return readdirSync(folder)
    .filter((name) => name.endsWith(".ts") && !name.endsWith(".d.ts"))
    .sort()
    .map((name) => join(folder, name));
}

/**
 * The declarations of one file.
 * @param {string} file
 * @returns {Declaration[]}
 */
export function readDeclarations(file) {
  const source = ts.createSourceFile(file, readFileSync(file, "utf8"), ts.ScriptTarget.Latest, true);
  /** @type {Declaration[]} */
  const found = [];
  source.forEachChild((node) => {
    if (!ts.isFunctionDeclaration(node) || !node.name) return;
    const tags = ts.getJSDocTags(node);
    const marker = tags.find((tag) => tag.tagName.text === "customfunction");
    if (!marker) return;
    const id = textOf(marker.comment).split(/\s+/)[0] ?? "";
    const doc = ts.getJSDocCommentsAndTags(node).find(ts.isJSDoc);
    found.push({
      id,
      functionName: node.name.text,
      file,
      description: textOf(doc?.comment),
      parameters: node.parameters
        .filter((parameter) => parameter.name.getText() !== "invocation")
        .map((parameter) => ({
          name: parameter.name.getText(),
          optional: parameter.questionToken !== undefined,
          text: textOf(
            tags.find((tag) => ts.isJSDocParameterTag(tag) && tag.name.getText() === parameter.name.getText())?.comment,
          ),
        })),
      returns: textOf(tags.find(ts.isJSDocReturnTag)?.comment),
      method: tagText(tags, "method"),
      source: tagText(tags, "source"),
      assumes: tagText(tags, "assumes"),
      errors: tagText(tags, "errors"),
      examples: tags.filter((tag) => tag.tagName.text === "example").map((tag) => textOf(tag.comment)),
    });
  });
  return found;
}

/**
 * @param {readonly ts.JSDocTag[]} tags
 * @param {string} name
 */
function tagText(tags, name) {
  return tags
    .filter((tag) => tag.tagName.text === name)
    .map((tag) => textOf(tag.comment))
    .join(" ");
}

/** @param {string | ts.NodeArray<ts.JSDocComment> | undefined} comment */
function textOf(comment) {
  return (ts.getTextOfJSDocComment(comment) ?? "").replace(/\s+/g, " ").trim();
}
