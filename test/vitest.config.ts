/** Unit, command and server tests. The tests in a real VS Code have a runner of their own (test/workbench). */
import { join } from "node:path";
import { defineConfig } from "vitest/config";

export default defineConfig({
  root: import.meta.dirname,
  // What runs in the product is the built parser; a test that needs all of the package names its file.
  resolve: { alias: [{ find: /^typescript$/, replacement: join(import.meta.dirname, "../dist/typescript.js") }] },
  test: {
    include: ["**/*.test.ts"],
    exclude: ["**/node_modules/**", "workbench/**"],
    passWithNoTests: false,
    // A hang must end; a busy machine must not fail.
    testTimeout: 120_000,
    hookTimeout: 120_000,
  },
});
