/** The parser that is shipped gives the trees of the package that it was cut out of, for whole, waiting and broken texts. */
import { readdirSync, readFileSync } from "node:fs";
import { createRequire } from "node:module";
import path from "node:path";
import type ts from "typescript";
import { describe, expect, it } from "vitest";
import { drawFrom, mutate } from "../support/mutate.js";
import { parser } from "../support/parser.js";

const ROOT = path.join(import.meta.dirname, "../..");
const whole = createRequire(import.meta.url)(path.join(ROOT, "node_modules/typescript/lib/typescript.js")) as typeof ts;

/** Files with `await` where it waits, and where it is a name. */
const WAITING: Readonly<Record<string, string>> = {
  "module.ts": `import { a } from "./a.js";\nconst first = 1;\nconst b = await a();\nfunction plain() { return first; }\nexport const c = (await b)[0] ?? await plain();\nfor await (const x of c) { plain(); }\nconst f = async () => { await b; };\nconst last = { a, b };\n`,
  "names.ts": "export {};\nfunction f(x: { await: number }) { const await = x.await; return await + 1; }\nf({ await: 1 });\n",
  "script.ts": "const await = 1;\nconst b = await + 1;\nawait (b);\n",
  "common.cjs": "const await = require('./x');\nmodule.exports = await(1);\n",
  "types.ts":
    "export type await = 1;\nlet x: await;\nexport default await x;\nclass C { static { x; } await = 2; async m() { await 1; } }\n",
  "broken.ts": "export const a = await\nconst b = await (\nexport const c = await a;\n}",
  "markup.tsx": "export const a = <b c={await d}>{await e} text</b>;\n",
  "data.json": '{ "await": [1, true, null, { "b": "c" }], }',
};

type Parser = Pick<typeof ts, "createSourceFile" | "forEachChild" | "ScriptTarget" | "JSDocParsingMode">;

/** Every node, from the root on: its kind, where it stands, how it was parsed and what it says. */
function listNodes(from: Parser, file: string, text: string): string[] {
  const options = { languageVersion: from.ScriptTarget.ESNext, jsDocParsingMode: from.JSDocParsingMode.ParseNone };
  const root = from.createSourceFile(file, text, options, true);
  const nodes: string[] = [];
  const visit = (node: ts.Node, depth: number): void => {
    const { text: own = "", elements } = node as { readonly text?: string; readonly elements?: ts.NodeArray<ts.Node> };
    const comma = elements?.hasTrailingComma === true ? "," : "";
    nodes.push(
      `${depth} ${whole.SyntaxKind[node.kind]} ${node.pos}-${node.end} ${node.flags}${comma} ${node === root ? "" : own}`,
    );
    from.forEachChild(node, (child) => {
      if (child.parent !== node) nodes.push("under another node");
      visit(child, depth + 1);
    });
  };
  visit(root, 0);
  return nodes;
}

function checkTree(file: string, text: string): void {
  expect(listNodes(parser, file, text), file).toEqual(listNodes(whole, file, text));
}

describe("the shipped parser", () => {
  it.each(Object.entries(WAITING))("knows where %s waits", (file, text) => checkTree(`/${file}`, text));

  it("parses the project's own sources", () => {
    const files = readdirSync(path.join(ROOT, "extension"), { recursive: true, encoding: "utf8" }).filter((file) =>
      /\.[mc]?ts$/.test(file),
    );
    expect(files.length).toBeGreaterThan(200);
    for (const file of files) checkTree(`/${file}`, readFileSync(path.join(ROOT, "extension", file), "utf8"));
  });

  it("parses damaged texts", () => {
    const draw = drawFrom(26);
    for (const [file, text] of Object.entries(WAITING))
      for (let count = 0; count < 100; count++) checkTree(`/${file}`, mutate(text, draw));
    const long = readFileSync(path.join(ROOT, "extension/evaluator/source.ts"), "utf8");
    for (let count = 0; count < 50; count++) checkTree("/source.ts", mutate(long, draw));
  });
});
