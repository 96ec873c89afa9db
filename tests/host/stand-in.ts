/**
 * A stand-in for the spreadsheet program: loads the built functions.js under the maker's own custom-functions runtime
 * and calls it through the runtime's native bridge, with arguments converted as the host converts them.
 */
import { readFileSync } from "node:fs";
import { join } from "node:path";
import { createContext, runInContext } from "node:vm";
import { HostBridge, type EmptyCell, type HostCell, type Metadata } from "./bridge";

export type { HostCell, HostError } from "./bridge";

const root = join(__dirname, "../..");

export const metadata = JSON.parse(readFileSync(join(root, "dist/functions.json"), "utf8")) as Metadata;

/**
 * The runtime also tries to start the rest of a page, which is not there; its timers neither hold up the end of a test nor
 * bring it down.
 */
function later(callback: () => void, ms?: number): NodeJS.Timeout {
  return setTimeout(() => {
    try {
      callback();
    } catch (fault) {
      if (!PAGE_START.test(String(fault))) throw fault;
    }
  }, ms).unref();
}

const PAGE_START = /MicrosoftAjax|parseXdmInfo|Office Web Extension/;

export class StandIn {
  private readonly bridge: HostBridge;
  /** What the runtime or the functions wrote to the console. */
  readonly warnings: string[] = [];

  constructor(empty: EmptyCell = 0) {
    this.bridge = new HostBridge(metadata, empty);
    const log = (...parts: unknown[]): void => void this.warnings.push(parts.join(" "));
    const scope: Record<string, unknown> = {
      _richApiNativeBridge: this.bridge.channel,
      console: { log, warn: log, error: log, info: () => undefined },
      setTimeout: later,
      clearTimeout,
      setInterval,
      clearInterval,
      // The little of a page that the runtime looks at while it starts.
      navigator: { userAgent: "stand-in" },
      location: { hash: "", search: "", protocol: "https:", href: "https://localhost/" },
      document: {
        getElementsByTagName: () => [
          {
            src: "https://localhost/custom-functions-runtime.js",
            getAttribute: () => null,
            appendChild: () => undefined,
          },
        ],
        createElement: () => ({ setAttribute: () => undefined }),
      },
      history: {},
      external: {},
      addEventListener: () => undefined,
    };
    scope["window"] = scope;
    scope["self"] = scope;
    const context = createContext(scope);
    const script = (path: string): void => void runInContext(readFileSync(path, "utf8"), context, { filename: path });
    script(join(root, "node_modules/@microsoft/office-js/dist/custom-functions-runtime.js"));
    script(join(root, "dist/functions.js"));
  }

  /** Calls a function by id; a scalar result comes as a 1x1 spill, as the functions declare it. */
  call(id: string, args: readonly unknown[]): Promise<HostCell[][]> {
    return this.bridge.call(id, args);
  }
}
