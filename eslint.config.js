import js from "@eslint/js";
import astro from "eslint-plugin-astro";
import ts from "typescript-eslint";

const noProcessEnv = {
  selector: "MemberExpression[object.name='process'][property.name='env']",
  message: "Read the environment through src/server/env.ts, which parses it once.",
};

export default ts.config(
  { ignores: ["dist/", "data/", ".astro/", "node_modules/", "test-output/", "drizzle/", "public/"] },
  js.configs.recommended,
  ...ts.configs.strict,
  ...astro.configs.recommended,
  {
    rules: {
      "no-console": "error",
      "@typescript-eslint/consistent-type-imports": "error",
      "@typescript-eslint/no-unused-vars": ["error", { argsIgnorePattern: "^_", varsIgnorePattern: "^_" }],
    },
  },
  { files: ["src/**"], rules: { "no-restricted-syntax": ["error", noProcessEnv] } },
  { files: ["src/server/env.ts"], rules: { "no-restricted-syntax": "off" } },
  {
    files: ["scripts/**", "fakes/**", "tests/**", "src/server/entries/**", "src/screening/command.ts"],
    rules: { "no-console": "off" },
  },
  {
    files: ["**/*.mjs"],
    languageOptions: { globals: { process: "readonly", console: "readonly", URL: "readonly" } },
  },
);
