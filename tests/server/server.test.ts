/** The local server: what it hands out, and what it refuses. */
import { mkdirSync, mkdtempSync, rmSync, symlinkSync, utimesSync, writeFileSync } from "node:fs";
import { request, type IncomingHttpHeaders } from "node:http";
import { request as requestEncrypted } from "node:https";
import { connect, type Socket } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { gunzipSync } from "node:zlib";
import { findCertificate } from "../../src/server/certificate";
import { servedName } from "../../src/server/files";
import { optionsOf } from "../../src/server/options";
import { startServer, type Started } from "../../src/server/server";

const PAGE = `<html><head><meta http-equiv="Content-Security-Policy" content="script-src 'self' https://office.example" /></head></html>`;
const LONG_SCRIPT = `var text = "${"a".repeat(5000)}";`;
let folder: string;
let started: Started;

beforeAll(async () => {
  const parent = mkdtempSync(join(tmpdir(), "served-"));
  folder = join(parent, "dist");
  mkdirSync(join(folder, "icons"), { recursive: true });
  mkdirSync(join(folder, "office/en-us"), { recursive: true });
  const files: Record<string, string> = {
    "pane.html": PAGE,
    "pane.css": "body {}",
    "functions.js": LONG_SCRIPT,
    "functions.json": "{}",
    "manifest.xml": "<x/>",
    "starter.xlsx": "PK",
    "icons/icon-16.png": "png",
    "office/office.js": "1",
    "office/en-us/office_strings.js": "2",
    "capacity.js": "the command line",
    "server.js": "the server",
    ".hidden": "hidden",
  };
  for (const [name, content] of Object.entries(files)) writeFileSync(join(folder, name), content);
  writeFileSync(join(parent, "secret.txt"), "secret");
  symlinkSync(join(parent, "secret.txt"), join(folder, "help.html"));
  started = await startServer(folder, "127.0.0.1", 0);
});
afterAll(() => {
  started.server.closeAllConnections();
  started.server.close();
  rmSync(join(folder, ".."), { recursive: true, force: true });
});

interface Answer {
  readonly status: number;
  readonly headers: IncomingHttpHeaders;
  readonly body: Buffer;
}

function ask(path: string, options: { method?: string; headers?: Record<string, string> } = {}): Promise<Answer> {
  return new Promise((resolve, reject) => {
    const asked = request({ port: started.port, host: "127.0.0.1", path, agent: false, ...options }, (answer) => {
      const parts: Buffer[] = [];
      answer.on("data", (part: Buffer) => parts.push(part));
      answer.on("end", () =>
        resolve({ status: answer.statusCode!, headers: answer.headers, body: Buffer.concat(parts) }),
      );
    });
    asked.on("error", reject);
    asked.end();
  });
}

/** What comes back for bytes sent as they are, once the other side ends. */
function raw(text: string, keepSending?: (socket: Socket) => void): Promise<string> {
  return new Promise((resolve, reject) => {
    const socket = connect(started.port, "127.0.0.1", () => {
      socket.write(text);
      keepSending?.(socket);
    });
    let answer = "";
    socket.on("data", (part) => (answer += part.toString("latin1")));
    socket.on("close", () => resolve(answer));
    // A reset after the answer is the server closing on what it refuses to read.
    socket.on("error", () => (answer === "" ? reject(new Error("no answer")) : undefined));
  });
}

test.each([
  ["/", "text/html; charset=utf-8"],
  ["/pane.html", "text/html; charset=utf-8"],
  ["/pane.html?_host_Info=Excel$Win32$16.01", "text/html; charset=utf-8"],
  ["/pane.css?v=1", "text/css; charset=utf-8"],
  ["/functions.js", "text/javascript; charset=utf-8"],
  ["/functions.json", "application/json; charset=utf-8"],
  ["/manifest.xml", "text/xml; charset=utf-8"],
  ["/starter.xlsx", "application/vnd.openxmlformats-officedocument.spreadsheetml.sheet"],
  ["/icons/icon-16.png", "image/png"],
  ["/office/office.js", "text/javascript; charset=utf-8"],
  ["/office/en-us/office_strings.js", "text/javascript; charset=utf-8"],
])("%s is handed out as %s", async (path, type) => {
  const { status, headers } = await ask(path);
  expect({ status, type: headers["content-type"] }).toEqual({ status: 200, type });
  expect(headers["x-content-type-options"]).toBe("nosniff");
  expect(headers["access-control-allow-origin"]).toBe("*");
});

test.each([
  "/../secret.txt",
  "/..%2fsecret.txt",
  "/%2e%2e/secret.txt",
  "/icons/../../secret.txt",
  "/icons/%2e%2e%2f%2e%2e%2fsecret.txt",
  "/office/..%5c..%5csecret.js",
  "/office/../../secret.js",
  "/office/....//secret.js",
  "//etc/passwd",
  "/pane.html%00.png",
  "/%",
  "/%c0%ae%c0%ae/secret.txt",
  "/capacity.js",
  "/server.js",
  "/.hidden",
  "/icons/",
  "/icons",
  "/help.html",
  "/nothing.html",
  "/PANE.HTML",
])("%s is not there", async (path) => {
  const { status, body } = await ask(path);
  expect(status).toBe(404);
  expect(body.toString()).toBe("There is nothing here.\n");
});

test("a path that says .. to the server itself, unshortened, finds nothing", async () => {
  expect(await raw("GET /../secret.txt HTTP/1.1\r\nHost: localhost\r\nConnection: close\r\n\r\n")).toMatch(
    /^HTTP\/1.1 404/,
  );
  expect(await raw("GET http://localhost/pane.html HTTP/1.1\r\nHost: localhost\r\nConnection: close\r\n\r\n")).toMatch(
    /^HTTP\/1.1 404/,
  );
  expect(servedName("/office/a..js")).toBeUndefined();
});

test("a page carries its own policy, every other file one that allows nothing", async () => {
  expect((await ask("/pane.html")).headers["content-security-policy"]).toBe("script-src 'self' https://office.example");
  for (const path of ["/functions.js", "/nothing", "/icons/icon-16.png"])
    expect((await ask(path)).headers["content-security-policy"]).toBe("default-src 'none'");
});

test.each(["POST", "PUT", "DELETE", "PATCH", "TRACE", "PROPFIND"])("%s is refused", async (method) => {
  const { status, headers } = await ask("/pane.html", { method });
  expect(status).toBe(405);
  expect(headers.allow).toBe("GET, HEAD, OPTIONS");
});

test("HEAD tells the length without the content; OPTIONS lets other origins in", async () => {
  const { status, headers, body } = await ask("/functions.js", { method: "HEAD" });
  expect({ status, length: headers["content-length"], body: body.length }).toEqual({
    status: 200,
    length: String(LONG_SCRIPT.length),
    body: 0,
  });
  const options = await ask("/functions.json", { method: "OPTIONS" });
  expect(options.status).toBe(204);
  expect(options.headers["access-control-allow-private-network"]).toBe("true");
});

test("content is refused before it is read, however much is announced", async () => {
  const { status } = await ask("/pane.html", { method: "POST", headers: { "content-length": "3" } });
  expect(status).toBe(413);
  const endless = "a".repeat(65_536);
  const answer = await raw(
    "POST /pane.html HTTP/1.1\r\nHost: localhost\r\nContent-Length: 100000000000\r\n\r\n",
    (socket) => {
      const send = (): void => {
        while (!socket.destroyed && socket.writable && socket.write(endless));
        if (!socket.destroyed && socket.writable) socket.once("drain", send);
      };
      send();
    },
  );
  expect(answer).toMatch(/^HTTP\/1.1 413/);
  expect(
    await raw("GET /pane.html HTTP/1.1\r\nHost: localhost\r\nTransfer-Encoding: chunked\r\n\r\n0\r\n\r\n"),
  ).toMatch(/^HTTP\/1.1 413/);
});

test("long addresses and long headers are refused", async () => {
  expect((await ask(`/${"a".repeat(3000)}`)).status).toBe(414);
  expect((await ask("/pane.html", { headers: { "x-long": "a".repeat(20_000) } })).status).toBe(431);
});

test("what is no HTTP is answered with 400 and closed", async () => {
  expect(await raw("hello\r\n\r\n")).toMatch(/^HTTP\/1.1 400/);
});

test("a request to another name, as a foreign page would send it, is refused", async () => {
  expect((await ask("/pane.html", { headers: { host: "evil.example:3000" } })).status).toBe(421);
  for (const host of ["localhost", "LOCALHOST:3000", "127.0.0.1:3000", "[::1]:3000"])
    expect((await ask("/pane.html", { headers: { host } })).status).toBe(200);
});

test("texts are packed where asked, and a known file is not sent again until it changes", async () => {
  const packed = await ask("/functions.js", { headers: { "accept-encoding": "br, gzip" } });
  expect(packed.headers["content-encoding"]).toBe("gzip");
  expect(packed.body.length).toBeLessThan(500);
  expect(gunzipSync(packed.body).toString()).toBe(LONG_SCRIPT);
  const etag = packed.headers.etag!;
  expect((await ask("/functions.js", { headers: { "if-none-match": etag } })).status).toBe(304);
  utimesSync(join(folder, "functions.js"), new Date(2026, 1, 1), new Date(2026, 1, 1));
  expect((await ask("/functions.js", { headers: { "if-none-match": etag } })).status).toBe(200);
});

test("it listens at the loopback address only", () => {
  expect(started.server.address()).toMatchObject({ address: "127.0.0.1" });
  expect(started.address).toBe(`http://localhost:${started.port}`);
});

test("a port in use is said so", async () => {
  await expect(startServer(folder, "127.0.0.1", started.port)).rejects.toMatchObject({ code: "EADDRINUSE" });
});

describe("certificate", () => {
  const certificate = { key: "key", cert: "cert" };
  const tool = (trusted: boolean, install: () => Promise<typeof certificate> = () => Promise.resolve(certificate)) => ({
    verifyCertificates: () => trusted,
    getHttpsServerOptions: install,
  });
  test("a trusted one is used, with or without somebody at the terminal", async () => {
    expect(await findCertificate(tool(true), false)).toEqual({ certificate });
  });
  test("a new one is installed only where somebody can allow it", async () => {
    const install = jest.fn(() => Promise.resolve(certificate));
    expect(await findCertificate(tool(false, install), false)).toMatchObject({
      why: expect.stringContaining("nobody"),
    });
    expect(install).not.toHaveBeenCalled();
    expect(await findCertificate(tool(false, install), true)).toEqual({ certificate });
  });
  test("why it could not be installed is told in one line", async () => {
    const failing = tool(false, () => Promise.reject(new Error("Unable to install.\nsudo: not found\n")));
    expect(await findCertificate(failing, true)).toEqual({ why: "Unable to install." });
  });
  test("with one, pages are encrypted", async () => {
    const { generateCertificates } = await import("office-addin-dev-certs");
    const place = mkdtempSync(join(tmpdir(), "certificate-"));
    const paths = ["ca.crt", "localhost.crt", "localhost.key"].map((name) => join(place, name));
    jest.spyOn(console, "log").mockImplementation(() => undefined);
    await generateCertificates(paths[0], paths[1], paths[2], 1, ["localhost", "127.0.0.1"]);
    const { readFileSync } = await import("node:fs");
    const encrypted = await startServer(folder, "127.0.0.1", 0, {
      cert: readFileSync(paths[1]!),
      key: readFileSync(paths[2]!),
    });
    expect(encrypted.address).toBe(`https://localhost:${encrypted.port}`);
    const status = await new Promise((resolve, reject) => {
      requestEncrypted(
        { host: "localhost", port: encrypted.port, path: "/pane.html", ca: readFileSync(paths[0]!), agent: false },
        (answer) => resolve(answer.resume().statusCode),
      )
        .on("error", reject)
        .end();
    });
    encrypted.server.close();
    rmSync(place, { recursive: true });
    expect(status).toBe(200);
  });
});

describe("options", () => {
  test("by default this machine only, port 3000", () => {
    expect(optionsOf([])).toEqual({ host: "127.0.0.1", port: 3000, plain: false });
    expect(optionsOf(["--host", "0.0.0.0", "--port", "8080", "--http"])).toEqual({
      host: "0.0.0.0",
      port: 8080,
      plain: true,
    });
    expect(optionsOf(["-h"])).toBe("help");
  });
  test.each(["0", "65536", "-1", "80x", "1.5", ""])("port %j is refused", (port) => {
    expect(() => optionsOf([`--port=${port}`])).toThrow("--port");
  });
  test("an unknown option is refused", () => {
    expect(() => optionsOf(["--open"])).toThrow("--open");
  });
});
