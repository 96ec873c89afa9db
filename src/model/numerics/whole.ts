/** Largest whole number not above a quotient of decimal inputs, whose rounding may leave 125 as 124.99999999999999. */
export function wholeWithin(quotient: number): number {
  const nearest = Math.round(quotient);
  return Math.abs(quotient - nearest) <= 1e-12 * Math.max(1, Math.abs(nearest)) ? nearest : Math.floor(quotient);
}

/** Smallest whole number not below a quotient of decimal inputs. */
export function wholeCovering(quotient: number): number {
  return -wholeWithin(-quotient);
}
