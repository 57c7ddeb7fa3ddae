/** Names from source stay text: nothing in them becomes markup, a link, an icon, a line of its own or a turn of direction. */
import { describe, expect, it } from "vitest";
import { inertMarkdown, plainText } from "../../extension/features/inertText.js";
import { chartLink, revealLink } from "../../extension/features/links.js";

describe("plainText", () => {
  it("keeps ordinary names as they are", () => {
    for (const name of ["tray hoist", "Förderband 2", "升降机", "arm_1 (left)", "a & b < c"]) expect(plainText(name)).toBe(name);
  });

  it("puts everything on one line", () => {
    expect(plainText("a\r\nb\tc\u2028d\u0000e\u007ff")).toBe("a b c d e f");
  });

  it("drops characters that turn the direction, hide or join", () => {
    expect(plainText("a\u202Eb\u2066c\u200Fd\u200Be\uFEFFf\u{E0041}g")).toBe("abcdefg");
  });

  it("cuts long names by characters, never through one", () => {
    const cut = plainText("\u{1F980}".repeat(500));
    expect([...cut]).toHaveLength(60);
    expect(cut.endsWith("\u{1F980}…")).toBe(true);
    expect(plainText("x".repeat(10_000_000))).toHaveLength(60);
  });

  it("keeps right-to-left letters from moving what stands beside them", () => {
    expect(plainText("זרוע")).toBe("\u2068זרוע\u2069");
    expect(plainText("ذراع 1")).toBe("\u2068ذراع 1\u2069");
  });

  it("replaces halves of surrogate pairs", () => {
    expect(plainText("a\uD800b\uDC00")).toBe("a\uFFFDb\uFFFD");
  });
});

describe("inertMarkdown", () => {
  it.each([
    ["**bold** _it_", "\\*\\*bold\\*\\* \\_it\\_"],
    ["[x](command:evil)", "\\[x\\](command:evil)"],
    ["![x](https://e.org/x.png)", "!\\[x\\](https\\://e.org/x.png)"],
    ["<img src=x onerror=y>", "&lt;img src=x onerror=y&gt;"],
    ["&lt;b&gt;", "&amp;lt;b&amp;gt;"],
    ["`code` ~~gone~~", "\\`code\\` \\~\\~gone\\~\\~"],
    ["a | b", "a \\| b"],
    ["# head", "\\# head"],
    ["- item", "\\- item"],
    ["=====", "\\====="],
    ["1. item", "1\\. item"],
    ["$(bug) icon", "$ (bug) icon"],
    ["see www.e.org or me@e.org", "see www\\.e.org or me\\@e.org"],
    ["a\n\n# b", "a \\# b"],
    ["back\\slash", "back\\\\slash"],
  ])("%s", (text, expected) => {
    expect(inertMarkdown(text)).toBe(expected);
  });
});

describe("links", () => {
  it("carry any name in characters that can neither end the link nor start markup", () => {
    const name = `a)b](c "d" 'e' *f* _g_ ~h~ <i> \`j\` \\ \uD800 \n`;
    const link = chartLink(name);
    const [, argument = ""] = /^\[Chart\]\(command:loadmark\.showChart\?([\w%.-]+)\)$/.exec(link) ?? [];
    expect(JSON.parse(decodeURIComponent(argument))).toEqual([name]);
  });

  it("lead to a stretch of a file", () => {
    const link = revealLink("Motor", { file: "/robot/motors (new).ts", start: 3, end: 9 });
    const [, argument = ""] = /^\[Motor\]\(command:loadmark\.reveal\?([\w%.-]+)\)$/.exec(link) ?? [];
    expect(JSON.parse(decodeURIComponent(argument))).toEqual([{ file: "/robot/motors (new).ts", start: 3, end: 9 }]);
  });
});
