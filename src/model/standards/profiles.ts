import { requireOneOf } from "../domain";

/** A fact that a standard fixes: parameter named as in the functions, value, where it is stated. */
export type Fact = readonly [parameter: string, value: number | string, source: string];

export const STANDARD_NAMES = ["TETRA", "DMR", "dPMR", "P25", "GSM", "UMTS", "LTE", "NR", "DECT"] as const;
export type StandardName = (typeof STANDARD_NAMES)[number];

const memory = (source: string): string => `${source}, from memory`;

const TETRA = "ETSI EN 300 392-2";
const DMR = memory("ETSI TS 102 361-1");
const DPMR = memory("ETSI TS 102 658");
const P25 = memory("TIA-102.BAAA, phase 1");
const GSM_SLOTS = memory("3GPP TS 45.002");
const GSM_TIMING = "3GPP TS 45.010";
const UMTS = memory("3GPP TS 25.101 and TS 25.211, frequency division duplex");
const LTE = "3GPP TS 36.211, clause 6.2.3";
const NR = "3GPP TS 38.211, clause 4.4, 15 kHz spacing";
const DECT = memory("ETSI EN 300 175-2");

/** A carrier of time slots; the plan's radio table calls its spacing channelSpacingKHz. */
function carrierOf(spacingKHz: number, slots: number, source: string): Fact[] {
  return [
    ["scheme", "TDMA", source],
    ["carrierSpacingKHz", spacingKHz, source],
    ["channelSpacingKHz", spacingKHz, source],
    ["slotsPerCarrier", slots, source],
  ];
}

function channelOf(spacingKHz: number, rateKbps: number, source: string): Fact[] {
  return [
    ["scheme", "FDMA", source],
    ["channelSpacingKHz", spacingKHz, source],
    ["grossRateKbps", rateKbps, source],
  ];
}

const PROFILES: Readonly<Record<StandardName, readonly Fact[]>> = {
  TETRA: [
    ...carrierOf(25, 4, TETRA),
    ["grossRateKbps", 36, TETRA],
    ["frameMs", 170 / 3, TETRA],
    ["slotUs", 42500 / 3, TETRA],
    ["guardTimeUs", 14000 / 36, `${TETRA}: 14 guard bits of the normal uplink burst`],
  ],
  DMR: [
    ...carrierOf(12.5, 2, DMR),
    ["grossRateKbps", 9.6, DMR],
    ["frameMs", 60, DMR],
    ["slotUs", 30_000, DMR],
    ["guardTimeUs", 2500, `${DMR}: bursts of 27.5 ms`],
  ],
  dPMR: channelOf(6.25, 4.8, DPMR),
  P25: channelOf(12.5, 9.6, P25),
  GSM: [
    ...carrierOf(200, 8, GSM_SLOTS),
    ["grossRateKbps", 1625 / 6, GSM_TIMING],
    ["frameMs", 60 / 13, GSM_TIMING],
    ["slotUs", 7500 / 13, GSM_TIMING],
    ["guardTimeUs", (8.25 * 48) / 13, `${GSM_SLOTS}: 8.25 guard bits of the normal burst`],
    ["stepUs", 48 / 13, `${GSM_TIMING}: one bit`],
    ["advanceSteps", 63, GSM_TIMING],
  ],
  UMTS: [
    ["scheme", "CDMA", UMTS],
    ["carrierSpacingKHz", 5000, UMTS],
    ["chipRateMcps", 3.84, UMTS],
    ["frameMs", 10, UMTS],
  ],
  LTE: [
    ["scheme", "OFDMA", LTE],
    ["blockBandwidthKHz", 180, `${LTE}: 12 subcarriers of 15 kHz`],
    ["frameMs", 10, "3GPP TS 36.211, clause 4"],
    ["stepUs", 16 / 30.72, "3GPP TS 36.213, clause 4.2.3: 16 Ts"],
    ["advanceSteps", 1282, "3GPP TS 36.213, clause 4.2.3"],
  ],
  NR: [
    ["scheme", "OFDMA", NR],
    ["blockBandwidthKHz", 180, `${NR}: 12 subcarriers; twice as wide for each doubling of the spacing`],
    ["frameMs", 10, memory("3GPP TS 38.211, clause 4.3.1")],
    [
      "stepUs",
      16 / 30.72,
      "3GPP TS 38.213, clause 4.2, 15 kHz spacing: 16 x 64 Tc, half for each doubling of the spacing",
    ],
    ["advanceSteps", 3846, "3GPP TS 38.213, clause 4.2"],
  ],
  DECT: [
    ...carrierOf(1728, 12, `${DECT}: 24 slots in both directions, 12 duplex channels`),
    ["grossRateKbps", 1152, DECT],
    ["frameMs", 10, DECT],
    ["slotUs", 10_000 / 24, DECT],
  ],
};

/**
 * What a standard fixes, a row a fact.
 *
 * @param standard one of STANDARD_NAMES
 */
export function profile(standard: string): readonly Fact[] {
  requireOneOf(STANDARD_NAMES, "standard", standard);
  return PROFILES[standard];
}
