import { describe, expect, it } from "vitest";
import { type GateWorkspace, importsDeclarations, namesPackage, usesDeclarations } from "../../extension/client/gate.js";

interface Fake {
  readonly open?: Readonly<Record<string, string>>;
  readonly manifests?: Readonly<Record<string, string>>;
  readonly settingsFile?: boolean;
}

/** Notes each question that it is asked. */
function fakeWorkspace({ open = {}, manifests = {}, settingsFile = false }: Fake) {
  const asked: string[] = [];
  const workspace: GateWorkspace = {
    openSources: () => Object.entries(open).map(([uri, text]) => ({ uri, text: () => text })),
    readNearestManifest: async (uri) => {
      asked.push(`manifest of ${uri}`);
      return manifests[uri];
    },
    hasSettingsFile: async () => {
      asked.push("settings file");
      return settingsFile;
    },
  };
  return { workspace, asked };
}

describe("the gate", () => {
  it("stays shut where nothing names the declarations", async () => {
    const { workspace, asked } = fakeWorkspace({
      open: { "a.ts": 'import { motor } from "./loadmark-like.js"; // loadmark' },
      manifests: { "a.ts": '{ "dependencies": { "left": "1.0.0" } }' },
    });
    expect(await usesDeclarations(workspace)).toBe(false);
    expect(asked).toEqual(["manifest of a.ts", "settings file"]);
  });

  it("opens for an open document, without reading any file", async () => {
    const { workspace, asked } = fakeWorkspace({ open: { "a.ts": "", "b.ts": 'import { motor } from "loadmark";' } });
    expect(await usesDeclarations(workspace)).toBe(true);
    expect(asked).toEqual([]);
  });

  it("opens for the nearest manifest, without searching the workspace", async () => {
    const { workspace, asked } = fakeWorkspace({
      open: { "a.ts": "" },
      manifests: { "a.ts": '{ "devDependencies": { "loadmark": "^0.1.0" } }' },
    });
    expect(await usesDeclarations(workspace)).toBe(true);
    expect(asked).toEqual(["manifest of a.ts"]);
  });

  it("opens for a settings file, also with no document open", async () => {
    expect(await usesDeclarations(fakeWorkspace({ settingsFile: true }).workspace)).toBe(true);
    expect(await usesDeclarations(fakeWorkspace({}).workspace)).toBe(false);
  });
});

describe("a text that imports the declarations", () => {
  it.each([
    'import { motor } from "loadmark";',
    "import * as l from 'loadmark'",
    "const l = await import(`loadmark`)",
    'require("loadmark")',
  ])("is %s", (text) => expect(importsDeclarations(text)).toBe(true));
  it.each(["", "// loadmark-allow stalls: tested", 'import "loadmark-extras"', "\"loadmark'"])("is not %j", (text) =>
    expect(importsDeclarations(text)).toBe(false),
  );
});

describe("a manifest that names the package", () => {
  it.each([
    '{ "dependencies": { "loadmark": "*" } }',
    '{ "peerDependencies": { "loadmark": "*" } }',
    '{ "optionalDependencies": { "loadmark": "*" } }',
    '{ "name": "loadmark" }',
  ])("is %s", (text) => expect(namesPackage(text)).toBe(true));
  it.each([
    "",
    "{",
    "null",
    "[]",
    "7",
    '{ "dependencies": null }',
    '{ "dependencies": "loadmark" }',
    '{ "scripts": { "loadmark": "x" } }',
  ])("is not %j", (text) => expect(namesPackage(text)).toBe(false));
});
