import type { RegisteredFunction } from "../sheet/registry";

/** The worksheet functions by id, handed in by whoever knows them. */
export type FunctionTable = Readonly<Record<string, RegisteredFunction>>;
