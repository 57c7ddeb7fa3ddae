// @ts-check
// Loads the built client and activates it once, with an editor that answers everything and does nothing; prints the milliseconds. Run it in
// a process of its own, so that nothing is loaded yet.

import { createRequire } from "node:module";
import { fileURLToPath } from "node:url";

const require = createRequire(import.meta.url);
const Module = require("node:module");

/** Whatever is asked of it, called or made, is one like it. @type {any} */
const anything = new Proxy(class {}, {
  get: (_, name) => {
    if (name === "then") return undefined;
    if (name === Symbol.toPrimitive) return () => "";
    if (name === Symbol.iterator) return [][Symbol.iterator].bind([]);
    return anything;
  },
  set: () => true,
  apply: () => anything,
  construct: () => ({ dispose() {}, event: () => ({ dispose() {} }), fire() {} }),
});
// A bundle copies the names that a module has, so that these must be real ones.
const names = ["window", "commands", "languages", "l10n", "Uri", "Range", "Position", "Disposable", "EventEmitter", "TreeItem"];
const more = [
  "ThemeIcon",
  "ThemeColor",
  "TreeItemCollapsibleState",
  "StatusBarAlignment",
  "ViewColumn",
  "RelativePattern",
  "FileType",
];
const workspace = new Proxy(
  { textDocuments: [], workspaceFolders: [], findFiles: async () => [] },
  { get: (target, name) => (name in target ? Reflect.get(target, name) : anything) },
);
const editor = { ...Object.fromEntries([...names, ...more].map((name) => [name, anything])), workspace };

const load = Module._load;
Module._load = (/** @type {string} */ request, /** @type {any[]} */ ...rest) =>
  request === "vscode" ? editor : load(request, ...rest);

const client = fileURLToPath(new URL("../../dist/client.cjs", import.meta.url));
const start = performance.now();
const { activate } = require(client);
const context = {
  subscriptions: [],
  extensionUri: anything,
  extensionPath: "",
  asAbsolutePath: (/** @type {string} */ path) => path,
};
activate(context);
console.log(performance.now() - start);
process.exit(0);
