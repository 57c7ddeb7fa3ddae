/** Directions of import: every import of every room against the table of the architecture. */
import { readdirSync, readFileSync } from "node:fs";
import { isBuiltin } from "node:module";
import path from "node:path";
import ts from "typescript/lib/typescript.js";
import { describe, expect, it } from "vitest";

const ROOT = path.join(import.meta.dirname, "../..");

/** What a room may import beside itself; `types:` allows type-only imports, `node` Node's own modules. */
const TABLE: Readonly<Record<string, readonly string[]>> = {
  "extension/units": [],
  "extension/model": [],
  "extension/declarations": ["model", "units", "valibot"],
  "extension/evaluator": ["typescript"],
  "extension/rules": ["model", "units", "types:declarations", "types:evaluator"],
  "extension/proposals": ["model", "units", "types:declarations", "types:evaluator"],
  "extension/analysis": ["units", "model", "declarations", "evaluator", "rules", "proposals", "valibot"],
  "extension/report": ["units", "types:analysis"],
  "extension/features": ["units", "model", "declarations", "evaluator", "rules", "analysis", "report"],
  "extension/protocol": [
    ...typesOf(["units", "model", "declarations", "evaluator", "rules", "analysis", "report", "features"]),
    "valibot",
  ],
  "extension/server": [
    ...["units", "model", "declarations", "evaluator", "rules", "analysis", "report", "features", "protocol"],
    ...["vscode-languageserver", "vscode-languageserver-textdocument", "node-entry"],
  ],
  "extension/command": ["analysis", "report", "node"],
  "extension/client": ["protocol", "vscode", "vscode-languageclient", "node-entry"],
  webview: ["protocol", "units", "chart.js", "chartjs-plugin-annotation"],
};

/** Files of server and client that run on Node alone; all others there also run in a browser worker. */
const NODE_ENTRIES = new Set(["extension/server/node.ts", "extension/server/start.ts", "extension/client/main.ts"]);

interface Import {
  readonly from: string;
  readonly specifier: string;
  readonly typeOnly: boolean;
}

describe("directions of import", () => {
  it("has a row for every room, and every room has files", () => {
    const rooms = readdirSync(path.join(ROOT, "extension"), { withFileTypes: true })
      .filter((entry) => entry.isDirectory() && entry.name !== "build")
      .map((entry) => `extension/${entry.name}`);
    expect([...rooms, "webview"].sort()).toEqual(Object.keys(TABLE).sort());
    for (const room of Object.keys(TABLE)) expect(sourcesOf(room), room).not.toEqual([]);
  });

  it.each(Object.keys(TABLE))("%s imports only what it may", (room) => {
    expect(
      sourcesOf(room)
        .flatMap(importsOf)
        .filter((one) => !isAllowed(room, one)),
    ).toEqual([]);
  });

  it("would notice a wrong import", () => {
    expect(
      isAllowed("extension/model", { from: "extension/model/motor.ts", specifier: "../units/parse.js", typeOnly: true }),
    ).toBe(false);
    expect(isAllowed("extension/model", { from: "extension/model/motor.ts", specifier: "node:fs", typeOnly: false })).toBe(false);
    expect(
      isAllowed("extension/report", { from: "extension/report/text.ts", specifier: "../analysis/judge.js", typeOnly: false }),
    ).toBe(false);
    expect(isAllowed("extension/server", { from: "extension/server/session.ts", specifier: "node:fs", typeOnly: false })).toBe(
      false,
    );
  });
});

function isAllowed(room: string, { from, specifier, typeOnly }: Import): boolean {
  const allowed = TABLE[room] ?? [];
  if (!specifier.startsWith(".")) {
    if (isBuiltin(specifier)) return allowed.includes("node") || (allowed.includes("node-entry") && NODE_ENTRIES.has(from));
    return allowed.some((name) => specifier === name || specifier.startsWith(`${name}/`));
  }
  const target = path.posix.normalize(path.posix.join(path.posix.dirname(from), specifier));
  if (target.startsWith(`${room}/`)) return true;
  const other = /^extension\/([^/]+)\//.exec(target)?.[1] ?? "";
  return allowed.includes(other) || (typeOnly && allowed.includes(`types:${other}`));
}

function sourcesOf(room: string): string[] {
  return readdirSync(path.join(ROOT, room), { recursive: true, encoding: "utf8" })
    .filter((name) => name.endsWith(".ts") && !name.endsWith(".d.ts"))
    .map((name) => path.posix.join(room, name.split(path.sep).join("/")));
}

function importsOf(from: string): Import[] {
  const source = ts.createSourceFile(from, readFileSync(path.join(ROOT, from), "utf8"), ts.ScriptTarget.Latest, true);
  const found: Import[] = [];
  const visit = (node: ts.Node): void => {
    if (
      (ts.isImportDeclaration(node) || ts.isExportDeclaration(node)) &&
      node.moduleSpecifier &&
      ts.isStringLiteral(node.moduleSpecifier)
    ) {
      found.push({ from, specifier: node.moduleSpecifier.text, typeOnly: isTypeOnly(node) });
    }
    const [argument] = ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword ? node.arguments : [];
    if (argument && ts.isStringLiteral(argument)) found.push({ from, specifier: argument.text, typeOnly: false });
    ts.forEachChild(node, visit);
  };
  visit(source);
  return found;
}

function isTypeOnly(node: ts.ImportDeclaration | ts.ExportDeclaration): boolean {
  if (ts.isExportDeclaration(node)) {
    return (
      node.isTypeOnly ||
      (node.exportClause !== undefined &&
        ts.isNamedExports(node.exportClause) &&
        node.exportClause.elements.every((one) => one.isTypeOnly))
    );
  }
  const { importClause } = node;
  if (importClause === undefined) return false;
  if (importClause.phaseModifier === ts.SyntaxKind.TypeKeyword) return true;
  const { namedBindings, name } = importClause;
  return (
    name === undefined &&
    namedBindings !== undefined &&
    ts.isNamedImports(namedBindings) &&
    namedBindings.elements.every((one) => one.isTypeOnly)
  );
}

function typesOf(rooms: readonly string[]): string[] {
  return rooms.map((room) => `types:${room}`);
}
