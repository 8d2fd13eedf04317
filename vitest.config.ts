import { fileURLToPath } from "node:url";
import { defineConfig } from "vitest/config";

/** Needs a PostgreSQL: services, and the parts that only show their faults together. */
const WITH_DATABASE = ["tests/services/**/*.test.ts", "tests/integration/**/*.test.ts"];
/** Needs a running service and a browser. */
const WITH_BROWSER = ["tests/e2e/**/*.test.ts"];

export default defineConfig({
  resolve: { alias: { "@": fileURLToPath(new URL(".", import.meta.url)).replace(/\/$/, "") } },
  test: {
    projects: [
      {
        extends: true,
        test: {
          name: "unit",
          include: ["tests/**/*.test.ts", "tests/**/*.test.tsx"],
          exclude: [...WITH_DATABASE, ...WITH_BROWSER],
          maxWorkers: 2,
        },
      },
      {
        extends: true,
        test: {
          name: "integration",
          include: WITH_DATABASE,
          globalSetup: "tests/integration/cluster-setup.ts",
          // Each file has a database or a workspace of its own.
          maxWorkers: 2,
          testTimeout: 120_000,
          hookTimeout: 120_000,
        },
      },
      {
        extends: true,
        test: {
          name: "e2e",
          include: WITH_BROWSER,
          fileParallelism: false,
          testTimeout: 90_000,
          hookTimeout: 90_000,
        },
      },
    ],
  },
});
