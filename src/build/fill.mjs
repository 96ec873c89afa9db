// @ts-check
/** Puts values into templates. */

/** @param {string} text */
export function escapeXml(text) {
  return text.replace(
    /[&<>"]/g,
    (letter) => ({ "&": "&amp;", "<": "&lt;", ">": "&gt;", '"': "&quot;" })[letter] ?? letter,
  );
}

/** @param {string} text */
export function escapeJson(text) {
  return JSON.stringify(text).slice(1, -1);
}

/**
 * Puts values in the places that a template marks with two braces.
 * @param {string} template
 * @param {Record<string, string>} values
 * @param {(text: string) => string} [escape] for the language of the template
 */
export function fill(template, values, escape = escapeXml) {
  return template.replace(/\{\{(\w+)\}\}/g, (_, name) => {
    const value = values[name];
    if (value === undefined) throw new Error(`The template asks for ${name}, which has no value.`);
    return escape(value);
  });
}
