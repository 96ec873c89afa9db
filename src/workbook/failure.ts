/** Something about a file or a request that its user can mend; shown as one line. */
export class WorkbookFailure extends Error {
  override readonly name = "WorkbookFailure";
}
