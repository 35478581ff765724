import react from "@vitejs/plugin-react";
import { defineConfig } from "vitest/config";

export default defineConfig({
  plugins: [react()],
  test: {
    globals: false,
    restoreMocks: true,
    // Set here and not in a project: pool ids are unique only under a maximum that all projects share.
    maxWorkers: 2,
    // Far above what a test takes: a busy machine is no failure.
    testTimeout: 60_000,
    reporters: ["default"],
    projects: [
      {
        extends: true,
        test: { name: "unit", include: ["tests/unit/**/*.test.ts"], sequence: { groupOrder: 0 } },
      },
      {
        extends: true,
        test: {
          name: "reference",
          include: ["tests/reference/**/*.test.ts"],
          globalSetup: ["tests/reference/setup.ts"],
          sequence: { groupOrder: 0 },
        },
      },
      {
        extends: true,
        test: {
          name: "client",
          include: ["tests/client/**/*.test.tsx"],
          environment: "happy-dom",
          sequence: { groupOrder: 1 },
        },
      },
      {
        extends: true,
        test: {
          name: "http",
          include: ["tests/http/**/*.test.ts"],
          globalSetup: ["tests/support/database-setup.ts"],
          testTimeout: 60_000,
          hookTimeout: 120_000,
          sequence: { groupOrder: 2 },
        },
      },
      {
        extends: true,
        test: {
          name: "browser",
          include: ["tests/browser/**/*.test.ts"],
          globalSetup: ["tests/support/database-setup.ts"],
          testTimeout: 180_000,
          hookTimeout: 180_000,
          fileParallelism: false,
          sequence: { groupOrder: 3 },
        },
      },
    ],
  },
});
