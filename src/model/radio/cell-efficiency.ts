import { decibel, domain, requireIn, share } from "../domain";
import { NoAnswerError } from "../errors";
import { pathLossExponent as exponents } from "../interference/hexagon";
import { density, upperTail } from "../numerics/normal";
import { legendre } from "../numerics/quadrature";
import { latticeCluster, localSinr, type LocalSinr } from "./local-sinr";
import {
  attenuationFactor,
  DEFAULT_ATTENUATION,
  DEFAULT_MAXIMUM_BPS_HZ,
  DEFAULT_MINIMUM_DB,
  maximumEfficiency,
  sinrOfBits,
} from "./link-curve";

export const shadowingDeviation = domain(0, 20, "a standard deviation from 0 to 20 dB");

const NEPERS_PER_DB = Math.LN10 / 10;
/** Largest stretch of SINR under one Gauss rule: log2(1 + SINR) has its nearest singularity 13.6 dB off the real axis. */
const WIDEST_PANEL = 20 * NEPERS_PER_DB;
/** Deviations beyond which a normal variable is left out: 2e-9 of its weight. */
const NORMAL_REACH = 6;
/** The innermost e^-24 of the cell's area takes the SINR of its rim. */
const INNERMOST = -12;
const SIXTH = Math.PI / 3;
const APOTHEM = Math.sqrt(3) / 2;
/** Area of the sixth of the hexagon between two corners. */
const SIXTH_AREA = Math.sqrt(3) / 4;

/** Logarithm of the distance from the site to the edge of the hexagon, over its corner radius. */
function edgeOf(angle: number): number {
  return Math.log(APOTHEM / Math.cos(angle - SIXTH * Math.round(angle / SIXTH)));
}

/** The link curve of `RATE.ATTENUATED` in natural units. */
interface LinkCurve {
  /** Bit/s/Hz for each neper of log(1 + SINR). */
  readonly perNeper: number;
  readonly maximum: number;
  /** Logarithm of the SINR from which on users are served. */
  readonly lower: number;
  /** Logarithm of the SINR from which on the maximum holds; never below `lower`. */
  readonly upper: number;
}

/** log(1 + SINR) from log SINR, which from 40 nepers on it equals to rounding and where the SINR itself may overflow. */
function logOnePlus(logSinr: number): number {
  return logSinr > 40 ? logSinr : Math.log1p(Math.exp(logSinr));
}

/** Averages over the cell, users who are not served counted as 0. */
interface Averages {
  efficiency: number;
  served: number;
  /** Of 1/efficiency over the served. */
  seconds: number;
}

/** Averages over the shadowing of one place. */
type Local = (logSinr: number, out: Averages) => void;

function withoutShadowing({ perNeper, maximum, lower, upper }: LinkCurve): Local {
  return (logSinr, out) => {
    // Panels end on the kinks, where rounding must not decide: inside them the curve itself is meant.
    const rate = logSinr >= upper ? maximum : Math.min(maximum, perNeper * logOnePlus(Math.max(logSinr, lower)));
    out.efficiency = rate;
    out.served = 1;
    out.seconds = 1 / rate;
  };
}

/** Upper tail of the normal distribution; a tiny deviation makes arguments beyond any table. */
function tailBeyond(z: number): number {
  return z > 40 ? 0 : z < -40 ? 1 : upperTail(z);
}

/**
 * Nodes for a stretch of the normal average: enough for the density, and for the singularities of log2(1 + SINR) that a
 * wide stretch comes close to.
 *
 * @param width length in deviations
 * @param nepers the same in nepers of SINR
 */
function normalNodes(width: number, nepers: number): number {
  return 8 * Math.ceil(Math.max(width < 5 ? 10 : 2 * width, 1.3 * nepers) / 8);
}

/**
 * The normal average is split at the jump of the curve at its minimum and its kink at the maximum. The interval reaches
 * down to the peak of density / rate, which lies at minus the deviation in nepers.
 */
function withShadowing({ perNeper, maximum, lower, upper }: LinkCurve, deviation: number, detail: number): Local {
  const floor = -NORMAL_REACH - deviation;
  return (logSinr, out) => {
    const served = (lower - logSinr) / deviation;
    const capped = (upper - logSinr) / deviation;
    const atMaximum = tailBeyond(capped);
    out.served = tailBeyond(served);
    out.efficiency = maximum * atMaximum;
    out.seconds = atMaximum / maximum;
    const low = Math.max(served, floor);
    const high = Math.min(capped, NORMAL_REACH);
    if (!(high > low)) return;
    const { nodes, weights } = legendre(detail * normalNodes(high - low, (high - low) * deviation));
    const half = 0.5 * (high - low);
    const middle = 0.5 * (high + low);
    for (let k = 0; k < nodes.length; k++) {
      const z = middle + half * nodes[k]!;
      const rate = perNeper * logOnePlus(logSinr + deviation * z);
      const weight = half * weights[k]! * density(z);
      out.efficiency += weight * rate;
      out.seconds += weight / rate;
    }
  };
}

/** Levels of the SINR between which the averages of one place are smooth, from high to low. */
function smoothLevels({ lower, upper }: LinkCurve, deviation: number): number[] {
  if (deviation === 0) {
    const panels = Math.max(1, Math.ceil((upper - lower) / WIDEST_PANEL));
    return Array.from({ length: panels + 1 }, (_, k) => upper - (k * (upper - lower)) / panels);
  }
  const reach = NORMAL_REACH * deviation;
  const fine = Math.min(WIDEST_PANEL, 4 * deviation);
  const levels = [upper + reach];
  for (let level = upper + reach; level > lower - reach;) {
    const between = level <= upper - reach && level > lower + reach;
    level = between ? Math.max(level - WIDEST_PANEL, lower + reach) : level - fine;
    levels.push(level);
  }
  return levels;
}

/** Logarithm of the distance at which the SINR falls to a level, at most `end`; the SINR falls all the way from the site. */
function distanceOf(sinr: LocalSinr, level: number, cosine: number, sine: number, start: number, end: number): number {
  let low = start;
  let high = end;
  let at = start;
  for (let step = 0; step < 60; step++) {
    const excess = sinr.at(at, cosine, sine) - level;
    if (excess >= 0) low = at;
    else high = at;
    const newton = at - excess / sinr.slope();
    const next = newton > low && newton < high ? newton : newton >= end && low === at ? end : 0.5 * (low + high);
    if (Math.abs(next - at) < 1e-11) return next;
    at = next;
  }
  return at;
}

function averagesOver(sinr: LocalSinr, curve: LinkCurve, deviation: number, detail: number): Averages {
  const local = deviation === 0 ? withoutShadowing(curve) : withShadowing(curve, deviation, detail);
  const levels = smoothLevels(curve, deviation);
  const total: Averages = { efficiency: 0, served: 0, seconds: 0 };
  const here: Averages = { efficiency: 0, served: 0, seconds: 0 };
  const add = (logSinr: number, weight: number): void => {
    local(logSinr, here);
    total.efficiency += weight * here.efficiency;
    total.served += weight * here.served;
    total.seconds += weight * here.seconds;
  };
  const radial = legendre(8 * detail);

  /** Adds the ray in one direction: the integral of r dr = exp(2 t) dt. */
  const addRay = (angle: number, weight: number): void => {
    const cosine = Math.cos(angle);
    const sine = Math.sin(angle);
    const edge = edgeOf(angle);
    const atEdge = sinr.at(edge, cosine, sine);
    const atCore = sinr.at(INNERMOST, cosine, sine);
    let inner = INNERMOST;
    let started = false;
    for (let k = 0; k < levels.length && inner < edge; k++) {
      const level = levels[k]!;
      // Levels inside the core have no panel; a first panel begins at the core or at the highest level.
      if (level >= atCore) continue;
      const outer = level <= atEdge ? edge : distanceOf(sinr, level, cosine, sine, inner, edge);
      if (!started) {
        started = true;
        const begin = k === 0 ? outer : INNERMOST;
        add(k === 0 ? level : atCore, 0.5 * weight * Math.exp(2 * begin));
        inner = begin;
        if (k === 0) continue;
      }
      const half = 0.5 * (outer - inner);
      const middle = 0.5 * (outer + inner);
      for (let n = 0; n < radial.nodes.length; n++) {
        const t = middle + half * radial.nodes[n]!;
        add(sinr.at(t, cosine, sine), weight * half * radial.weights[n]! * Math.exp(2 * t));
      }
      inner = outer;
    }
  };

  const angular = legendre(10 * detail);
  let width = 0;
  for (const [from, to] of sinr.directions) {
    width += to - from;
    const ends = splitAtKinks(sinr, curve, from, to);
    for (let k = 1; k < ends.length; k++) {
      const half = 0.5 * (ends[k]! - ends[k - 1]!);
      const middle = 0.5 * (ends[k]! + ends[k - 1]!);
      for (let n = 0; n < angular.nodes.length; n++) {
        addRay(middle + half * angular.nodes[n]!, half * angular.weights[n]!);
      }
    }
  }
  const area = (SIXTH_AREA * width) / SIXTH;
  return { efficiency: total.efficiency / area, served: total.served / area, seconds: total.seconds / area };
}

/** The two ends and the directions between them in which the cell's edge has the SINR of the jump or of the kink. */
function splitAtKinks(sinr: LocalSinr, { lower, upper }: LinkCurve, from: number, to: number): number[] {
  const LOOKS = 16;
  const onEdge = (angle: number): number => sinr.at(edgeOf(angle), Math.cos(angle), Math.sin(angle));
  const found = [from];
  let last = from;
  let before = onEdge(from);
  for (let k = 1; k <= LOOKS; k++) {
    const angle = from + ((to - from) * k) / LOOKS;
    const value = onEdge(angle);
    for (const level of upper > lower ? [lower, upper] : [lower]) {
      if (before > level === value > level) continue;
      let low = last;
      let high = angle;
      // Halving: nine digits of the direction, a split beside the kink being all that is at stake.
      for (let step = 0; step < 30; step++) {
        const middle = 0.5 * (low + high);
        if (onEdge(middle) > level === before > level) low = middle;
        else high = middle;
      }
      found.push(low);
    }
    last = angle;
    before = value;
  }
  found.push(to);
  return found.sort((a, b) => a - b);
}

/** Below this deviation in dB the averages differ from those without shadowing by less than 1e-7. */
const NO_SHADOWING = 1e-3;

/**
 * The averages behind `cellEfficiency` and `cellCapacity`, without memory.
 *
 * @param parameters of the cell and the link curve
 * @param detail factor on the number of nodes in every direction: 1 is meant, 2 and more show what 1 is worth
 */
export function cellAverages(parameters: CellParameters, detail = 1): Averages {
  const { pathLossExponent, clusterSize, sectors, load, edgeSnrDb, shadowingDb } = parameters;
  const { attenuation, minimumDb, maximumBpsHz } = parameters;
  const sinr = localSinr(pathLossExponent, clusterSize, sectors, load, edgeSnrDb);
  if (sinr.silent) return { efficiency: maximumBpsHz, served: 1, seconds: 1 / maximumBpsHz };
  const lower = minimumDb * NEPERS_PER_DB;
  const curve: LinkCurve = {
    perNeper: attenuation / Math.LN2,
    maximum: maximumBpsHz,
    lower,
    upper: Math.max(lower, sinrOfBits(maximumBpsHz / attenuation) * NEPERS_PER_DB),
  };
  return averagesOver(sinr, curve, shadowingDb < NO_SHADOWING ? 0 : shadowingDb * NEPERS_PER_DB, detail);
}

export interface CellParameters {
  readonly pathLossExponent: number;
  readonly clusterSize: number;
  readonly sectors: number;
  readonly load: number;
  readonly edgeSnrDb: number | undefined;
  readonly shadowingDb: number;
  readonly attenuation: number;
  readonly minimumDb: number;
  readonly maximumBpsHz: number;
}

const REMEMBERED = 500;
/** A plan asks for the same few cells again and again. */
const memory = new Map<string, Averages>();

function remembered(parameters: CellParameters): Averages {
  requireIn(exponents, "pathLossExponent", parameters.pathLossExponent);
  requireIn(latticeCluster, "clusterSize", parameters.clusterSize);
  requireIn(share, "load", parameters.load);
  if (parameters.edgeSnrDb !== undefined) requireIn(decibel, "edgeSnrDb", parameters.edgeSnrDb);
  requireIn(shadowingDeviation, "shadowingDb", parameters.shadowingDb);
  requireIn(attenuationFactor, "attenuation", parameters.attenuation);
  requireIn(decibel, "minimumDb", parameters.minimumDb);
  requireIn(maximumEfficiency, "maximumBpsHz", parameters.maximumBpsHz);
  const key = Object.values(parameters).join();
  let averages = memory.get(key);
  if (!averages) {
    averages = cellAverages(parameters);
    if (memory.size >= REMEMBERED) memory.clear();
    memory.set(key, averages);
  }
  return averages;
}

/**
 * Mean spectral efficiency in bit/s/Hz over users spread evenly in a hexagonal cell: the arithmetic mean of the link
 * curve at the local SINR, users out of service counted as 0. It is what a scheduler that shares time equally carries.
 *
 * Deterministic quadrature: rays over a sixth of the hexagon, split where the curve has its jump and its kink; relative
 * error below 1e-5.
 *
 * @param pathLossExponent 1 to 10
 * @param clusterSize 1, 3, 4, 7, 9, 12, 13, ...: i^2 + i j + j^2, at most a million
 * @param sectors 1, 3 or 6, ideal beams that point alike at every site
 * @param load share of the time that interferers send, 0 to 1
 * @param edgeSnrDb median signal to noise at the corner of the hexagon; left out: no noise
 * @param shadowingDb standard deviation of the SINR around its local median, 0 to 20; the user stays with the site in whose
 *   hexagon it stands
 * @param attenuation as in `rate.attenuated`
 * @param minimumDb as in `rate.attenuated`
 * @param maximumBpsHz as in `rate.attenuated`
 */
export function cellEfficiency(
  pathLossExponent: number,
  clusterSize: number,
  sectors = 1,
  load = 1,
  edgeSnrDb?: number,
  shadowingDb = 0,
  attenuation = DEFAULT_ATTENUATION,
  minimumDb = DEFAULT_MINIMUM_DB,
  maximumBpsHz = DEFAULT_MAXIMUM_BPS_HZ,
): number {
  return remembered({
    pathLossExponent,
    clusterSize,
    sectors,
    load,
    edgeSnrDb,
    shadowingDb,
    attenuation,
    minimumDb,
    maximumBpsHz,
  }).efficiency;
}

/** The columns of `cellCapacity`. */
export const CELL_CAPACITY_COLUMNS = ["harmonicMeanBpsHz", "shareServed"] as const;

/**
 * Harmonic mean of the spectral efficiency in bit/s/Hz over the served part of the cell, and the share served: the
 * capacity for transfers of equal volume wherever the user is (T. Bonald, A. Proutiere, "Wireless downlink data channels:
 * user performance and cell dimensioning", MobiCom 2003: 1/C is the mean of 1/rate over the users).
 *
 * Parameters as in `cellEfficiency`.
 *
 * @throws NoAnswerError where no part of the cell is served
 */
export function cellCapacity(
  pathLossExponent: number,
  clusterSize: number,
  sectors = 1,
  load = 1,
  edgeSnrDb?: number,
  shadowingDb = 0,
  attenuation = DEFAULT_ATTENUATION,
  minimumDb = DEFAULT_MINIMUM_DB,
  maximumBpsHz = DEFAULT_MAXIMUM_BPS_HZ,
): [number, number] {
  const { served, seconds } = remembered({
    pathLossExponent,
    clusterSize,
    sectors,
    load,
    edgeSnrDb,
    shadowingDb,
    attenuation,
    minimumDb,
    maximumBpsHz,
  });
  if (!(served > 0 && seconds > 0)) {
    throw new NoAnswerError(`no part of the cell reaches the minimum of ${minimumDb} dB.`);
  }
  return [served / seconds, Math.min(1, served)];
}
