/** A headless browser on the built files, served by the project's own server. Skipped unless CHECK_BROWSER=1. */
import { readFileSync } from "node:fs";
import { join } from "node:path";
import { buildSync } from "esbuild";
import { chromium, type Browser, type Page } from "playwright-core";
import { startServer, type Started } from "../../src/server/server";

export const root = join(__dirname, "../..");
const OFFICE_JS = "https://appsforoffice.microsoft.com/lib/1/hosted/";
const CHROMIUM = process.env["CHROMIUM"] ?? "/usr/bin/chromium";
const FLAGS = [
  "--no-sandbox",
  "--disable-gpu",
  "--disable-dev-shm-usage",
  "--disable-background-networking",
  "--disable-component-update",
  "--disable-sync",
  "--no-first-run",
];

export const describeInBrowser = process.env["CHECK_BROWSER"] === "1" ? describe : describe.skip;
export const BROWSER_TIMEOUT = 60_000;

/** A script of the tests as one file for the page. */
export function bundled(path: string): string {
  const { outputFiles } = buildSync({
    entryPoints: [join(root, path)],
    bundle: true,
    write: false,
    format: "iife",
    platform: "browser",
    target: "es2020",
    logLevel: "silent",
  });
  return outputFiles[0]!.text;
}

export interface Session {
  readonly browser: Browser;
  readonly address: string;
  end(): Promise<void>;
}

export async function startSession(): Promise<Session> {
  const served: Started = await startServer(join(root, "dist"), "127.0.0.1", 0);
  const browser = await chromium.launch({ executablePath: CHROMIUM, args: FLAGS });
  return {
    browser,
    address: served.address,
    async end() {
      await browser.close();
      served.server.closeAllConnections();
      served.server.close();
    },
  };
}

/** What a page did that it should not have done. */
export interface Misdeeds {
  /** Addresses beyond its own server and the one of Office.js. */
  readonly requests: string[];
  /** Errors, among them what its content policy forbade. */
  readonly errors: string[];
}

/**
 * Opens a new page.
 *
 * @param extra contents of addresses that the server does not have, by path or whole address
 */
export async function newPage(
  session: Session,
  extra: Readonly<Record<string, string>>,
  options: Parameters<Browser["newPage"]>[0] = {},
): Promise<{ page: Page; misdeeds: Misdeeds }> {
  const page = await session.browser.newPage(options);
  const misdeeds: Misdeeds = { requests: [], errors: [] };
  page.on("pageerror", (error) => misdeeds.errors.push(String(error)));
  page.on("console", (message) => {
    if (message.type() === "error") misdeeds.errors.push(message.text());
  });
  await page.route("**/*", async (route) => {
    const url = route.request().url();
    const own = url.startsWith(session.address);
    const body = extra[own ? new URL(url).pathname : url];
    if (body !== undefined) {
      const contentType = url.endsWith(".html") ? "text/html" : "text/javascript";
      // Office.js fetches its own parts across origins.
      await route.fulfill({ body, contentType, headers: { "Access-Control-Allow-Origin": "*" } });
    } else if (own) await route.continue();
    else {
      misdeeds.requests.push(url);
      await route.abort();
    }
  });
  return { page, misdeeds };
}

/** Microsoft's own files by the addresses that pages load them from. */
export function officeFile(name: string): Record<string, string> {
  return { [OFFICE_JS + name]: readFileSync(join(root, "node_modules/@microsoft/office-js/dist", name), "utf8") };
}

export const officeAddress = `${OFFICE_JS}office.js`;
