/** Puts the starter sheets into the open workbook, or opens them as a new one. */
import { Package } from "../../workbook/package/archive";
import { sheetParts } from "../../workbook/package/sheets";
import { tags, attribute, unescapeXml } from "../../workbook/package/xml";
import { PaneFailure } from "../failure";
import { say, sayCount, texts } from "../say";
import { stopIfAsked, type Work } from "../work";
import { areaOf } from "../workbook/address";
import { ChartsRefused, type Area, type OpenWorkbook } from "../workbook/workbook";
import { renameNamespace } from "./namespace-in-file";

/** Namespace under which the starter is built. */
const BUILT_NAMESPACE = "CAP";
const ADDRESS = "starter.xlsx";

interface Starter {
  readonly bytes: Uint8Array;
  readonly sheets: readonly string[];
  readonly sheetsWithCharts: readonly string[];
  readonly names: ReadonlyMap<string, Area>;
}

/** Fetches the starter from the pane's own server. */
export async function fetchStarter(work: Work, namespace: string): Promise<Uint8Array> {
  work.progress(texts.plan.starterFetching);
  let status: string;
  try {
    const answer = await fetch(ADDRESS, { signal: work.signal });
    if (answer.ok) return renameNamespace(new Uint8Array(await answer.arrayBuffer()), BUILT_NAMESPACE, namespace);
    status = String(answer.status);
  } catch (fault) {
    stopIfAsked(work, texts.work.nothingChanged);
    status = fault instanceof Error ? fault.message : String(fault);
  }
  throw new PaneFailure(say(texts.plan.starterMissing, { status }));
}

function namesOf(file: Package): Map<string, Area> {
  const names = new Map<string, Area>();
  const pattern = /<definedName\b([^>]*)>([^<]*)<\/definedName>/g;
  for (const [, attributes = "", content = ""] of file.text("xl/workbook.xml").matchAll(pattern)) {
    const name = attribute(`<x ${attributes}>`, "name");
    const match = /^(?:'((?:[^']|'')+)'|([^!']+))!(.+)$/.exec(unescapeXml(content).replace(/\$/g, ""));
    const area = match && areaOf(match[1]?.replace(/''/g, "'") ?? match[2]!, match[3]!);
    if (name !== undefined && area && !name.startsWith("_xlnm.")) names.set(name, area);
  }
  return names;
}

export function describeStarter(bytes: Uint8Array): Starter {
  const file = Package.open(bytes);
  const parts = sheetParts(file);
  return {
    bytes,
    sheets: parts.map(({ name }) => name),
    sheetsWithCharts: parts.filter(({ part }) => tags(file.text(part), "drawing").length > 0).map(({ name }) => name),
    names: namesOf(file),
  };
}

/** Refuses where sheets or names of the starter are taken: formulas would point at the wrong ones. */
async function requireRoom(book: OpenWorkbook, { sheets, names }: Starter): Promise<void> {
  const present = new Set((await book.sheetNames()).map((name) => name.toLowerCase()));
  const taken = sheets.filter((name) => present.has(name.toLowerCase()));
  if (taken.length > 0) throw new PaneFailure(say(texts.plan.starterClash, { sheets: taken.join(", ") }));
  const used: string[] = [];
  for (const name of names.keys()) if (await book.namedArea(name)) used.push(name);
  if (used.length > 0) throw new PaneFailure(say(texts.plan.starterNames, { names: used.join(", ") }));
}

/** Inserts the starter sheets; answers with what to tell. */
export async function insertStarter(book: OpenWorkbook, namespace: string, work: Work): Promise<string> {
  if (!book.can.insertSheets) throw new PaneFailure(texts.plan.cannotInsert);
  const starter = describeStarter(await fetchStarter(work, namespace));
  await requireRoom(book, starter);
  stopIfAsked(work, texts.work.nothingChanged);
  work.progress(texts.plan.starterInserting);
  const told: string[] = [];
  let inserted = starter.sheets;
  try {
    await book.insertSheets(starter.bytes);
  } catch (fault) {
    if (!(fault instanceof ChartsRefused)) throw fault;
    inserted = starter.sheets.filter((name) => !starter.sheetsWithCharts.includes(name));
    await book.insertSheets(starter.bytes, inserted);
    told.push(say(texts.plan.starterWithoutCharts, { sheets: starter.sheetsWithCharts.join(", ") }));
  }
  let added = false;
  for (const [name, area] of starter.names) {
    if (await book.namedArea(name)) continue;
    await book.setNamedArea(name, area);
    added = true;
  }
  if (added) told.push(texts.plan.starterNamesAdded);
  await book.recalculate();
  return [sayCount(texts.plan.starterInserted, inserted.length), ...told].join(" ");
}

/** Opens the starter as a workbook of its own; answers with what to tell. */
export async function openStarter(book: OpenWorkbook, namespace: string, work: Work): Promise<string> {
  if (!book.can.openWorkbook) throw new PaneFailure(texts.plan.cannotOpen);
  const bytes = await fetchStarter(work, namespace);
  stopIfAsked(work, texts.work.nothingChanged);
  await book.openWorkbook(bytes);
  return texts.plan.starterOpened;
}
