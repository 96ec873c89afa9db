import { domain } from "../domain";
import { DomainError } from "../errors";

const ALLOWED = [1, 2, 4, 6, 8, 10];

/** Bits a symbol of pi/2-BPSK, QPSK, 16QAM, 64QAM, 256QAM and 1024QAM. */
export const modulationBits = domain(1, 10, "1, 2, 4, 6, 8 or 10 bits a symbol", { whole: true });

/** @throws DomainError unless some modulation has this number of bits a symbol */
export function requireModulationBits(bits: number): void {
  if (!ALLOWED.includes(bits)) throw new DomainError("modulationBits", bits, modulationBits.words);
}
