/** What made a workbook, kept in its properties. */
export interface Origin {
  readonly version: string;
  readonly time: Date;
  /** SHA-256 of each input by its name. */
  readonly hashes: Readonly<Record<string, string>>;
  /** True for the demo scenario, which says on every opening that it is invented. */
  readonly invented: boolean;
}
