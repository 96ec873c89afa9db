/**
 * The cheapest steps that keep every cell within its targets in every year. PLAN.EXPANSION.
 *
 * Rules: a step in service from the beginning of a year costs its cost once and its yearly cost in every year from then to the
 * end of the plan; nothing is discounted. Steps are never undone. Sectors and sites divide the load evenly; a change of scheme
 * moves all users of the scheme. The search is exact: dynamic programming over how often each step has been taken, year by
 * year, which is a few hundred states for the ladders met in practice.
 */
import { DomainError } from "../errors";
import { carriersAfterMove, coveredWith, dividedCarriers, type NeedRow } from "./expansion-needs";

export interface LadderStep {
  readonly step: string;
  readonly fromScheme: string;
  readonly toScheme: string;
  readonly carriersAdded: number;
  readonly sectorsAdded: number;
  readonly sitesAdded: number;
  /** Spectrum that the step brings with it, MHz of one direction. */
  readonly needsSpectrumMHz: number;
  readonly requires: string;
  /** NaN for as often as it helps. */
  readonly maxTimes: number;
  readonly cost: number;
  readonly costPerYear: number;
  readonly leadTimeMonths: number;
}

export interface ExpansionRow {
  readonly cell: string;
  readonly step: string;
  /** Year and month, "2029-04"; "" where no step suffices. */
  readonly orderBy: string;
  readonly inServiceBy: string;
  readonly cost: number;
}

/** A step without a limit of its own is not tried more often than this. */
const MOST_TIMES = 20;
const MOST_STATES = 200_000;
const MONTHS_PER_YEAR = 12;
/** Weighs a year with an unmet target above any cost, so that as few as possible remain and then the cheapest way counts. */
const UNMET = 1e15;

/** How often each step may be taken, as digits of a mixed-radix number: one number is one state. */
interface States {
  readonly steps: readonly LadderStep[];
  readonly radix: readonly number[];
  readonly weight: readonly number[];
  readonly count: number;
}

function statesOf(steps: readonly LadderStep[], radix: readonly number[], cell: string): States {
  const weight: number[] = [];
  let count = 1;
  for (const size of radix) {
    weight.push(count);
    count *= size;
  }
  if (count > MOST_STATES) {
    throw new DomainError(
      `ladder for cell ${cell}`,
      count,
      `at most ${MOST_STATES} combinations; set maxTimes of the steps lower`,
    );
  }
  return { steps, radix, weight, count };
}

function times(states: States, state: number, step: number): number {
  return Math.floor(state / states.weight[step]!) % states.radix[step]!;
}

/** Whether steps that must come before have come. */
function ordered(states: States, state: number): boolean {
  return states.steps.every((step, i) => {
    if (step.requires === "" || times(states, state, i) === 0) return true;
    const before = states.steps.findIndex((other) => other.step === step.requires);
    return before >= 0 && times(states, state, before) > 0;
  });
}

/** What is missing in a year with the steps of a state taken; undefined where nothing is. */
function missing(states: States, state: number, rows: readonly NeedRow[]): string | undefined {
  const sum = (scheme: string, what: "carriersAdded" | "sectorsAdded" | "sitesAdded"): number =>
    states.steps.reduce(
      (total, step, i) => (step.fromScheme === scheme ? total + step[what] * times(states, state, i) : total),
      0,
    );
  const movedTo = (scheme: string): string | undefined =>
    states.steps.find((step, i) => step.fromScheme === scheme && step.toScheme !== "" && times(states, state, i) > 0)
      ?.toScheme;
  for (const row of rows) {
    if (movedTo(row.scheme) !== undefined) continue;
    let carriers = row.carriersRequired;
    for (const other of rows) {
      if (movedTo(other.scheme) !== row.scheme) continue;
      const together = carriersAfterMove(row, other);
      if (together === undefined)
        return `${row.scheme} serves nobody yet, so that what it needs for ${other.scheme} is unknown`;
      carriers += together - row.carriersRequired;
    }
    const sites = sum(row.scheme, "sitesAdded");
    const parts = 1 + sum(row.scheme, "sectorsAdded") + sites;
    const needed = dividedCarriers({ ...row, carriersRequired: carriers }, parts);
    // What is licensed holds only so many carriers; steps that bring spectrum of their own go beyond.
    const added = sum(row.scheme, "carriersAdded");
    const withSpectrum = states.steps.reduce(
      (total, step, i) =>
        step.fromScheme === row.scheme && step.needsSpectrumMHz > 0
          ? total + step.carriersAdded * times(states, state, i)
          : total,
      0,
    );
    const licensed = Number.isNaN(row.maximumCarriers)
      ? Infinity
      : Math.max(row.maximumCarriers, row.carriersInstalled);
    const short = needed - Math.min(row.carriersInstalled + added - withSpectrum, licensed) - withSpectrum;
    if (short > 0) return `${row.scheme} lacks ${short} carriers in ${row.year}`;
    if (!coveredWith(row, sites)) return `${row.scheme} lacks reach in ${row.year}`;
  }
  return undefined;
}

/** Schemes of a cell that steps tie together, with the steps; groups are searched one by one. */
interface Group {
  readonly schemes: ReadonlySet<string>;
  readonly steps: readonly LadderStep[];
}

/**
 * Steps that can pay in a cell, grouped by the schemes that they tie together.
 *
 * A step costs and takes nothing off a scheme that lacks nothing, so only steps on schemes that fall short count, those on
 * schemes that may have to take over users, and those that another step requires.
 */
function usefulGroups(
  ladder: readonly LadderStep[],
  present: ReadonlySet<string>,
  short: ReadonlySet<string>,
): Group[] {
  const possible = ladder.filter(
    ({ fromScheme, toScheme }) => present.has(fromScheme) && (toScheme === "" || present.has(toScheme)),
  );
  const affected = new Set(short);
  for (let before = -1; before !== affected.size;) {
    before = affected.size;
    for (const step of possible) {
      if (!affected.has(step.fromScheme)) continue;
      if (step.toScheme !== "") affected.add(step.toScheme);
      const first = possible.find((other) => other.step === step.requires);
      if (first) affected.add(first.fromScheme);
    }
  }
  const groups: { schemes: Set<string>; steps: LadderStep[] }[] = [...affected].map((scheme) => ({
    schemes: new Set([scheme]),
    steps: [],
  }));
  const groupOf = (scheme: string): (typeof groups)[number] => groups.find(({ schemes }) => schemes.has(scheme))!;
  const merge = (a: string, b: string): void => {
    const [one, other] = [groupOf(a), groupOf(b)];
    if (one === other) return;
    for (const scheme of other.schemes) one.schemes.add(scheme);
    groups.splice(groups.indexOf(other), 1);
  };
  const steps = possible.filter(({ fromScheme }) => affected.has(fromScheme));
  for (const step of steps) {
    if (step.toScheme !== "") merge(step.fromScheme, step.toScheme);
    const first = steps.find((other) => other.step === step.requires);
    if (first) merge(step.fromScheme, first.fromScheme);
  }
  for (const step of steps) groupOf(step.fromScheme).steps.push(step);
  return groups;
}

/** How often each step of a group can pay at most, plus one. */
function radixOf({ steps }: Group, rows: readonly NeedRow[]): number[] {
  const takesOver = steps.some(({ toScheme }) => toScheme !== "");
  const gap = (scheme: string): number =>
    rows.reduce(
      (most, row) => (row.scheme === scheme ? Math.max(most, row.carriersRequired - row.carriersInstalled) : most),
      0,
    );
  return steps.map((step) => {
    if (step.toScheme !== "") return 2;
    const own = Number.isNaN(step.maxTimes) ? MOST_TIMES : step.maxTimes;
    // More carriers than the largest gap never pay, unless users that come over from another scheme may widen the gap.
    const pays = step.carriersAdded > 0 && !takesOver ? Math.ceil(gap(step.fromScheme) / step.carriersAdded) : own;
    const required = steps.some((other) => other.requires === step.step);
    return 1 + Math.min(own, required ? Math.max(1, pays) : pays);
  });
}

function monthOf(year: number, monthsBefore: number): string {
  const months = year * MONTHS_PER_YEAR - Math.ceil(monthsBefore);
  return `${Math.floor(months / MONTHS_PER_YEAR)}-${String((((months % MONTHS_PER_YEAR) + MONTHS_PER_YEAR) % MONTHS_PER_YEAR) + 1).padStart(2, "0")}`;
}

interface Taken {
  readonly step: LadderStep;
  readonly year: number;
}

interface Way {
  readonly taken: readonly Taken[];
  /** What is missing in the first year that no way can mend. */
  readonly reason: string | undefined;
}

/** The cheapest way for one group of schemes of a cell. */
function cheapestWay(cell: string, group: Group, plan: readonly (readonly NeedRow[])[]): Way {
  const { steps } = group;
  const byYear = plan
    .map((rows) => rows.filter(({ scheme }) => group.schemes.has(scheme)))
    .filter((rows) => rows.length > 0);
  const states = statesOf(steps, radixOf(group, byYear.flat()), cell);
  const lastYear = byYear[byYear.length - 1]![0]!.year;
  const allowed = Array.from({ length: states.count }, (_, state) => ordered(states, state));
  let cost = new Float64Array(states.count).fill(Infinity);
  cost[0] = 0;
  /** Step by which a state was reached in a year, -1 where it was carried over. */
  const arrivals: Int16Array[] = [];
  const years: number[] = [];
  for (const rows of byYear) {
    const year = rows[0]!.year;
    const next = Float64Array.from(cost);
    const arrival = new Int16Array(states.count).fill(-1);
    for (let state = 0; state < states.count; state++) {
      for (let i = 0; i < steps.length; i++) {
        if (times(states, state, i) === 0) continue;
        const step = steps[i]!;
        const reached = next[state - states.weight[i]!]! + step.cost + step.costPerYear * (lastYear - year + 1);
        if (reached < next[state]!) {
          next[state] = reached;
          arrival[state] = i;
        }
      }
    }
    for (let state = 0; state < states.count; state++) {
      if (next[state] === Infinity) continue;
      if (!allowed[state]) next[state] = Infinity;
      else if (missing(states, state, rows) !== undefined) next[state]! += UNMET;
    }
    arrivals.push(arrival);
    years.push(year);
    cost = next;
  }
  return trace(states, cost, arrivals, years, byYear);
}

/** The steps that led to the cheapest state, first year first, and what they leave unmet. */
function trace(
  states: States,
  cost: Float64Array,
  arrivals: readonly Int16Array[],
  years: readonly number[],
  byYear: readonly (readonly NeedRow[])[],
): Way {
  let state = cost.reduce((best, value, i) => (value < cost[best]! ? i : best), 0);
  const taken: Taken[] = [];
  let reason: string | undefined;
  for (let y = arrivals.length - 1; y >= 0; y--) {
    // Going backwards, the last reason found is that of the first year.
    reason = missing(states, state, byYear[y]!) ?? reason;
    for (let by = arrivals[y]![state]!; by >= 0; by = arrivals[y]![state]!) {
      taken.push({ step: states.steps[by]!, year: years[y]! });
      state -= states.weight[by]!;
    }
  }
  return { taken: taken.reverse(), reason };
}

/** The cheapest ways of all groups of a cell, first year first. */
function waysOf(
  cell: string,
  ladder: readonly LadderStep[],
  byYear: readonly (readonly NeedRow[])[],
): { taken: Taken[]; reasons: string[] } {
  const none = statesOf([], [], cell);
  const short = new Set<string>();
  for (const rows of byYear) {
    for (const row of rows) if (missing(none, 0, [row]) !== undefined) short.add(row.scheme);
  }
  if (short.size === 0) return { taken: [], reasons: [] };
  const present = new Set(byYear.flatMap((rows) => rows.map(({ scheme }) => scheme)));
  const ways = usefulGroups(ladder, present, short).map((group) => cheapestWay(cell, group, byYear));
  return {
    taken: ways.flatMap(({ taken }) => taken).sort((a, b) => a.year - b.year),
    reasons: ways.flatMap(({ reason }) => (reason === undefined ? [] : [reason])),
  };
}

/**
 * Steps of every cell with dates and costs; a cell that needs none has no row, one that cannot be helped a row that says why.
 *
 * @param plan rows of the plan
 * @param ladder steps to choose from
 */
export function expansion(plan: Iterable<NeedRow>, ladder: readonly LadderStep[]): ExpansionRow[] {
  for (const { step, requires } of ladder) {
    if (requires !== "" && !ladder.some((other) => other.step === requires)) {
      throw new DomainError(`ladder requires of ${step}`, requires, "a step of the ladder");
    }
  }
  const cells = new Map<string, Map<number, NeedRow[]>>();
  for (const row of plan) {
    let years = cells.get(row.cell);
    if (!years) {
      years = new Map();
      cells.set(row.cell, years);
    }
    const rows = years.get(row.year);
    if (rows) rows.push(row);
    else years.set(row.year, [row]);
  }
  const result: ExpansionRow[] = [];
  for (const [cell, years] of cells) {
    const byYear = [...years].sort(([a], [b]) => a - b).map(([, rows]) => rows);
    const lastYear = byYear[byYear.length - 1]![0]!.year;
    const { taken, reasons } = waysOf(cell, ladder, byYear);
    for (const { step, year } of taken) {
      result.push({
        cell,
        step: step.step,
        orderBy: monthOf(year, step.leadTimeMonths),
        inServiceBy: monthOf(year, 0),
        cost: step.cost + step.costPerYear * (lastYear - year + 1),
      });
    }
    for (const reason of reasons) {
      result.push({ cell, step: `no step suffices: ${reason}`, orderBy: "", inServiceBy: "", cost: 0 });
    }
  }
  return result;
}
