import { functionTable } from "../../functions/generated/function-table";
import texts from "../../functions/generated/texts.json";
import { CellError } from "../../src/sheet/cell-error";

const methodText = (name: unknown): unknown => functionTable["METHOD.TEXT"]!.call([[[name]]])[0]![0];

test.each(texts.map(({ id }) => id))("the text of %s holds its method and source", (id) => {
  const entry = texts.find((text) => text.id === id)!;
  const text = methodText(id) as string;
  for (const part of [entry.description, entry.method, entry.source]) expect(text).toContain(part);
  for (const parameter of entry.parameters) expect(text).toContain(`${parameter.name}: `);
});
test("names are taken in any case, with or without namespace, as a formula too", () => {
  const plain = methodText("ERLANGB.BLOCKING");
  for (const name of ["cap.erlangb.blocking", "=CAP.ERLANGB.BLOCKING(A1,B1)", " ErlangB.Blocking "]) {
    expect(methodText(name)).toBe(plain);
  }
});
test("an unknown name is an error that helps", () => {
  const answer = methodText("ERLANGB.BLOKING") as CellError;
  expect(answer.code).toBe("#VALUE!");
  expect(answer.message).toContain("ERLANGB.BLOCKING");
  expect((methodText("__proto__") as CellError).code).toBe("#VALUE!");
});
