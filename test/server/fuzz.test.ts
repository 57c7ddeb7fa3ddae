/**
 * The built server on broken, deep and huge texts: it neither ends, nor keeps anybody waiting beyond a budget, nor tells what is no
 * longer true.
 */
import path from "node:path";
import { afterEach, beforeAll, describe, expect, it } from "vitest";
import type { Diagnostic } from "vscode-languageserver/node";
import { inLines } from "../../extension/server/diagnostics.js";
import { loadEngine } from "../../extension/server/engine.js";
import { buildServer } from "../support/builtServer.js";
import { drawFrom, mutate, readSources } from "../support/mutate.js";
import { type ServerClient, startServerClient } from "../support/serverClient.js";
import { whenJudged } from "../support/whenJudged.js";

const DEMO = readSources(path.join(import.meta.dirname, "../demo"));
const MUTANTS = 60;
/** For one text of ordinary size, on a machine that is busy with other tests; an edit of the demo takes some milliseconds. */
const BUDGET_MS = 5000;
/** For one text of megabytes. */
const HUGE_BUDGET_MS = 20_000;

let server: string;
let client: ServerClient | undefined;

beforeAll(async () => {
  server = await buildServer("fuzz");
}, 120_000);

afterEach(async () => {
  await client?.stop();
  client = undefined;
});

describe("damaged text", () => {
  it("is answered in time, as if it had been there from the start, and mending it brings the old findings back", async () => {
    client = await startServerClient({ server, files: DEMO });
    const names = Object.keys(DEMO).filter((name) => name.endsWith(".ts"));
    for (const name of names) await client.open(name);
    const good = await findingsNow(client, BUDGET_MS);
    expect(good.length).toBeGreaterThan(5);
    for (let round = 0; round < MUTANTS; round++) {
      const draw = drawFrom(round);
      const name = names[draw(names.length)] as string;
      const damaged = mutate(DEMO[name] ?? "", draw);
      await client.retype(name, DEMO[name] ?? "", damaged);
      expect(await findingsNow(client, BUDGET_MS), `round ${round}, ${name}:\n${damaged}`).toEqual(
        await findingsFromNothing(client, { ...DEMO, [name]: damaged }),
      );
      await client.retype(name, damaged, DEMO[name] ?? "");
    }
    expect(await findingsNow(client, BUDGET_MS)).toEqual(good);
    expect(client.errors).toEqual([]);
    expect(client.process.exitCode).toBeNull();
  }, 120_000);
});

describe("text without bounds", () => {
  const head = 'import { motor, spur } from "loadmark";\nexport const pair = spur(0, 40);\n';
  it.each<[string, string, string | undefined]>([
    ["5 MB of declarations", `${head}${"export const gears = spur(16, 40);\n".repeat(150_000)}`, "bad-declaration"],
    ["5 MB on one line", `${head}export const text = "${"x".repeat(5_000_000)}";`, "bad-declaration"],
    ["100,000 lines", `${head}${"export const unused = [1, 2, 3];\n".repeat(100_000)}`, "bad-declaration"],
    ["brackets 10,000 deep", `${head}export const deep = ${"(".repeat(10_000)}1${")".repeat(10_000)};`, "not-constant"],
    ["open brackets 10,000 deep", `${head}export const deep = ${"[{(".repeat(3_400)}`, "not-constant"],
    ["blocks 10,000 deep", `${head}${"{".repeat(10_000)}${"}".repeat(10_000)}`, "not-constant"],
    ["a sum of 10,000 parts", `${head}export const other = spur(1${" + 1".repeat(10_000)}, 40);`, "bad-declaration"],
    ["5 MB of nonsense", `${head}${"`${ (".repeat(1_000_000)}`, undefined],
    ["5 MB of a comment that never ends", `${head}/*${" loadmark ".repeat(500_000)}`, "bad-declaration"],
  ])(
    "%s",
    async (_, text, rule) => {
      client = await startServerClient({ server, files: { "good.ts": head, "huge.ts": 'import "loadmark";\n' } });
      await client.open("huge.ts");
      await findingsNow(client, BUDGET_MS);
      expect(client.findings("good.ts").map(({ code }) => code)).toEqual(["bad-declaration"]);
      await client.retype("huge.ts", client.text("huge.ts"), text);
      await findingsNow(client, HUGE_BUDGET_MS);
      // Whatever the one file holds, the other is judged as before; and the one is read, or says why it is not.
      expect(client.findings("good.ts").map(({ code }) => code)).toEqual(["bad-declaration"]);
      if (rule !== undefined) expect(client.findings("huge.ts").map(({ code }) => code)).toContain(rule);
      await client.retype("huge.ts", text, "");
      await findingsNow(client, HUGE_BUDGET_MS);
      expect(client.findings("huge.ts")).toEqual([]);
      expect(client.errors).toEqual([]);
    },
    60_000,
  );
});

/** What is shown once the newest texts are judged, which must be so within the budget. */
async function findingsNow(client: ServerClient, budgetMs: number): Promise<string[]> {
  await whenJudged(client, budgetMs);
  const latest = new Map<string, readonly Diagnostic[]>(client.published.map(({ uri, diagnostics }) => [uri, diagnostics]));
  return [...latest].flatMap(([uri, all]) => all.map(({ code, message }) => `${uri} ${code} ${String(message)}`)).sort();
}

/** By an analysis that never saw another text. */
async function findingsFromNothing({ uri }: ServerClient, files: Readonly<Record<string, string>>): Promise<string[]> {
  const { analyse } = await loadEngine();
  const texts = new Map(Object.entries(files).map(([name, text]) => [`/demo/${name}`, text]));
  const roots = [...texts].flatMap(([file, text]) => (file.endsWith(".ts") && text.includes("loadmark") ? [file] : []));
  const { findings } = analyse(roots, { read: (file) => texts.get(file) ?? null });
  return findings.map(({ at, rule, message }) => `${uri(at.file.slice("/demo/".length))} ${rule} ${inLines(message)}`).sort();
}
