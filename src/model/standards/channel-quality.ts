import { domain, requireOneOf } from "../domain";
import { DomainError } from "../errors";

/** Bits of a modulation symbol and 1024 times the code rate. */
export type ModulationAndCode = readonly [bits: number, codeRate1024: number];

interface IndexTable {
  readonly source: string;
  /** Index of the first row; indices beyond the last are reserved. */
  readonly first: number;
  readonly rows: readonly ModulationAndCode[];
}

const rows = (bits: number, ...rates: readonly number[]): ModulationAndCode[] => rates.map((rate) => [bits, rate]);

/** Tables of 3GPP TS 38.214 V18.7.0: channel quality in clause 5.2.2.1, modulation and coding (of PDSCH) in clause 5.1.3.1. */
export const NR_TABLES = {
  /** Up to 64QAM; the rows of LTE's first table too. */
  cqi1: {
    source: "TS 38.214 table 5.2.2.1-2",
    first: 1,
    rows: [
      ...rows(2, 78, 120, 193, 308, 449, 602),
      ...rows(4, 378, 490, 616),
      ...rows(6, 466, 567, 666, 772, 873, 948),
    ],
  },
  /** Up to 256QAM. */
  cqi2: {
    source: "TS 38.214 table 5.2.2.1-3",
    first: 1,
    rows: [
      ...rows(2, 78, 193, 449),
      ...rows(4, 378, 490, 616),
      ...rows(6, 466, 567, 666, 772, 873),
      ...rows(8, 711, 797, 885, 948),
    ],
  },
  /** Low spectral efficiency: block errors of 1e-5 instead of 0.1. */
  cqi3: {
    source: "TS 38.214 table 5.2.2.1-4",
    first: 1,
    rows: [...rows(2, 30, 50, 78, 120, 193, 308, 449, 602), ...rows(4, 378, 490, 616), ...rows(6, 466, 567, 666, 772)],
  },
  /** Up to 1024QAM. */
  cqi4: {
    source: "TS 38.214 table 5.2.2.1-5",
    first: 1,
    rows: [
      ...rows(2, 78, 193, 449),
      ...rows(4, 378, 616),
      ...rows(6, 567, 666, 772, 873),
      ...rows(8, 711, 797, 885, 948),
      ...rows(10, 853, 948),
    ],
  },
  /** Up to 64QAM. */
  mcs1: {
    source: "TS 38.214 table 5.1.3.1-1",
    first: 0,
    rows: [
      ...rows(2, 120, 157, 193, 251, 308, 379, 449, 526, 602, 679),
      ...rows(4, 340, 378, 434, 490, 553, 616, 658),
      ...rows(6, 438, 466, 517, 567, 616, 666, 719, 772, 822, 873, 910, 948),
    ],
  },
  /** Up to 256QAM. */
  mcs2: {
    source: "TS 38.214 table 5.1.3.1-2",
    first: 0,
    rows: [
      ...rows(2, 120, 193, 308, 449, 602),
      ...rows(4, 378, 434, 490, 553, 616, 658),
      ...rows(6, 466, 517, 567, 616, 666, 719, 772, 822, 873),
      ...rows(8, 682.5, 711, 754, 797, 841, 885, 916.5, 948),
    ],
  },
  /** Low spectral efficiency. */
  mcs3: {
    source: "TS 38.214 table 5.1.3.1-3",
    first: 0,
    rows: [
      ...rows(2, 30, 40, 50, 64, 78, 99, 120, 157, 193, 251, 308, 379, 449, 526, 602),
      ...rows(4, 340, 378, 434, 490, 553, 616),
      ...rows(6, 438, 466, 517, 567, 616, 666, 719, 772),
    ],
  },
  /** Up to 1024QAM. */
  mcs4: {
    source: "TS 38.214 table 5.1.3.1-4",
    first: 0,
    rows: [
      ...rows(2, 120, 193, 449),
      ...rows(4, 378, 490, 616),
      ...rows(6, 466, 517, 567, 616, 666, 719, 772, 822, 873),
      ...rows(8, 682.5, 711, 754, 797, 841, 885, 916.5, 948),
      ...rows(10, 805.5, 853, 900.5, 948),
    ],
  },
} as const satisfies Record<string, IndexTable>;

export type NrTable = keyof typeof NR_TABLES;
export const NR_TABLE_NAMES = Object.keys(NR_TABLES) as NrTable[];

/** 3GPP TS 36.213 V15.8.0, clause 7.2.3, table 7.2.3-1 (4-bit channel quality, up to 64QAM): the rows of TS 38.214 table 5.2.2.1-2. */
export const LTE_TABLE: IndexTable = { source: "TS 36.213 table 7.2.3-1", first: 1, rows: NR_TABLES.cqi1.rows };

export const nrIndex = domain(0, 28, "a whole index of the table", { whole: true });
export const lteIndex = domain(1, 15, "a whole channel quality index from 1 to 15", { whole: true });

function efficiencyOf(parameter: string, index: number, { source, first, rows: entries }: IndexTable): number {
  const row = entries[index - first];
  if (row === undefined) {
    throw new DomainError(parameter, index, `a whole index from ${first} to ${first + entries.length - 1} (${source})`);
  }
  return (row[0] * row[1]) / 1024;
}

/**
 * Information bits a modulation symbol of an NR index: modulation bits times code rate, not rounded to the four decimals
 * of the print.
 *
 * @param index row of the table; 0 of a channel quality table is "out of range" and refused, as are reserved rows
 * @param table "cqi1" to "cqi4", "mcs1" to "mcs4"
 */
export function nrEfficiency(index: number, table: string = "cqi1"): number {
  requireOneOf(NR_TABLE_NAMES, "table", table);
  return efficiencyOf("index", index, NR_TABLES[table]);
}

/**
 * Information bits a modulation symbol of an LTE channel quality index.
 *
 * @param cqi 1 to 15
 */
export function lteEfficiency(cqi: number): number {
  return efficiencyOf("cqi", cqi, LTE_TABLE);
}
