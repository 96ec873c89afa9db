// @ts-check
/** Fills the manifest templates for one environment and address. */
import { mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { parseArgs } from "node:util";
import { fileURLToPath } from "node:url";
import { writeIcons } from "./icons.mjs";

/** Each environment has its own id and namespace, so that a development copy never shadows the real functions. */
const ENVIRONMENTS = {
  production: { id: "5b0c9a52-7b3e-4d0b-9a55-3f4f6d1c8e21", namespace: "CAP", suffix: "" },
  development: { id: "e1f7a3c4-92d8-4c17-8b36-0d5a7c2f9b64", namespace: "CAPDEV", suffix: " (development)" },
};

const LOCAL_URL = "https://localhost:3000";

/** @param {string} text */
function escapeXml(text) {
  return text.replace(
    /[&<>"]/g,
    (letter) => ({ "&": "&amp;", "<": "&lt;", ">": "&gt;", '"': "&quot;" })[letter] ?? letter,
  );
}

/**
 * @param {string} template
 * @param {Record<string, string>} values
 */
export function fill(template, values) {
  return template.replace(/\{\{(\w+)\}\}/g, (_, name) => {
    const value = values[name];
    if (value === undefined) throw new Error(`The manifest template asks for ${name}, which has no value.`);
    return escapeXml(value);
  });
}

/**
 * @param {string} root folder of the project
 * @param {string} version of package.json
 * @param {{ url?: string, environment?: string }} [options]
 */
export function writeManifest(root, version, { url = LOCAL_URL, environment = "development" } = {}) {
  if (!(environment in ENVIRONMENTS)) {
    throw new Error(`environment is "${environment}"; allowed: ${Object.keys(ENVIRONMENTS).join(", ")}.`);
  }
  const address = new URL(url);
  if (address.protocol !== "https:" || address.search || address.hash) {
    throw new Error(`url is "${url}"; allowed: an https address without query, as the host demands.`);
  }
  const { id, namespace, suffix } = ENVIRONMENTS[/** @type {keyof typeof ENVIRONMENTS} */ (environment)];
  const template = readFileSync(join(root, "manifest-template", "manifest.xml"), "utf8");
  const xml = fill(template, {
    id,
    namespace,
    version: `${version}.0`,
    provider: "Radio capacity functions project",
    displayName: `Radio capacity functions${suffix}`,
    description: "Worksheet functions that dimension the capacity of multi-user radio networks.",
    url: address.href.replace(/\/$/, ""),
  });
  mkdirSync(join(root, "dist"), { recursive: true });
  writeFileSync(join(root, "dist", "manifest.xml"), xml);
  writeIcons(join(root, "dist", "icons"));
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  const { values } = parseArgs({ options: { url: { type: "string" }, environment: { type: "string" } } });
  const root = join(fileURLToPath(import.meta.url), "../../..");
  const { version } = JSON.parse(readFileSync(join(root, "package.json"), "utf8"));
  try {
    writeManifest(root, version, values);
    console.log("Wrote dist/manifest.xml and dist/icons.");
  } catch (fault) {
    console.error(fault instanceof Error ? fault.message : fault);
    process.exitCode = 1;
  }
}
