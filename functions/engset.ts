import * as engset from "../src/model/blocking/engset";
import { blockingTarget } from "../src/model/blocking/erlang-b";
import { shareBelowOne } from "../src/model/domain";
import { number, perCell } from "../src/sheet/call";

/**
 * Time congestion of Engset's model: share of time in which all channels are busy, for a finite number of sources.
 * @customfunction ENGSET.TIMECONGESTION
 * @param sources Number of sources S, 1 to 1e9.
 * @param trafficPerIdleSourceE Traffic of one idle source in erlang, at least 0: a/(1-a) of a source that carries a.
 * @param channels Number of channels N, at least 0; may be fractional.
 * @returns Probability from 0 to 1.
 * @method E = C(S,N) b^N / (sum of C(S,k) b^k, k = 0 to N), b the traffic per idle source; continued to fractional N by 1/E = (S-N) times the integral of (1-t)^(S-N-1) (1+t/b)^N over t from 0 to 1 = 2F1(1, -N; S-N+1; -1/b), which tends to the continued Erlang B as S grows. Recursion up to 32 channels; beyond, the continued fraction of the incomplete beta function, below the mean directly, above it beside the binomial probability by its saddle point. Relative error below 1e-12 at any size, down to 1e-300.
 * @source T. O. Engset 1918; ITU-D Teletraffic Engineering Handbook, Engset chapter; fractional N: P. Azimzadeh, T. Carpenter, Operations Research Letters 44 (2016); algorithm: A. R. DiDonato, A. H. Morris, ACM Transactions on Mathematical Software 18 (1992).
 * @assumes Each idle source calls at the same constant rate, any distribution of holding times, every call reaches every channel, blocked calls leave.
 * @errors #VALUE! for sources outside 1 to 1e9 or negative traffic.
 * @example =CAP.ENGSET.TIMECONGESTION(100, 0.15, 20) is 0.01545
 */
export function engsetTimecongestion(sources: any[][], trafficPerIdleSourceE: any[][], channels: any[][]): any[][] {
  return perCell(engset.timeCongestion, {
    sources: number(sources, engset.sourceCount),
    trafficPerIdleSourceE: number(trafficPerIdleSourceE, engset.idleSourceTraffic),
    channels: number(channels, engset.groupSize),
  });
}

/**
 * Call congestion of Engset's model: share of calls that are blocked, for a finite number of sources.
 * @customfunction ENGSET.CALLCONGESTION
 * @param sources Number of sources S, 1 to 1e9.
 * @param trafficPerIdleSourceE Traffic of one idle source in erlang, at least 0: a/(1-a) of a source that carries a.
 * @param channels Number of channels N, at least 0; may be fractional.
 * @returns Probability from 0 to 1; 0 where every source has a channel.
 * @method The time congestion of S-1 sources, because a calling source sees the others only: B(S) = E(S-1). Continuation and algorithm as in CAP.ENGSET.TIMECONGESTION.
 * @source T. O. Engset 1918; ITU-D Teletraffic Engineering Handbook, Engset chapter (arrival theorem).
 * @assumes Each idle source calls at the same constant rate, any distribution of holding times, every call reaches every channel, blocked calls leave.
 * @errors #VALUE! for sources outside 1 to 1e9 or negative traffic.
 * @example =CAP.ENGSET.CALLCONGESTION(100, 0.15, 20) is 0.01419
 */
export function engsetCallcongestion(sources: any[][], trafficPerIdleSourceE: any[][], channels: any[][]): any[][] {
  return perCell(engset.callCongestion, {
    sources: number(sources, engset.sourceCount),
    trafficPerIdleSourceE: number(trafficPerIdleSourceE, engset.idleSourceTraffic),
    channels: number(channels, engset.groupSize),
  });
}

/**
 * Traffic congestion of Engset's model: share of the offered traffic that is not carried, for a finite number of sources.
 * @customfunction ENGSET.TRAFFICCONGESTION
 * @param sources Number of sources S, 1 to 1e9.
 * @param trafficPerIdleSourceE Traffic of one idle source in erlang, at least 0: a/(1-a) of a source that carries a.
 * @param channels Number of channels N, at least 0; may be fractional.
 * @returns Share from 0 to 1; 0 where every source has a channel.
 * @method C = E (S-N)/S, E the time congestion: the offered traffic is S b/(1+b), what the sources would carry were none blocked. Continuation and algorithm as in CAP.ENGSET.TIMECONGESTION.
 * @source T. O. Engset 1918; ITU-D Teletraffic Engineering Handbook, Engset chapter.
 * @assumes Each idle source calls at the same constant rate, any distribution of holding times, every call reaches every channel, blocked calls leave.
 * @errors #VALUE! for sources outside 1 to 1e9 or negative traffic.
 * @example =CAP.ENGSET.TRAFFICCONGESTION(100, 0.15, 20) is 0.01236
 */
export function engsetTrafficcongestion(sources: any[][], trafficPerIdleSourceE: any[][], channels: any[][]): any[][] {
  return perCell(engset.trafficCongestion, {
    sources: number(sources, engset.sourceCount),
    trafficPerIdleSourceE: number(trafficPerIdleSourceE, engset.idleSourceTraffic),
    channels: number(channels, engset.groupSize),
  });
}

/**
 * Smallest whole number of channels that keeps Engset's call congestion at the target or below.
 * @customfunction ENGSET.CHANNELS
 * @param sources Number of sources S, 1 to 1e9.
 * @param trafficPerIdleSourceE Traffic of one idle source in erlang, at least 0: a/(1-a) of a source that carries a.
 * @param blocking Largest share of calls blocked, 1e-300 to below 1; 0.02 is 2 %.
 * @returns Number of channels, at most one for each source.
 * @method Smallest N with a call congestion (CAP.ENGSET.CALLCONGESTION) not above the target, by halving around an estimate from the normal distribution.
 * @source T. O. Engset 1918; ITU-D Teletraffic Engineering Handbook, Engset chapter.
 * @assumes Each idle source calls at the same constant rate, any distribution of holding times, every call reaches every channel, blocked calls leave.
 * @errors #VALUE! for a target of 0, or of 1 or more.
 * @example =CAP.ENGSET.CHANNELS(100, 0.15, 0.02) is 20
 */
export function engsetChannels(sources: any[][], trafficPerIdleSourceE: any[][], blocking: any[][]): any[][] {
  return perCell(engset.channels, {
    sources: number(sources, engset.sourceCount),
    trafficPerIdleSourceE: number(trafficPerIdleSourceE, engset.idleSourceTraffic),
    blocking: number(blocking, blockingTarget),
  });
}

/**
 * Traffic of an idle source from the traffic of a source: erlang per user are not erlang per idle user.
 * @customfunction ENGSET.IDLETRAFFIC
 * @param trafficPerSourceE Traffic of one source in erlang when never blocked, at least 0 and below 1.
 * @returns Erlang per idle source.
 * @method a/(1-a): a source that carries a is idle for a share 1-a of the time, and calls only then.
 * @source ITU-D Teletraffic Engineering Handbook, Engset chapter.
 * @errors #VALUE! for 1 erlang or more: one source cannot be busy more than always.
 * @example =CAP.ENGSET.IDLETRAFFIC(0.2) is 0.25
 */
export function engsetIdletraffic(trafficPerSourceE: any[][]): any[][] {
  return perCell(engset.idleTraffic, { trafficPerSourceE: number(trafficPerSourceE, shareBelowOne) });
}
