/**
 * The analysis as the session uses it, with the parser behind it, which is loaded when the first file needs it.
 */
import { type Analyser, createAnalyser } from "../analysis/analyser.js";
import { parseSettings } from "../analysis/settings.js";
import { loadTypeScript } from "../evaluator/typescript.js";

export interface Engine extends Analyser {
  /** The folders that a settings file leaves out, relative to its own. */
  leftOutBy(settingsFile: string, text: string): readonly string[];
}

export async function loadEngine(): Promise<Engine> {
  const typescript = await loadTypeScript();
  const analyser = createAnalyser(typescript);
  return {
    analyse: analyser.analyse,
    leftOutBy: (file, text) => parseSettings(typescript, file, text).settings.leaveOut ?? [],
  };
}
