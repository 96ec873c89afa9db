// @ts-check
/** Makes dist/starter.xlsx, the sheets that the pane inserts, with the command line that was just built. */
import { execFileSync } from "node:child_process";
import { join } from "node:path";

/** @param {string} root folder of the project, with dist/capacity.js */
export function writeStarter(root) {
  const dist = join(root, "dist");
  const args = [join(dist, "capacity.js"), "new", "--demo", "--force", "--out", join(dist, "starter.xlsx")];
  execFileSync(process.execPath, args, { stdio: ["ignore", "ignore", "pipe"] });
}
