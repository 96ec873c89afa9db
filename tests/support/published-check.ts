import { publishedValue, title } from "../checks/published";

/** Adds a test that holds a computation to a published value, its source in the title. */
export function checkPublished(id: string, compute: (inputs: Record<string, number>) => number): void {
  const entry = publishedValue(id);
  test(title(entry), () => {
    const actual = compute(entry.inputs as Record<string, number>);
    expect(Math.abs(actual - entry.expected)).toBeLessThanOrEqual(entry.tolerance ?? 1e-10 * Math.abs(entry.expected));
  });
}
