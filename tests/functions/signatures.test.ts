/** Names and parameter order are fixed: workbooks in the field depend on them. signatures.txt lists them all. */
import { readFileSync } from "node:fs";
import { join } from "node:path";
import texts from "../../functions/generated/texts.json";

const released = readFileSync(join(__dirname, "signatures.txt"), "utf8").trim().split("\n");
const current = new Map(
  texts.map(({ id, parameters }) => [id, parameters.map(({ name, optional }) => (optional ? `[${name}]` : name))]),
);

test.each(released)("%s", (line) => {
  const [, id, list] = /^([A-Z0-9.]+)\((.*)\)$/.exec(line)!;
  const parameters = current.get(id!);
  // Functions that spill several numbers end with a switch for headings.
  const named = parameters?.at(-1) === "[labels]" ? parameters.slice(0, -1) : parameters;
  expect(named?.join(", ")).toBe(list);
});

test("every function is in the list, so that a rename is noticed", () => {
  const listed = new Set(released.map((line) => line.slice(0, line.indexOf("("))));
  expect([...current.keys()].filter((id) => !listed.has(id))).toEqual([]);
});
