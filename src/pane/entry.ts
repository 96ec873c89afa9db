/// <reference types="office-js" />
/** Entry of dist/pane.js: waits for the program around the pane and puts the pane together. */
import { mount } from "./app";
import { texts } from "./say";
import { followTheme } from "./theme";
import { OfficeWorkbook } from "./workbook/office-workbook";

/** Office.js answers at once or never, where no program is around the page. */
const LONGEST_WAIT_MILLISECONDS = 5_000;

interface HostAnswer {
  readonly inWorkbook: boolean;
  readonly notice: string | undefined;
}

async function askHost(): Promise<HostAnswer> {
  if (typeof Office === "undefined") return { inWorkbook: false, notice: texts.host.missing };
  const waited = new Promise<undefined>((resolve) => setTimeout(resolve, LONGEST_WAIT_MILLISECONDS, undefined));
  const info = await Promise.race([Office.onReady(), waited]);
  const inWorkbook = info?.host === Office.HostType.Excel;
  return { inWorkbook, notice: inWorkbook ? undefined : texts.host.outside };
}

async function start(): Promise<void> {
  const { namespace = "", version = "", environment = "" } = document.documentElement.dataset;
  let background: string | undefined;
  const applyTheme = followTheme(() => background);
  const { inWorkbook, notice } = await askHost();
  if (inWorkbook) background = Office.context.officeTheme?.bodyBackgroundColor;
  applyTheme();
  const functions = globalThis.capacityFunctions;
  mount(
    document.getElementById("pane")!,
    { namespace, version, environment },
    { book: inWorkbook ? new OfficeWorkbook() : undefined, functions },
    functions ? notice : texts.host.noFunctions,
  );
}

void start();
