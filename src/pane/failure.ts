/** Something that the person at the pane can mend, said in one line. */
export class PaneFailure extends Error {
  override readonly name = "PaneFailure";
}
