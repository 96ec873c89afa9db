import fc from "fast-check";
import * as abandon from "../../../src/model/blocking/abandon";
import * as erlangC from "../../../src/model/blocking/erlang-c";
import { blockingOf } from "../../../src/model/blocking/erlang-b-formula";
import * as message from "../../../src/model/blocking/message";
import * as priority from "../../../src/model/blocking/priority";
import * as queue from "../../../src/model/blocking/queue";
import * as retry from "../../../src/model/blocking/retry";
import { DomainError, NoAnswerError } from "../../../src/model/errors";
import { publishedValue, title } from "../../checks/published";
import reference from "../../fixtures/blocking/waiting.json";
import { relativeError } from "../../support/relative-error";

const { rows } = reference;
const BOUND = 1e-12;

function holds(actual: number, digits: string | number): void {
  expect(relativeError(actual, Number(digits))).toBeLessThanOrEqual(BOUND);
}

type Row = (number | string)[];
const numbers = (row: Row): number[] => row.filter((cell): cell is number => typeof cell === "number");
const digitsOf = (row: Row): string => row.find((cell): cell is string => typeof cell === "string")!;

describe("against 50 digits", () => {
  const cases: [string, Row[], (...args: number[]) => number][] = [
    ["erlangC.delayed", rows.delayed, erlangC.delayed],
    ["erlangC.wait", rows.wait, erlangC.wait],
    ["erlangC.late", rows.late, erlangC.late],
    ["queue.lost", rows.queueLost, queue.lost],
    ["queue.delayed", rows.queueDelayed, queue.delayed],
    ["abandon.lost", rows.abandon, abandon.lost],
    ["retry.offered", rows.retry, retry.offered],
  ];
  test.each(cases.flatMap(([name, list, fn]) => list.map((row) => [name, numbers(row).join(", "), fn, row] as const)))(
    "%s(%s)",
    (_name, _args, fn, row) => holds(fn(...numbers(row)), digitsOf(row)),
  );
  test.each(rows.retry.map((row) => [row] as const))("retry.blocking %p", ([a, n, r, , digits]) => {
    holds(retry.blocking(a as number, n as number, r as number), digits as string);
  });
});

describe("published values", () => {
  const check = (id: string, compute: (inputs: Record<string, number>) => number): void => {
    const entry = publishedValue(id);
    test(title(entry), () => {
      const actual = compute(entry.inputs as Record<string, number>);
      expect(Math.abs(actual - entry.expected)).toBeLessThanOrEqual(
        entry.tolerance ?? 1e-10 * Math.abs(entry.expected),
      );
    });
  };
  const N = "N_servers";
  const A = "A_offered_erlang";
  const H = "h_mean_holding_s";
  for (const id of ["EC-01", "EC-03", "EC-06", "EC-08", "EC-09", "EC-52"])
    check(id, (i) => erlangC.delayed(i[A]!, i[N]!));
  for (const id of ["EC-20", "EC-21", "EC-23"]) check(id, (i) => erlangC.wait(i[A]!, i[N]!, i[H]!));
  check("EC-41", (i) => erlangC.wait(i["lambda_per_s"]! * i[H]!, i[N]!, i[H]!));
  // Mean queue length by Little: arrivals wait W each.
  for (const id of ["EC-20q", "EC-21q", "EC-22q", "EC-23q"]) check(id, (i) => i[A]! * erlangC.wait(i[A]!, i[N]!, 1));
  for (const id of ["EC-31", "EC-32", "EC-33"]) check(id, (i) => erlangC.late(i[A]!, i[N]!, i[H]!, i["t_s"]!));
  check("EC-50", (i) => erlangC.late(i[A]!, i[N]!, i[H]!, i["t_s"]!) / erlangC.delayed(i[A]!, i[N]!));
  check("EC-55", (i) => erlangC.channels(i[A]!, i[H]!, i["t_s"]!, i["target"]!));
  for (const id of ["EC-60", "EC-62"]) check(id, (i) => queue.lost(i[A]!, i[N]!, i["K_waiting_places"]!));
  for (const id of ["EC-61d", "EC-62d"]) check(id, (i) => queue.delayed(i[A]!, i[N]!, i["K_waiting_places"]!));
  // In units of the service time: 1,250 bytes at 10 kbit/s take 1 s; the delay holds the transmission too.
  check("EC-70", (i) => message.delay(3600 * i["rho"]!, 1250, 10, 0) - 1);
  check("EC-71", (i) => message.delay(3600 * i["rho"]!, 1250, 10, Math.sqrt(i["scv_service"]!)) - 1);
  const R = "r_retry_prob";
  const A0 = "A0_first_attempt_erlang";
  for (const id of ["EX-01a", "EX-02a"]) check(id, (i) => retry.blocking(i[A0]!, i[N]!, i[R]!));
  for (const id of ["EX-02b", "EX-03b"]) check(id, (i) => retry.offered(i[A0]!, i[N]!, i[R]!));
});

describe("identities", () => {
  const run = { seed: 19170101, numRuns: 300 };
  const servers = fc.integer({ min: 1, max: 2000 });
  const load = fc.double({ min: 0.001, max: 0.999, noNaN: true });

  test("B and C belong together: C = B / (1 - (A/N)(1 - B))", () => {
    fc.assert(
      fc.property(servers, load, (n, rho) => {
        const b = blockingOf(n * rho, n);
        expect(relativeError(erlangC.delayed(n * rho, n), b / (1 - (n * rho) / n + ((n * rho) / n) * b))).toBeLessThan(
          1e-11,
        );
      }),
      run,
    );
  });
  test("C rises with traffic and falls with channels", () => {
    fc.assert(
      fc.property(servers, load, (n, rho) => {
        const c = erlangC.delayed(n * rho, n);
        fc.pre(c > 1e-300);
        expect(erlangC.delayed(n * rho * 0.99, n)).toBeLessThan(c);
        expect(erlangC.delayed(n * rho, n + 1)).toBeLessThan(c);
      }),
      run,
    );
  });
  test("erlangC.channels is minimal", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.01, max: 3000, noNaN: true }),
        fc.double({ min: 0, max: 60, noNaN: true }),
        fc.double({ min: 1e-9, max: 0.99, noNaN: true }),
        (a, t, p) => {
          const n = erlangC.channels(a, 30, t, p);
          expect(erlangC.late(a, n, 30, t)).toBeLessThanOrEqual(p);
          if (n - 1 > a) expect(erlangC.late(a, n - 1, 30, t)).toBeGreaterThan(p);
        },
      ),
      run,
    );
  });
  test("no waiting place is Erlang B, very many are Erlang C", () => {
    fc.assert(
      fc.property(servers, load, (n, rho) => {
        expect(relativeError(queue.lost(n * rho, n, 0), blockingOf(n * rho, n))).toBeLessThan(1e-13);
        expect(relativeError(queue.delayed(n * rho, n, 1e8), erlangC.delayed(n * rho, n))).toBeLessThan(1e-11);
      }),
      run,
    );
  });
  test("one class of priority is Erlang C, and the classes' waits weighted by traffic conserve work", () => {
    fc.assert(
      fc.property(servers, load, fc.double({ min: 0.01, max: 0.99, noNaN: true }), (n, rho, part) => {
        const a = n * rho;
        const classes = [a * part, a * (1 - part)];
        const waits = priority.wait(classes, n, 12);
        const mean = (waits[0]! * classes[0]! + waits[1]! * classes[1]!) / (classes[0]! + classes[1]!);
        expect(relativeError(mean, erlangC.wait(a, n, 12))).toBeLessThan(1e-9);
        expect(waits[0]!).toBeLessThanOrEqual(waits[1]!);
        expect(relativeError(priority.wait([a], n, 12)[0]!, erlangC.wait(a, n, 12))).toBeLessThan(1e-12);
      }),
      run,
    );
  });
  test("patience equal to the holding time makes the number present Poisson", () => {
    // With equal rates the state is that of infinitely many servers: the share lost is E[(X - N)+] / A, X Poisson.
    const a = 7;
    const n = 9;
    let p = Math.exp(-a);
    let excess = 0;
    for (let k = 1; k < 200; k++) {
      p *= a / k;
      if (k > n) excess += (k - n) * p;
    }
    expect(relativeError(abandon.lost(a, n, 50, 50), excess / a)).toBeLessThan(1e-12);
  });
  test("less patience loses more, and the loss lies between overload and Erlang B", () => {
    fc.assert(
      fc.property(servers, fc.double({ min: 0.3, max: 2, noNaN: true }), (n, rho) => {
        const a = n * rho;
        const patient = abandon.lost(a, n, 10, 1000);
        const hasty = abandon.lost(a, n, 10, 1);
        // Far above the servers both are (A - N)/A to the last bits.
        expect(patient).toBeLessThanOrEqual(hasty * (1 + 1e-14));
        expect(hasty).toBeLessThanOrEqual(blockingOf(a, n) * (1 + 1e-12));
        expect(patient).toBeGreaterThanOrEqual(Math.max(0, (a - n) / a) * (1 - 1e-12));
      }),
      run,
    );
  });
  test("repeats solve their own equation and rise with the retry share", () => {
    fc.assert(
      fc.property(servers, load, load, (n, rho, r) => {
        const a = retry.offered(n * rho, n, r);
        expect(relativeError(n * rho + r * a * blockingOf(a, n), a)).toBeLessThan(1e-12);
        expect(retry.offered(n * rho, n, r / 2)).toBeLessThanOrEqual(a * (1 + 1e-13));
      }),
      run,
    );
  });
});

describe("edges and bad input", () => {
  test.each([
    [10, 10],
    [12, 10],
    [1, 0.5],
  ])("%p erlang on %p channels never settles, with the numbers in the message", (a, n) => {
    expect(() => erlangC.delayed(a, n)).toThrow(NoAnswerError);
    expect(() => erlangC.wait(a, n, 1)).toThrow(String(a));
  });
  test("no traffic waits for nothing", () => {
    expect(erlangC.delayed(0, 3)).toBe(0);
    expect(erlangC.channels(0, 1, 0, 0.1)).toBe(0);
    expect(queue.lost(0, 3, 2)).toBe(0);
    expect(abandon.lost(0, 3, 1, 1)).toBe(0);
    expect(message.delay(0, 125, 1)).toBe(1);
    expect(retry.offered(0, 3, 1)).toBe(0);
  });
  test("overload of a finite queue stays a probability at any length", () => {
    expect(relativeError(queue.lost(20, 10, 1e9), 0.5)).toBeLessThan(1e-12);
    expect(queue.delayed(20, 10, 1e9)).toBe(1);
  });
  test("a message load of 1 has no answer", () => {
    expect(() => message.delay(3600, 1250, 10)).toThrow(NoAnswerError);
  });
  test("all calls repeated on too few channels have no answer", () => {
    expect(() => retry.offered(10, 10, 1)).toThrow(NoAnswerError);
    expect(() => retry.offered(1, 0, 1)).toThrow(NoAnswerError);
    expect(retry.offered(1, 0, 0.5)).toBe(2);
  });
  test.each([
    () => erlangC.delayed(-1, 2),
    () => erlangC.delayed(NaN, 2),
    () => queue.lost(1, 2, 1.5),
    () => priority.wait([1, -1], 4, 1),
    () => abandon.lost(1, 2, 1, 1e7),
    () => retry.offered(1, 2, 1.1),
    () => message.delay(1, 0, 1),
  ])("outside the domain: %#", (call) => {
    expect(call).toThrow(DomainError);
  });
});
