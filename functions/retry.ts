import * as retry from "../src/model/blocking/retry";
import { share } from "../src/model/domain";
import { number, perCell } from "../src/sheet/call";

/**
 * Blocking of an attempt where blocked callers try again.
 * @customfunction RETRY.BLOCKING
 * @param firstTrafficE Traffic of first attempts in erlang, 0 to 1e6.
 * @param channels Number of channels, 0 to 1e7; may be fractional.
 * @param retryShare Share of blocked attempts that are repeated, 0 to 1.
 * @returns Probability from 0 to 1, the same for first attempts and repeats.
 * @method Fixed point A = A0 + r A B(A) (extended Erlang B), then Erlang B at A. Solved as (1 - r) A + r carried(A) = A0, which rises with A, so that the answer is unique and keeps its digits. Not the single retry and not a retrial queue.
 * @source Extended Erlang B: R. F. Rey (ed.), Engineering and Operations in the Bell System; ITU-D Teletraffic Engineering Handbook (from memory).
 * @assumes Repeats arrive as fresh Poisson traffic, some time after the blocked attempt.
 * @errors #N/A where every blocked attempt is repeated and the first attempts alone fill the channels.
 * @example =CAP.RETRY.BLOCKING(8, 10, 0.5) is 0.15195
 */
export function retryBlocking(firstTrafficE: any[][], channels: any[][], retryShare: any[][]): any[][] {
  return perCell(retry.blocking, {
    firstTrafficE: number(firstTrafficE, retry.firstTraffic),
    channels: number(channels, retry.retryChannels),
    retryShare: number(retryShare, share),
  });
}

/**
 * Offered traffic with repeats, where blocked callers try again.
 * @customfunction RETRY.OFFERED
 * @param firstTrafficE Traffic of first attempts in erlang, 0 to 1e6.
 * @param channels Number of channels, 0 to 1e7; may be fractional.
 * @param retryShare Share of blocked attempts that are repeated, 0 to 1.
 * @returns Erlang, first attempts and repeats together.
 * @method Fixed point A = A0 + r A B(A) (extended Erlang B), solved as (1 - r) A + r carried(A) = A0.
 * @source Extended Erlang B: R. F. Rey (ed.), Engineering and Operations in the Bell System; ITU-D Teletraffic Engineering Handbook (from memory).
 * @assumes Repeats arrive as fresh Poisson traffic, some time after the blocked attempt.
 * @errors #N/A where every blocked attempt is repeated and the first attempts alone fill the channels.
 * @example =CAP.RETRY.OFFERED(8, 10, 1) is 10.4737
 */
export function retryOffered(firstTrafficE: any[][], channels: any[][], retryShare: any[][]): any[][] {
  return perCell(retry.offered, {
    firstTrafficE: number(firstTrafficE, retry.firstTraffic),
    channels: number(channels, retry.retryChannels),
    retryShare: number(retryShare, share),
  });
}
