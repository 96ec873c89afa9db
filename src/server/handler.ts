/** Answers requests: reads only, no bodies, nothing outside the add-in's own files. */
import type { IncomingMessage, ServerResponse } from "node:http";
import { gzipSync } from "node:zlib";
import { readServed, servedName, type ServedFile } from "./files";

const METHODS = "GET, HEAD, OPTIONS";
const LONGEST_ADDRESS = 2_000;
const NO_CONTENT_POLICY = "default-src 'none'";
const PAGE_POLICY = /http-equiv="Content-Security-Policy" content="([^"]*)"/;

/** The web program reads the function list from its own origin, and from a public page into a local network. */
const ACROSS_ORIGINS = {
  "Access-Control-Allow-Origin": "*",
  "Access-Control-Allow-Methods": METHODS,
  "Access-Control-Allow-Private-Network": "true",
  "Cross-Origin-Resource-Policy": "cross-origin",
};
const EVERYWHERE = {
  ...ACROSS_ORIGINS,
  "X-Content-Type-Options": "nosniff",
  "Referrer-Policy": "no-referrer",
};

export interface Site {
  readonly folder: string;
  /** Host names that requests may be addressed to; any where it is left out. */
  readonly hosts?: ReadonlySet<string>;
}

/** An answer in words; the connection ends, so that a body that is still coming is never read. */
function refuse(response: ServerResponse, status: number, words: string, headers: Record<string, string> = {}): void {
  response.writeHead(status, {
    ...EVERYWHERE,
    ...headers,
    "Content-Security-Policy": NO_CONTENT_POLICY,
    "Content-Type": "text/plain; charset=utf-8",
    Connection: "close",
  });
  response.end(`${words}\n`);
}

/** Without its port, brackets and case. */
function hostName(header: string): string {
  return header
    .toLowerCase()
    .replace(/:\d+$/, "")
    .replace(/^\[|\]$/g, "");
}

function policyOf(file: ServedFile): string {
  if (!file.type.startsWith("text/html")) return NO_CONTENT_POLICY;
  return PAGE_POLICY.exec(file.bytes.toString("utf8"))?.[1] ?? NO_CONTENT_POLICY;
}

const packed = new Map<string, Buffer>();

/** The packed form of a file, kept until the file changes. */
function pack(name: string, { bytes, tag }: ServedFile): Buffer {
  const key = `${name} ${tag}`;
  const known = packed.get(key);
  if (known) return known;
  for (const other of packed.keys()) if (other.startsWith(`${name} `)) packed.delete(other);
  const result = gzipSync(bytes);
  packed.set(key, result);
  return result;
}

function send(request: IncomingMessage, response: ServerResponse, name: string, file: ServedFile): void {
  const headers: Record<string, string | number> = {
    ...EVERYWHERE,
    "Content-Security-Policy": policyOf(file),
    "Cache-Control": "no-cache",
    ETag: file.tag,
    ...(file.packable ? { Vary: "Accept-Encoding" } : {}),
  };
  if (request.headers["if-none-match"] === file.tag) {
    response.writeHead(304, headers);
    response.end();
    return;
  }
  const asksPacked = /\bgzip\b/.test(String(request.headers["accept-encoding"] ?? ""));
  const body = file.packable && asksPacked ? pack(name, file) : file.bytes;
  if (body !== file.bytes) headers["Content-Encoding"] = "gzip";
  response.writeHead(200, { ...headers, "Content-Type": file.type, "Content-Length": body.length });
  response.end(request.method === "HEAD" ? undefined : body);
}

/** Answers one request. */
export function answer(site: Site, request: IncomingMessage, response: ServerResponse): void {
  const { method = "", url = "", headers } = request;
  if (url.length > LONGEST_ADDRESS) return refuse(response, 414, "The address is too long.");
  if (site.hosts && !site.hosts.has(hostName(headers.host ?? ""))) {
    return refuse(response, 421, "This server answers to its own name only.");
  }
  if (headers["transfer-encoding"] !== undefined || Number(headers["content-length"] ?? 0) > 0) {
    return refuse(response, 413, "This server takes no content.");
  }
  if (method === "OPTIONS") {
    response.writeHead(204, { ...EVERYWHERE, Allow: METHODS });
    response.end();
    return;
  }
  if (method !== "GET" && method !== "HEAD") {
    return refuse(response, 405, "This server only hands out files.", { Allow: METHODS });
  }
  const name = url.startsWith("/") ? servedName(url.replace(/[?#].*$/s, "")) : undefined;
  const file = name === undefined ? undefined : readServed(site.folder, name);
  if (name === undefined || !file) return refuse(response, 404, "There is nothing here.");
  send(request, response, name, file);
}
