/** The built server starts from compiled code that it kept, and from its files where that is missing, broken or not its own. */
import { mkdtempSync, readdirSync, readFileSync, rmSync, statSync, utimesSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterEach, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { serverArguments } from "../../extension/client/serverProcess.js";
import { buildServer } from "../support/builtServer.js";
import { startServerClient } from "../support/serverClient.js";

const FILES = { "gears.ts": 'import { spur } from "loadmark";\nexport const pair = spur(0, 40);\n' };

let server: string;
let folder: string;

beforeAll(async () => {
  server = await buildServer("start");
}, 120_000);

beforeEach(() => {
  folder = mkdtempSync(path.join(tmpdir(), "loadmark-compiled-"));
});

afterEach(() => rmSync(folder, { recursive: true, force: true }));

/** Starts the server, waits for a finding, which takes the parser too, and ends it. */
async function startOnce(kept: string | undefined): Promise<void> {
  const client = await startServerClient({ server, files: FILES, arguments: kept === undefined ? [] : serverArguments(kept) });
  try {
    await client.open("gears.ts");
    await client.waitForRules("gears.ts", ["bad-declaration"]);
    expect(client.errors).toEqual([]);
  } finally {
    await client.stop();
  }
}

/** By the file that it was made of. */
function listKept(): Map<string, { readonly name: string; readonly sum: string; readonly changed: number }> {
  return new Map(
    readdirSync(folder).map((name) => {
      const file = path.join(folder, name);
      const sum = readFileSync(file).toString("latin1");
      return [name.replace(/-[0-9a-f]+\.compiled$/, ""), { name, sum, changed: statSync(file).mtimeMs }];
    }),
  );
}

describe("compiled code of the server", () => {
  it("is kept in the folder that is named, and taken from there by the next start", async () => {
    await startOnce(folder);
    const kept = listKept();
    expect([...kept.keys()].sort()).toEqual(["server.main.cjs", "typescript.js"]);
    await startOnce(folder);
    // Whatever is refused is written anew.
    expect(listKept()).toEqual(kept);
  });

  it("is made anew where it is cut off, changed or empty", async () => {
    await startOnce(folder);
    for (const spoil of [
      (content: Buffer) => content.subarray(0, content.length / 2),
      (content: Buffer) => Buffer.from(content.map((byte, at) => (at === content.length - 1000 ? byte ^ 1 : byte))),
      () => Buffer.alloc(0),
    ]) {
      for (const { name } of listKept().values()) {
        const file = path.join(folder, name);
        writeFileSync(file, spoil(readFileSync(file)));
      }
      const spoilt = listKept();
      await startOnce(folder);
      for (const [file, { name, sum }] of listKept()) {
        expect(name).toBe(spoilt.get(file)?.name);
        expect(sum === spoilt.get(file)?.sum).toBe(false);
      }
    }
  });

  it("of another version is neither taken nor left", async () => {
    await startOnce(folder);
    const before = listKept().get("server.main.cjs")?.name;
    const main = path.join(path.dirname(server), "server.main.cjs");
    utimesSync(main, new Date(), new Date(Date.now() + 1000));
    await startOnce(folder);
    expect(readdirSync(folder)).toHaveLength(2);
    expect(listKept().get("server.main.cjs")?.name).not.toBe(before);
  });

  it("is not kept where no folder is named, nor missed where the folder cannot be made", async () => {
    await startOnce(undefined);
    const file = path.join(folder, "file");
    writeFileSync(file, "");
    await startOnce(path.join(file, "below"));
    expect(readdirSync(folder)).toEqual(["file"]);
  });
});
