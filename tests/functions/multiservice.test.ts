/** How answers of several services and several numbers spill. */
import { handoverBlocking, handoverGuard } from "../../functions/handover";
import { multiserviceBlocking, multiservicePeaky, multiserviceUnits } from "../../functions/multiservice";
import { sharingThroughput } from "../../functions/sharing";
import { CellError } from "../../src/sheet/cell-error";

const column = (...values: unknown[]): unknown[][] => values.map((value) => [value]);
const numbers = (cells: any[][]): any[][] =>
  cells.map((row) => row.map((cell) => (typeof cell === "number" ? Math.round(cell * 1e4) / 1e4 : cell)));

test("blocking lies where the services lie, and blank services stay blank", () => {
  const traffic = column(10, null, 2, 0.5);
  const width = column(1, null, 4, 8);
  expect(numbers(multiserviceBlocking([[32]], traffic, width))).toEqual(column(0.0224, "", 0.1072, 0.2645));
  expect(numbers(multiserviceBlocking([[32]], [[10, 2, 0.5]], [[1, 4, 8]]))).toEqual([[0.0224, 0.1072, 0.2645]]);
});

test("a blank reservation is none, and a heading comes first on request", () => {
  const [traffic, width] = [column(6, 1.5), column(1, 4)];
  const reserved = multiserviceBlocking([[20]], traffic, width, column(3, null), [[true]]);
  expect(numbers(reserved)[0]).toEqual(["blocking"]);
  expect(numbers(reserved)[1]).toEqual([0.1016]);
  expect(multiserviceBlocking([[20]], traffic, width, column(null, null))).toEqual(
    multiserviceBlocking([[20]], traffic, width),
  );
});

test("three congestions a service, side by side", () => {
  const answer = multiservicePeaky([[10]], column(3, 1.2), column(1, 2), column(1, 0.8), [[true]]);
  expect(answer.map((row) => row.length)).toEqual([3, 3, 3]);
  expect(answer[0]).toEqual(["timeCongestion", "callCongestion", "trafficCongestion"]);
});

test("one target serves every service", () => {
  const [traffic, width] = [column(10, 2), column(1, 4)];
  expect(multiserviceUnits(traffic, width, [[0.01]])).toEqual(multiserviceUnits(traffic, width, column(0.01, 0.01)));
});

test("new calls and handovers side by side, a row for each cell", () => {
  const answer = handoverBlocking(column(20, 5), column(2, 1), column(30, 10), column(2, 1), [[true]]);
  expect(numbers(answer)).toEqual([
    ["newCallBlocking", "handoverFailure"],
    [0.0415, 0.0002],
    [0.082, 0.0075],
  ]);
});

test("errors say which kind they are and why", () => {
  const guard = handoverGuard([[1]], column(50, 1), [[40]], [[0.01]]);
  expect(guard[0]![0]).toBeInstanceOf(CellError);
  expect((guard[0]![0] as CellError).code).toBe("#N/A");
  expect((guard[0]![0] as CellError).message).toContain("50 erlang");
  expect(guard[1]![0]).toBe(0);
  const sharing = sharingThroughput([[10]], column(8, 12), [[null]]);
  expect(sharing[0]![0]).toBe(2);
  expect((sharing[1]![0] as CellError).code).toBe("#N/A");
  const tooMany = handoverBlocking([[1]], [[1]], [[5]], [[6]]);
  expect((tooMany[0]![0] as CellError).code).toBe("#VALUE!");
  expect((tooMany[0]![0] as CellError).message).toContain("guardChannels is 6");
});
