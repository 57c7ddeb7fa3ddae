/** Unit, command and server tests. The tests in a real VS Code have a runner of their own (test/workbench). */
import { defineConfig } from "vitest/config";

export default defineConfig({
  root: import.meta.dirname,
  test: {
    include: ["**/*.test.ts"],
    exclude: ["**/node_modules/**", "workbench/**"],
    passWithNoTests: false,
    // A hang must end; a busy machine must not fail.
    testTimeout: 120_000,
    hookTimeout: 120_000,
  },
});
