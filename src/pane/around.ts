/** What the parts of the pane share. */
import type { PageFunctions } from "./functions-on-page";
import type { Jobs } from "./view/jobs";
import type { OpenWorkbook } from "./workbook/workbook";

export interface Around {
  /** The open workbook; undefined outside the spreadsheet program. */
  readonly book: OpenWorkbook | undefined;
  readonly functions: PageFunctions | undefined;
  readonly namespace: string;
  readonly jobs: Jobs;
}
