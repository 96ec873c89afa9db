/** Functions are found by what people want to know. */
import declared from "../../functions/generated/texts.json";
import { FunctionSearch, wordsOf } from "../../src/pane/finder/search";
import { unitOf } from "../../src/pane/finder/unit";
import { texts } from "../../src/pane/say";

const search = new FunctionSearch(declared, texts.find);
const first = (question: string, count: number): string[] =>
  search
    .find(question)
    .slice(0, count)
    .map(({ id }) => id);

test.each(texts.find.questions.map(({ ask, functions }) => [ask, functions] as const))(
  "%s is answered by the functions that were chosen for it",
  (ask, functions) => {
    expect(first(ask, functions.length)).toEqual(functions);
  },
);

test.each([
  ["trunks for 20 erlang", "ERLANGB.CHANNELS", 3],
  ["grade of service", "ERLANGB.BLOCKING", 1],
  ["gos", "ERLANGB.BLOCKING", 3],
  ["blockng", "ERLANGB.BLOCKING", 1],
  ["noise rise", "MARGIN.FROMLOAD", 1],
  ["handoff", "HANDOVER.BLOCKING", 1],
  ["busy hour", "TRAFFIC.CALLS", 1],
  ["callers who redial", "RETRY.BLOCKING", 1],
  ["5g peak rate", "NR.PEAK", 1],
  ["resource blocks of an LTE carrier", "LTE.BLOCKS", 1],
  ["okumura hata", "PATHLOSS.HATA", 1],
  ["sensitivity", "LINK.SENSITIVITY", 1],
  ["walsh code", "CODE.SEQUENCE", 1],
  ["wait longer than 10 seconds", "ERLANGC.LATE", 1],
  ["near-far", "NEARFAR.SINR", 2],
  ["bit error rate of qam", "MODULATION.BER", 1],
  ["give up waiting", "ABANDON.LOST", 1],
  ["push to talk", "TRAFFIC.GROUP", 1],
])("%s leads to %s among the first %d", (question, id, count) => {
  expect(first(question, count)).toContain(id);
});

test.each(["ERLANGB.", "=CAP.ERLANGB", "capdev.erlangb", "cap.erlangb."])("%s lists that subject alone", (typed) => {
  const ids = search.find(typed).map(({ id }) => id);
  expect(ids.length).toBeGreaterThan(3);
  expect(ids.every((id) => id.startsWith("ERLANGB."))).toBe(true);
});

test("every function is found by its own name and by its own description, first", () => {
  for (const { id, description } of declared) {
    expect(first(`CAP.${id}`, 1)).toEqual([id]);
    expect({ id, found: first(description, 3) }).toEqual({ id, found: expect.arrayContaining([id]) });
  }
});

test("questions about nothing here find nothing", () => {
  for (const question of ["", "  ", "how many do I", "zebra", "xyzzy", "§§", "?"])
    expect(search.find(question)).toEqual([]);
});

test("every question, subject and synonym is about functions that exist", () => {
  const ids = new Set(declared.map(({ id }) => id));
  for (const { functions } of texts.find.questions) for (const id of functions) expect(ids).toContain(id);
  const subjects = new Set(declared.map(({ id }) => id.split(".")[0]));
  for (const subject of subjects) expect(Object.keys(texts.find.subjects)).toContain(subject);
  expect(new Set(search.subjects())).toEqual(subjects);
});

test("a subject's functions come in their own order", () => {
  expect(search.ofSubject("POWER").map(({ id }) => id)).toEqual(
    declared.filter(({ id }) => id.startsWith("POWER.")).map(({ id }) => id),
  );
});

test("words are taken without case, plural and hyphen", () => {
  expect(wordsOf("Channels, delays & Eb/N0 of multi-user CDMA: busies")).toEqual([
    "channel",
    "delay",
    "eb/n0",
    "of",
    "multi",
    "user",
    "cdma",
    "busy",
  ]);
});

describe("units", () => {
  test.each([
    ["bandwidthMHz", "MHz"],
    ["channelSpacingKHz", "kHz"],
    ["trafficE", "erlang"],
    ["holdingTimeS", "s"],
    ["areaKm2", "km²"],
    ["distanceKm", "km"],
    ["powersDbm", "dBm"],
    ["gainDb", "dB"],
    ["baseHeightM", "m"],
    ["packetMs", "ms"],
    ["callsPerHour", "an hour"],
    ["ebN0Db", "dB"],
    ["channels", undefined],
    ["percentile", undefined],
    ["demand", undefined],
    ["subcarrierKHz", "kHz"],
  ])("%s is in %s", (parameter, unit) => {
    expect(unitOf(parameter, texts.find.units)).toBe(unit);
  });
});
