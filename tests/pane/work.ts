/** Work for tests: keeps what it told, and can stop itself after some steps. */
import type { Work } from "../../src/pane/work";

export interface WatchedWork extends Work {
  readonly told: string[];
}

/** @param stopAfter progress reports after which a person presses Stop */
export function watched(stopAfter = Infinity): WatchedWork {
  const control = new AbortController();
  const told: string[] = [];
  return {
    signal: control.signal,
    told,
    progress: (text) => {
      told.push(text);
      if (told.length >= stopAfter) control.abort();
    },
  };
}
