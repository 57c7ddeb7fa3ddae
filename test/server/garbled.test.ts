/** Whatever is typed, the session with the real analysis neither fails nor keeps findings that are no longer true. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { type Engine, loadEngine } from "../../extension/server/engine.js";
import { type Result, Session } from "../../extension/server/session.js";
import { createMemoryFiles } from "../support/memoryFiles.js";
import { gears, PAST_PEAK, SWING_ARM } from "../support/swingArm.js";

const ROBOT = "file:///w/robot.ts";
const GEARS = "file:///w/gears.ts";

interface Edit {
  readonly file: string;
  readonly at: number;
  readonly removed: number;
  readonly inserted: string;
}

const snippet = fc.oneof(
  fc.constantFrom(
    "(",
    ")",
    "{",
    "}",
    "[",
    "]",
    '"',
    "'",
    "`",
    "$" + "{",
    ",",
    ";",
    ":",
    "=",
    "/*",
    "*/",
    "//",
    "\n",
    "\r\n",
    "...",
    "?.",
    "=>",
  ),
  fc.constantFrom("mechanism(", "spur(16, DRIVEN)", "1 kg", "NaN", "-", "1e999", "null", "\ud800", "\u202e", "\u0000"),
  fc.constantFrom('import { DRIVEN } from "./robot.js";', 'export * from "./gears.js";', "export const DRIVEN = DRIVEN;"),
  fc.string({ maxLength: 6 }),
);

const edit: fc.Arbitrary<Edit> = fc.record({
  file: fc.constantFrom(ROBOT, GEARS),
  at: fc.nat(800),
  removed: fc.oneof(fc.constant(0), fc.nat(12), fc.nat(400)),
  inserted: fc.oneof(fc.constant(""), snippet),
});

describe("garbled text", () => {
  it("gives findings as if it had been there from the start, and good text gives the old ones again", async () => {
    const engine = await loadEngine();
    const good = await findingsOf({ [ROBOT]: SWING_ARM, [GEARS]: gears(PAST_PEAK) });
    expect(good).toContainEqual(expect.stringContaining("past-peak"));
    await fc.assert(
      fc.asyncProperty(fc.array(edit, { minLength: 1, maxLength: 5 }), async (edits) => {
        const { session, current, errors } = start(engine);
        await session.setFolders(["/w"]);
        const texts: Record<string, string> = { [ROBOT]: SWING_ARM, [GEARS]: gears(PAST_PEAK) };
        for (const [uri, text] of Object.entries(texts)) session.open(uri, 1, text);
        let version = 1;
        for (const { file, at, removed, inserted } of edits) {
          const before = texts[file] ?? "";
          const start = Math.min(at, before.length);
          texts[file] = before.slice(0, start) + inserted + before.slice(start + removed);
          version += 1;
          session.change(file, version, [{ text: texts[file] }]);
          session.save();
          await session.whenCurrent(10_000);
        }
        expect(summary(await current())).toEqual(await findingsOf(texts));
        session.change(ROBOT, version + 1, [{ text: SWING_ARM }]);
        session.change(GEARS, version + 1, [{ text: gears(PAST_PEAK) }]);
        session.save();
        expect(summary(await current())).toEqual(good);
        expect(errors).toEqual([]);
        session.dispose();
      }),
      { numRuns: 120 },
    );
  }, 60_000);
});

function start(engine: Engine) {
  const errors: unknown[] = [];
  const session = new Session({
    host: createMemoryFiles({}),
    loadEngine: async () => engine,
    onResult: () => {},
    onError: (what, error) => errors.push(what, error),
  });
  return { session, errors, current: () => session.whenCurrent(10_000) };
}

/** By a session and an engine of its own, which never saw another text. */
async function findingsOf(texts: Readonly<Record<string, string>>) {
  const { session, current } = start(await loadEngine());
  await session.setFolders(["/w"]);
  for (const [uri, text] of Object.entries(texts)) session.open(uri, 1, text);
  const result = await current();
  session.dispose();
  return summary(result);
}

function summary(result: Result | undefined): string[] {
  return (result?.analysis.findings ?? []).map(({ rule, message, at }) => `${at.file}:${at.start}-${at.end} ${rule}: ${message}`);
}
