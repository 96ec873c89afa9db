// @ts-check
/** The pages of the add-in for one address and environment, and the copy of Office.js that a closed network asks for. */
import { cpSync, mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { createRequire } from "node:module";
import { dirname, join } from "node:path";
import { escapeXml, fill } from "./fill.mjs";
import { numericVersion, OWN_COPY_FOLDER } from "./settings.mjs";

/** Files of Office.js that a workbook's pages load, without those of other programs and of debugging. */
const OFFICE_FILES = /^(office|excel-.*|excelios-.*|excelwebapp-.*|o15apptofilemappingtable|es6-promise)\.js$/;
const OFFICE_STRINGS = "office_strings.js";
const DEBUG = /\.debug\.js$/;

/**
 * What the pages may load. Office.js is the only script from elsewhere, and only where it is not kept here.
 * @param {string} officeJsOrigin origin of Office.js, or nothing where it is the page's own
 */
export function contentPolicy(officeJsOrigin) {
  return [
    "default-src 'none'",
    `script-src 'self'${officeJsOrigin && ` ${officeJsOrigin}`}`,
    "style-src 'self'",
    "img-src 'self'",
    "connect-src 'self'",
    "base-uri 'none'",
    "form-action 'none'",
  ].join("; ");
}

/** @param {string} root */
function copyOfficeJs(root) {
  const from = join(dirname(createRequire(import.meta.url).resolve("@microsoft/office-js/package.json")), "dist");
  const to = join(root, "dist", OWN_COPY_FOLDER);
  rmSync(to, { recursive: true, force: true });
  mkdirSync(to, { recursive: true });
  for (const entry of readdirSync(from, { withFileTypes: true })) {
    if (entry.isDirectory()) {
      if (!readdirSync(join(from, entry.name)).includes(OFFICE_STRINGS)) continue;
      cpSync(join(from, entry.name, OFFICE_STRINGS), join(to, entry.name, OFFICE_STRINGS));
    } else if (OFFICE_FILES.test(entry.name) && !DEBUG.test(entry.name)) {
      cpSync(join(from, entry.name), join(to, entry.name));
    }
  }
}

/** @typedef {{ title: string, body: (string | string[])[] }} HelpSection */

/**
 * The help page's sections: a text is a paragraph, a list is a list of steps.
 * @param {HelpSection[]} sections
 */
function helpBody(sections) {
  const paragraph = (/** @type {string | string[]} */ part) =>
    Array.isArray(part)
      ? `<ol>\n${part.map((step) => `<li>${escapeXml(step)}</li>`).join("\n")}\n</ol>`
      : `<p>${escapeXml(part)}</p>`;
  return sections
    .map(({ title, body }) => `<section>\n<h2>${escapeXml(title)}</h2>\n${body.map(paragraph).join("\n")}\n</section>`)
    .join("\n");
}

/**
 * @param {string} root folder of the project
 * @param {string} version of package.json
 * @param {import("./settings.mjs").Settings} settings
 */
export function writePages(root, version, settings) {
  const source = join(root, "src", "pane");
  const dist = join(root, "dist");
  const texts = JSON.parse(readFileSync(join(source, "texts.json"), "utf8"));
  const values = {
    language: texts.language,
    title: texts.title,
    noScript: texts.noScript,
    helpTitle: texts.help.title,
    namespace: settings.namespace,
    environment: settings.environment,
    version: numericVersion(version),
    officeJs: settings.officeJs,
    policy: contentPolicy(settings.officeJsOrigin),
  };
  for (const page of ["pane.html", "help.html"]) {
    const html = fill(readFileSync(join(source, page), "utf8"), values);
    const body = helpBody(texts.help.sections).replaceAll("{namespace}", settings.namespace);
    writeFileSync(
      join(dist, page),
      html.replace("<!-- sections -->", () => body),
    );
  }
  if (settings.copyOfficeJs) copyOfficeJs(root);
}
