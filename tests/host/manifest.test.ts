/** Both manifests, for every environment, as the spreadsheet program demands them. */
import { execFileSync } from "node:child_process";
import { cpSync, mkdirSync, mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import Ajv from "ajv";
import addFormats from "ajv-formats";
import { unzipSync } from "fflate";

const root = join(__dirname, "../..");
const { version } = JSON.parse(readFileSync(join(root, "package.json"), "utf8")) as { version: string };

/** A folder like the project's, in which manifests can be made without touching dist/. */
let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), "manifest-"));
  for (const part of ["manifest-template", "src/build", "src/pane", "package.json"])
    cpSync(join(root, part), join(folder, part), { recursive: true });
  mkdirSync(join(folder, "dist"));
  cpSync(join(root, "dist/functions.json"), join(folder, "dist/functions.json"));
  cpSync(join(root, "node_modules/fflate"), join(folder, "node_modules/fflate"), {
    recursive: true,
    dereference: true,
  });
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function make(...args: string[]): string {
  return execFileSync(process.execPath, ["src/build/manifest.mjs", ...args], {
    cwd: folder,
    encoding: "utf8",
    stdio: "pipe",
  });
}

function refusal(...args: string[]): string {
  try {
    make(...args);
  } catch (fault) {
    return String((fault as { stderr: string }).stderr);
  }
  return "";
}

const output = (name: string): string => readFileSync(join(folder, "dist", name), "utf8");

/** An element of the manifest. */
interface Element {
  readonly name: string;
  readonly attributes: Readonly<Record<string, string>>;
  readonly children: Element[];
  text: string;
}

const ENTITIES: Readonly<Record<string, string>> = { amp: "&", lt: "<", gt: ">", quot: '"' };
const plain = (text: string): string => text.replace(/&(\w+);/g, (_, name: string) => ENTITIES[name]!);

/** Reads XML as plain as a manifest's; fails where tags do not match. */
function parseXml(xml: string): Element {
  const top: Element = { name: "", attributes: {}, children: [], text: "" };
  const open = [top];
  for (const [, closing, name, attributes = "", selfClosing, text] of xml.matchAll(
    /<(\/?)([\w:]+)((?:\s+[\w:]+="[^"]*")*)\s*(\/?)>|([^<]+)|<\?[^>]*\?>/g,
  )) {
    if (text !== undefined) open.at(-1)!.text += plain(text);
    else if (name === undefined) continue;
    else if (closing) {
      if (open.pop()!.name !== name) throw new Error(`</${name}> closes another element`);
    } else {
      const element: Element = {
        name,
        attributes: Object.fromEntries(
          [...attributes.matchAll(/([\w:]+)="([^"]*)"/g)].map(([, key, value]) => [key!, plain(value!)]),
        ),
        children: [],
        text: "",
      };
      open.at(-1)!.children.push(element);
      if (!selfClosing) open.push(element);
    }
  }
  if (open.length !== 1) throw new Error(`<${open.at(-1)!.name}> stays open`);
  return top.children[0]!;
}

function all(element: Element, name: string): Element[] {
  return element.children.flatMap((child) => [...(child.name === name ? [child] : []), ...all(child, name)]);
}
const names = (element: Element): string[] => element.children.map(({ name }) => name);
const one = (element: Element, ...path: string[]): Element =>
  path.reduce((at, name) => {
    const found = at.children.filter((child) => child.name === name);
    expect({ name, count: found.length }).toEqual({ name, count: 1 });
    return found[0]!;
  }, element);

/** The order in which the manifest's schema wants its elements. */
const ORDER: Readonly<Record<string, readonly string[]>> = {
  OfficeApp: [
    ...["Id", "AlternateId", "Version", "ProviderName", "DefaultLocale", "DisplayName", "Description", "IconUrl"],
    ...["HighResolutionIconUrl", "SupportUrl", "AppDomains", "Hosts", "Requirements", "DefaultSettings"],
    ...["Permissions", "Dictionary", "VersionOverrides"],
  ],
  VersionOverrides: ["Description", "Requirements", "Hosts", "Resources"],
  Host: ["Runtimes", "AllFormFactors", "DesktopFormFactor", "MobileFormFactor"],
  DesktopFormFactor: ["GetStarted", "SupportsSharedFolders", "FunctionFile", "ExtensionPoint"],
  ExtensionPoint: ["Script", "Page", "Metadata", "Namespace", "OfficeTab"],
  GetStarted: ["Title", "Description", "LearnMoreUrl"],
  Group: ["Label", "Icon", "Control"],
  Control: ["Label", "Supertip", "Icon", "Action"],
  Supertip: ["Title", "Description"],
  Action: ["TaskpaneId", "SourceLocation"],
  Resources: ["bt:Images", "bt:Urls", "bt:ShortStrings", "bt:LongStrings"],
};

const CASES = [
  { environment: "production", url: "https://planning.example", namespace: "CAP" },
  { environment: "development", url: "https://localhost:3000", namespace: "CAPDEV" },
  { environment: "production", url: "https://intranet.example/tools/capacity/", namespace: "CAP" },
];

describe.each(CASES)("$environment at $url", ({ environment, url, namespace }) => {
  const base = url.replace(/\/$/, "");
  let xml: Element;
  let json: any;
  beforeAll(() => {
    make("--url", url, "--env", environment);
    xml = parseXml(output("manifest.xml"));
    json = JSON.parse(output("manifest.json"));
  });

  test("elements stand in the order of the schema", () => {
    const check = (element: Element): void => {
      const order = ORDER[element.name];
      if (order) {
        const places = names(element).map((name) => order.indexOf(name));
        expect({ element: element.name, places }).toEqual({
          element: element.name,
          places: [...places].sort((a, b) => a - b),
        });
        expect(places).not.toContain(-1);
      }
      element.children.forEach(check);
    };
    check(xml);
    expect(xml.attributes["xsi:type"]).toBe("TaskPaneApp");
  });

  test("resource ids are short, unique, all defined and all used", () => {
    const resources = one(xml, "VersionOverrides", "Resources");
    const defined = resources.children.flatMap(({ children }) => children.map(({ attributes }) => attributes["id"]!));
    expect(new Set(defined).size).toBe(defined.length);
    for (const id of defined) expect(id.length).toBeLessThanOrEqual(32);
    const used = new Set<string>();
    const collect = (element: Element): void => {
      if (element.attributes["resid"] !== undefined) used.add(element.attributes["resid"]);
      element.children.forEach(collect);
    };
    collect(xml);
    expect([...used].sort()).toEqual([...defined].sort());
  });

  test("texts keep their longest lengths", () => {
    const resources = one(xml, "VersionOverrides", "Resources");
    const longest: Readonly<Record<string, number>> = {
      "bt:ShortStrings": 125,
      "bt:LongStrings": 250,
      "bt:Urls": 2048,
    };
    for (const list of resources.children) {
      for (const { attributes } of list.children)
        expect(attributes["DefaultValue"]!.length).toBeLessThanOrEqual(longest[list.name] ?? 2048);
    }
    expect(one(xml, "DisplayName").attributes["DefaultValue"]!.length).toBeLessThanOrEqual(125);
    expect(one(xml, "Description").attributes["DefaultValue"]!.length).toBeLessThanOrEqual(250);
  });

  test("every icon has its three sizes, and the pictures are as large as they say", () => {
    for (const icon of all(xml, "Icon"))
      expect(icon.children.map(({ attributes }) => attributes["size"])).toEqual(["16", "32", "80"]);
    for (const size of [16, 32, 64, 80]) {
      const png = readFileSync(join(folder, "dist/icons", `icon-${size}.png`));
      expect(png.subarray(1, 4).toString("latin1")).toBe("PNG");
      expect([png.readUInt32BE(16), png.readUInt32BE(20)]).toEqual([size, size]);
    }
    expect(one(xml, "IconUrl").attributes["DefaultValue"]).toBe(`${base}/icons/icon-32.png`);
    expect(one(xml, "HighResolutionIconUrl").attributes["DefaultValue"]).toBe(`${base}/icons/icon-64.png`);
  });

  test("functions and pane share one long-lived runtime", () => {
    const runtimes = all(xml, "Runtime");
    expect(runtimes.map(({ attributes }) => attributes)).toEqual([{ resid: "Pane.Url", lifetime: "long" }]);
    const functions = all(xml, "ExtensionPoint").find(
      ({ attributes }) => attributes["xsi:type"] === "CustomFunctions",
    )!;
    expect(one(functions, "Page", "SourceLocation").attributes["resid"]).toBe("Pane.Url");
    expect(one(all(xml, "Action")[0]!, "SourceLocation").attributes["resid"]).toBe("Pane.Url");
    const sets = all(xml, "Set").map(({ attributes }) => `${attributes["Name"]} ${attributes["MinVersion"]}`);
    expect(sets).toEqual(["SharedRuntime 1.1", "CustomFunctionsRuntime 1.1"]);
  });

  test("every address is https and below the one given; the domain has no path", () => {
    const addresses = output("manifest.xml")
      .match(/https?:[^"<]*/g)!
      .filter((address) => !address.includes("schemas.microsoft.com") && !address.includes("www.w3.org"));
    expect(addresses.length).toBeGreaterThan(5);
    for (const address of addresses)
      expect(address.startsWith(`${base}/`) || address === new URL(url).origin).toBe(true);
    expect(one(xml, "AppDomains", "AppDomain").text).toBe(new URL(url).origin);
  });

  test("version and namespace", () => {
    expect(one(xml, "Version").text).toBe(`${version}.0`);
    const strings = all(xml, "bt:String").find(({ attributes }) => attributes["id"] === "Functions.Namespace")!;
    expect(strings.attributes["DefaultValue"]).toBe(namespace);
    expect(json.version).toBe(version);
    expect(json.extensions[0].runtimes[0].customFunctions.namespace).toEqual({ id: namespace, name: namespace });
    expect(json.id).toBe(one(xml, "Id").text);
    expect(output("pane.html")).toContain(`data-namespace="${namespace}"`);
  });

  test("the unified manifest fits its maker's schema", () => {
    const { validate, errors } = against(json.manifestVersion as string, undefined);
    expect(validate(json) ? [] : errors()).toEqual([]);
  });

  test("the package holds the manifest and both icons in their sizes", () => {
    const files = unzipSync(readFileSync(join(folder, "dist/addin-package.zip")));
    expect(Object.keys(files).sort()).toEqual(["color.png", "manifest.json", "outline.png"]);
    expect(Buffer.from(files["manifest.json"]!).toString("utf8")).toBe(output("manifest.json"));
    const size = (name: string): number => Buffer.from(files[name]!).readUInt32BE(16);
    expect([size("color.png"), size("outline.png")]).toEqual([192, 32]);
  });
});

/** A check against the bundled schema of a manifest version, or against a definition in it. */
function against(manifestVersion: string, definition: string | undefined) {
  const path = `@microsoft/app-manifest/build/json-schemas/teams/v${manifestVersion}/MicrosoftTeams.schema.json`;
  const schema = JSON.parse(readFileSync(require.resolve(path), "utf8")) as {
    $schema?: string;
    $id?: string;
    id?: string;
  };
  delete schema.$schema;
  delete schema.id;
  schema.$id = "manifest";
  const ajv = new Ajv({ strict: false, allErrors: true });
  addFormats(ajv);
  ajv.addSchema(schema);
  const validate = ajv.compile({ $ref: definition ? `manifest#/definitions/${definition}` : "manifest" });
  return { validate, errors: () => validate.errors?.map(({ instancePath, message }) => `${instancePath} ${message}`) };
}

test("functions.json fits the definition of custom functions, and a wrong one does not", () => {
  const metadata = JSON.parse(readFileSync(join(root, "dist/functions.json"), "utf8")) as {
    functions: { description: string }[];
    allowCustomDataForDataTypeAny?: boolean;
  };
  const { validate, errors } = against("1.24", "extensionCustomFunctions");
  expect(validate(metadata) ? [] : errors()).toEqual([]);
  const [first, ...others] = metadata.functions;
  const wrong = { ...metadata, functions: [{ ...first, description: "x".repeat(129) }, ...others] };
  expect(validate(wrong)).toBe(false);
});

test("the two environments share neither id nor namespace", () => {
  make("--env", "production", "--url", "https://planning.example");
  const production = output("manifest.xml");
  make();
  const development = output("manifest.xml");
  const value = (xml: string, pattern: RegExp): string => pattern.exec(xml)![1]!;
  for (const pattern of [
    /<Id>([^<]*)/,
    /"Functions.Namespace" DefaultValue="([^"]*)/,
    /<DisplayName DefaultValue="([^"]*)/,
  ])
    expect(value(production, pattern)).not.toBe(value(development, pattern));
});

describe("Office.js", () => {
  const policy = (): string => /Content-Security-Policy" content="([^"]*)"/.exec(output("pane.html"))![1]!;
  const script = (): string => /<script src="([^"]*)"/.exec(output("pane.html"))![1]!;
  test("comes from its maker by default, the only foreign script allowed", () => {
    make();
    expect(script()).toBe("https://appsforoffice.microsoft.com/lib/1/hosted/office.js");
    expect(policy()).toContain("script-src 'self' https://appsforoffice.microsoft.com;");
    expect(policy()).toContain("connect-src 'self'");
  });
  test("comes from an address of the closed network where one is given", () => {
    make("--office-js", "https://mirror.example/office/lib/office.js");
    expect(script()).toBe("https://mirror.example/office/lib/office.js");
    expect(policy()).toContain("script-src 'self' https://mirror.example;");
  });
  test("is copied beside the pages where asked, without debugging files and other programs' parts", () => {
    cpSync(
      join(root, "node_modules/@microsoft/office-js/package.json"),
      join(folder, "node_modules/@microsoft/office-js/package.json"),
    );
    const from = join(root, "node_modules/@microsoft/office-js/dist");
    const to = join(folder, "node_modules/@microsoft/office-js/dist");
    const files = [
      "office.js",
      "office.debug.js",
      "excel-web-16.00.js",
      "excel-web-16.00.debug.js",
      "word-web-16.00.js",
    ];
    for (const file of [...files, "en-us/office_strings.js", "en-us/outlook_strings.js"])
      cpSync(join(from, file), join(to, file));
    make("--office-js", "self");
    const copied = (file: string): boolean => {
      try {
        return output(`office/${file}`).length > 0;
      } catch {
        return false;
      }
    };
    expect(files.map(copied)).toEqual([true, false, true, false, false]);
    expect([copied("en-us/office_strings.js"), copied("en-us/outlook_strings.js")]).toEqual([true, false]);
    expect(script()).toBe("office/office.js");
    expect(policy()).toContain("script-src 'self';");
  });
});

test("the steps for trying the development copy name its manifest, id and namespace for every program", () => {
  const told = execFileSync(process.execPath, ["src/build/sideload.mjs"], { cwd: folder, encoding: "utf8" });
  const id = /<Id>([^<]*)/.exec(output("manifest.xml"))![1]!;
  for (const program of ["Excel on Windows", "Excel on a Mac", "Excel in a browser"]) expect(told).toContain(program);
  expect(told).toContain(`/v ${id} /t REG_SZ /d "${join(folder, "dist", "manifest.xml")}"`);
  expect(told).toContain("=CAPDEV.POWER.DB(100)");
});

test.each([
  [["--url", "http://planning.example"], "--url"],
  [["--url", "https://planning.example/?a=1"], "--url"],
  [["--url", "planning"], "--url"],
  [["--env", "staging"], "--env"],
  [["--env", "toString"], "--env"],
  [["--office-js", "http://mirror.example/office.js"], "--office-js"],
  [["--office-js", "https://mirror.example/other.js"], "--office-js"],
])("%j is refused in one line that names the option", (args, option) => {
  const told = refusal(...args);
  expect(told.trim().split("\n")).toHaveLength(1);
  expect(told).toContain(`${option} is "`);
});
