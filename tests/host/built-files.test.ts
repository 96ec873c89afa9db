/** The built files as the spreadsheet program sees them. */
import { metadata, StandIn, type HostError } from "./stand-in";

const desktop = new StandIn(0);
const web = new StandIn(null);
const hosts: [string, StandIn][] = [
  ["desktop, empty cell 0", desktop],
  ["web, empty cell null", web],
];

// The host gathers calls for half a second, so that calls in one go cost that once.
test("every function of functions.json is associated, once", async () => {
  expect(metadata.functions.length).toBeGreaterThan(100);
  expect(desktop.warnings).toEqual([]);
  const answers = await Promise.all(
    metadata.functions.map(({ id, parameters }) =>
      desktop.call(
        id,
        parameters.filter(({ optional }) => !optional).map(() => [[null]]),
      ),
    ),
  );
  answers.forEach(([[cell]]: any, i) => {
    expect({ id: metadata.functions[i]!.id, cell }).toEqual({ id: metadata.functions[i]!.id, cell: expect.anything() });
    expect((cell as HostError).error).not.toBe("#NAME?");
  });
});

test("no function answers wrong text with a number", async () => {
  const taking = metadata.functions.filter(({ parameters }) => parameters.length > 0);
  const answers = await Promise.all(
    taking.map(({ id, parameters }) =>
      web.call(
        id,
        parameters.map(() => [["§ not an input §"]]),
      ),
    ),
  );
  answers.forEach((out, i) => {
    const first = out[0]![0] as HostError;
    const { id } = taking[i]!;
    expect({ id, error: first.error, told: (first.message ?? "").length > 0 }).toEqual({
      id,
      error: "#VALUE!",
      told: true,
    });
    expect(first.message).not.toContain("Internal fault");
  });
});

describe.each(hosts)("%s", (_, host) => {
  test("a scalar, a range and a spill", async () => {
    expect(await host.call("ERLANGB.CHANNELS", [10, 0.01])).toEqual([[18]]);
    expect(await host.call("ERLANGB.CHANNELS", [[[1], [10]], [[0.01, 0.1]]])).toEqual([
      [5, 3],
      [18, 13],
    ]);
  });
  test("blank in, blank out", async () => {
    expect(await host.call("ERLANGB.CHANNELS", [[[null]], [[null]]])).toEqual([[""]]);
  });
  test("a missing input is named", async () => {
    const [[cell]] = (await host.call("ERLANGB.CHANNELS", [10, [[null]]])) as [[HostError]];
    expect(cell.error).toBe("#VALUE!");
    expect(cell.message).toContain("blocking");
  });
  test("one bad row in a spill keeps its message and spoils no other", async () => {
    const out = await host.call("ERLANGB.CHANNELS", [[[10], ["x"], [12]], 0.01]);
    expect(out[0]).toEqual([18]);
    expect((out[1]![0] as HostError).message).toContain("trafficE");
    expect(typeof out[2]![0]).toBe("number");
  });
  test("no answer is #N/A with a message", async () => {
    const [[cell]] = (await host.call("ERLANGC.DELAYED", [12, 10])) as [[HostError]];
    expect(cell.error).toBe("#N/A");
    expect(cell.message).toContain("12");
  });
  test("an optional argument may be left out or empty", async () => {
    const left = await host.call("NOISE.FLOOR", [10, 5]);
    expect(await host.call("NOISE.FLOOR", [10, 5, [[null]]])).toEqual(left);
    expect(await host.call("NOISE.FLOOR", [10, 5, 290])).toEqual(left);
  });
});

test("ten thousand independent calls in one go", async () => {
  const calls = Array.from({ length: 10_000 }, (_, i) => web.call("ERLANGB.BLOCKING", [i / 100, 20]));
  const answers = await Promise.all(calls);
  expect(answers.every(([[cell]]: any) => typeof cell === "number" && cell >= 0 && cell <= 1)).toBe(true);
});

test("a table beyond the host's limit is refused with advice, by the add-in only", async () => {
  const wide = Array.from({ length: 100_000 }, (_, i) => [`area ${i}`, 2027, 100, "planner's note of some length"]);
  const [[cell]] = (await web.call("PLAN.DEMAND", [[["area", "year", "users", "note"], ...wide], [["service"]]])) as [
    [HostError],
  ];
  expect(cell.error).toBe("#N/A");
  expect(cell.message).toContain("one year at a time");
});
