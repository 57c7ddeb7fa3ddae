/** The result where nothing is declared: nothing need be loaded to say so. */
import type { FileAnalysis, Finding } from "../analysis/analysis.js";
import type { Engine } from "./engine.js";
import type { Result } from "./session.js";
import type { TextSnapshot } from "./texts.js";

export function resultOfNothing(snapshot: TextSnapshot): Result {
  const nothing = {
    mechanisms: [],
    motors: [],
    robots: [],
    findings: [],
    findingsIn: new Map<string, readonly Finding[]>(),
    inFile: new Map<string, FileAnalysis>(),
    wanted: [],
    levels: new Map(),
    toothCounts: new Map<string, readonly number[]>(),
  };
  const analyse: Engine["analyse"] = (_roots, given) => ({ ...nothing, files: new Map(), snapshot: given });
  return { analysis: analyse([], snapshot), snapshot, analyse };
}
