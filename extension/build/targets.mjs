// The table of bundles: which entry becomes which file of dist/, and for which host. It holds data only; bundle.mjs
// builds it.

/**
 * @typedef {object} Target
 * @property {string} entry path from the repository's root
 * @property {string} outfile path inside dist/
 * @property {import("esbuild").BuildOptions} options
 */

/** @type {import("esbuild").BuildOptions} */
const node = { platform: "node", target: "node20" };
/** @type {import("esbuild").BuildOptions} */
const browser = { platform: "browser", target: "es2023" };

/** @type {Target[]} */
export const targets = [
  {
    entry: "extension/client/main.ts",
    outfile: "client.cjs",
    options: { ...node, format: "cjs", external: ["vscode"] },
  },
  {
    entry: "extension/client/browser.ts",
    outfile: "client.web.cjs",
    options: { ...browser, format: "cjs", external: ["vscode"] },
  },
  { entry: "extension/server/start.ts", outfile: "server.cjs", options: { ...node, format: "cjs" } },
  {
    entry: "extension/server/node.ts",
    outfile: "server.main.cjs",
    // What it loads late comes through the `require` that server.cjs gives it.
    options: { ...node, format: "cjs", supported: { "dynamic-import": false } },
  },
  {
    entry: "extension/server/browser.ts",
    outfile: "server.web.js",
    options: { ...browser, format: "iife" },
  },
  {
    entry: "extension/command/main.ts",
    outfile: "command.js",
    options: { ...node, format: "esm", banner: { js: "#!/usr/bin/env node" } },
  },
  {
    entry: "extension/declarations/index.ts",
    outfile: "declarations/index.js",
    options: { platform: "neutral", target: "es2023", format: "esm" },
  },
  { entry: "webview/main.ts", outfile: "webview/main.js", options: { ...browser, format: "iife" } },
  { entry: "webview/panel.css", outfile: "webview/panel.css", options: browser },
];

/** Files that go into dist/ as they are: from the repository's root, to the path inside dist/. */
export const copies = [
  { from: "extension/analysis/loadmark.schema.json", to: "loadmark.schema.json" },
  { from: "extension/client/media", to: "media" },
];
