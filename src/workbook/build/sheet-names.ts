/** Names of the sheets of a plan workbook, in the order of the work. */
export const SHEETS = {
  purpose: "Purpose",
  forecast: "Forecast",
  services: "Services",
  routing: "Routing",
  radio: "Radio",
  cells: "Cells",
  installed: "Installed",
  ladder: "Ladder",
  traffic: "Traffic",
  plan: "Plan",
  expansion: "Expansion",
  summary: "Summary",
  dashboard: "Dashboard",
  linkBudget: "Link budget",
  receiver: "Receiver",
  method: "Method",
  checks: "Checks",
  changes: "Changes",
  formulas: "Formulas",
} as const;

export const CHANGES_HEADINGS = ["cell", "year", "scheme", "column", "before", "after", "change"];
