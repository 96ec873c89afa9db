/** Types are checked by `npm run types`; here files are only translated, so that tests start quickly. */
module.exports = {
  rootDir: "../..",
  testMatch: ["<rootDir>/tests/**/*.test.ts"],
  testEnvironment: "node",
  // A slow machine is no failure: no test asserts a time.
  testTimeout: 60_000,
  transform: {
    "\\.csv$": "<rootDir>/tests/config/text-transform.cjs",
    "\\.ts$": [
      "ts-jest",
      {
        tsconfig: {
          target: "ES2022",
          module: "CommonJS",
          isolatedModules: true,
          esModuleInterop: true,
          resolveJsonModule: true,
        },
        diagnostics: false,
      },
    ],
  },
};
