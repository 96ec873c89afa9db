/** The house rule: arrows point down only. */
const only = (from, to, why) => ({
  name: `${from.replaceAll("/", "-")}-imports-only-below`,
  comment: why,
  severity: "error",
  from: { path: `^${from}/` },
  to: { path: "^(src|functions)/", pathNot: `^(${to})/` },
});

module.exports = {
  forbidden: [
    only("src/model", "src/model", "The model is pure: it imports nothing of ours."),
    only("src/sheet", "src/model|src/sheet", "The sheet layer knows the model and no host."),
    only("functions", "src/model|src/sheet|functions", "Declarations call the sheet layer with model functions."),
    only("src/workbook", "src/model|src/sheet|src/workbook", "The workbook is handed the function table."),
    only("src/host", "src/model|src/sheet|functions|src/host", "The host adapter serves the functions only."),
    only(
      "src/command",
      "src/model|src/sheet|src/workbook|functions|src/command",
      "An entry point imports no other entry point.",
    ),
    only(
      "src/pane",
      "src/model|src/sheet|src/workbook|src/pane",
      "The pane takes the functions from the page, where functions.js put them, and knows no other entry point.",
    ),
    only("src/server", "src/server", "The server hands out built files and knows nothing of what is in them."),
    {
      name: "one-door-to-office-js",
      comment: "Only the adapter and the entry point know the spreadsheet program behind the pane.",
      severity: "error",
      from: { path: "^src/", pathNot: "^src/(pane/workbook/office-workbook|pane/entry)\\.ts$" },
      to: { path: "^src/pane/workbook/office-workbook\\.ts$" },
    },
    {
      name: "model-has-no-packages",
      severity: "error",
      from: { path: "^src/model/" },
      to: { dependencyTypes: ["core"] },
    },
    { name: "no-circular", severity: "error", from: { pathNot: "^node_modules" }, to: { circular: true } },
    {
      name: "one-door-to-the-spreadsheet-library",
      severity: "error",
      from: { pathNot: "^src/workbook/" },
      to: { path: "node_modules/@cj-tech-master" },
    },
    {
      name: "no-test-code-in-the-product",
      severity: "error",
      from: { path: "^(src|functions)/" },
      to: { path: "^tests/" },
    },
    { name: "resolvable", severity: "error", from: {}, to: { couldNotResolve: true } },
  ],
  options: {
    doNotFollow: { path: "node_modules" },
    tsConfig: { fileName: "tsconfig.json" },
    tsPreCompilationDeps: true,
    enhancedResolveOptions: { exportsFields: ["exports"], conditionNames: ["import", "require", "node", "default"] },
    exclude: { path: "^(dist|node_modules)/" },
  },
};
