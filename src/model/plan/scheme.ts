/** What the radio table says of one scheme, read once and checked. */
import { DomainError } from "../errors";
import type { RadioColumn } from "./records";

export const ACCESS_SCHEMES = ["FDMA", "TDMA", "CDMA", "OFDMA"] as const;
export type Access = (typeof ACCESS_SCHEMES)[number];

/** Parameters of one scheme. */
export class Scheme {
  readonly access: Access;

  constructor(
    readonly name: string,
    private readonly column: RadioColumn,
  ) {
    this.access = accessOf(name, column);
  }

  /** A number of the column, or the default where the cell is blank. */
  number(parameter: string, fallback: number): number {
    const value = this.column.get(parameter);
    if (value === undefined) return fallback;
    if (typeof value !== "number") throw new DomainError(`Radio ${parameter} of ${this.name}`, value, "a number");
    return value;
  }

  /** A number that the scheme cannot do without. */
  required(parameter: string): number {
    const value = this.number(parameter, NaN);
    if (Number.isNaN(value)) {
      throw new DomainError(`Radio ${parameter} of ${this.name}`, undefined, `a value, which ${this.access} needs`);
    }
    return value;
  }

  optional(parameter: string): number | undefined {
    const value = this.number(parameter, NaN);
    return Number.isNaN(value) ? undefined : value;
  }

  text(parameter: string, fallback: string): string {
    const value = this.column.get(parameter);
    return value === undefined ? fallback : String(value);
  }
}

/** The access scheme: stated in the row "access" (or "scheme", as profiles of standards call it), or told by the parameters that only one scheme has. */
function accessOf(name: string, column: RadioColumn): Access {
  const stated = String(column.get("access") ?? column.get("scheme") ?? "").toUpperCase();
  const known = ACCESS_SCHEMES.find((access) => access === stated || access === name.toUpperCase());
  if (known) return known;
  if (stated !== "") throw new DomainError(`Radio access of ${name}`, stated, ACCESS_SCHEMES.join(", "));
  if (column.has("chipRateMcps")) return "CDMA";
  if (column.has("blocks")) return "OFDMA";
  if (column.has("slotsPerCarrier")) return "TDMA";
  if (column.has("channelSpacingKHz")) return "FDMA";
  throw new DomainError(
    "Radio",
    name,
    `a scheme with chipRateMcps (CDMA), blocks (OFDMA), slotsPerCarrier (TDMA) or channelSpacingKHz (FDMA)`,
  );
}
