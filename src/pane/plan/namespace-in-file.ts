/** A saved workbook names our functions with their namespace; a development copy has another one. */
import { Package } from "../../workbook/package/archive";

/** The file with every stored function name under another namespace. */
export function renameNamespace(file: Uint8Array, from: string, to: string): Uint8Array {
  if (from === to) return file;
  const opened = Package.open(file);
  const stored = new RegExp(`_xldudf_${from}_`, "g");
  for (const name of opened.names()) {
    if (!/^xl\/(worksheets\/[^/]+|workbook)\.xml$/.test(name)) continue;
    opened.set(name, opened.text(name).replace(stored, `_xldudf_${to}_`));
  }
  return opened.bytes();
}
