import fc from "fast-check";
import { DomainError, NoAnswerError } from "../../../src/model/errors";
import { exhaustion } from "../../../src/model/traffic/exhaustion";
import * as forecast from "../../../src/model/traffic/forecast";
import * as traffic from "../../../src/model/traffic/traffic";
import { checkPublished } from "../../support/published-check";
import { relativeError } from "../../support/relative-error";

describe("published values", () => {
  checkPublished("FC-01", (i) => forecast.compound(i["N0"]!, i["growth_per_year"]!, i["years"]!));
  for (const id of ["FC-10", "FC-12"]) {
    // K/(1 + a exp(-b t)) has its midpoint at ln(a)/b.
    checkPublished(id, (i) =>
      forecast.logistic(i["K"]!, Math.log(i["a"]!) / i["b_per_yr"]!, i["b_per_yr"]!, i["t_yr"]!),
    );
  }
  checkPublished("FC-14", (i) => forecast.gompertz(i["K"]!, i["a"]!, i["b_per_yr"]!, i["t_yr"]!));
  checkPublished("FC-16", (i) => forecast.gompertz(i["K"]!, 5, 0.3, Math.log(5) / 0.3));
  checkPublished("FC-17", (i) => {
    // At the inflexion the slope is largest: the level is K/e.
    const inflexion = Math.log(i["a"]!) / i["b_per_yr"]!;
    expect(relativeError(forecast.gompertz(1, i["a"]!, i["b_per_yr"]!, inflexion), 1 / Math.E)).toBeLessThan(1e-14);
    return inflexion;
  });
  for (const id of ["FC-20", "FC-21"]) {
    checkPublished(id, (i) => forecast.bass(1, i["p_innovation"]!, i["q_imitation"]!, i["t_yr"]!));
  }
  checkPublished("FC-24", (i) => {
    const [p, q] = [i["p_innovation"]!, i["q_imitation"]!];
    const peak = Math.log(q / p) / (p + q);
    const h = 1e-4;
    const slope = (forecast.bass(1, p, q, peak + h) - forecast.bass(1, p, q, peak - h)) / (2 * h);
    // The central difference is off by its own error of order h^2.
    expect(Math.abs(slope - (p + q) ** 2 / (4 * q))).toBeLessThan(1e-9);
    return (p + q) ** 2 / (4 * q);
  });
  checkPublished("FC-26", (i) => {
    const growth = (i["to"]! / i["from"]!) ** (1 / i["years"]!) - 1;
    expect(relativeError(forecast.compound(i["from"]!, growth, i["years"]!), i["to"]!)).toBeLessThan(1e-14);
    return growth;
  });
  checkPublished("FC-27", (i) => {
    const doubling = Math.LN2 / Math.log1p(i["growth_per_year"]!);
    expect(relativeError(forecast.compound(1, i["growth_per_year"]!, doubling), 2)).toBeLessThan(1e-14);
    return doubling;
  });
  // 150 minutes a month on 24 days, spread over 6 busy hours a day.
  checkPublished("FC-02", (i) =>
    traffic.perUser(1 / (i["days"]! * i["busy_hours_per_day"]!), i["min_per_month"]! * 60),
  );
});

test("the curves start, turn and end where they should", () => {
  expect(forecast.logistic(80, 5, 2, 5)).toBe(40);
  expect(forecast.logistic(80, 5, 2, 1000)).toBe(80);
  expect(relativeError(forecast.logistic(1, 0, 1, -700), Math.exp(-700))).toBeLessThan(1e-13);
  expect(relativeError(forecast.gompertz(7, 3, 0.5, 0), 7 * Math.exp(-3))).toBeLessThan(1e-15);
  expect(forecast.gompertz(7, 3, 5, -10_000)).toBe(0);
  expect(forecast.bass(9, 0.1, 0.4, 0) + 0).toBe(0);
  expect(relativeError(forecast.bass(9, 0.1, 0, 3), 9 * -Math.expm1(-0.3))).toBeLessThan(1e-15);
  expect(relativeError(forecast.bass(1, 1e-12, 1e-12, 1), 1e-12)).toBeLessThan(1e-11);
  expect(forecast.compound(5, 0.3, 0)).toBe(5);
});

test("compound growth adds up: two periods one after the other are both together", () => {
  fc.assert(
    fc.property(
      fc.double({ min: -0.5, max: 2, noNaN: true }),
      fc.double({ min: -20, max: 20, noNaN: true }),
      fc.double({ min: -20, max: 20, noNaN: true }),
      (g, a, b) => {
        const stepwise = forecast.compound(forecast.compound(100, g, a), g, b);
        expect(relativeError(stepwise, forecast.compound(100, g, a + b))).toBeLessThan(1e-13);
      },
    ),
    { seed: 21 },
  );
});

test("a band is the forecast at the median, symmetric in logarithms, wider with the root of the horizon", () => {
  expect(forecast.band(300, 0.2, 9, 0.5)).toBe(300);
  expect(forecast.band(300, 0, 9, 0.99)).toBe(300);
  const up = forecast.band(300, 0.2, 4, 0.9) / 300;
  expect(relativeError(300 / forecast.band(300, 0.2, 4, 0.1), up)).toBeLessThan(1e-14);
  expect(relativeError(Math.log(forecast.band(300, 0.2, 16, 0.9) / 300), 2 * Math.log(up))).toBeLessThan(1e-14);
});

describe("exhaustion", () => {
  const times = [2027, 2028, 2030];
  const demand = [40, 52, 70];
  test("lies between the times in proportion", () => {
    expect(exhaustion(times, demand, 46)).toBe(2027.5);
    expect(exhaustion(times, demand, 61)).toBe(2029);
  });
  test("is the first time where the capacity is too small at once", () => {
    expect(exhaustion(times, demand, 39)).toBe(2027);
  });
  test("a demand that only reaches the capacity does not exceed it", () => {
    expect(exhaustion(times, demand, 52)).toBe(2028);
    expect(() => exhaustion(times, demand, 70)).toThrow(NoAnswerError);
    expect(() => exhaustion(times, demand, 70)).toThrow("highest value is 70");
  });
  test("the order of the rows does not matter, a time given twice does", () => {
    expect(exhaustion([2030, 2027, 2028], [70, 40, 52], 61)).toBe(2029);
    expect(() => exhaustion([2027, 2027], [1, 2], 1)).toThrow(DomainError);
    expect(() => exhaustion([2027, 2028], [1], 1)).toThrow(DomainError);
  });
  test("the first of several crossings counts", () => {
    expect(exhaustion([0, 1, 2, 3], [0, 10, 0, 20], 5)).toBe(0.5);
  });
  test("demand at the answer is the capacity", () => {
    fc.assert(
      fc.property(fc.double({ min: 40, max: 69.9, noNaN: true }), (capacity) => {
        const at = exhaustion(times, demand, capacity);
        const level = at <= 2028 ? 40 + 12 * (at - 2027) : 52 + 9 * (at - 2028);
        expect(Math.abs(level - capacity)).toBeLessThan(1e-9);
      }),
      { seed: 22 },
    );
  });
});

test.each([
  () => forecast.compound(1, -1, 1),
  () => forecast.logistic(1, 0, 0, 1),
  () => forecast.gompertz(1, 0, 1, 1),
  () => forecast.bass(1, 0, 0.1, 1),
  () => forecast.bass(1, 0.1, 0.1, -1),
  () => forecast.band(1, 0.1, 1, 1),
])("outside the domain: %#", (call) => {
  expect(call).toThrow(DomainError);
});
test("a level beyond all numbers is no answer", () => {
  expect(() => forecast.compound(1, 99, 10_000)).toThrow(NoAnswerError);
});
