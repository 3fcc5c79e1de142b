import { fileURLToPath } from "node:url";
import { defineConfig } from "vitest/config";

const path = (relative: string) => fileURLToPath(new URL(relative, import.meta.url));

export default defineConfig({
  resolve: { alias: { "~": path("./src") } },
  test: {
    // Node 20 is what this runs on; the storage client's notice about it says nothing new.
    env: { AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: "true" },
    projects: [
      {
        extends: true,
        test: {
          name: "unit",
          include: ["src/**/*.test.ts", "src/**/*.test.tsx", "fakes/**/*.test.ts", "scripts/**/*.test.ts"],
          setupFiles: [path("./tests/support/quiet-console.ts")],
          // Property tests on a machine that is busy with other things; speed is measured by the benches.
          testTimeout: 60_000,
        },
      },
      {
        extends: true,
        test: { name: "reference", include: ["tests/reference/**/*.test.ts"], testTimeout: 120_000 },
      },
      {
        extends: true,
        test: {
          name: "api",
          include: ["tests/api/**/*.test.ts"],
          globalSetup: ["tests/api/global-setup.ts"],
          setupFiles: [path("./tests/support/quiet-console.ts")],
          testTimeout: 30_000,
          hookTimeout: 60_000,
        },
      },
      {
        extends: true,
        test: {
          name: "faults",
          include: ["tests/faults/**/*.test.ts"],
          // Each starts the whole application: two at once on two cores would only time out.
          fileParallelism: false,
          testTimeout: 120_000,
          hookTimeout: 120_000,
        },
      },
      {
        extends: true,
        test: {
          name: "e2e",
          include: ["tests/e2e/**/*.test.ts"],
          globalSetup: ["tests/e2e/global-setup.ts"],
          fileParallelism: false,
          testTimeout: 240_000,
          hookTimeout: 120_000,
        },
      },
    ],
  },
});
