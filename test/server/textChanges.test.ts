/** What a host says of changes between snapshots: every file that changed, or that it does not know. */
import { describe, expect, it } from "vitest";
import type { Snapshot } from "../../extension/evaluator/value.js";
import { Texts } from "../../extension/server/texts.js";

function start() {
  const texts = new Texts({ keepImporters: (files) => files, canonical: (file) => file });
  texts.setDiskText("/w/a.ts", "export const A = 1;");
  texts.setDiskText("/w/b.ts", "export const B = 1;");
  const between = (one: Snapshot, other: Snapshot) => one.changes?.between(one, other);
  return { texts, between };
}

describe("changes between snapshots", () => {
  it("are those of the disk and of open documents", () => {
    const { texts, between } = start();
    const before = texts.capture();
    expect(between(before, texts.capture())).toEqual(new Set());
    texts.setDiskText("/w/a.ts", "export const A = 2;");
    texts.open("file:///w/b.ts", 1, "export const B = 2;");
    const opened = texts.capture();
    expect(between(before, opened)).toEqual(new Set(["/w/a.ts", "/w/b.ts"]));
    texts.change("file:///w/b.ts", 2, [{ text: "export const B = 3;" }]);
    expect(between(opened, texts.capture())).toEqual(new Set(["/w/b.ts"]));
    texts.close("file:///w/b.ts");
    texts.forgetDiskText("/w/a.ts");
    expect(between(opened, texts.capture())).toEqual(new Set(["/w/a.ts", "/w/b.ts"]));
  });

  it("are not told of a text that stays the same", () => {
    const { texts, between } = start();
    const before = texts.capture();
    texts.setDiskText("/w/a.ts", "export const A = 1;");
    expect(between(before, texts.capture())).toEqual(new Set());
  });

  it("are not known of a snapshot made out of another, where settings changed, or where files import others than before", () => {
    const { texts, between } = start();
    const before = texts.capture();
    expect(between(before, { ...before, read: () => null })).toBeUndefined();
    texts.setDiskText("/w/loadmark.json", "{}");
    const withSettings = texts.capture();
    expect(between(before, withSettings)).toBeUndefined();
    texts.imports.markWhole();
    texts.imports.setDiskText("/w/a.ts", 'import { B } from "./b.js";');
    expect(between(withSettings, texts.capture())).toBeUndefined();
  });

  it("are not known after more of them than are kept", () => {
    const { texts, between } = start();
    const before = texts.capture();
    for (let edit = 0; edit < 3000; edit += 1) texts.setDiskText("/w/a.ts", `export const A = ${edit};`);
    expect(between(before, texts.capture())).toBeUndefined();
    const after = texts.capture();
    texts.setDiskText("/w/b.ts", "export const B = 9;");
    expect(between(after, texts.capture())).toEqual(new Set(["/w/b.ts"]));
  });
});
