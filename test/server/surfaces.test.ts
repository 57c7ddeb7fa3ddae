/** What the surfaces say after an edit, worked out from what changed alone, against the same worked out from nothing. */
import { describe, expect, it } from "vitest";
import { codeLensesOf } from "../../extension/features/codeLenses.js";
import { inlayHintsIn } from "../../extension/features/inlayHints.js";
import { createIndexReader, createMechanismsReader } from "../../extension/features/mechanismIndex.js";
import { readMessage } from "../../extension/protocol/readMessage.js";
import { NO_STATE, resolveState, type State, stateMessageSchema } from "../../extension/protocol/state.js";
import { createLensReader } from "../../extension/server/answers/codeLenses.js";
import { createHintReader } from "../../extension/server/answers/inlayHints.js";
import { createDiagnosticsReader } from "../../extension/server/diagnostics.js";
import { resultChanges, retoldFiles } from "../../extension/server/resultChanges.js";
import type { Result } from "../../extension/server/session.js";
import { createStateReader } from "../../extension/server/stateMessage.js";
import { EDITS, EditedWorkspace, WORKSPACE } from "../support/editedWorkspace.js";

const FILES = Object.keys(WORKSPACE);

/** Follows results as the server does. */
function follow(workspace: EditedWorkspace) {
  const indexOf = createIndexReader();
  const mechanismsIn = createMechanismsReader(indexOf);
  const [hintsOf, lensesOf] = [createHintReader(mechanismsIn), createLensReader(mechanismsIn)];
  const diagnosticsOf = createDiagnosticsReader();
  const stateOf = createStateReader(indexOf, true);
  let before: Result | undefined;
  let state: State = NO_STATE;
  return {
    hintsOf,
    lensesOf,
    diagnostics: (result: Result) => diagnosticsOf(result, workspace.uriOf),
    tell(result: Result) {
      const changes = before && resultChanges(before, result, indexOf);
      const message = stateOf(result, workspace.uriOf, changes);
      if (message !== undefined) {
        const received = readMessage(stateMessageSchema, JSON.parse(JSON.stringify(message)));
        const resolved = received && resolveState(state, received);
        if (resolved === undefined) throw new Error("A state that cannot be resolved.");
        state = resolved;
      }
      const retold = before && changes && retoldFiles(before, result, changes);
      const last = before;
      before = result;
      return { message, state, retold, last };
    },
  };
}

function wholeState(workspace: EditedWorkspace, result: Result): State | undefined {
  const message = createStateReader(createIndexReader(), false)(result, workspace.uriOf);
  return message && resolveState(NO_STATE, message);
}

/** A small generator with a seed (numerical recipes' constants), so that a failure comes again. */
function randomFrom(seed: number): (below: number) => number {
  let state = seed;
  return (below) => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return Math.floor((state / 2 ** 32) * below);
  };
}

function editAtRandom(workspace: EditedWorkspace, random: (below: number) => number): string {
  const file = FILES[random(FILES.length)] ?? "";
  switch (random(12)) {
    case 0:
      workspace.open(file, random(2) === 0);
      return `open ${file}`;
    case 1:
      workspace.close(file);
      return `close ${file}`;
    case 2:
      if (workspace.texts.openText(file) === undefined)
        workspace.put(file, workspace.text(file) === undefined ? (WORKSPACE[file] ?? null) : null);
      return `remove or put ${file}`;
    case 3:
      workspace.put(
        "/w/loadmark.json",
        ['{ "levels": { "past-peak": "error", "sags": "off" } }', '{ "levels": { "stalls": "warning", "sags": "error" } }', null][
          random(3)
        ] ?? null,
      );
      return "settings";
    case 4:
      return `line ${file} ${workspace.replace(file, "import", "\nimport")}`;
    default: {
      const [text, replacement] = EDITS[random(EDITS.length)] ?? ["", ""];
      const holder = FILES.find((one) => workspace.replace(one, text, replacement));
      return `${holder} ${text} → ${replacement}`;
    }
  }
}

describe("after edits at random", () => {
  it.each([1, 2, 3, 4, 5, 6])("all surfaces say what they would say from nothing (%i)", (seed) => {
    const random = randomFrom(seed);
    const workspace = new EditedWorkspace();
    const surfaces = follow(workspace);
    const seen = { kept: 0, left: 0, states: new Set<string>() };
    let log = "";
    for (let edit = 0; edit < 70; edit += 1) {
      for (let more = random(3); more >= 0; more -= 1) log = editAtRandom(workspace, random);
      const result = workspace.result();
      const { analysis, snapshot } = result;
      const told = surfaces.diagnostics(result);
      const fresh = createDiagnosticsReader()(result, workspace.uriOf);
      expect(new Map([...told].sort()), log).toEqual(new Map([...fresh].sort()));
      expect(
        [...told.values()].flatMap(({ diagnostics }) => diagnostics),
        log,
      ).toHaveLength(analysis.findings.length);
      // Now and then a newer result comes before the rest is told.
      if (random(4) === 0) continue;
      const { message, state, retold, last } = surfaces.tell(result);
      expect(state, log).toEqual(wholeState(workspace, result));
      const names = [...state.apart, ...state.robots.flatMap(({ mechanisms }) => mechanisms)].map(({ name }) => name);
      expect(new Set(names), log).toEqual(new Set(analysis.mechanisms.map(({ name }) => name)));
      if (JSON.stringify(message)?.includes('"kept"')) seen.kept += 1;
      seen.states.add(JSON.stringify(state.status));
      for (const file of FILES) {
        const hints = surfaces.hintsOf(result, file);
        expect(hints, `${log}: ${file}`).toEqual(inlayHintsIn(analysis, file, 0, snapshot.read(file)?.length ?? 0));
        expect(surfaces.lensesOf(result, file), `${log}: ${file}`).toEqual(codeLensesOf(analysis, file));
        if (last === undefined || (retold?.has(file) ?? true)) continue;
        seen.left += 1;
        expect(hints, `${log}: ${file}`).toEqual(surfaces.hintsOf(last, file));
        expect(surfaces.lensesOf(result, file), `${log}: ${file}`).toEqual(surfaces.lensesOf(last, file));
      }
    }
    expect(seen.kept).toBeGreaterThan(10);
    expect(seen.left).toBeGreaterThan(50);
    expect(seen.states.size).toBeGreaterThan(5);
  });
});

describe("after one edit", () => {
  it("the message names all that stays, and tells what does not", () => {
    const workspace = new EditedWorkspace();
    const surfaces = follow(workspace);
    const first = surfaces.tell(workspace.result());
    expect(JSON.stringify(first.message)).not.toContain('"kept"');
    expect(first.state.apart.map(({ name }) => name)).toEqual(["vague", "near", "far", "right"]);
    workspace.replace("/w/d.ts", "spur(20, 30)", "spur(20, 70)");
    const { message, state } = surfaces.tell(workspace.result());
    const changed = state.apart.filter(({ name }) => name === "near" || name === "far");
    expect(message?.apart).toEqual([{ from: 0, kept: 1 }, ...changed, { from: 3, kept: 1 }]);
    expect(message?.robots).toEqual([{ from: 0, kept: 2 }]);
  });

  it("a robot is told without those of its mechanisms that stay", () => {
    const workspace = new EditedWorkspace();
    const surfaces = follow(workspace);
    surfaces.tell(workspace.result());
    workspace.replace("/w/gears.ts", "WHEEL = 60", "WHEEL = 20");
    const { message, state } = surfaces.tell(workspace.result());
    const { mechanisms, ...head } = state.robots[1] ?? { mechanisms: [] };
    expect(message?.robots).toEqual([
      { from: 0, kept: 1 },
      { ...head, like: 1, mechanisms: [{ from: 0, kept: 2 }, mechanisms[2]] },
    ]);
    expect(mechanisms[2]).toMatchObject({ name: "middle", standing: "error" });
    expect(message?.apart).toEqual([{ from: 0, kept: 4 }]);
  });

  it("in a file that declares nothing, nothing is told, and no diagnostics are another object", () => {
    const workspace = new EditedWorkspace();
    const surfaces = follow(workspace);
    const result = workspace.result();
    surfaces.tell(result);
    const before = new Map(surfaces.diagnostics(result));
    workspace.replace("/w/plain.ts", "1", "2");
    const next = workspace.result();
    expect(surfaces.tell(next).message).toBeUndefined();
    const after = surfaces.diagnostics(next);
    expect(before.size).toBeGreaterThan(2);
    expect(after.size).toBe(before.size);
    for (const [file, told] of after) expect(told).toBe(before.get(file));
  });

  it("a text that was typed over with the same is looked at: what the editor moved along may stand elsewhere", () => {
    const workspace = new EditedWorkspace();
    const surfaces = follow(workspace);
    workspace.open("/w/a.ts");
    surfaces.tell(workspace.result());
    const text = workspace.text("/w/a.ts") ?? "";
    workspace.replace("/w/a.ts", text, "");
    workspace.replace("/w/a.ts", "", text);
    expect(surfaces.tell(workspace.result()).retold).toEqual(new Set(["/w/a.ts"]));
  });
});
