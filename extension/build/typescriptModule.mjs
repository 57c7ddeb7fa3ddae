// Makes dist/typescript.js: TypeScript's own compiler file, minified, as one module that the server, the command and a
// browser worker share and load lazily. The file's function wrapper is taken off, since an engine compiles what is
// inside such a wrapper at once but a module's functions only when called (loading took 130 ms instead of 220 ms), and
// `require` is defined away, so that the module reaches neither disk nor process. It changes nothing else of the compiler.

import { readFile } from "node:fs/promises";
import { join } from "node:path";
import { build } from "esbuild";
import { repositoryRoot } from "./repositoryRoot.mjs";

/**
 * Points a bundle's import of TypeScript at the shared file.
 * @param {string} up leads from the bundle to dist/
 * @returns {import("esbuild").Plugin}
 */
export function shareTypeScript(up) {
  return {
    name: "share-typescript",
    setup(builder) {
      builder.onResolve({ filter: /^typescript$/ }, () => ({ path: `${up}/typescript.js`, external: true }));
    },
  };
}

/** @param {string} outfile */
export function buildTypeScript(outfile) {
  const compiler = join(repositoryRoot, "node_modules/typescript/lib/typescript.js");
  return build({
    stdin: {
      contents: `export { default } from ${JSON.stringify(compiler)}; export * from ${JSON.stringify(compiler)};`,
      resolveDir: repositoryRoot,
    },
    outfile,
    bundle: true,
    minify: true,
    format: "esm",
    platform: "neutral",
    target: "es2023",
    define: { require: "undefined" },
    legalComments: "eof",
    metafile: true,
    logLevel: "error",
    plugins: [
      {
        name: "unwrap-typescript",
        setup(builder) {
          builder.onLoad({ filter: /[\\/]typescript\.js$/ }, async ({ path }) => ({
            contents: unwrap(await readFile(path, "utf8")),
            loader: "js",
          }));
        },
      },
    ],
  });
}

/** @param {string} source */
function unwrap(source) {
  const open = 'var ts = {}; ((module) => {\n"use strict";\n';
  const publish = "module.exports = __toCommonJS(typescript_exports);\n";
  const close = "// Annotate the CommonJS export names for ESM import in node:";
  const [notice, afterOpen] = splitOnce(source, open);
  const [beforePublish, afterPublish] = splitOnce(afterOpen, publish);
  const [body] = splitOnce(afterPublish, close);
  const names = [...beforePublish.matchAll(/^ {2}(\w+): \(\) => (\w+),?$/gm)].map(([, name, local]) =>
    name === local ? name : `${local} as ${name}`,
  );
  return `${notice}${beforePublish}${body}\nexport { typescript_exports as default, ${names.join(", ")} };`;
}

/**
 * @param {string} text
 * @param {string} separator
 * @returns {[string, string]}
 */
function splitOnce(text, separator) {
  const at = text.indexOf(separator);
  if (at < 0)
    throw new Error(
      `TypeScript's compiler file no longer holds ${JSON.stringify(separator)}: typescriptModule.mjs must learn its new shape.`,
    );
  return [text.slice(0, at), text.slice(at + separator.length)];
}
