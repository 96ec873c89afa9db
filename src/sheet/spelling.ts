/** Edits (insert, delete, replace, swap of neighbours) that turn one word into another, counted up to a limit. */
export function editDistance(a: string, b: string, limit = 3): number {
  if (Math.abs(a.length - b.length) > limit) return limit + 1;
  let beforeLast: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const replace = last[j - 1]! + (a[i - 1] === b[j - 1] ? 0 : 1);
      let best = Math.min(replace, last[j]! + 1, row[j - 1]! + 1);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1])
        best = Math.min(best, beforeLast[j - 2]! + 1);
      row.push(best);
    }
    beforeLast = last;
    last = row;
  }
  return last[b.length]!;
}

/** The known name that a heading most likely means, where it is close to one. */
export function closest(heading: string, known: readonly string[]): string | undefined {
  const lower = heading.toLowerCase().replace(/[\s_-]/g, "");
  let best: string | undefined;
  let bestDistance = Infinity;
  for (const name of known) {
    const distance = editDistance(lower, name.toLowerCase());
    // Short names are close to everything; a third of the letters may differ, at most two.
    if (distance < bestDistance && distance <= Math.min(2, Math.floor(name.length / 3))) {
      best = name;
      bestDistance = distance;
    }
  }
  return best;
}
