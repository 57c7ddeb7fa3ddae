/** When each surface is told of a result: findings first, the rest once, for the newest. */
import { describe, expect, it, vi } from "vitest";
import type { Connection } from "vscode-languageserver";
import type { Analysis } from "../../extension/analysis/analysis.js";
import { createIndexReader, createMechanismsReader } from "../../extension/features/mechanismIndex.js";
import { NO_COMMIT } from "../../extension/features/sinceCommit.js";
import { NO_STATE, resolveState, STATE, type State, type StateMessage } from "../../extension/protocol/state.js";
import { createLensReader } from "../../extension/server/answers/codeLenses.js";
import { createHintReader } from "../../extension/server/answers/inlayHints.js";
import { showResults } from "../../extension/server/results.js";
import type { Result } from "../../extension/server/session.js";
import { EditedWorkspace } from "../support/editedWorkspace.js";

const CHART = "loadmark/chartMayDiffer";
const HINTS = "inlay hints";
const LENSES = "workspace/codeLens/refresh";
const FINDINGS = "findings";

/** A client whose reading can be held up; `said`: what it got, in order. */
function start() {
  const workspace = new EditedWorkspace();
  const said: string[] = [];
  const errors: string[] = [];
  const states: StateMessage[] = [];
  const client = { isReading: true, losesStates: false, held: [] as (() => void)[] };
  const say = (what: string) => {
    said.push(what);
    return Promise.resolve();
  };
  const connection = {
    sendDiagnostics: () => {
      if (said.at(-1) !== FINDINGS) said.push(FINDINGS);
      return client.isReading ? Promise.resolve() : new Promise<void>((resolve) => client.held.push(resolve));
    },
    sendNotification: (method: string, message?: StateMessage) => {
      if (method === STATE && client.losesStates) return Promise.reject(new Error("lost"));
      if (method === STATE && message !== undefined) states.push(message);
      return say(method);
    },
    sendRequest: say,
    languages: { inlayHint: { refresh: () => say(HINTS) } },
    tracer: { log: () => {} },
  };
  const indexOf = createIndexReader();
  const mechanismsIn = createMechanismsReader(indexOf);
  const hintsOf = vi.fn(createHintReader(mechanismsIn));
  const results = showResults({
    connection: connection as unknown as Connection,
    capabilities: { workspace: { inlayHint: { refreshSupport: true }, codeLens: { refreshSupport: true } } },
    indexOf,
    hintsOf,
    lensesOf: createLensReader(mechanismsIn),
    committedOf: () => NO_COMMIT,
    report: (what, error) => errors.push(`${what}: ${error instanceof Error ? error.message : error}`),
  });
  const edit = (file: string, text: string, replacement: string) => {
    if (!workspace.replace(file, text, replacement)) throw new Error(`${file} does not hold ${text}.`);
    const result = withoutLists(workspace.result());
    results.show(workspace.texts, result);
    // As the session does.
    workspace.texts.forgetEditsUpTo(result.snapshot.versions);
  };
  const settle = () => new Promise((resolve) => setTimeout(resolve, 20));
  const takeSaid = () => said.splice(0);
  const state = () => states.reduce<State | undefined>((before, message) => before && resolveState(before, message), NO_STATE);
  const robotOf = (name: string) => state()?.robots.find((robot) => robot.name === name);
  return { workspace, said, errors, states, client, results, hintsOf, edit, settle, takeSaid, state, robotOf };
}

/** A result whose lists over the whole workspace nobody may ask for: they would cost what the workspace has, not what changed. */
function withoutLists(result: Result): Result {
  const { inFile, findingsIn, wanted, snapshot, levels, toothCounts } = result.analysis;
  const analysis = { inFile, findingsIn, wanted, snapshot, levels, toothCounts } as Analysis;
  for (const list of ["mechanisms", "motors", "robots", "findings", "files"]) {
    Object.defineProperty(analysis, list, {
      get: () => {
        throw new Error(`All ${list} were asked for.`);
      },
    });
  }
  return { ...result, analysis };
}

async function startOpened() {
  const server = start();
  server.workspace.open("/w/a.ts");
  server.edit("/w/plain.ts", "1", "2");
  await server.settle();
  server.takeSaid();
  return server;
}

describe("a new result", () => {
  it("tells findings, then the state, then that charts may differ, then what to ask for anew", async () => {
    const { edit, settle, said, errors } = await startOpened();
    edit("/w/a.ts", "spur(20, 80)", "spur(20, 20)");
    expect(said).toEqual([FINDINGS]);
    await settle();
    expect(said).toEqual([FINDINGS, STATE, CHART, HINTS, LENSES]);
    expect(errors).toEqual([]);
  });

  it("asks for nothing anew, and tells no state, where nothing differs", async () => {
    const { edit, settle, said, hintsOf } = await startOpened();
    hintsOf.mockClear();
    edit("/w/plain.ts", "2", "1");
    await settle();
    expect(said).toEqual([CHART]);
    expect(hintsOf).not.toHaveBeenCalled();
  });

  it("asks for nothing anew where a change is in a file that is not open", async () => {
    const { edit, settle, said, hintsOf } = await startOpened();
    hintsOf.mockClear();
    edit("/w/d.ts", "spur(20, 30)", "spur(20, 70)");
    await settle();
    expect(said).toEqual([FINDINGS, STATE, CHART]);
    expect(hintsOf).not.toHaveBeenCalled();
  });

  it("asks for nothing anew where hints and lenses moved along with the text", async () => {
    const { edit, settle, said } = await startOpened();
    edit("/w/a.ts", "import", "\nimport");
    await settle();
    expect(said).toEqual([FINDINGS, STATE, CHART]);
  });

  it("asks anew for what is typed over with the same, which the editor could not move along", async () => {
    const { workspace, edit, settle, said } = await startOpened();
    const text = workspace.text("/w/a.ts") ?? "";
    workspace.replace("/w/a.ts", text, "");
    edit("/w/a.ts", "", text);
    await settle();
    expect(said).toEqual([FINDINGS, CHART, HINTS, LENSES]);
  });
});

describe("results in quick succession", () => {
  it("have the rest told once, for the newest", async () => {
    const { edit, settle, said, client, robotOf } = await startOpened();
    client.isReading = false;
    edit("/w/gears.ts", "WHEEL = 60", "WHEEL = 20");
    await settle();
    // Findings on their way are waited for.
    expect(said).toEqual([FINDINGS]);
    edit("/w/gears.ts", "WHEEL = 20", "WHEEL = 95");
    for (const release of client.held) release();
    await settle();
    expect(said).toEqual([FINDINGS, STATE, CHART, HINTS, LENSES]);
    expect(robotOf("mover")?.mechanisms[2]).toMatchObject({ name: "middle", standing: "fine" });
  });

  it("have hints asked for anew even where the last is like the first: somebody may have been shown the one between", async () => {
    const { edit, settle, takeSaid } = await startOpened();
    edit("/w/gears.ts", "WHEEL = 60", "WHEEL = 20");
    edit("/w/gears.ts", "WHEEL = 20", "WHEEL = 60");
    await settle();
    expect(takeSaid()).toEqual([FINDINGS, CHART, HINTS, LENSES]);
    edit("/w/gears.ts", "WHEEL = 60", "WHEEL = 20");
    await settle();
    expect(takeSaid()).toEqual([FINDINGS, STATE, CHART, HINTS, LENSES]);
    edit("/w/plain.ts", "2", "1");
    await settle();
    expect(takeSaid()).toEqual([CHART]);
  });

  it("are told nothing more of once the server shuts down", async () => {
    const { edit, settle, said, results } = await startOpened();
    edit("/w/gears.ts", "WHEEL = 60", "WHEEL = 20");
    results.dispose();
    await settle();
    expect(said).toEqual([FINDINGS]);
  });
});

describe("a failure", () => {
  it("to send a state is made up for by a whole one", async () => {
    const { edit, settle, states, client, errors, state, robotOf } = await startOpened();
    client.losesStates = true;
    edit("/w/gears.ts", "WHEEL = 60", "WHEEL = 20");
    await settle();
    expect(errors).toEqual(["Telling the state: lost"]);
    client.losesStates = false;
    edit("/w/plain.ts", "2", "1");
    await settle();
    expect(JSON.stringify(states.at(-1))).not.toContain("kept");
    expect(robotOf("mover")).toMatchObject({ standing: "error" });
    edit("/w/gears.ts", "WHEEL = 20", "WHEEL = 60");
    await settle();
    expect(JSON.stringify(states.at(-1))).toContain("kept");
    expect(state()?.apart).toHaveLength(4);
  });

  it("of one surface keeps no other from the result", async () => {
    const { edit, settle, said, errors, hintsOf } = await startOpened();
    hintsOf.mockImplementation(() => {
      throw new Error("broken");
    });
    edit("/w/a.ts", "spur(20, 80)", "spur(20, 20)");
    await settle();
    expect(said).toEqual([FINDINGS, STATE, CHART, LENSES]);
    expect(errors).toEqual(["Comparing hints: broken"]);
  });
});
