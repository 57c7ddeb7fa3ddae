/** Names of linked files: those that the workspace itself uses. */
import { describe, expect, it } from "vitest";
import { nameBehindLinks } from "../../extension/analysis/linkedName.js";

/** Real paths, where each of these is a link. */
function follow(links: Readonly<Record<string, string>>): (name: string) => string {
  return (name) => {
    const link = Object.keys(links).find((one) => name === one || name.startsWith(`${one}/`));
    return link === undefined ? name : links[link] + name.slice(link.length);
  };
}

describe("the name of a linked file", () => {
  it.each<[string, Readonly<Record<string, string>>, string, string]>([
    [
      "in the workspace",
      { "/w/node_modules/kit": "/w/packages/kit" },
      "/w/node_modules/kit/src/a.ts",
      "/w/packages/kit/src/a.ts",
    ],
    [
      "below the package that uses it",
      { "/w/packages/arm/node_modules/@team/kit": "/w/packages/kit" },
      "/w/packages/arm/node_modules/@team/kit/a.ts",
      "/w/packages/kit/a.ts",
    ],
    [
      "in a workspace that was opened through a link",
      { "/link/node_modules/kit": "/real/w/packages/kit", "/link": "/real/w" },
      "/link/node_modules/kit/a.ts",
      "/link/packages/kit/a.ts",
    ],
    ["outside of the workspace", { "/w/node_modules/kit": "/elsewhere/kit" }, "/w/node_modules/kit/a.ts", "/elsewhere/kit/a.ts"],
    ["on a drive", { "c:/w/node_modules/kit": "c:/w/packages/kit" }, "c:/w/node_modules/kit/a.ts", "c:/w/packages/kit/a.ts"],
    ["that is no link", {}, "/w/node_modules/kit/a.ts", "/w/node_modules/kit/a.ts"],
    ["that was not reached through packages", { "/w": "/real" }, "/w/src/a.ts", "/w/src/a.ts"],
  ])("%s", (_name, links, file, name) => {
    expect(nameBehindLinks(file, follow(links))).toBe(name);
  });

  it("stays where nobody can tell", () => {
    expect(nameBehindLinks("/w/node_modules/kit/a.ts", () => undefined)).toBe("/w/node_modules/kit/a.ts");
  });
});
