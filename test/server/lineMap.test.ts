import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { TextDocument } from "vscode-languageserver-textdocument";
import { createLineMap } from "../../extension/server/lineMap.js";

const texts = fc.string({ unit: fc.constantFrom("a", "ü", "\u{1f916}", "\n", "\r", "\r\n", "\t") });

describe("line map", () => {
  it("counts lines and UTF-16 units from 0", () => {
    const map = createLineMap("ab\r\n\u{1f916}c\rd");
    expect(map.positionAt(0)).toEqual({ line: 0, character: 0 });
    expect(map.positionAt(4)).toEqual({ line: 1, character: 0 });
    expect(map.positionAt(6)).toEqual({ line: 1, character: 2 });
    expect(map.positionAt(8)).toEqual({ line: 2, character: 0 });
    expect(map.offsetAt({ line: 1, character: 3 })).toBe(7);
  });

  it("clamps what lies outside", () => {
    const map = createLineMap("ab\ncd");
    expect(map.positionAt(-1)).toEqual({ line: 0, character: 0 });
    expect(map.positionAt(99)).toEqual({ line: 1, character: 2 });
    expect(map.offsetAt({ line: 0, character: 99 })).toBe(2);
    expect(map.offsetAt({ line: 9, character: 0 })).toBe(5);
    expect(map.offsetAt({ line: -1, character: 0 })).toBe(0);
  });

  it("gives the positions that the protocol's own text document gives", () => {
    fc.assert(
      fc.property(texts, (text) => {
        const document = TextDocument.create("file:///a.ts", "typescript", 1, text);
        const map = createLineMap(text);
        for (let offset = 0; offset <= text.length; offset += 1) {
          const position = map.positionAt(offset);
          // A place between CR and LF is before both for the document, and behind CR here: neither is ever asked for.
          if (text[offset - 1] === "\r" && text[offset] === "\n") continue;
          expect(position).toEqual(document.positionAt(offset));
          expect(map.offsetAt(position)).toBe(offset);
        }
      }),
    );
  });
});
