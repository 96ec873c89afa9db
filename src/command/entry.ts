import { functionTable } from "../../functions/generated/function-table";
import { run } from "./main";

run(process.argv.slice(2), {
  out: (line) => process.stdout.write(`${line}\n`),
  err: (line) => process.stderr.write(`${line}\n`),
  functions: functionTable,
  version: PRODUCT_VERSION,
  now: () => new Date(),
}).then(
  (code) => {
    process.exitCode = code;
  },
  (fault: unknown) => {
    process.stderr.write(
      `capacity: internal fault, please report it: ${fault instanceof Error ? fault.stack : String(fault)}\n`,
    );
    process.exitCode = 70;
  },
);
