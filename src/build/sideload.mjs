// @ts-check
/** `npm run sideload`: the manifest of the development copy, and how each spreadsheet program takes it. */
import { copyFileSync, existsSync, mkdirSync, readFileSync } from "node:fs";
import { homedir, platform } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { parseArgs } from "node:util";
import { writeManifest } from "./manifest.mjs";
import { settingsOf } from "./settings.mjs";

/** Where the Mac program looks for manifests of add-ins under development. */
const MAC_CONTAINER = "Library/Containers/com.microsoft.Excel/Data/Documents";
const WINDOWS_KEY = "HKCU\\Software\\Microsoft\\Office\\16.0\\WEF\\Developer";

/**
 * Steps for one kind of program.
 * @param {string} title
 * @param {string[]} steps
 */
function section(title, steps) {
  return [title, ...steps.map((step, i) => `  ${i + 1}. ${step}`), ""];
}

/**
 * What to do by hand, for every kind of program.
 * @param {{ manifest: string, id: string, namespace: string, copiedTo?: string | undefined }} facts
 */
export function steps({ manifest, id, namespace, copiedTo }) {
  const folder = `~/${MAC_CONTAINER}/wef`;
  return [
    ...section("First, in another terminal", ["npm start   (keep it running; it must say https)"]),
    ...section("Excel on Windows", [
      `reg add "${WINDOWS_KEY}" /v ${id} /t REG_SZ /d "${manifest}" /f`,
      "Restart Excel; the button is on the tab Formulas. If it is not: Home, Add-ins, Developer Add-ins.",
      `To remove it: reg delete "${WINDOWS_KEY}" /v ${id} /f`,
    ]),
    ...section("Excel on a Mac", [
      copiedTo === undefined ? `mkdir -p ${folder} && cp "${manifest}" ${folder}/${id}.xml` : `Done: ${copiedTo}`,
      "Restart Excel; Home, Add-ins, and choose it under Developer Add-ins.",
      `To remove it: rm ${folder}/${id}.xml`,
    ]),
    ...section("Excel in a browser", [
      `Home, Add-ins, More Add-ins, My Add-ins, Upload My Add-in, and choose ${manifest}`,
      "Allow the browser to reach localhost if it asks. To remove it, clear the site data of the page.",
    ]),
    `Then type =${namespace}.POWER.DB(100) in a cell: it gives 20.`,
  ];
}

/**
 * Copies the manifest to where the Mac program looks, if this is a Mac with that program.
 * @param {string} manifest
 * @param {string} id
 */
function copyOnMac(manifest, id) {
  const container = join(homedir(), MAC_CONTAINER);
  if (platform() !== "darwin" || !existsSync(container)) return undefined;
  const target = join(container, "wef", `${id}.xml`);
  mkdirSync(join(container, "wef"), { recursive: true });
  copyFileSync(manifest, target);
  return target;
}

function main() {
  const { values } = parseArgs({ options: { url: { type: "string" } } });
  const root = join(fileURLToPath(import.meta.url), "../../..");
  const { version } = JSON.parse(readFileSync(join(root, "package.json"), "utf8"));
  const choices = { url: values.url, environment: "development" };
  writeManifest(root, version, choices);
  const { id, namespace } = settingsOf(choices);
  const manifest = join(root, "dist", "manifest.xml");
  console.log(steps({ manifest, id, namespace, copiedTo: copyOnMac(manifest, id) }).join("\n"));
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  try {
    main();
  } catch (fault) {
    console.error(fault instanceof Error ? fault.message : fault);
    process.exitCode = 1;
  }
}
