// @ts-check
/** What the metadata generator lets through and the host, or a workbook in the field, would not forgive. */

const LONGEST_NAME = 64;
const LONGEST_TEXT = 128;

/**
 * @param {import("./declarations.mjs").Declaration[]} declarations
 * @param {{ functions: { id: string, name: string, description?: string, parameters: { name: string, description?: string, repeating?: boolean }[] }[] }} metadata
 * @returns {string[]} one line a fault
 */
export function lintDeclarations(declarations, metadata) {
  /** @type {string[]} */
  const faults = [];
  /** @type {Set<string>} */
  const seen = new Set();
  for (const declaration of declarations) {
    const { id, file, functionName, description, parameters } = declaration;
    const fault = (/** @type {string} */ text) => faults.push(`${file}: ${id || functionName}: ${text}`);
    if (!id) fault("no id after @customfunction");
    if (seen.has(id)) fault("this id is declared twice");
    seen.add(id);
    // A saved workbook turns dots into underscores, so an underscore could make two names one.
    if (!/^[A-Z][A-Z0-9]*(\.[A-Z0-9]+)+$/.test(id))
      fault("an id is upper-case words joined by dots, without underscores");
    if (/^[A-Z]{1,3}[0-9]+$/.test(id)) fault("the id looks like a cell address");
    if (`_xldudf_CAP_${id}`.length > 255) fault("the stored name is too long");
    if (id.length > LONGEST_NAME) fault(`the id is longer than ${LONGEST_NAME} characters`);
    const camel = id.toLowerCase().replace(/\.(.)/g, (_, letter) => letter.toUpperCase());
    if (functionName !== undefined && functionName.toLowerCase() !== camel.toLowerCase())
      fault(`the function should be named ${camel}`);
    if (!description) fault("no description");
    if (description.length > LONGEST_TEXT)
      fault(`the description has ${description.length} characters, more than ${LONGEST_TEXT}`);
    for (const tag of /** @type {const} */ (["returns", "method", "source"]))
      if (!declaration[tag]) fault(`no @${tag}`);
    if (declaration.examples.length === 0) fault("no @example");
    /** @type {Set<string>} */
    const names = new Set();
    let optionalSeen = false;
    for (const { name, text, optional } of parameters) {
      if (!text) fault(`parameter ${name} has no text`);
      if (text.length > LONGEST_TEXT)
        fault(`the text of parameter ${name} has ${text.length} characters, more than ${LONGEST_TEXT}`);
      if (name.length > LONGEST_NAME) fault(`parameter name ${name} is too long`);
      if (names.has(name)) fault(`parameter ${name} appears twice`);
      names.add(name);
      if (optionalSeen && !optional) fault(`required parameter ${name} follows an optional one`);
      optionalSeen ||= optional;
    }
  }
  const generated = new Set(metadata.functions.map((entry) => entry.id));
  for (const id of seen) if (!generated.has(id)) faults.push(`${id}: the metadata generator skipped it`);
  for (const entry of metadata.functions) {
    if (!seen.has(entry.id)) faults.push(`${entry.id}: in the metadata but not among the declarations`);
    entry.parameters.forEach((parameter, i) => {
      if (parameter.repeating && i < entry.parameters.length - 1)
        faults.push(`${entry.id}: repeating parameter ${parameter.name} is not last`);
    });
  }
  return faults;
}
