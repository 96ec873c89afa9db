/** Patching somebody's workbook: only values change, and hostile files are refused in one line. */
import { strToU8, unzipSync, zipSync } from "fflate";
import { functionTable } from "../../functions/generated/function-table";
import { newBook, writeBook } from "../../src/workbook/engine/library";
import { Package } from "../../src/workbook/package/archive";
import { patchSheet } from "../../src/workbook/package/patch-cells";
import { escapeXml, unescapeXml } from "../../src/workbook/package/xml";
import { recalculate } from "../../src/workbook/recalculate";
import { toStored } from "../../src/workbook/stored-names";

async function sample(): Promise<Uint8Array> {
  const book = newBook();
  const sheet = book.addWorksheet("S");
  sheet.getCell("A1").value = 10;
  sheet.getCell("B1").value = {
    formula: toStored("=CAP.ERLANGB.CHANNELS(A1,0.01)", functionTable),
    result: 1,
  };
  book.addWorksheet("Notes").getCell("A1").value = "the planner's own & <kept>";
  return writeBook(book);
}

test("recalculation changes the sheet with formulas and leaves every other part byte for byte, unknown parts too", async () => {
  const parts = unzipSync(await sample());
  parts["custom/unknown.bin"] = new Uint8Array([1, 2, 3]);
  parts["xl/media/picture.png"] = new Uint8Array([9, 8, 7]);
  const before = zipSync(parts);
  const after = unzipSync((await recalculate(before, functionTable)).bytes);
  expect(Object.keys(after).sort()).toEqual(Object.keys(parts).sort());
  const changed = Object.keys(parts).filter(
    (name) => Buffer.compare(Buffer.from(parts[name]!), Buffer.from(after[name]!)) !== 0,
  );
  expect(changed).toEqual(["xl/worksheets/sheet1.xml"]);
  expect(Buffer.from(after["xl/worksheets/sheet1.xml"]!).toString()).toContain("<v>18</v>");
});

describe("patching a sheet", () => {
  const xml = (rows: string): string =>
    `<worksheet><dimension ref="A1:B2"/><sheetData>${rows}</sheetData><pageMargins left="1"/></worksheet>`;
  test("keeps style and formula, replaces value and type", () => {
    const patched = patchSheet(
      xml('<row r="1" ht="20"><c r="A1" s="3" t="str"><f>B1</f><v>old</v></c></row>'),
      new Map([["1,1", { value: 2.5 }]]),
    );
    expect(patched).toContain('<row r="1" ht="20"><c r="A1" s="3"><f>B1</f><v>2.5</v></c></row>');
  });
  test("puts new rows and cells in their order", () => {
    const patched = patchSheet(
      xml('<row r="2"><c r="B2"><v>1</v></c></row>'),
      new Map([
        ["2,1", { value: "a" }],
        ["1,1", { value: true }],
        ["5,3", { value: 7 }],
      ]),
    );
    expect(patched).toMatch(/<row r="1">.*<row r="2"><c r="A2".*<c r="B2".*<row r="5"><c r="C5">/s);
    expect(patched).toContain('<dimension ref="A1:C5"/>');
  });
  test("an input replaces a formula; a text that begins like one stays text", () => {
    const patched = patchSheet(
      xml('<row r="1"><c r="A1" cm="1"><f t="array" ref="A1">X()</f><v>1</v></c></row>'),
      new Map([["1,1", { value: "=1+1", input: true }]]),
    );
    expect(patched).toContain('<c r="A1" t="inlineStr"><is><t xml:space="preserve">=1+1</t></is></c>');
    expect(patched).not.toContain("<f");
  });
  test("an empty sheet takes cells", () => {
    expect(patchSheet("<worksheet><sheetData/></worksheet>", new Map([["1,2", { value: 1 }]]))).toContain(
      '<sheetData><row r="1"><c r="B1"><v>1</v></c></row></sheetData>',
    );
  });
});

test("XML texts survive escaping, control characters do not", () => {
  const text = `<a & "b"> 'c' é 漢`;
  expect(unescapeXml(escapeXml(text))).toBe(text);
  expect(escapeXml("a\u0001b")).toBe("ab");
  expect(unescapeXml("&#65;&#x42;&unknown;")).toBe("AB&unknown;");
});

describe("files that are refused", () => {
  test.each([
    ["a text file", strToU8("area,year"), "not an .xlsx"],
    ["an empty file", new Uint8Array(0), "not an .xlsx"],
    ["a password-protected or old workbook", new Uint8Array([0xd0, 0xcf, 0x11, 0xe0, 0, 0]), "password"],
    ["half a workbook", new Uint8Array([0x50, 0x4b, 3, 4, 20, 0, 0, 0]), "damaged"],
    ["another kind of archive", zipSync({ "a.txt": strToU8("x") }), "lacks the part"],
  ])("%s", (_, bytes, message) => {
    expect(() => Package.open(bytes)).toThrow(message);
  });
  test("a document type, whose entities could explode", async () => {
    const parts = unzipSync(await sample());
    parts["xl/worksheets/sheet1.xml"] = strToU8('<?xml version="1.0"?><!DOCTYPE x [<!ENTITY a "aaaa">]><worksheet/>');
    expect(() => Package.open(zipSync(parts))).toThrow("document type");
  });
  test("an archive that unpacks beyond all measure", () => {
    const bomb = zipSync(
      { "xl/workbook.xml": new Uint8Array(600_000_000), "b.xml": new Uint8Array(600_000_000) },
      { level: 1 },
    );
    expect(() => Package.open(bomb)).toThrow("unpacks to more than");
  }, 60_000);
  test("thousands of parts", () => {
    const many = Object.fromEntries(Array.from({ length: 5_001 }, (_, i) => [`p${i}`, new Uint8Array(0)]));
    expect(() => Package.open(zipSync(many))).toThrow("more than 5000 parts");
  });
  test.each(["truncated at half", "a byte flipped"])("a damaged workbook, %s, fails in one line", async (how) => {
    const bytes = await sample();
    const hurt = how.startsWith("truncated")
      ? bytes.slice(0, bytes.length / 2)
      : bytes.map((byte, i) => (i === bytes.length >> 1 ? byte ^ 0xff : byte));
    await recalculate(hurt, functionTable).then(
      () => undefined,
      (fault: Error) => {
        expect(fault.name).toBe("WorkbookFailure");
        expect(fault.message).not.toContain("\n");
      },
    );
  });
});
