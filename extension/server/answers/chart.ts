/**
 * The chart of the mechanism at the caret, or of the one that is shown, beside the saved result; the last good one while there is none.
 *
 * Keeps good charts, so that half-typed code does not take away what people look at. Computes no number itself.
 */
import type { Analysis } from "../../analysis/analysis.js";
import { type OperatingPointChart, operatingPointChart } from "../../features/chart.js";
import { mechanismsAround } from "../../features/mechanismsAround.js";
import type { ChartAnswer, ChartQuestion } from "../../protocol/chartMessages.js";
import { currentFile } from "../current.js";
import { keyOf } from "../fileKeys.js";
import type { Result } from "../session.js";
import type { Texts } from "../texts.js";

/** Good charts that are kept; the one that was asked for longest ago goes first. */
const KEPT = 32;

export class ChartAnswers {
  readonly #texts: Texts;
  readonly #lastGood = new Map<string, OperatingPointChart>();
  /** Analyses of what is saved, by the texts that they are of. */
  readonly #saved = new WeakMap<object, Analysis>();

  constructor(texts: Texts) {
    this.#texts = texts;
  }

  answer(result: Result, question: ChartQuestion): ChartAnswer {
    for (const name of this.#wanted(result, question)) {
      const answer = this.#chartOf(result, name);
      if (answer !== undefined) return answer;
    }
    const declared = result.analysis.mechanisms.length > 0;
    return { kind: "nothing", reason: declared ? "nothing-computed" : "nothing-declared" };
  }

  /** Names of mechanisms, the most wanted first. */
  #wanted(result: Result, { caret, mechanism: shown }: ChartQuestion): Set<string> {
    const file = caret === null ? undefined : keyOf(caret.uri);
    const current = file === undefined ? undefined : currentFile(this.#texts, result, file);
    const offset = current && caret ? current.carryBack(current.lines.offsetAt(caret)) : undefined;
    const { analysis } = result;
    const around = file === undefined || offset === undefined ? [] : mechanismsAround(analysis, file, offset);
    const atCaret = around.map(({ name }) => name);
    const kept = shown === null ? [] : [shown];
    const others = analysis.mechanisms.toSorted((one, other) => Number(other.at.file === file) - Number(one.at.file === file));
    // Where a loop declares several at once, the one that is shown stays.
    const first = shown !== null && atCaret.includes(shown) ? [shown] : [];
    return new Set([...first, ...atCaret, ...kept, ...others.map(({ name }) => name)]);
  }

  #chartOf(result: Result, name: string): ChartAnswer | undefined {
    const chart = operatingPointChart(result.analysis, name);
    const saved = this.#savedChart(result, name);
    if (chart !== undefined) {
      this.#keep(name, chart);
      return { kind: "chart", chart, saved: isSame(chart, saved) ? null : (saved ?? null), old: null };
    }
    const last = this.#lastGood.get(name) ?? saved;
    return last && { kind: "chart", chart: last, saved: isSame(last, saved) ? null : (saved ?? null), old: whyOld(result, name) };
  }

  /** The chart for what is saved; undefined where there is none, or where everything is saved. */
  #savedChart({ analysis, analyse }: Result, name: string): OperatingPointChart | undefined {
    const { saved, isSaved } = this.#texts.capture();
    if (isSaved) return undefined;
    const known = this.#saved.get(saved) ?? analyse([...analysis.files.keys()], saved);
    this.#saved.set(saved, known);
    return operatingPointChart(known, name);
  }

  #keep(name: string, chart: OperatingPointChart): void {
    this.#lastGood.delete(name);
    this.#lastGood.set(name, chart);
    const [oldest] = this.#lastGood.keys();
    if (this.#lastGood.size > KEPT && oldest !== undefined) this.#lastGood.delete(oldest);
  }
}

function whyOld({ analysis }: Result, name: string): string {
  const mechanism = analysis.mechanisms.find((one) => one.name === name);
  const why =
    mechanism === undefined
      ? "The code as it stands does not declare this mechanism."
      : (mechanism.notChecked[0] ?? "A value is missing.");
  return `${why} What is shown is its last result.`;
}

function isSame(one: OperatingPointChart, other: OperatingPointChart | undefined): boolean {
  return other !== undefined && JSON.stringify(one) === JSON.stringify(other);
}
