/** The invented demo scenario, as the files that a planner would fill in. */
import cells from "../workbook/demo/cells.csv";
import demand from "../workbook/demo/demand.csv";
import installed from "../workbook/demo/installed.csv";
import ladder from "../workbook/demo/ladder.csv";
import radio from "../workbook/demo/radio.csv";
import routing from "../workbook/demo/routing.csv";
import services from "../workbook/demo/services.csv";

export const DEMO_FILES: Readonly<Record<string, string>> = {
  "demand.csv": demand,
  "services.csv": services,
  "routing.csv": routing,
  "radio.csv": radio,
  "cells.csv": cells,
  "installed.csv": installed,
  "ladder.csv": ladder,
};
