/** The one place that knows the host's global: hands it the functions and gives errors the host's own form. */
import { CellError } from "../sheet/cell-error";
import type { RegisteredFunction } from "../sheet/registry";
import { refuseTooLarge } from "./payload";

/** The host's error codes by the text a cell shows. */
const CODES: Readonly<Record<string, keyof typeof CustomFunctions.ErrorCode>> = {
  "#VALUE!": "invalidValue",
  "#N/A": "notAvailable",
  "#NUM!": "invalidNumber",
  "#DIV/0!": "divisionByZero",
  "#NULL!": "nullReference",
};

function hostCell(cell: unknown): unknown {
  if (!(cell instanceof CellError)) return cell;
  // CustomFunctions.Error exists only inside a host, so it is touched at call time.
  const code = CustomFunctions.ErrorCode[CODES[cell.code] ?? "invalidValue"];
  return new CustomFunctions.Error(code, cell.message);
}

/** A function as the host calls it: its own arguments, without the invocation that the host adds. */
export function hostFunction(entry: RegisteredFunction): (...received: unknown[]) => unknown[][] {
  return (...received) => {
    const args = entry.parameters.map((_, i) => (received[i] ?? null) as unknown[][] | null);
    const tooLarge = refuseTooLarge(entry.id, args);
    const result = tooLarge ? [[tooLarge]] : entry.call(args);
    return result.map((row) => row.map(hostCell));
  };
}

/** Hands every function to the host. */
export function associateAll(functions: Iterable<RegisteredFunction>): void {
  for (const entry of functions) CustomFunctions.associate(entry.id, hostFunction(entry));
}
