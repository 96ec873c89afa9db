import { functionTable } from "../../functions/generated/function-table";
import texts from "../../functions/generated/texts.json";
import { CellError } from "../../src/sheet/cell-error";
import { parseExample, printedTolerance } from "../support/worked-example";

const examples = texts.flatMap(({ id, examples }) => examples.map((example) => [id, example] as const));

test("every function has a worked example of its own", () => {
  const without = texts.filter(({ id, examples }) => !examples.some((example) => example.startsWith(`=CAP.${id}(`)));
  expect(without.map(({ id }) => id)).toEqual([]);
});

test.each(examples)("%s: %s", (_, example) => {
  const { id, args, printed } = parseExample(example);
  const answer = functionTable[id]!.call(args)[0]![0];
  if (answer instanceof CellError) throw new Error(`${answer.code} ${answer.message}`);
  if (printed === "text") expect(typeof answer === "string" && answer.length > 0).toBe(true);
  else if (printed.startsWith('"')) expect(answer).toBe(printed.slice(1, -1));
  else if (/^(TRUE|FALSE)$/.test(printed)) expect(answer).toBe(printed === "TRUE");
  else expect(Math.abs((answer as number) - Number(printed))).toBeLessThanOrEqual(printedTolerance(printed));
});
