/** The packed npm package in an empty folder, as a robot project gets it: no schema library, no source, nothing else installed. */
import { execFileSync } from "node:child_process";
import { cpSync, existsSync, mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";

const ROOT = path.join(import.meta.dirname, "../..");
const TSC = path.join(ROOT, "node_modules/typescript/bin/tsc");
const folder = mkdtempSync(path.join(tmpdir(), "loadmark-types-"));
const installed = path.join(folder, "node_modules/loadmark");

beforeAll(() => {
  expect(existsSync(path.join(ROOT, "dist/declarations/index.js")), "build first: npm run build").toBe(true);
  const packed = JSON.parse(
    execFileSync("npm", ["pack", "--json", "--ignore-scripts", "--pack-destination", folder], { cwd: ROOT, encoding: "utf8" }),
  );
  mkdirSync(installed, { recursive: true });
  execFileSync("tar", ["-xzf", path.join(folder, packed[0].filename), "--strip-components=1", "-C", installed]);
  cpSync(path.join(import.meta.dirname, "robot.ts"), path.join(folder, "robot.ts"));
  writeFileSync(path.join(folder, "package.json"), JSON.stringify({ type: "module" }));
}, 60_000);

afterAll(() => rmSync(folder, { recursive: true, force: true }));

describe("the packed declarations", () => {
  it.each([
    ["nodenext", true],
    ["nodenext", false],
    ["bundler", true],
  ] as const)(
    "refuse what is wrong and take what is right (%s, skipLibCheck %s)",
    (resolution, skipLibCheck) => {
      expect(compile(resolution, skipLibCheck)).toBe("");
    },
    60_000,
  );

  it("do not mention the schema library anywhere", () => {
    const typings = readdirSync(path.join(installed, "dist/declarations"), { recursive: true, encoding: "utf8" }).filter((name) =>
      name.endsWith(".d.ts"),
    );
    expect(typings).not.toEqual([]);
    for (const name of typings)
      expect(readFileSync(path.join(installed, "dist/declarations", name), "utf8"), name).not.toContain("valibot");
  });

  it("run in plain Node without anything else installed", () => {
    const code = `import { motor, spur } from "loadmark";
      const built = motor({ voltage: "12 V", noLoad: { speed: "100 rpm", current: "0.2 A" }, stall: { torque: "2 N*m", current: "4 A" } });
      console.log(built.si.resistanceOhm, spur(16, 40).ratio);
      try { spur(0, 40); } catch (error) { console.log(error.name, error.message); }`;
    const printed = execFileSync(process.execPath, ["--input-type=module", "--eval", code], { cwd: folder, encoding: "utf8" });
    expect(printed).toBe("3 2.5\nDeclarationError spur: the driver's teeth must be a whole number from 1, not 0\n");
  });
});

/** The compiler's output; empty when all is well. */
function compile(resolution: "nodenext" | "bundler", skipLibCheck: boolean): string {
  const module = resolution === "bundler" ? "esnext" : "nodenext";
  const options = ["--noEmit", "--strict", "--target", "es2023", "--module", module, "--moduleResolution", resolution];
  try {
    return execFileSync(process.execPath, [TSC, ...options, "--skipLibCheck", String(skipLibCheck), "robot.ts"], {
      cwd: folder,
      encoding: "utf8",
    });
  } catch (error) {
    return (error as { readonly stdout: string }).stdout;
  }
}
