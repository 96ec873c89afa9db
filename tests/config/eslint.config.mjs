import { fileURLToPath } from "node:url";
import jsdoc from "eslint-plugin-jsdoc";
import tseslint from "typescript-eslint";

const OWN_TAGS = ["customfunction", "method", "source", "assumes", "errors", "example", "streaming", "cancelable"];

export default tseslint.config(
  { ignores: ["dist/**", "functions/generated/**", "node_modules/**", "plan-output/**", "coverage/**"] },
  {
    files: ["**/*.ts"],
    extends: [...tseslint.configs.recommendedTypeChecked],
    languageOptions: {
      parserOptions: { project: "./tsconfig.json", tsconfigRootDir: fileURLToPath(new URL("../..", import.meta.url)) },
    },
    rules: {
      // An index is checked by noUncheckedIndexedAccess; where the code has just made it safe, "!" says so.
      "@typescript-eslint/no-non-null-assertion": "off",
      "@typescript-eslint/no-unused-vars": ["error", { argsIgnorePattern: "^_", varsIgnorePattern: "^_" }],
      "@typescript-eslint/restrict-template-expressions": ["error", { allowNumber: true }],
      "@typescript-eslint/only-throw-error": ["error", { allow: [{ from: "file", name: "CellError" }] }],
      // Cells and thrown values are of unknown type; turning them into text is meant.
      "@typescript-eslint/no-base-to-string": "off",
      eqeqeq: "error",
      "no-console": "error",
    },
  },
  {
    // The metadata generator reads only any[][] as "a cell or a range".
    files: ["functions/**/*.ts"],
    plugins: { jsdoc },
    settings: { jsdoc: { tagNamePreference: { method: "method" } } },
    rules: {
      "@typescript-eslint/no-explicit-any": "off",
      "@typescript-eslint/no-unsafe-return": "off",
      "jsdoc/check-param-names": "error",
      "jsdoc/check-tag-names": ["error", { definedTags: OWN_TAGS }],
      "jsdoc/require-param-description": "error",
      "jsdoc/require-returns-description": "error",
    },
  },
  {
    files: ["src/model/**/*.ts"],
    plugins: { jsdoc },
    rules: {
      "jsdoc/check-param-names": "error",
      "jsdoc/require-jsdoc": ["error", { publicOnly: true }],
      "no-restricted-globals": ["error", "Date", "performance"],
      "no-restricted-properties": [
        "error",
        { object: "Math", property: "random", message: "Randomness is passed in." },
      ],
    },
  },
  {
    files: ["tests/**/*.ts"],
    rules: {
      "@typescript-eslint/no-unsafe-assignment": "off",
      "@typescript-eslint/no-unsafe-member-access": "off",
      "@typescript-eslint/no-unsafe-argument": "off",
      "@typescript-eslint/no-unsafe-call": "off",
      "@typescript-eslint/no-unsafe-return": "off",
      "@typescript-eslint/no-explicit-any": "off",
    },
  },
  { files: ["tests/benchmarks/**/*.ts"], rules: { "no-console": "off" } },
);
