import { blockingTarget } from "../src/model/blocking/erlang-b";
import * as handover from "../src/model/blocking/handover";
import { flag, number, perCell, perCellRow } from "../src/sheet/call";

/**
 * Blocking of new calls and failure of handovers in a cell with guard channels that only handovers may take.
 * @customfunction HANDOVER.BLOCKING
 * @param newTrafficE Traffic of new calls in erlang: new calls per second times the mean channel holding time.
 * @param handoverTrafficE Traffic of handovers into the cell in erlang, at least 0.
 * @param channels Number of channels of the cell, whole, 0 to 1,000,000.
 * @param guardChannels Channels that new calls leave free for handovers, whole, at most all channels.
 * @param [labels] TRUE to put the headings first.
 * @returns Blocking probability of new calls, then failure probability of handovers.
 * @method Birth-death chain: new calls are admitted while fewer than channels - guardChannels are busy, handovers while any is free. Erlang B of both up to that state; from there each state joins by the ratio to those below. Relative error below 1e-12, down to 1e-300.
 * @source D. Hong, S. S. Rappaport, IEEE Transactions on Vehicular Technology 35 (1986), priority by reserved channels.
 * @assumes Poisson new calls and handovers with the same exponential channel holding time, blocked calls leave, no queue. For emergency traffic follow local regulation and have licensed practice check the result.
 * @errors #VALUE! for more guard channels than channels.
 * @example =CAP.HANDOVER.BLOCKING(20, 2, 30, 2) is 0.04153
 */
export function handoverBlocking(
  newTrafficE: any[][],
  handoverTrafficE: any[][],
  channels: any[][],
  guardChannels: any[][],
  labels?: any[][],
): any[][] {
  return perCellRow(
    handover.blocking,
    ["newCallBlocking", "handoverFailure"],
    {
      newTrafficE: number(newTrafficE, handover.cellTraffic),
      handoverTrafficE: number(handoverTrafficE, handover.cellTraffic),
      channels: number(channels, handover.cellChannels),
      guardChannels: number(guardChannels, handover.guardCount),
    },
    flag(labels),
  );
}

/**
 * Smallest number of guard channels that keeps the failure of handovers at the target or below.
 * @customfunction HANDOVER.GUARD
 * @param newTrafficE Traffic of new calls in erlang: new calls per second times the mean channel holding time.
 * @param handoverTrafficE Traffic of handovers into the cell in erlang, at least 0.
 * @param channels Number of channels of the cell, whole, 0 to 1,000,000.
 * @param failureTarget Largest failure probability of handovers, 1e-300 to below 1; 0.005 is 0.5 %.
 * @returns Number of guard channels.
 * @method Smallest count at which the failure of CAP.HANDOVER.BLOCKING is not above the target, in one pass: each guard channel more costs one product and one Erlang B. New-call blocking rises with it: look at both.
 * @source D. Hong, S. S. Rappaport, IEEE Transactions on Vehicular Technology 35 (1986), priority by reserved channels.
 * @assumes Poisson new calls and handovers with the same exponential channel holding time, blocked calls leave, no queue.
 * @errors #N/A where handovers fail more often even with all channels to themselves.
 * @example =CAP.HANDOVER.GUARD(20, 2, 30, 0.001) is 2
 */
export function handoverGuard(
  newTrafficE: any[][],
  handoverTrafficE: any[][],
  channels: any[][],
  failureTarget: any[][],
): any[][] {
  return perCell(handover.guard, {
    newTrafficE: number(newTrafficE, handover.cellTraffic),
    handoverTrafficE: number(handoverTrafficE, handover.cellTraffic),
    channels: number(channels, handover.cellChannels),
    failureTarget: number(failureTarget, blockingTarget),
  });
}

/**
 * Handover traffic of a cell among equal cells, and the mean time for which a call holds a channel of one cell.
 * @customfunction HANDOVER.TRAFFIC
 * @param newTrafficE Traffic of new calls in erlang: new calls per second times the mean channel holding time.
 * @param holdingTimeS Mean duration of a call in seconds, handovers included.
 * @param dwellTimeS Mean time that a user stays in one cell in seconds.
 * @param [labels] TRUE to put the headings first.
 * @returns Traffic of handovers into the cell in erlang, then mean channel holding time in seconds.
 * @method A channel is held h T/(h+T) on average, the shorter of the rest of the call (h) and of the stay (T). A call makes h/T handovers, each as long as a new call's stay, so that handover traffic is newTrafficE h/T. Traffic c counted by whole calls (calls per second times h) has c T/(h+T) erlang of new calls.
 * @source D. Hong, S. S. Rappaport, IEEE Transactions on Vehicular Technology 35 (1986), with exponential dwell time.
 * @assumes Exponential call duration and dwell time, every cell like its neighbours, as many calls come as go; blocking and failed handovers neglected.
 * @errors #VALUE! for times of 0 or negative traffic.
 * @example =CAP.HANDOVER.TRAFFIC(10, 120, 60) is 20
 */
export function handoverTraffic(
  newTrafficE: any[][],
  holdingTimeS: any[][],
  dwellTimeS: any[][],
  labels?: any[][],
): any[][] {
  return perCellRow(
    handover.traffic,
    ["handoverE", "channelHoldingS"],
    {
      newTrafficE: number(newTrafficE, handover.cellTraffic),
      holdingTimeS: number(holdingTimeS, handover.durationS),
      dwellTimeS: number(dwellTimeS, handover.durationS),
    },
    flag(labels),
  );
}
