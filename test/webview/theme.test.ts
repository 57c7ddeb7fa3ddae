import { describe, expect, it } from "vitest";
import { contrast, parseColour, withContrast, writeColour } from "../../webview/theme/colour.js";
import { themeKind } from "../../webview/theme/theme.js";

function classes(...names: string[]): DOMTokenList {
  return { contains: (name: string) => names.includes(name) } as DOMTokenList;
}

describe("the kind of theme", () => {
  it.each([
    ["light", ["vscode-light"]],
    ["dark", ["vscode-dark"]],
    ["high-contrast", ["vscode-high-contrast"]],
    ["high-contrast-light", ["vscode-high-contrast-light"]],
    ["high-contrast-light", ["vscode-high-contrast", "vscode-high-contrast-light"]],
    ["dark", []],
  ])("is %s for the classes %j", (kind, names) => {
    expect(themeKind(classes(...names))).toBe(kind);
  });
});

describe("colours", () => {
  it.each([
    ["#1f5fb4", { red: 31, green: 95, blue: 180, alpha: 1 }],
    ["#1f5fb480", { red: 31, green: 95, blue: 180, alpha: 128 / 255 }],
    ["rgb(1, 2, 3)", { red: 1, green: 2, blue: 3, alpha: 1 }],
    ["rgba(1, 2, 3, 0.5)", { red: 1, green: 2, blue: 3, alpha: 0.5 }],
  ])("are read from %s", (text, colour) => {
    expect(parseColour(text)).toEqual(colour);
  });

  it.each(["", "red", "#12", "rgb(a, b, c)", "url(x)"])("are not read from %j", (text) => {
    expect(parseColour(text)).toBeUndefined();
  });

  it("are written so that they can be read", () => {
    const colour = { red: 9, green: 200, blue: 255, alpha: 0.25 };
    expect(parseColour(writeColour(colour))).toEqual(colour);
  });

  it("move towards the letters' colour until they can be seen", () => {
    const ground = { red: 255, green: 255, blue: 255, alpha: 1 };
    const letters = { red: 0, green: 0, blue: 0, alpha: 1 };
    const pale = { red: 250, green: 240, blue: 200, alpha: 1 };
    expect(contrast(pale, ground)).toBeLessThan(4.5);
    expect(contrast(withContrast(pale, ground, 4.5, letters), ground)).toBeGreaterThanOrEqual(4.5);
    expect(withContrast(letters, ground, 4.5, pale)).toEqual(letters);
  });
});
