import { DomainError } from "../model/errors";
import { canonicalId, NAMESPACE, registeredIds, textOf, type FunctionText } from "./registry";
import { closest } from "./spelling";

/** The documentation of a function as one text, a line for each part. */
export function compose(entry: FunctionText): string {
  const names = entry.parameters.map(({ name, optional }) => (optional ? `[${name}]` : name)).join(", ");
  const part = (heading: string, text: string): string[] => (text ? [`${heading}: ${text}`] : []);
  return [
    `${NAMESPACE}.${entry.id}(${names})`,
    entry.description,
    ...entry.parameters.map(({ name, text }) => `${name}: ${text}`),
    ...part("Result", entry.returns),
    ...part("Method", entry.method),
    ...part("Source", entry.source),
    ...part("Assumes", entry.assumes),
    ...part("Errors", entry.errors),
  ].join("\n");
}

/**
 * The method statement of a function by name.
 *
 * @throws DomainError for a name that is not in the set
 */
export function describe(functionName: string): string {
  const entry = textOf(functionName);
  if (entry) return compose(entry);
  const ids = registeredIds();
  const near = closest(canonicalId(functionName), ids);
  const subject = canonicalId(functionName).split(".")[0]!;
  const related = near ? [near] : ids.filter((id) => id.startsWith(`${subject}.`)).slice(0, 5);
  const hint =
    related.length > 0 ? `a function of this set, such as ${related.join(", ")}` : "the name of a function of this set";
  throw new DomainError("functionName", functionName, hint);
}
