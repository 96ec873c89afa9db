/** An input outside the domain of a function. The sheet shows it as `#VALUE!` with this message. */
export class DomainError extends Error {
  override readonly name = "DomainError";

  constructor(
    readonly parameter: string,
    readonly value: unknown,
    allowed: string,
  ) {
    super(`${parameter} is ${show(value)}; allowed: ${allowed}.`);
  }
}

/** Valid inputs that have no answer, such as a target above the pole capacity. The sheet shows it as `#N/A`. */
export class NoAnswerError extends Error {
  override readonly name = "NoAnswerError";
}

const LONGEST_QUOTE = 40;

function show(value: unknown): string {
  if (value === undefined) return "missing";
  if (typeof value !== "string") return String(value);
  const text = value.length > LONGEST_QUOTE ? `${value.slice(0, LONGEST_QUOTE)}…` : value;
  return `the text "${text}"`;
}
