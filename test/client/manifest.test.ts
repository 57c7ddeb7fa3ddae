/** What package.json promises to the editor, against the sources that must keep it. */
import { existsSync, readdirSync, readFileSync } from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { targets } from "../../extension/build/targets.mjs";

const ROOT = path.join(import.meta.dirname, "../..");
const manifest = JSON.parse(readFileSync(path.join(ROOT, "package.json"), "utf8"));
const { contributes } = manifest;

const client = readSources("extension/client");
const protocol = readSources("extension/protocol");

function readSources(room: string): string {
  const names = readdirSync(path.join(ROOT, room)).filter((name) => name.endsWith(".ts"));
  return names.map((name) => readFileSync(path.join(ROOT, room, name), "utf8")).join("\n");
}

describe("the manifest", () => {
  it("contributes commands that the client registers, under one category", () => {
    const commands: { command: string; category: string; title: string }[] = contributes.commands;
    expect(commands.length).toBeGreaterThan(0);
    for (const { command, category, title } of commands) {
      expect(client + protocol, command).toContain(`"${command}"`);
      expect(category).toBe("Loadmark");
      expect(title).not.toMatch(/loadmark/i);
    }
  });

  it("describes every setting, with a default, per folder", () => {
    const settings: [string, Record<string, unknown>][] = Object.entries(contributes.configuration.properties);
    expect(settings.length).toBeGreaterThan(0);
    for (const [name, setting] of settings) {
      expect(setting.markdownDescription, name).toEqual(expect.any(String));
      expect(setting.scope, name).toBe("resource");
      expect(setting.default, name).toBeDefined();
      const { enum: values = [], enumDescriptions = [] } = setting as { enum?: string[]; enumDescriptions?: string[] };
      expect(enumDescriptions, name).toHaveLength(values.length);
    }
  });

  it("has the server's defaults", () => {
    const source = readFileSync(path.join(ROOT, "extension/server/displaySettings.ts"), "utf8");
    const { "loadmark.hints": hints, "loadmark.codeLens": codeLens } = contributes.configuration.properties;
    expect(source).toContain(`DEFAULTS: DisplaySettings = { hints: "${hints.default}", codeLens: ${codeLens.default} }`);
  });

  it("hides the view where the declarations are not used, and says what to do where none is written", () => {
    const [view, ...more] = contributes.views.explorer;
    expect(more).toEqual([]);
    expect(view).toMatchObject({ id: "loadmark.mechanisms", when: "loadmark.isUsed", icon: expect.any(String) });
    for (const context of ["loadmark.isUsed", "loadmark.isRead", "loadmark.hasMechanisms"])
      expect(client).toContain(`"${context}"`);
    const [welcome] = contributes.viewsWelcome;
    expect(welcome).toMatchObject({ view: "loadmark.mechanisms", when: "loadmark.isRead" });
    expect(welcome.contents).toContain("(command:loadmark.openExample)");
    expect(welcome.contents).toContain(
      encodeURIComponent(`"${manifest.publisher}.${manifest.name}#${contributes.walkthroughs[0].id}"`),
    );
    expect(client).toContain('"loadmark.mechanisms"');
  });

  it("has a file for every step of the walkthrough, and no link to a command that isn't there", () => {
    const commands = new Set(contributes.commands.map(({ command }: { command: string }) => command));
    for (const { media, description } of contributes.walkthroughs[0].steps) {
      expect(existsSync(path.join(ROOT, "extension/client", media.markdown.replace("dist/", "")))).toBe(true);
      for (const [, command = ""] of description.matchAll(/command:(loadmark\.\w+)/g))
        expect(commands.has(command), command).toBe(true);
    }
  });

  it("names only files that are built or copied", () => {
    for (const { url } of contributes.jsonValidation) {
      expect(url).toBe("./dist/loadmark.schema.json");
      expect(existsSync(path.join(ROOT, "extension/analysis", path.basename(url)))).toBe(true);
    }
  });

  it("starts for languages and settings files alone, on the side of the workspace", () => {
    expect(manifest.activationEvents).not.toContain("*");
    expect(manifest.extensionKind).toEqual(["workspace"]);
    expect(manifest.capabilities.untrustedWorkspaces.supported).toBe(true);
  });

  it("has an entry for each kind of host, and needs no disk", () => {
    const built = targets.map(({ outfile }) => `./dist/${outfile}`);
    expect(built).toContain(manifest.main);
    expect(built).toContain(manifest.browser);
    expect(manifest.capabilities.virtualWorkspaces).toBe(true);
  });
});
