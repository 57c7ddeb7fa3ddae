// Makes dist/typescript.js: the parser of TypeScript's own compiler file, minified, as one module that the server, the
// command and a browser worker share and load lazily. The file is taken apart into a module of plain declarations, so
// that the bundler can leave out whatever the names of parserNames.ts do not need: the checker, the emitter and all that
// editors ask of a language service, three quarters of the file. `require` is defined away, so that the module reaches
// neither disk nor process. Nodes get classes of their own, an identifier its text, which the package leaves to the language
// service, and slimParser.mjs takes out what no parser needs; the trees stay those of the package (test/evaluator/parser.test.ts).

import { readFile } from "node:fs/promises";
import { join } from "node:path";
import { build } from "esbuild";
import { importTypeScript } from "./importTypeScript.mjs";
import { repositoryRoot } from "./repositoryRoot.mjs";
import { slimParser } from "./slimParser.mjs";

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
export async function buildTypeScript(outfile) {
  const compiler = join(repositoryRoot, "node_modules/typescript/lib/typescript.js");
  const { PARSER_NAMES, START_OF_NODE } = await importTypeScript("extension/evaluator/parserNames.ts");
  return build({
    entryPoints: [compiler],
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
        name: "cut-out-parser",
        setup(builder) {
          builder.onLoad({ filter: /[\\/]typescript\.js$/ }, async ({ path }) => ({
            contents: cutOut([...PARSER_NAMES, START_OF_NODE], await readFile(path, "utf8")),
            loader: "js",
          }));
        },
      },
    ],
  });
}

/**
 * @param {readonly string[]} names of the compiler's namespace
 * @param {string} source the compiler's file
 */
function cutOut(names, source) {
  const [notice, afterOpen] = splitOnce(source, 'var ts = {}; ((module) => {\n"use strict";\n');
  const [helpers, afterHelpers] = splitOnce(afterOpen, "__export(typescript_exports, {");
  const [list, rest] = splitOnce(afterHelpers, "module.exports = __toCommonJS(typescript_exports);\n");
  // What comes behind the compiler only makes use of it.
  const [compiler] = splitOnce(rest, "\n// src/jsTyping/");
  const locals = new Map([...list.matchAll(/^ {2}(\w+): \(\) => (\w+),?$/gm)].map(([, name, local]) => [name, local]));
  const entries = names.map((name) => {
    if (!locals.has(name)) throw new Error(`TypeScript no longer has ${name}: parserNames.ts must learn its new name.`);
    return `${name}: ${locals.get(name)}`;
  });
  // Lists of a part's own names: only those are kept that something asks for.
  const declarations = compiler.replaceAll(
    /^var (\w+) = \{\};\n__export\(\1, (\{[\s\S]*?\n\})\);$/gm,
    "var $1 = /* @__PURE__ */ listed($2);",
  );
  // The package's nodes carry fields of the checker and the emitter, and share a shape that is as wide as the widest kind.
  const slimNodes = `
    const ofKinds = [];
    const makeClass = (kind) => kind === SyntaxKind.Identifier || kind === SyntaxKind.PrivateIdentifier
      ? class {
          constructor(kind, pos, end) { this.pos = pos; this.end = end; this.kind = kind; this.flags = 0; this.parent = undefined; }
          get text() { return idText(this); }
        }
      : class {
          constructor(kind, pos, end) { this.pos = pos; this.end = end; this.kind = kind; this.flags = 0; this.parent = undefined; }
        };
    // A class that extends another makes no object of its own.
    class SlimNode extends Object {
      constructor(kind, pos, end) { return new (ofKinds[kind] ??= makeClass(kind))(kind, pos, end); }
    }
    const ofNode = () => SlimNode;
    setObjectAllocator({
      getNodeConstructor: ofNode,
      getTokenConstructor: ofNode,
      getSourceFileConstructor: ofNode,
      getIdentifierConstructor: ofNode,
      getPrivateIdentifierConstructor: ofNode,
    });`;
  const listed = "function listed(names) { const list = {}; __export(list, names); return list; }";
  return `${notice}${helpers}${slimParser(declarations)}\n${listed}\n${slimNodes}\nexport default { ${entries.join(", ")} };`;
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
