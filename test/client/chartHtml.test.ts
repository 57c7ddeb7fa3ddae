/** The document of the chart's page: what its policy lets in, and that it needs nothing more. */
import { readFileSync } from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { chartHtml } from "../../extension/client/chartHtml.js";

const options = {
  cspSource: "https://*.vscode-cdn.example",
  nonce: "bm9uY2U",
  scriptUri: "https://host.example/dist/webview/main.js?a=1&b=2",
  styleUri: "https://host.example/dist/webview/panel.css",
  units: "inch",
};
const html = chartHtml(options);

describe("the chart's document", () => {
  it("lets in its own script and style, pictures of its own, and nothing else", () => {
    const [, policy = ""] = /<meta http-equiv="Content-Security-Policy" content="([^"]*)">/.exec(html) ?? [];
    const directives = Object.fromEntries(
      policy.split("; ").map((one) => [one.split(" ")[0], one.split(" ").slice(1).join(" ")]),
    );
    expect(directives).toEqual({
      "default-src": "'none'",
      "script-src": "'nonce-bm9uY2U'",
      "style-src": "https://*.vscode-cdn.example",
      "img-src": "data: blob:",
      "font-src": "https://*.vscode-cdn.example",
    });
  });

  it("states the policy before anything is loaded", () => {
    expect(html.indexOf("Content-Security-Policy")).toBeLessThan(html.indexOf("<link"));
    expect(html.indexOf("Content-Security-Policy")).toBeLessThan(html.indexOf("<script"));
  });

  it("holds no script or style of its own", () => {
    expect(html.match(/<script/g)).toHaveLength(1);
    expect(html).toMatch(/<script nonce="bm9uY2U" src="[^"]+"><\/script>/);
    expect(html).not.toMatch(/<style|style=|\son\w+=|javascript:|unsafe/);
  });

  it("escapes what goes into attributes", () => {
    expect(html).toContain("main.js?a=1&amp;b=2");
    const hostile = chartHtml({ ...options, styleUri: '"><script>alert(1)</script>' });
    expect(hostile.match(/<script/g)).toHaveLength(1);
  });
});

describe("the panel", () => {
  const source = readFileSync(path.join(import.meta.dirname, "../../extension/client/chartPanel.ts"), "utf8");

  it("serves the page's folder alone, and does not keep hidden pages alive", () => {
    expect(source).toContain('joinPath(this.#parts.extensionUri, "dist", "webview")');
    expect(source).toContain("localResourceRoots: [root]");
    expect(source).not.toContain("retainContextWhenHidden");
  });
});
