import { codeCorrelation, codePeak, codeSequence } from "../../functions/code";
import { receiverSinr } from "../../functions/receiver";
import { nearfarRange } from "../../functions/nearfar";
import { timingEfficiency, timingRadius } from "../../functions/timing";
import { CellError } from "../../src/sheet/cell-error";

const error = (cell: unknown): string => `${(cell as CellError).code} ${(cell as CellError).message}`;

test("a column of indices spills a table of codes that the other functions take whole", () => {
  const gold = codeSequence(
    [["Gold"]],
    [[31]],
    Array.from({ length: 33 }, (_, index) => [index]),
  );
  expect(gold.length).toBe(33);
  expect(gold.every((row) => row.length === 31)).toBe(true);
  expect(codePeak(gold)[0]![0]).toBeCloseTo(9 / 31, 12);
  expect(codeCorrelation([gold[0]!], [gold[1]!], [[0], [0.5], [1]]).length).toBe(3);
});

test("index 0 is an index, not an empty cell", () => {
  expect(codeSequence([["walsh"]], [[4]], [[0]])).toEqual([[1, 1, 1, 1]]);
});

test("a length that a family lacks is an error beside rows that exist", () => {
  const table = codeSequence([["gold"]], [[31], [15]], [[0]]);
  expect(table[0]!.length).toBe(31);
  expect(error(table[1]![0])).toBe('#VALUE! length is 15; allowed: for "gold" 7, 31, 63, 127, 511, 1023.');
});

test("codes may lie in a column, and empty cells at the end do not count", () => {
  expect(codeCorrelation([[1], [-1], [null]], [[1], [-1], [""]], [[0]])).toEqual([[1]]);
});

describe("a column of ratios, one for each row of codes", () => {
  const codes = codeSequence([["gold"]], [[7]], [[0], [1], [2]]);

  test("powers and delays in rows or columns, or one for all", () => {
    const column = receiverSinr(codes, [[-90], [-95], [-100]], [[0], [1], [2.5]], [[-110]], [["MMSE"]]);
    expect(column.map((row) => row.length)).toEqual([1, 1, 1]);
    expect(receiverSinr(codes, [[-90, -95, -100]], [[0, 1, 2.5]], [[-110]], [["mmse"]])).toEqual(column);
    const equal = receiverSinr(codes, [[-90]], [[0]], [[-110]]);
    expect(equal.length).toBe(3);
    expect(receiverSinr(codes, [[-90], [-90], [-90]], [[0]], [[-110]], [[null]])).toEqual(equal);
  });

  test("blank rows below the codes and their powers are left out", () => {
    const blank = new Array<unknown>(7).fill(null);
    const short = receiverSinr(codes, [[-90], [-95], [-100]], [[0], [1], [2.5]], [[-110]]);
    expect(
      receiverSinr([...codes, blank, blank], [[-90], [-95], [-100], [null]], [[0], [1], [2.5], [null]], [[-110]]),
    ).toEqual(short);
  });

  test("users that cannot be separated are #N/A, the others keep their answers", () => {
    const answers = receiverSinr([...codes, codes[0]!], [[-90]], [[0]], [[-110]], [["decorrelating"]]);
    expect(answers.map(([cell]) => cell instanceof CellError)).toEqual([true, false, false, true]);
    expect(error(answers[3]![0])).toMatch(/^#N\/A The code of row 4/);
  });

  test("all blank is blank; lists that do not match are an error", () => {
    expect(receiverSinr([[null]], [[null]], [[null]], [[null]])).toEqual([[""]]);
    expect(error(receiverSinr(codes, [[-90], [-95]], [[0]], [[-110]])[0]![0])).toContain(
      "number of powersDbm is 2; allowed: 3, one for each row of codes",
    );
  });
});

test("timing and distance: optional cells, errors with the allowed range", () => {
  expect(timingRadius([[30.46]], [[null]], [[""]])[0]![0]).toBeCloseTo(4.566, 3);
  expect(timingRadius([[0]], [[63]], [[48 / 13]])[0]![0]).toBeCloseTo(34.868, 3);
  expect(error(timingEfficiency([[500]], [[600]])[0]![0])).toContain(
    "guardUs is 600; allowed: a guard time up to the slot",
  );
  expect(error(nearfarRange([[2]], [[1]], [[4]])[0]![0])).toContain("farKm is 1");
});
