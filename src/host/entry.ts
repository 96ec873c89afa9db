/** Entry of dist/functions.js. */
import { functionTable } from "../../functions/generated/function-table";
import { associateAll } from "./associate";

associateAll(Object.values(functionTable));
