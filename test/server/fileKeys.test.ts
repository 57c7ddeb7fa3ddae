import { describe, expect, it } from "vitest";
import { keyOf, pathBelow, uriOf } from "../../extension/server/fileKeys.js";

describe("file keys", () => {
  it.each([
    ["file:///home/u/robot.ts", "/home/u/robot.ts"],
    ["file:///c%3A/Users/u/robot.ts", "c:/Users/u/robot.ts"],
    ["file:///C:/Users/u/robot.ts", "c:/Users/u/robot.ts"],
    ["file:///home/u/a%20b%23c/%C3%BC.ts", "/home/u/a b#c/ü.ts"],
    ["file://server/share/robot.ts", "//server/share/robot.ts"],
    ["vscode-vfs://github/owner/repo/src/%C3%BC%20x.ts", "vscode-vfs://github/owner/repo/src/ü x.ts"],
    ["untitled:Untitled-1", "untitled:Untitled-1"],
  ])("%s is %s", (uri, key) => {
    expect(keyOf(uri)).toBe(key);
  });

  it.each([
    "/home/u/robot.ts",
    "/home/u/100% & more?/a#b.ts",
    "c:/Users/u/ü.ts",
    "//server/share/robot.ts",
    "vscode-vfs://github/owner/repo/src/ü x.ts",
    "vscode-vfs://github/owner/repo/100%25/a%23b%3Fc%2Fd.ts",
    "untitled:Untitled-1",
  ])("%s survives the way to an address and back", (key) => {
    expect(keyOf(uriOf(key))).toBe(key);
  });

  it("writes addresses as editors do", () => {
    expect(uriOf("c:/a b/ü.ts")).toBe("file:///c%3A/a%20b/%C3%BC.ts");
    expect(uriOf("/a b/#.ts")).toBe("file:///a%20b/%23.ts");
  });

  it("leaves broken escapes and lone surrogates harmless", () => {
    expect(keyOf("file:///a/%zz/%E0%A4.ts")).toBe("/a/%zz/%E0%A4.ts");
    expect(() => uriOf("/a/\ud800.ts")).not.toThrow();
  });

  it("finds what lies below a folder, and not beside it", () => {
    expect(pathBelow("/w/robot", "/w/robot/src/a.ts")).toBe("src/a.ts");
    expect(pathBelow("/w/robot", "/w/robot2/a.ts")).toBeUndefined();
    expect(pathBelow("/", "/a.ts")).toBe("a.ts");
  });
});
