/** The unit that a parameter's name carries. */

/** The longest known ending that follows a lower-case letter or a digit; undefined where there is none. */
export function unitOf(parameter: string, units: Readonly<Record<string, string>>): string | undefined {
  const ending = Object.keys(units)
    .sort((a, b) => b.length - a.length)
    .find((unit) => parameter.endsWith(unit) && /[a-z\d]$/.test(parameter.slice(0, -unit.length)));
  return ending === undefined ? undefined : units[ending];
}
