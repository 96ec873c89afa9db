import fc from "fast-check";
import { domain, finite, nonNegative, positive, probability } from "../../src/model/domain";
import { NoAnswerError } from "../../src/model/errors";
import {
  choice,
  flag,
  grid,
  list,
  number,
  optionalChoice,
  optionalNumber,
  optionalParallel,
  parallel,
  perCell,
  perCellRow,
  perItem,
  text,
  wholeTable,
} from "../../src/sheet/call";
import { CellError } from "../../src/sheet/cell-error";

type Cells = unknown[][];

const ratio = (a: number, b: number): number => a / b;
const divide = (a: Cells, b: Cells): unknown[][] =>
  perCell(ratio, { trafficE: number(a, nonNegative), channels: number(b, positive) });
const column = (...values: unknown[]): Cells => values.map((value) => [value]);

function error(cell: unknown): CellError {
  expect(cell).toBeInstanceOf(CellError);
  return cell as CellError;
}

describe("shapes", () => {
  test("a single cell with a single cell gives a single cell", () => {
    expect(divide([[6]], [[3]])).toEqual([[2]]);
  });
  test("a row with a column gives a table", () => {
    expect(divide([[6, 12]], [[1], [2], [3]])).toEqual([
      [6, 12],
      [3, 6],
      [2, 4],
    ]);
  });
  test("equal shapes go cell by cell", () => {
    expect(divide([[6, 12]], [[2, 3]])).toEqual([[3, 4]]);
  });
  test("a table with a row or a column spreads it", () => {
    expect(
      divide(
        [
          [2, 4],
          [6, 8],
        ],
        [[1, 2]],
      ),
    ).toEqual([
      [2, 2],
      [6, 4],
    ]);
    expect(
      divide(
        [
          [2, 4],
          [6, 8],
        ],
        [[1], [2]],
      ),
    ).toEqual([
      [2, 4],
      [3, 4],
    ]);
  });
  test("other shapes are #VALUE! and name the parameter that does not fit", () => {
    const cell = error(divide([[1], [2]], [[1], [2], [3]])[0]![0]);
    expect(cell.code).toBe("#VALUE!");
    expect(cell.message).toContain("trafficE has 2 rows");
  });

  const side = fc.constantFrom(1, 2, 3, 4);
  const cells = fc.record({ rows: side, columns: side }).chain(({ rows, columns }) =>
    fc.array(fc.array(fc.double({ min: 0.5, max: 1e6, noNaN: true }), { minLength: columns, maxLength: columns }), {
      minLength: rows,
      maxLength: rows,
    }),
  );
  test("every pair of shapes combines as the spreadsheet's own arrays, or is one #VALUE!", () => {
    fc.assert(
      fc.property(cells, cells, (a, b) => {
        const out = divide(a, b);
        const rows = Math.max(a.length, b.length);
        const columns = Math.max(a[0]!.length, b[0]!.length);
        const fits = [a, b].every((m) => [1, rows].includes(m.length) && [1, columns].includes(m[0]!.length));
        if (!fits) {
          expect(out).toHaveLength(1);
          expect(error(out[0]![0]).code).toBe("#VALUE!");
          return;
        }
        expect(out).toHaveLength(rows);
        for (let r = 0; r < rows; r++) {
          for (let c = 0; c < columns; c++) {
            const at = (m: number[][]): number => m[m.length === 1 ? 0 : r]![m[0]!.length === 1 ? 0 : c]!;
            expect(out[r]![c]).toBe(at(a) / at(b));
          }
        }
      }),
      { seed: 20261201, numRuns: 500 },
    );
  });
  test("three and more parameters combine too", () => {
    const sum = (a: number, b: number, c: number, d: number): number => a + 10 * b + 100 * c + 1000 * d;
    const out = perCell(sum, {
      a: number([[1], [2]], finite),
      b: number([[1, 2]], finite),
      c: number([[3]], finite),
      d: number(
        [
          [4, 5],
          [6, 7],
        ],
        finite,
      ),
    });
    expect(out).toEqual([
      [4311, 5321],
      [6312, 7322],
    ]);
  });
});

describe("missing values", () => {
  test.each([
    ["null", null],
    ["an empty text", ""],
    ["spaces", "  "],
    ["undefined", undefined],
  ])("%s in every input gives an empty text", (_, empty) => {
    expect(divide([[empty]], [[empty]])).toEqual([[""]]);
  });
  test("0 in every input counts as empty where one of them cannot be 0", () => {
    expect(divide([[0]], [[0]])).toEqual([[""]]);
  });
  test("0 in every input is computed where all of them can be 0", () => {
    const sum = perCell((a: number, b: number) => a + b + 1, {
      a: number([[0]], nonNegative),
      b: number([[0]], nonNegative),
    });
    expect(sum).toEqual([[1]]);
  });
  test.each([
    ["null", null],
    ["an empty text", ""],
    ["0 where 0 is not allowed", 0],
  ])("one missing input among filled ones is an error that names it: %s", (_, empty) => {
    const cell = error(divide([[5]], [[empty]])[0]![0]);
    expect(cell.code).toBe("#VALUE!");
    expect(cell.message).toMatch(/^channels is missing; allowed: a number above 0/);
  });
  test("beside null a 0 is a filled cell, so the null is what is missing", () => {
    expect(error(divide([[0]], [[null]])[0]![0]).message).toContain("channels is missing");
  });
  test("a long column beside a constant is blank where its cell is blank", () => {
    expect(divide(column(6, null, "", 9), [[3]])).toEqual(column(2, "", "", 3));
    expect(divide([[6]], column(2, 0, null, 3))).toEqual(column(3, "", "", 2));
  });
  test("two columns are blank only where both are", () => {
    const out = divide(column(6, null, null), column(2, null, 4));
    expect(out.slice(0, 2)).toEqual([[3], [""]]);
    expect(error(out[2]![0]).message).toContain("trafficE is missing");
  });
  test("a blank optional parameter takes its default, given as null, empty text, nothing or a 0 that cannot be meant", () => {
    const scaled = (cells: Cells | undefined): unknown[][] =>
      perCell((a: number, k: number) => a * k, { a: number([[7]], finite), k: optionalNumber(cells, positive, 3) });
    for (const empty of [undefined, [[null]], [[""]], [[0]]]) expect(scaled(empty)).toEqual([[21]]);
    expect(scaled([[2]])).toEqual([[14]]);
  });
  test("an optional parameter without default reaches the model as undefined", () => {
    const seen: unknown[] = [];
    perCell((a: number, snrDb?: number) => (seen.push(snrDb), a), {
      a: number([[1]], finite),
      snrDb: optionalNumber([[null]], finite),
    });
    expect(seen).toEqual([undefined]);
  });
  test("a whole column that is mostly empty is answered quickly", () => {
    const cells: Cells = Array.from({ length: 1_048_576 }, (_, i) => [i < 3 ? 6 : null]);
    const out = divide(cells, [[3]]);
    expect(out).toHaveLength(1_048_576);
    expect(out[2]).toEqual([2]);
    expect(out[1_048_575]).toEqual([""]);
  });
});

describe("errors per cell", () => {
  test("one bad row in a long column spoils only itself", () => {
    const cells: Cells = Array.from({ length: 10_000 }, (_, i) => [i + 1]);
    cells[5000] = ["twelve"];
    cells[7000] = [-4];
    const out = divide(cells, [[2]]);
    expect(error(out[5000]![0]).message).toBe('trafficE is the text "twelve"; allowed: a number of at least 0.');
    expect(error(out[7000]![0]).message).toBe("trafficE is -4; allowed: a number of at least 0.");
    expect(out.filter(([cell]) => cell instanceof CellError)).toHaveLength(2);
    expect(out[9999]).toEqual([5000]);
  });
  test("the same in two columns that both vary", () => {
    const out = divide(column(1, "x", 3), column(1, 1, -1));
    expect(out[0]).toEqual([1]);
    expect(error(out[1]![0]).message).toContain("trafficE");
    expect(error(out[2]![0]).message).toContain("channels is -1");
  });
  test.each([true, "5", NaN, Infinity, -Infinity, {}, []])("%p is no number", (wrong) => {
    expect(error(divide([[wrong]], [[2]])[0]![0]).code).toBe("#VALUE!");
  });
  test("an error that comes in goes out unchanged", () => {
    const incoming = new CellError("#N/A", "none");
    expect(divide([[incoming]], [[2]])[0]![0]).toBe(incoming);
    expect(divide(column(4, incoming), [[2]])[1]![0]).toBe(incoming);
  });
  test("valid inputs without an answer are #N/A with the model's message", () => {
    const none = (): number => {
      throw new NoAnswerError("12 erlang on 10 channels never settle");
    };
    const cell = error(perCell(none, { a: number([[1]], finite) })[0]![0]);
    expect(cell.code).toBe("#N/A");
    expect(cell.message).toContain("12 erlang");
  });
  test.each([NaN, Infinity, -Infinity])("a result of %p never reaches a cell", (result) => {
    expect(error(perCell(() => result, { a: number([[1]], finite) })[0]![0]).code).toBe("#N/A");
    expect(error(perCell(() => result, { a: number([[1], [2]], finite) })[1]![0]).code).toBe("#N/A");
  });
  test("open and closed ends of a domain hold to the last bit", () => {
    const inside = (value: number): unknown => perCell((p: number) => p, { p: number([[value]], probability) })[0]![0];
    expect(inside(1 - 2 ** -53)).toBe(1 - 2 ** -53);
    expect(inside(Number.MIN_VALUE)).toBe(Number.MIN_VALUE);
    expect(error(inside(1)).code).toBe("#VALUE!");
    const whole = domain(-3, 3, "a whole number from -3 to 3", { whole: true, openLow: true });
    const at = (value: number): unknown => perCell((n: number) => n, { n: number([[value]], whole) })[0]![0];
    expect(at(-2)).toBe(-2);
    expect(error(at(-3)).message).toContain("from -3 to 3");
    expect(error(at(1.5)).code).toBe("#VALUE!");
  });
  test("the quick way for one varying column and the careful way agree", () => {
    const cell = fc.oneof(
      fc.double({ min: -2, max: 5, noNaN: true }),
      fc.constantFrom(null, "", 0, "x", true, undefined),
    );
    fc.assert(
      fc.property(fc.array(cell, { minLength: 2, maxLength: 6 }), fc.constantFrom(2, 4), (values, divisor) => {
        const quick = divide(column(...values), [[divisor]]);
        // A second column, constant, forces the careful way.
        const careful = perCell((a: number, b: number, k: number) => (a / b) * k, {
          trafficE: number(column(...values), nonNegative),
          channels: number([[divisor]], positive),
          k: optionalNumber(column(...values.map(() => 1)), positive, 1),
        });
        expect(quick).toEqual(careful);
      }),
      { seed: 7, numRuns: 300 },
    );
  });
});

describe("words and flags", () => {
  const pick = (cells: Cells): unknown =>
    perCell((word: string) => word, { channel: optionalChoice(cells, ["awgn", "rayleigh"], "awgn") })[0]![0];
  test("words match in any case", () => {
    expect(pick([[" Rayleigh "]])).toBe("rayleigh");
  });
  test("an unknown word lists the known ones", () => {
    expect(error(pick([["rician"]])).message).toBe('channel is the text "rician"; allowed: "awgn", "rayleigh".');
  });
  test("an empty cell takes the default, as 0 too", () => {
    for (const empty of [null, "", 0]) expect(pick([[empty]])).toBe("awgn");
  });
  test("a required word or text that is missing is blank out", () => {
    expect(perCell((w: string) => w, { w: choice([[0]], ["a"]) })).toEqual([[""]]);
    expect(perCell((w: string) => w, { w: text([[null]]) })).toEqual([[""]]);
  });
});

describe("ranges taken whole", () => {
  const sum = (values: readonly number[], k = 1): number => values.reduce((a, b) => a + b, 0) * k;
  test("blanks in a list are ignored", () => {
    expect(
      perCell(sum, {
        powersDbm: list(
          [
            [1, null],
            ["", 4],
          ],
          finite,
        ),
      }),
    ).toEqual([[5]]);
  });
  test("an empty list is blank out", () => {
    expect(perCell(sum, { powersDbm: list([[null], [""]], finite) })).toEqual([[""]]);
  });
  test("an empty list beside filled scalars is an error", () => {
    const out = perCell((k: number, values: readonly number[]) => sum(values, k), {
      k: number([[2]], finite),
      powersDbm: list([[null]], finite),
    });
    expect(error(out[0]![0]).message).toContain("powersDbm is missing");
  });
  test("a wrong item is named by its place", () => {
    const out = perCell(sum, {
      powersDbm: list(
        [
          [1, 2],
          [3, "x"],
        ],
        finite,
      ),
    });
    expect(error(out[0]![0]).message).toContain("powersDbm row 2, column 2");
  });
  test("scalars beside a list still take ranges", () => {
    expect(perCell(sum, { powersDbm: list([[1], [2]], finite), k: number([[1, 10]], finite) })).toEqual([[3, 30]]);
  });
  const weighted = (a: readonly number[], b: readonly number[]): number => a.reduce((s, x, i) => s + x * b[i]!, 0);
  test("parallel lists go place by place; blank places are dropped and a single cell serves all", () => {
    const out = perCell(weighted, {
      users: parallel(column(1, null, 3), positive),
      rate: parallel(column(10, "", 20), positive),
    });
    expect(out).toEqual([[70]]);
    expect(perCell(weighted, { users: parallel(column(1, 2), positive), rate: parallel([[5]], positive) })).toEqual([
      [15],
    ]);
  });
  test("a hole in parallel lists names list and place", () => {
    const out = perCell(weighted, {
      users: parallel(column(1, 2), positive),
      rate: parallel(column(10, null), positive),
    });
    expect(error(out[0]![0]).message).toContain("rate row 2, column 1 is missing");
  });
  test("parallel lists of unequal length are an error", () => {
    const out = perCell(weighted, {
      users: parallel(column(1, 2, 3), positive),
      rate: parallel(column(10, 1), positive),
    });
    expect(error(out[0]![0]).message).toContain("rate has 2 cells but users has 3");
  });
  test("an optional parallel list takes its default in blank places", () => {
    const out = perCell(weighted, {
      users: parallel(column(1, 2), positive),
      rate: optionalParallel(column(null, 5), positive, 4),
    });
    expect(out).toEqual([[14]]);
  });
  test("a grid drops blank rows and columns at its end and refuses holes", () => {
    const size = (m: number[][]): string => `${m.length}x${m[0]!.length}`;
    expect(
      perCell(size, {
        codes: grid(
          [
            [1, -1, null],
            [1, 1, null],
            [null, null, null],
          ],
          finite,
        ),
      }),
    ).toEqual([["2x2"]]);
    const out = perCell(size, {
      codes: grid(
        [
          [1, null],
          [1, 1],
        ],
        finite,
      ),
    });
    expect(error(out[0]![0]).message).toContain("codes row 1, column 2 is missing");
  });
});

describe("several answers", () => {
  const both = (a: number): number[] => [a, a * a];
  const names = ["one", "square"];
  test("spill to the right, a row an input row, with names on request", () => {
    expect(perCellRow(both, names, { a: number(column(2, 3), finite) })).toEqual([
      [2, 4],
      [3, 9],
    ]);
    expect(perCellRow(both, names, { a: number(column(2), finite) }, flag([[true]]))).toEqual([names, [2, 4]]);
  });
  test("a whole column of rows of answers is no too long argument list", () => {
    const cells: Cells = Array.from({ length: 300_000 }, (_, i) => [i + 1]);
    const out = perCellRow(both, names, { a: number(cells, finite) });
    expect(out).toHaveLength(300_000);
    expect(out[299_999]).toEqual([300_000, 9e10]);
  });
  test("spill downwards from a row", () => {
    expect(perCellRow(both, names, { a: number([[2, 3]], finite) }, flag([[true]]))).toEqual([
      ["one", 2, 3],
      ["square", 4, 9],
    ]);
  });
  test("refuse a table of inputs", () => {
    expect(
      error(
        perCellRow(both, names, {
          a: number(
            [
              [1, 2],
              [3, 4],
            ],
            finite,
          ),
        })[0]![0],
      ).code,
    ).toBe("#VALUE!");
  });
  test("a bad row is an error across its width and leaves the others", () => {
    const out = perCellRow(both, names, { a: number(column(2, "x", 3), finite) });
    expect(out[0]).toEqual([2, 4]);
    expect(out[1]!.every((cell) => cell instanceof CellError)).toBe(true);
    expect(out[2]).toEqual([3, 9]);
  });
  test("labels must be TRUE or FALSE", () => {
    expect(error(perCellRow(both, names, { a: number([[1]], finite) }, flag([["yes"]]))[0]![0]).message).toContain(
      "labels",
    );
  });
  const shares = (items: readonly number[]): number[] => items.map((item) => item / 10);
  test("one answer an item lies where the item lies", () => {
    expect(perItem(shares, ["share"], { items: parallel(column(1, null, 3, null), positive) })).toEqual([
      [0.1],
      [""],
      [0.3],
    ]);
    expect(perItem(shares, ["share"], { items: parallel([[1, null, 3]], positive) })).toEqual([[0.1, "", 0.3]]);
    expect(perItem(shares, ["share"], { items: parallel(column(1, 2), positive) }, flag([[true]]))).toEqual([
      ["share"],
      [0.1],
      [0.2],
    ]);
  });
  test("a whole table is padded and its cells made safe", () => {
    const out = wholeTable((rows: readonly number[]) => [["h", "i"], [rows[0]], [NaN, null]], {
      rows: list([[1]], finite),
    });
    expect(out.slice(0, 2)).toEqual([
      ["h", "i"],
      [1, ""],
    ]);
    expect(error(out[2]![0]).code).toBe("#N/A");
    expect(out[2]![1]).toBe("");
  });
});
