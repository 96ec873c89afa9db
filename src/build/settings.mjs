// @ts-check
/** What an installation may choose: its address, its environment, and where Office.js comes from. */

/** Each environment has its own id and namespace, so that a development copy never shadows the real functions. */
export const ENVIRONMENTS = {
  production: { id: "5b0c9a52-7b3e-4d0b-9a55-3f4f6d1c8e21", namespace: "CAP", suffix: "", longSuffix: "" },
  development: {
    id: "e1f7a3c4-92d8-4c17-8b36-0d5a7c2f9b64",
    namespace: "CAPDEV",
    suffix: " (dev)",
    longSuffix: " (development copy)",
  },
};

const LOCAL_URL = "https://localhost:3000";

/** The address that the maker of Office.js supports; a closed network gives its own. */
const OFFICE_JS = "https://appsforoffice.microsoft.com/lib/1/hosted/office.js";

/** Asks for a copy of Office.js beside the pages. */
const OWN_COPY = "self";

/** Where that copy is kept, below the address of the installation. */
export const OWN_COPY_FOLDER = "office";

/**
 * @typedef {{ url?: string | undefined, environment?: string | undefined, officeJs?: string | undefined }} Choices
 * @typedef {{ id: string, namespace: string, suffix: string, longSuffix: string, environment: string, url: string,
 *   origin: string, officeJs: string, officeJsOrigin: string, copyOfficeJs: boolean }} Settings
 */

/**
 * @param {string} option
 * @param {string} text
 */
function httpsAddress(option, text) {
  const allowed = `${option} is "${text}"; allowed: an https address without query, as the spreadsheet program demands.`;
  let address;
  try {
    address = new URL(text);
  } catch {
    throw new Error(allowed);
  }
  if (address.protocol !== "https:" || address.search || address.hash || address.username) throw new Error(allowed);
  return address;
}

/**
 * @param {Choices} choices
 * @returns {Settings}
 * @throws Error that names the option that is wrong
 */
export function settingsOf({ url = LOCAL_URL, environment = "development", officeJs = OFFICE_JS }) {
  if (!Object.hasOwn(ENVIRONMENTS, environment)) {
    throw new Error(`--env is "${environment}"; allowed: ${Object.keys(ENVIRONMENTS).join(", ")}.`);
  }
  const address = httpsAddress("--url", url);
  const base = address.href.replace(/\/+$/, "");
  const copyOfficeJs = officeJs === OWN_COPY;
  const script = copyOfficeJs ? new URL(`${base}/${OWN_COPY_FOLDER}/office.js`) : httpsAddress("--office-js", officeJs);
  if (!script.pathname.endsWith("/office.js")) {
    throw new Error(`--office-js is "${officeJs}"; allowed: the address of a file office.js, or ${OWN_COPY}.`);
  }
  return {
    ...ENVIRONMENTS[/** @type {keyof typeof ENVIRONMENTS} */ (environment)],
    environment,
    url: base,
    origin: address.origin,
    officeJs: copyOfficeJs ? `${OWN_COPY_FOLDER}/office.js` : script.href,
    officeJsOrigin: copyOfficeJs ? "" : script.origin,
    copyOfficeJs,
  };
}

/**
 * Versions in the manifests have numbers only.
 * @param {string} version of package.json
 */
export function numericVersion(version) {
  const match = /^(\d+)\.(\d+)\.(\d+)/.exec(version);
  if (!match) throw new Error(`version in package.json is "${version}"; allowed: three numbers joined by dots.`);
  return match[0];
}
