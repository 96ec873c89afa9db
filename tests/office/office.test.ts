/** The written workbooks in another office program: same values, charts drawn, nothing broken in the handover copy. */
import { execFileSync } from "node:child_process";
import { mkdtempSync, readdirSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import Papa from "papaparse";
import { loadBook, type Book } from "../../src/workbook/engine/library";
import { plainValue } from "../../src/workbook/plan-in-book";

const root = join(__dirname, "../..");
const described = process.env["CHECK_OFFICE"] === "1" ? describe : describe.skip;

/** Every sheet as a CSV file with raw values. */
const ALL_SHEETS = "csv:Text - txt - csv (StarCalc):44,34,76,1,,0,false,false,false,false,false,-1";

described("handover copy of the demo plan in LibreOffice", () => {
  let folder: string;
  let book: Book;
  const office = (...args: string[]): void => {
    const profile = `-env:UserInstallation=file://${join(folder, "profile")}`;
    execFileSync("soffice", [profile, "--headless", ...args], { cwd: folder, stdio: "pipe", timeout: 240_000 });
  };

  beforeAll(async () => {
    folder = mkdtempSync(join(tmpdir(), "office-"));
    execFileSync(process.execPath, [join(root, "dist/capacity.js"), "new", "--demo", "--out", "plan.xlsx"], {
      cwd: folder,
      stdio: "pipe",
    });
    execFileSync(process.execPath, [join(root, "dist/capacity.js"), "handover", "plan.xlsx", "--out", "copy.xlsx"], {
      cwd: folder,
      stdio: "pipe",
    });
    book = await loadBook(new Uint8Array(readFileSync(join(folder, "copy.xlsx"))));
    office("--convert-to", ALL_SHEETS, "copy.xlsx");
  }, 300_000);
  afterAll(() => rmSync(folder, { recursive: true, force: true }));

  const shown = (sheet: string): string[][] =>
    Papa.parse<string[]>(readFileSync(join(folder, `copy-${sheet}.csv`), "utf8"), { skipEmptyLines: false }).data;

  test("every sheet opens, none with an error", () => {
    const files = readdirSync(folder).filter((name) => name.endsWith(".csv"));
    expect(files).toHaveLength(book.worksheets.length);
    for (const name of files) {
      const cells = Papa.parse<string[]>(readFileSync(join(folder, name), "utf8")).data.flat();
      // The method statements speak of errors; a cell that is one holds nothing else.
      expect({
        name,
        errors: cells.filter((cell) => /^(#NAME\?|#VALUE!|#REF!|#N\/A|#DIV\/0!|Err:\d+)$/.test(cell)),
      }).toEqual({
        name,
        errors: [],
      });
    }
  });

  // Percentages are written with their sign even as raw values.
  const numberOf = (text: string): number => (text.endsWith("%") ? Number(text.slice(0, -1)) / 100 : Number(text));

  test.each(["Traffic", "Plan", "Summary", "Expansion", "Checks"])("%s shows the values that were computed", (name) => {
    const sheet = book.getWorksheet(name)!;
    const cells = shown(name);
    let compared = 0;
    const differing: string[] = [];
    for (let row = 5; row <= sheet.rowCount; row++) {
      for (let column = 1; column <= sheet.columnCount; column++) {
        const value = plainValue(sheet, row, column);
        const text = cells[row - 1]?.[column - 1] ?? "";
        let same: boolean;
        if (typeof value === "number") {
          // A percentage is written with so many decimals only.
          same = Math.abs(numberOf(text) - value) <= 1e-9 * Math.abs(value) + 1e-20;
          compared++;
        } else same = text === (typeof value === "boolean" ? String(value).toUpperCase() : String(value ?? ""));
        if (!same) differing.push(`row ${row}, column ${column}: ${String(value)} shows as ${text}`);
      }
    }
    expect(differing).toEqual([]);
    expect(compared).toBeGreaterThan(10);
  });

  test("charts are drawn: the dashboard's page is more than its text", () => {
    office("--convert-to", "pdf", "copy.xlsx");
    const pages = execFileSync("pdftotext", ["-layout", join(folder, "copy.pdf"), "-"], {
      encoding: "utf8",
      maxBuffer: 1 << 28,
    }).split("\f");
    const page = pages.findIndex((text) => text.trimStart().startsWith("Dashboard"));
    expect(page).toBeGreaterThan(0);
    expect(pages[page]).toContain("Carriers needed and installed");
    execFileSync("pdftoppm", [
      "-r",
      "40",
      "-f",
      String(page + 1),
      "-l",
      String(page + 1),
      join(folder, "copy.pdf"),
      join(folder, "page"),
    ]);
    const image = readFileSync(
      join(
        folder,
        readdirSync(folder).find((name) => name.startsWith("page"))!,
      ),
    );
    const header = /^P6\s+(\d+)\s+(\d+)\s+255\s/.exec(image.toString("latin1", 0, 40))!;
    const pixels = image.subarray(header[0].length);
    let coloured = 0;
    for (let i = 0; i + 2 < pixels.length; i += 3) if (Math.abs(pixels[i]! - pixels[i + 2]!) > 60) coloured++;
    expect(coloured).toBeGreaterThan(500);
  }, 300_000);
});
