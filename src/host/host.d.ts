/** What the adapter uses of the host's global, which exists only inside the host. */
declare namespace CustomFunctions {
  const ErrorCode: Readonly<
    Record<"invalidValue" | "notAvailable" | "invalidNumber" | "divisionByZero" | "nullReference", string>
  >;
  class Error {
    constructor(code: string, message?: string);
  }
  function associate(id: string, fn: (...args: unknown[]) => unknown): void;
}
