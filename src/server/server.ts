/** The server itself, encrypted where there is a certificate. */
import { createServer as createPlain, type Server } from "node:http";
import { createServer as createEncrypted } from "node:https";
import type { AddressInfo } from "node:net";
import type { Certificate } from "./certificate";
import { answer, type Site } from "./handler";

const MOST_CONNECTIONS = 200;
const HEADERS_TIMEOUT = 10_000;
const REQUEST_TIMEOUT = 20_000;
const LARGEST_HEADERS_BYTES = 16_384;
const LOOPBACK: ReadonlySet<string> = new Set(["127.0.0.1", "::1", "localhost"]);

export interface Started {
  readonly server: Server;
  readonly address: string;
  readonly port: number;
}

export function isLoopback(host: string): boolean {
  return LOOPBACK.has(host.toLowerCase());
}

/**
 * Starts to serve a folder.
 *
 * @param host address to listen at; a loopback address answers to loopback names only
 * @param port 0 for any free one
 */
export function startServer(folder: string, host: string, port: number, certificate?: Certificate): Promise<Started> {
  const site: Site = { folder, ...(isLoopback(host) ? { hosts: LOOPBACK } : {}) };
  const limits = {
    maxHeaderSize: LARGEST_HEADERS_BYTES,
    headersTimeout: HEADERS_TIMEOUT,
    requestTimeout: REQUEST_TIMEOUT,
    connectionsCheckingInterval: HEADERS_TIMEOUT / 2,
  };
  const server: Server = certificate ? createEncrypted({ ...limits, ...certificate }) : createPlain(limits);
  server.maxConnections = MOST_CONNECTIONS;
  server.on("request", (request, response) => answer(site, request, response));
  return new Promise((resolve, reject) => {
    server.once("error", reject);
    server.listen(port, host, () => {
      const { port: actual } = server.address() as AddressInfo;
      const name = isLoopback(host) ? "localhost" : host.includes(":") ? `[${host}]` : host;
      resolve({ server, port: actual, address: `${certificate ? "https" : "http"}://${name}:${actual}` });
    });
  });
}
