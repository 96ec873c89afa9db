/** What `npm start` may be told. */
import { parseArgs } from "node:util";

export interface Options {
  readonly host: string;
  readonly port: number;
  /** Serve without encryption, whatever certificates there are. */
  readonly plain: boolean;
}

export const USAGE = `Serves the built add-in on this machine.

  npm start -- [--port 3000] [--host 127.0.0.1] [--http]

  --port   port to listen at, 1 to 65535
  --host   address to listen at; anything but a loopback address lets other machines in
  --http   without encryption, to look at the pages in a browser; spreadsheet programs want HTTPS
`;

/** @throws Error naming the option that is wrong */
export function optionsOf(args: readonly string[]): Options | "help" {
  const { values } = parseArgs({
    args: [...args],
    options: {
      host: { type: "string", default: "127.0.0.1" },
      port: { type: "string", default: "3000" },
      http: { type: "boolean", default: false },
      help: { type: "boolean", default: false, short: "h" },
    },
  });
  if (values.help) return "help";
  const port = Number(values.port);
  if (!/^\d+$/.test(values.port) || port < 1 || port > 65_535)
    throw new Error(`--port is "${values.port}"; allowed: a whole number from 1 to 65535.`);
  return { host: values.host, port, plain: values.http };
}
