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

/** What the steps of a state do to one scheme. */
interface Effect {
  readonly carriersAdded: number;
  /** Of those, the carriers that come with spectrum of their own. */
  readonly withSpectrum: number;
  readonly parts: number;
  readonly sites: number;
  /** Scheme that takes over the users. */
  readonly movedTo: string | undefined;
}

/** How often each step may be taken, as digits of a mixed-radix number: one number is one state. */
interface States {
  readonly steps: readonly LadderStep[];
  readonly radix: readonly number[];
  readonly weight: readonly number[];
  readonly count: number;
  /** Whether a state has the steps that must come before others. */
  readonly allowed: readonly boolean[];
  /** By scheme, what each state does to it. */
  readonly effects: ReadonlyMap<string, readonly Effect[]>;
}

function statesOf({ steps, schemes }: Group, radix: readonly number[], cell: string): States {
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
  const digits = { steps, radix, weight, count };
  const every = Array.from({ length: count }, (_, state) => state);
  return {
    ...digits,
    allowed: every.map((state) => ordered(digits, state)),
    effects: new Map(Array.from(schemes, (scheme) => [scheme, every.map((state) => effectOf(digits, state, scheme))])),
  };
}

type Digits = Pick<States, "steps" | "radix" | "weight" | "count">;

function times(digits: Digits, state: number, step: number): number {
  return Math.floor(state / digits.weight[step]!) % digits.radix[step]!;
}

/** Whether steps that must come before have come. */
function ordered(digits: Digits, state: number): boolean {
  return digits.steps.every((step, i) => {
    if (step.requires === "" || times(digits, state, i) === 0) return true;
    const before = digits.steps.findIndex((other) => other.step === step.requires);
    return before >= 0 && times(digits, state, before) > 0;
  });
}

function effectOf(digits: Digits, state: number, scheme: string): Effect {
  let carriersAdded = 0;
  let withSpectrum = 0;
  let sectors = 0;
  let sites = 0;
  let movedTo: string | undefined;
  digits.steps.forEach((step, i) => {
    if (step.fromScheme !== scheme) return;
    const taken = times(digits, state, i);
    carriersAdded += step.carriersAdded * taken;
    if (step.needsSpectrumMHz > 0) withSpectrum += step.carriersAdded * taken;
    sectors += step.sectorsAdded * taken;
    sites += step.sitesAdded * taken;
    if (step.toScheme !== "" && taken > 0) movedTo ??= step.toScheme;
  });
  return { carriersAdded, withSpectrum, parts: 1 + sectors + sites, sites, movedTo };
}

/** Carriers missing with what the steps of a state do: what is licensed holds only so many, steps with spectrum go beyond. */
function shortOf(row: NeedRow, carriers: number, { carriersAdded, withSpectrum, parts }: Effect): number {
  const licensed = Number.isNaN(row.maximumCarriers) ? Infinity : Math.max(row.maximumCarriers, row.carriersInstalled);
  const held = Math.min(row.carriersInstalled + carriersAdded - withSpectrum, licensed);
  // Dividing the load never asks for more, so that it need not be worked out where all of it fits.
  if (carriers - held - withSpectrum <= 0) return 0;
  const needed = dividedCarriers(
    carriers === row.carriersRequired ? row : { ...row, carriersRequired: carriers },
    parts,
  );
  return needed - held - withSpectrum;
}

/** What is missing in a year with the steps of a state taken; undefined where nothing is. */
function missing(states: States, state: number, rows: readonly NeedRow[]): string | undefined {
  for (const row of rows) {
    const effect = states.effects.get(row.scheme)![state]!;
    if (effect.movedTo !== undefined) continue;
    let carriers = row.carriersRequired;
    for (const other of rows) {
      if (other === row || states.effects.get(other.scheme)![state]!.movedTo !== row.scheme) continue;
      const together = carriersAfterMove(row, other);
      if (together === undefined)
        return `${row.scheme} serves nobody yet, so that what it needs for ${other.scheme} is unknown`;
      carriers += together - row.carriersRequired;
    }
    const short = shortOf(row, carriers, effect);
    if (short > 0) return `${row.scheme} lacks ${short} carriers in ${row.year}`;
    if (!coveredWith(row, effect.sites)) return `${row.scheme} lacks reach in ${row.year}`;
  }
  return undefined;
}

/** Whether a row falls short of its promises without any step. */
function fallsShort(row: NeedRow): boolean {
  return row.carriersRequired > row.carriersInstalled || !coveredWith(row, 0);
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
function cheapestWay(cell: string, group: Group, plan: readonly (readonly NeedRow[])[], known: KnownStates): Way {
  const { steps } = group;
  const byYear = plan
    .map((rows) => rows.filter(({ scheme }) => group.schemes.has(scheme)))
    .filter((rows) => rows.length > 0);
  const states = known.of(group, radixOf(group, byYear.flat()), cell);
  const { count, weight, allowed } = states;
  const lastYear = byYear[byYear.length - 1]![0]!.year;
  const cost = new Float64Array(count).fill(Infinity);
  cost[0] = 0;
  /** By year and state, the step by which a state was reached, -1 where it was carried over. */
  const arrivals = new Int16Array(count * byYear.length).fill(-1);
  for (let y = 0; y < byYear.length; y++) {
    const rows = byYear[y]!;
    const yearsLeft = lastYear - rows[0]!.year + 1;
    for (let state = 0; state < count; state++) {
      for (let i = 0; i < steps.length; i++) {
        if (times(states, state, i) === 0) continue;
        const step = steps[i]!;
        const reached = cost[state - weight[i]!]! + step.cost + step.costPerYear * yearsLeft;
        if (reached < cost[state]!) {
          cost[state] = reached;
          arrivals[y * count + state] = i;
        }
      }
    }
    for (let state = 0; state < count; state++) {
      if (cost[state] === Infinity) continue;
      if (!allowed[state]) cost[state] = Infinity;
      else if (missing(states, state, rows) !== undefined) cost[state]! += UNMET;
    }
  }
  return trace(states, cost, arrivals, byYear);
}

/** The steps that led to the cheapest state, first year first, and what they leave unmet. */
function trace(states: States, cost: Float64Array, arrivals: Int16Array, byYear: readonly (readonly NeedRow[])[]): Way {
  let state = cost.reduce((best, value, i) => (value < cost[best]! ? i : best), 0);
  const taken: Taken[] = [];
  let reason: string | undefined;
  for (let y = byYear.length - 1; y >= 0; y--) {
    const arrival = (): number => arrivals[y * states.count + state]!;
    // Going backwards, the last reason found is that of the first year.
    reason = missing(states, state, byYear[y]!) ?? reason;
    for (let by = arrival(); by >= 0; by = arrival()) {
      taken.push({ step: states.steps[by]!, year: byYear[y]![0]!.year });
      state -= states.weight[by]!;
    }
  }
  return { taken: taken.reverse(), reason };
}

/** Cells with as many states as this in all are remembered; beyond, a ladder is so rich that its cells differ anyway. */
const MOST_REMEMBERED = 1_000_000;

/** Groups and states that many cells of a plan share, since the same ladder stands before all of them. */
class KnownStates {
  private readonly groups = new Map<string, Group[]>();
  private readonly states = new Map<Group, Map<string, States>>();
  private remembered = 0;

  constructor(private readonly ladder: readonly LadderStep[]) {}

  groupsOf(present: ReadonlySet<string>, short: ReadonlySet<string>): readonly Group[] {
    const key = JSON.stringify([[...present], [...short]]);
    let groups = this.groups.get(key);
    if (!groups) {
      groups = usefulGroups(this.ladder, present, short);
      this.groups.set(key, groups);
    }
    return groups;
  }

  of(group: Group, radix: readonly number[], cell: string): States {
    let ofGroup = this.states.get(group);
    if (!ofGroup) {
      ofGroup = new Map();
      this.states.set(group, ofGroup);
    }
    const key = radix.join();
    let states = ofGroup.get(key);
    if (!states) {
      states = statesOf(group, radix, cell);
      this.remembered += states.count * group.schemes.size;
      if (this.remembered <= MOST_REMEMBERED) ofGroup.set(key, states);
    }
    return states;
  }
}

/** The cheapest ways of all groups of a cell, first year first. */
function waysOf(
  cell: string,
  byYear: readonly (readonly NeedRow[])[],
  known: KnownStates,
): { taken: Taken[]; reasons: string[] } {
  const short = new Set<string>();
  const present = new Set<string>();
  for (const rows of byYear) {
    for (const row of rows) {
      present.add(row.scheme);
      if (fallsShort(row)) short.add(row.scheme);
    }
  }
  if (short.size === 0) return { taken: [], reasons: [] };
  const ways = known.groupsOf(present, short).map((group) => cheapestWay(cell, group, byYear, known));
  return {
    taken: ways.flatMap(({ taken }) => taken).sort((a, b) => a.year - b.year),
    reasons: ways.flatMap(({ reason }) => (reason === undefined ? [] : [reason])),
  };
}

/** The rows of a cell by year, first year first. */
function yearsOf(rows: readonly NeedRow[]): NeedRow[][] {
  const years = new Map<number, NeedRow[]>();
  for (const row of rows) {
    const same = years.get(row.year);
    if (same) same.push(row);
    else years.set(row.year, [row]);
  }
  return [...years.values()].sort(([a], [b]) => a!.year - b!.year);
}

/**
 * Steps of every cell with dates and costs; a cell that needs none has no row, one that cannot be helped a row that says why.
 *
 * @param plan rows of the plan
 * @param ladder steps to choose from
 */
export function expansion(plan: readonly NeedRow[], ladder: readonly LadderStep[]): ExpansionRow[] {
  return expansionOf(
    plan.map(({ cell }) => cell),
    (i) => plan[i]!,
    ladder,
  );
}

/**
 * As `expansion`, for a plan whose rows are made as a cell's turn comes.
 *
 * @param cellOf cell of each row of the plan
 * @param rowAt row of the plan by its number
 * @param ladder steps to choose from
 */
export function expansionOf(
  cellOf: readonly string[],
  rowAt: (i: number) => NeedRow,
  ladder: readonly LadderStep[],
): ExpansionRow[] {
  for (const { step, requires } of ladder) {
    if (requires !== "" && !ladder.some((other) => other.step === requires)) {
      throw new DomainError(`ladder requires of ${step}`, requires, "a step of the ladder");
    }
  }
  const cells = new Map<string, number[]>();
  cellOf.forEach((cell, i) => {
    const rows = cells.get(cell);
    if (rows) rows.push(i);
    else cells.set(cell, [i]);
  });
  const known = new KnownStates(ladder);
  const result: ExpansionRow[] = [];
  for (const [cell, places] of cells) {
    const byYear = yearsOf(places.map(rowAt));
    const lastYear = byYear[byYear.length - 1]![0]!.year;
    const { taken, reasons } = waysOf(cell, byYear, known);
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
