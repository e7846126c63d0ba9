import { defineConfig } from "vitest/config";

export default defineConfig({
  test: {
    include: ["tests/**/*.test.ts"],
    testTimeout: 60_000,
    reporters: process.env.CI
      ? ["default", ["json", { outputFile: "node_modules/.rungwise/tests.json" }]]
      : ["default"],
  },
});
