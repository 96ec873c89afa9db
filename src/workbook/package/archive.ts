/** An .xlsx file as its parts, opened with care: it may be damaged, protected, or made to do harm. */
import { strFromU8, strToU8, unzipSync, zipSync } from "fflate";
import { WorkbookFailure } from "../failure";

/** Limits of what is opened; a plan of 100,000 rows stays far below them. */
const LARGEST_FILE_BYTES = 200_000_000;
const LARGEST_UNPACKED_BYTES = 1_000_000_000;
const MOST_PARTS = 5_000;

const ZIP = [0x50, 0x4b];
/** Old .xls files and password-protected ones come in this container. */
const COMPOUND = [0xd0, 0xcf, 0x11, 0xe0];

function startsWith(bytes: Uint8Array, start: readonly number[]): boolean {
  return start.every((byte, i) => bytes[i] === byte);
}

export class Package {
  private constructor(private readonly parts: Map<string, Uint8Array>) {}

  /**
   * Opens a workbook file.
   *
   * @throws WorkbookFailure saying in one line why it cannot be opened
   */
  static open(bytes: Uint8Array): Package {
    if (startsWith(bytes, COMPOUND)) {
      throw new WorkbookFailure(
        "the workbook is protected by a password or in the old .xls form; save it as .xlsx without a password.",
      );
    }
    if (!startsWith(bytes, ZIP)) throw new WorkbookFailure("this is not an .xlsx workbook.");
    if (bytes.length > LARGEST_FILE_BYTES) {
      throw new WorkbookFailure(`the workbook has ${bytes.length} bytes; at most ${LARGEST_FILE_BYTES} are opened.`);
    }
    let unpacked = 0;
    let count = 0;
    let files: Record<string, Uint8Array>;
    try {
      files = unzipSync(bytes, {
        filter({ name, originalSize }) {
          unpacked += originalSize;
          count++;
          if (unpacked > LARGEST_UNPACKED_BYTES) {
            throw new WorkbookFailure(
              `the workbook unpacks to more than ${LARGEST_UNPACKED_BYTES} bytes (at ${name}).`,
            );
          }
          if (count > MOST_PARTS) throw new WorkbookFailure(`the workbook has more than ${MOST_PARTS} parts.`);
          return true;
        },
      });
    } catch (fault) {
      if (fault instanceof WorkbookFailure) throw fault;
      throw new WorkbookFailure("the workbook is damaged: its archive cannot be unpacked.");
    }
    const opened = new Package(new Map(Object.entries(files)));
    for (const part of ["[Content_Types].xml", "xl/workbook.xml", "xl/_rels/workbook.xml.rels"]) {
      if (!opened.parts.has(part)) throw new WorkbookFailure(`the workbook is damaged: it lacks the part ${part}.`);
    }
    for (const [name, part] of opened.parts) {
      // No workbook needs a document type, and entities in one can be made to explode.
      if (/\.(xml|rels|vml)$/.test(name) && strFromU8(part.subarray(0, 2000)).includes("<!DOCTYPE")) {
        throw new WorkbookFailure(`the workbook's part ${name} declares a document type, which is refused.`);
      }
    }
    return opened;
  }

  names(): string[] {
    return [...this.parts.keys()];
  }

  has(name: string): boolean {
    return this.parts.has(name);
  }

  text(name: string): string {
    const part = this.parts.get(name);
    if (!part) throw new WorkbookFailure(`the workbook is damaged: it lacks the part ${name}.`);
    return strFromU8(part);
  }

  set(name: string, text: string): void {
    this.parts.set(name, strToU8(text));
  }

  remove(name: string): void {
    this.parts.delete(name);
  }

  bytes(): Uint8Array {
    return zipSync(Object.fromEntries(this.parts), { level: 6 });
  }
}
