/** Entry of dist/server.js: `npm start`. */
import { existsSync } from "node:fs";
import { join } from "node:path";
import { findCertificate, type CertificateTool, type Found } from "./certificate";
import { optionsOf, USAGE } from "./options";
import { isLoopback, startServer } from "./server";

const say = (line: string): void => void process.stdout.write(`${line}\n`);

async function certificateFor(plain: boolean): Promise<Found> {
  if (plain) return { why: "--http was asked for" };
  let tool: CertificateTool;
  try {
    tool = await import("office-addin-dev-certs");
  } catch {
    return { why: "office-addin-dev-certs is not installed" };
  }
  return findCertificate(tool, process.stdin.isTTY);
}

async function main(): Promise<void> {
  const options = optionsOf(process.argv.slice(2));
  if (options === "help") return say(USAGE);
  const folder = __dirname;
  if (!existsSync(join(folder, "pane.html"))) throw new Error("dist/ is not complete; run npm run build first.");
  const found = await certificateFor(options.plain);
  const certificate = "certificate" in found ? found.certificate : undefined;
  const { address } = await startServer(folder, options.host, options.port, certificate);
  say(`Serving the add-in at ${address}/pane.html (Ctrl+C ends).`);
  if ("why" in found) {
    say(`Without encryption: ${found.why}.`);
    say("Spreadsheet programs load add-ins over HTTPS only; npx office-addin-dev-certs install makes a certificate.");
  }
  if (!isLoopback(options.host)) say("Other machines can reach it.");
}

main().catch((fault: unknown) => {
  const inUse = fault instanceof Error && "code" in fault && fault.code === "EADDRINUSE";
  const message = fault instanceof Error ? fault.message : String(fault);
  process.stderr.write(`${inUse ? `${message}; choose another with --port.` : message}\n`);
  process.exitCode = 1;
});
