/** Long work: it says how far it is and can be stopped between its steps. */

export interface Work {
  readonly signal: AbortSignal;
  /** Tells what is going on, with the share done where it is known. */
  progress(text: string, share?: number): void;
}

/** Thrown where work was stopped; `what` says what stays behind. */
export class Stopped extends Error {
  override readonly name = "Stopped";
  constructor(readonly what?: string) {
    super("stopped");
  }
}

export function stopIfAsked(work: Work, what?: string): void {
  if (work.signal.aborted) throw new Stopped(what);
}

/** Waits, and ends early when stopped. */
export function pause(milliseconds: number, work: Work): Promise<void> {
  return new Promise((resolve) => {
    const end = (): void => {
      clearTimeout(timer);
      work.signal.removeEventListener("abort", end);
      resolve();
    };
    const timer = setTimeout(end, milliseconds);
    work.signal.addEventListener("abort", end);
  });
}
