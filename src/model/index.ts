/** The pure module: traffic theory and multi-access radio as functions of numbers, a namespace for each subject. */
export { DomainError, NoAnswerError } from "./errors";

export * as traffic from "./traffic/traffic";
export * as forecast from "./traffic/forecast";

export * as erlangB from "./blocking/erlang-b";
export * as erlangC from "./blocking/erlang-c";
export * as queue from "./blocking/queue";
export * as priority from "./blocking/priority";
export * as abandon from "./blocking/abandon";
export * as message from "./blocking/message";
export * as engset from "./blocking/engset";
export * as retry from "./blocking/retry";
export * as overflow from "./blocking/overflow";
export * as peaky from "./blocking/peaky";
export * as multiservice from "./blocking/multiservice";
export * as handover from "./blocking/handover";
export * as sharing from "./blocking/sharing";
export * as randomAccess from "./blocking/random-access";

export * as power from "./radio/power";
export * as noise from "./radio/noise";
export * as rate from "./radio/rate";
export * as modulation from "./radio/modulation";
export * as link from "./radio/link";
export * as pathLoss from "./radio/path-loss";
export * as range from "./radio/range";
export * as shadowing from "./radio/shadowing";
export * as cell from "./radio/cell";

export * as sinr from "./interference/sinr";
export * as load from "./interference/load";
export * as margin from "./interference/margin";

export * as code from "./codes/code";
export * as receiver from "./codes/receiver";
export * as nearFar from "./codes/near-far";
export * as timing from "./codes/timing";

export * as fdma from "./schemes/fdma";
export * as tdma from "./schemes/tdma";
export * as cdma from "./schemes/cdma";
export * as ofdma from "./schemes/ofdma";
export * as voice from "./schemes/voice";
export * as compare from "./schemes/compare";

export * as lte from "./standards/lte";
export * as nr from "./standards/nr";
export * as tdd from "./standards/tdd";
export * as profiles from "./standards/profiles";

export { carriers } from "./plan/carriers";
export { sites } from "./plan/sites";
export { demandTable } from "./plan/demand";
export { planTable } from "./plan/table";
export { expansion } from "./plan/expansion";
export { summarise } from "./plan/summary";
export { changesBetween } from "./plan/changes";
