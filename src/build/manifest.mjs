// @ts-check
/** `npm run manifest`: both manifests, the pages and the icons for one address and environment. */
import { existsSync, mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { parseArgs } from "node:util";
import { fileURLToPath } from "node:url";
import { zipSync } from "fflate";
import { escapeJson, fill } from "./fill.mjs";
import { drawIcon, OUTLINE_ICON, PACKAGE_ICON, writeIcons } from "./icons.mjs";
import { writePages } from "./pages.mjs";
import { numericVersion, settingsOf } from "./settings.mjs";

/**
 * @param {import("./settings.mjs").Settings} settings
 * @param {string} version of package.json
 * @returns {Record<string, string>}
 */
function manifestValues(settings, version) {
  const { id, namespace, suffix, longSuffix, url, origin } = settings;
  return {
    id,
    namespace,
    version: numericVersion(version),
    provider: "Radio capacity functions project",
    developer: "Radio capacity functions",
    shortName: `Radio capacity functions${suffix}`,
    groupLabel: `Radio capacity${suffix}`,
    displayName: `Radio capacity functions${longSuffix}`,
    description: "Worksheet functions that dimension the capacity of multi-user radio networks.",
    url,
    origin,
    domain: new URL(url).host,
  };
}

/**
 * The unified manifest with its icons, as the programs that take it want it.
 * @param {string} manifest
 */
function addInPackage(manifest) {
  return zipSync({
    "manifest.json": new TextEncoder().encode(manifest),
    "color.png": drawIcon(PACKAGE_ICON),
    "outline.png": drawIcon(OUTLINE_ICON),
  });
}

/**
 * @param {string} root folder of the project
 * @param {string} version of package.json
 * @param {import("./settings.mjs").Choices} [choices]
 * @returns {string[]} what was written
 */
export function writeManifest(root, version, choices = {}) {
  const settings = settingsOf(choices);
  const values = manifestValues(settings, version);
  const templates = join(root, "manifest-template");
  const dist = join(root, "dist");
  mkdirSync(dist, { recursive: true });
  writeFileSync(join(dist, "manifest.xml"), fill(readFileSync(join(templates, "manifest.xml"), "utf8"), values));
  const unified = fill(readFileSync(join(templates, "manifest.json"), "utf8"), values, escapeJson);
  writeFileSync(join(dist, "manifest.json"), unified);
  writeFileSync(join(dist, "addin-package.zip"), addInPackage(unified));
  writeIcons(join(dist, "icons"));
  writePages(root, version, settings);
  return ["manifest.xml", "manifest.json", "addin-package.zip", "icons/", "pane.html", "help.html"];
}

function main() {
  const { values } = parseArgs({
    options: {
      url: { type: "string" },
      env: { type: "string" },
      "office-js": { type: "string" },
    },
  });
  const root = join(fileURLToPath(import.meta.url), "../../..");
  if (!existsSync(join(root, "dist", "functions.json"))) throw new Error("dist/ is empty; run npm run build first.");
  const { version } = JSON.parse(readFileSync(join(root, "package.json"), "utf8"));
  const written = writeManifest(root, version, {
    url: values.url,
    environment: values.env,
    officeJs: values["office-js"],
  });
  console.log(`Wrote to dist/: ${written.join(", ")}.`);
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  try {
    main();
  } catch (fault) {
    console.error(fault instanceof Error ? fault.message : fault);
    process.exitCode = 1;
  }
}
