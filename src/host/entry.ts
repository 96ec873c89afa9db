/** Entry of dist/functions.js. What it exports is the page's global `capacityFunctions`, from which the pane reads. */
import { functionTable } from "../../functions/generated/function-table";
import { textOf } from "../sheet/registry";
import { associateAll } from "./associate";

// Without the host's script the page still shows what the functions are.
if (typeof CustomFunctions !== "undefined") associateAll(Object.values(functionTable));

export { functionTable, textOf };
