import { beforeEach, describe, expect, it } from "vitest";
import type { Diagnostic, PublishDiagnosticsParams } from "vscode-languageserver";
import type { FileDiagnostics } from "../../extension/server/diagnostics.js";
import { Publisher } from "../../extension/server/publisher.js";

const sent: PublishDiagnosticsParams[] = [];
let publisher: Publisher;

beforeEach(() => {
  sent.length = 0;
  publisher = new Publisher((params) => sent.push(params));
});

const diagnostic = (message: string): Diagnostic => ({
  message,
  range: { start: { line: 0, character: 0 }, end: { line: 0, character: 1 } },
});

function publish(files: Readonly<Record<string, FileDiagnostics>>): PublishDiagnosticsParams[] {
  sent.length = 0;
  publisher.publish(new Map(Object.entries(files)));
  return [...sent];
}

const file = (version: number | undefined, ...messages: string[]): FileDiagnostics => ({
  uri: "file:///a.ts",
  version,
  diagnostics: messages.map(diagnostic),
});

describe("publishing", () => {
  it("sends what is new, and nothing twice", () => {
    expect(publish({ a: file(undefined, "x") })).toEqual([{ uri: "file:///a.ts", diagnostics: [diagnostic("x")] }]);
    expect(publish({ a: file(undefined, "x") })).toEqual([]);
    expect(publish({ a: file(undefined, "y") })).toHaveLength(1);
  });

  it("does not look into what it was given before", () => {
    const told = file(1, "x");
    publish({ a: told });
    const diagnostics = {
      ...told,
      get diagnostics(): never {
        throw new Error("looked into");
      },
    };
    expect(() => publish({ a: diagnostics })).toThrow("looked into");
    publish({ a: told, b: { ...told, uri: "file:///b.ts" } });
    expect(publish({ a: told })).toEqual([{ uri: "file:///b.ts", diagnostics: [] }]);
  });

  it("says nothing of files that never had a finding", () => {
    expect(publish({ a: file(1) })).toEqual([]);
    expect(publish({ a: file(2) })).toEqual([]);
  });

  it("tells a newer version of the same findings, which typing may have moved", () => {
    publish({ a: file(1, "x") });
    expect(publish({ a: file(2, "x") })).toEqual([{ uri: "file:///a.ts", version: 2, diagnostics: [diagnostic("x")] }]);
  });

  it("clears, with the version where the document is open", () => {
    publish({ a: file(1, "x") });
    expect(publish({ a: file(2) })).toEqual([{ uri: "file:///a.ts", version: 2, diagnostics: [] }]);
    publish({ a: file(3, "x") });
    expect(publish({})).toEqual([{ uri: "file:///a.ts", diagnostics: [] }]);
    expect(publish({})).toEqual([]);
  });

  it("clears the old address of a file that got another", () => {
    publish({ a: file(1, "x") });
    expect(publish({ a: { ...file(1, "x"), uri: "file:///A.ts" } })).toEqual([
      { uri: "file:///a.ts", diagnostics: [] },
      { uri: "file:///A.ts", version: 1, diagnostics: [diagnostic("x")] },
    ]);
  });
});
