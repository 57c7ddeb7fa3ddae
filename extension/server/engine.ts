/**
 * The analysis as the session uses it, with the parser behind it, which is loaded when the first file needs it.
 */
import { type Analyser, createAnalyser } from "../analysis/analyser.js";
import { loadParser } from "../analysis/parser.js";

export type Engine = Analyser;

export async function loadEngine(): Promise<Engine> {
  return createAnalyser(await loadParser());
}
