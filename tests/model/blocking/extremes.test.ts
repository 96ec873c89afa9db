/** Far from the middle of their domains, where sums, differences and logarithms would cost digits. */
import * as abandon from "../../../src/model/blocking/abandon";
import * as erlangC from "../../../src/model/blocking/erlang-c";
import * as message from "../../../src/model/blocking/message";
import * as overflow from "../../../src/model/blocking/overflow";
import { excessOf } from "../../../src/model/blocking/overflow-moments";
import * as priority from "../../../src/model/blocking/priority";
import * as queue from "../../../src/model/blocking/queue";
import * as retry from "../../../src/model/blocking/retry";
import reference from "../../fixtures/blocking/extremes.json";
import { relativeError } from "../../support/relative-error";

const BOUND = 1e-12;

type Column = readonly [name: string, model: (...inputs: number[]) => number, at: number];

/** Each row holds its inputs first; the worst row is shown with them where it fails. */
function check(rows: number[][], inputs: number, columns: readonly Column[]): void {
  test.each(columns)("%s", (_name, model, at) => {
    expect(rows.length).toBeGreaterThan(30);
    for (const row of rows) {
      const actual = model(...row.slice(0, inputs));
      if (!(relativeError(actual, row[at]!) < BOUND))
        expect([...row.slice(0, inputs), actual]).toEqual([...row.slice(0, inputs), row[at]]);
    }
  });
}

const model = (fn: (...inputs: never[]) => number): ((...inputs: number[]) => number) =>
  fn as (...inputs: number[]) => number;

describe("Erlang C from an empty to a full group, up to ten million channels", () => {
  check(reference.delayed, 2, [["delayed", model(erlangC.delayed), 2]]);
});

describe("finite queues, from rare losses to overload", () => {
  check(reference.queue, 3, [
    ["lost", model(queue.lost), 3],
    ["delayed", model(queue.delayed), 4],
  ]);
});

describe("overflow of groups of any size", () => {
  check(reference.overflow, 2, [
    ["mean", model(overflow.mean), 2],
    ["variance", model(overflow.variance), 3],
    ["peakedness less 1", model(excessOf), 4],
  ]);
});

describe("equivalent groups of peaky, light, smooth and nearly Poisson streams", () => {
  check(reference.equivalent, 3, [
    ["traffic", (m, v) => overflow.equivalent(m, v)[0], 3],
    ["channels", (m, v) => overflow.equivalent(m, v)[1], 4],
    ["lost", model(overflow.lost), 5],
  ]);
});

describe("abandonment, from no patience to nearly endless", () => {
  check(reference.abandon, 4, [["lost", model(abandon.lost), 4]]);
});

describe("repeats, up to all of them on a nearly full group", () => {
  check(reference.retry, 3, [["offered", model(retry.offered), 3]]);
});

test("priority: the last erlang below a full group counts, whatever the order of the sum", () => {
  // 0.1 + 0.2 + ... in doubles misses the sum by more than the gap to the channels.
  const gap = 2 ** -30;
  const classes = [0.5, 0.25 - gap, 0.125, 0.125];
  const waits = priority.wait(classes, 1, 1);
  // One server: W_k = A / ((1 - s_(k-1)) (1 - s_k)).
  expect(relativeError(waits[3]!, (1 - gap) / ((0.125 + gap) * gap))).toBeLessThan(BOUND);
  const tiny = priority.wait([1 - 2 ** -40, 2 ** -60, 2 ** -60], 1, 1);
  const spare = 2 ** -40 - 2 ** -59;
  expect(relativeError(tiny[2]!, (1 - spare) / ((spare + 2 ** -60) * spare))).toBeLessThan(BOUND);
});

test("messages: a channel full to one part in 10^10 still knows its spare capacity", () => {
  // 450 bytes at 1 kbit/s take 3.6 s: 1,000 an hour fill it; one message in 10^10 less leaves 450 * 10^-7 byte an hour.
  const fewer = 1000 * (1 - 2 ** -33);
  const expected = 3.6 + (fewer * 450 * 3.6) / (450 * 1000 * 2 ** -33);
  expect(relativeError(message.delay(fewer, 450, 1), expected)).toBeLessThan(BOUND);
});
