import {
  LTE_TABLE,
  lteEfficiency,
  NR_TABLE_NAMES,
  NR_TABLES,
  nrEfficiency,
} from "../../../src/model/standards/channel-quality";
import { published, title } from "../../checks/published";
import printed from "../../fixtures/standards/printed.json";

describe("published values", () => {
  const tables: [prefix: string, name: string][] = [
    ["OF-C", "cqi1"],
    ["OF-D", "cqi2"],
    ["OF-F", "cqi3"],
    ["OF-M", "mcs1"],
    ["OF-Q", "mcs2"],
  ];
  const all = tables.flatMap(([prefix, name]) =>
    published(prefix).map((entry) => [title(entry), name, entry] as const),
  );
  test.each(all)("%s, %s", (_, name, { inputs, expected, tolerance }) => {
    expect(Math.abs(nrEfficiency(inputs.index as number, name) - expected)).toBeLessThanOrEqual(tolerance!);
    const table = NR_TABLES[name as "cqi1"];
    expect(table.rows[(inputs.index as number) - table.first]).toEqual([inputs.Qm, inputs.Rx1024]);
  });
});

describe("every row against the printed efficiency and modulation of the standard", () => {
  test.each(NR_TABLE_NAMES)("%s", (name) => {
    const column = printed.efficiency[name];
    const { first, rows } = NR_TABLES[name];
    expect(rows.length).toBe(column.length);
    column.forEach((efficiency, i) => expect(nrEfficiency(first + i, name).toFixed(4)).toBe(efficiency.toFixed(4)));
    const changes = rows.flatMap(([bits], i) => (bits === rows[i - 1]?.[0] ? [] : [[bits, first + i]]));
    expect(changes).toEqual(printed.modulation[name]);
  });

  test("LTE's first table has the same rows", () => {
    expect(LTE_TABLE.rows.length).toBe(15);
    for (let cqi = 1; cqi <= 15; cqi++) expect(lteEfficiency(cqi)).toBe(nrEfficiency(cqi));
  });
});

test("efficiency grows with the index, but for the two overlaps of modulations in the standard", () => {
  for (const name of NR_TABLE_NAMES) {
    const { first, rows } = NR_TABLES[name];
    const falls = rows.flatMap((_, i) =>
      i > 0 && nrEfficiency(first + i, name) < nrEfficiency(first + i - 1, name) ? [first + i] : [],
    );
    // In table 1 index 17 begins 64QAM a little below the last of 16QAM.
    expect(falls).toEqual(name === "mcs1" ? [17] : []);
  }
});

test.each([
  [() => nrEfficiency(0), "index is 0; allowed: a whole index from 1 to 15 (TS 38.214 table 5.2.2.1-2)."],
  [() => nrEfficiency(16, "cqi3"), "index is 16"],
  [() => nrEfficiency(28, "mcs2"), "index is 28; allowed: a whole index from 0 to 27 (TS 38.214 table 5.1.3.1-2)."],
  [() => nrEfficiency(1.5), "index is 1.5"],
  [() => nrEfficiency(1, "mcs9"), 'table is the text "mcs9"; allowed: "cqi1", "cqi2", "cqi3", "cqi4", "mcs1"'],
  [() => lteEfficiency(0), "cqi is 0; allowed: a whole index from 1 to 15 (TS 36.213 table 7.2.3-1)."],
])("bad input %# is named", (call, message) => {
  expect(call).toThrow(message);
});
