/**
 * The chart of a view: of what is declared at the caret, or of what is shown, beside the saved result; the last good one while there is none.
 *
 * Keeps good charts, so that half-typed code does not take away what people look at. Computes no number itself, and knows no view.
 */
import type { Analysis } from "../../analysis/analysis.js";
import type { ChartFeature, Wish } from "../../features/charts/feature.js";
import { createChartFeatures } from "../../features/charts/features.js";
import { mechanismsAround } from "../../features/mechanismsAround.js";
import { robotsAround } from "../../features/robotsAround.js";
import type { ChartAnswer, ChartEdits, ChartQuestion } from "../../protocol/chartMessages.js";
import type { Want } from "../../protocol/charts/views.js";
import { currentFile } from "../current.js";
import { keyOf } from "../fileKeys.js";
import type { Result } from "../session.js";
import { runInSlices, type Slices } from "../slices.js";
import type { Texts } from "../texts.js";

/** Good charts that are kept; the one that was asked for longest ago goes first. */
const KEPT = 32;

/** What only the view itself knows more of. */
type AnyFeature = ChartFeature<unknown, Want>;

export class ChartAnswers {
  readonly #texts: Texts;
  readonly #slices: Slices;
  readonly #features = createChartFeatures();
  readonly #lastGood = new Map<string, unknown>();
  /** Analyses of what is saved, by the texts that they are of. */
  readonly #saved = new WeakMap<object, Analysis>();

  constructor(texts: Texts, slices: Slices) {
    this.#texts = texts;
    this.#slices = slices;
  }

  /** `undefined` where a text changed while a chart was prepared: whoever asked will ask again. */
  async answer(result: Result, question: ChartQuestion): Promise<ChartAnswer | undefined> {
    const { want } = question;
    // Each feature takes the wants of its own view, which the compiler cannot follow through the table.
    const feature = this.#features[want.view] as AnyFeature;
    const wish = this.#wishOf(result, question);
    for (const name of feature.subjects(result.analysis, wish)) {
      if (!(await this.#prepare(result, feature, name, want))) return undefined;
      const shown = this.#chartOf(result, feature, name, want);
      if (shown === undefined) continue;
      const besides = feature.besides?.(result.analysis, name, want, result.analyse) ?? {};
      return { kind: "chart", view: want.view, ...shown, ...besides } as ChartAnswer;
    }
    const { reason, says, example } = feature.nothing(result.analysis, wish);
    return { kind: "nothing", view: want.view, reason, says: [...says], example };
  }

  /** What would write what is wanted to the code; null where nothing would, or where the texts are newer than the result. */
  editsFor(result: Result, question: ChartQuestion): ChartEdits {
    const { want } = question;
    const feature = this.#features[want.view] as AnyFeature;
    const [name] = feature.subjects(result.analysis, this.#wishOf(result, question));
    const edits = name === undefined ? undefined : feature.editsFor?.(result.analysis, name, want);
    const { snapshot } = result;
    if (edits === undefined || edits.some(({ file }) => !this.#isUnchanged(snapshot, file))) return null;
    return edits.map((edit) => ({
      uri: this.#texts.uriOf(edit.file),
      range: snapshot.lineMap(edit.file).rangeOf(edit),
      newText: edit.newText,
      version: snapshot.versions.get(edit.file) ?? null,
    }));
  }

  /** False where a text changed meanwhile. */
  async #prepare(result: Result, feature: AnyFeature, name: string, want: Want): Promise<boolean> {
    const saved = feature.prepare && this.#savedAnalysis(result);
    for (const analysis of [result.analysis, ...(saved ? [saved] : [])]) {
      const work = feature.prepare?.(analysis, name, want);
      if (work !== undefined && (await runInSlices(work, this.#slices)) === undefined) return false;
    }
    return true;
  }

  #isUnchanged(snapshot: Result["snapshot"], file: string): boolean {
    const open = this.#texts.openText(file);
    return open === undefined || open.text === snapshot.read(file);
  }

  #wishOf(result: Result, { caret, mechanism, robot }: ChartQuestion): Wish {
    const { analysis } = result;
    const file = caret === null ? undefined : keyOf(caret.uri);
    const current = file === undefined ? undefined : currentFile(this.#texts, result, file);
    const offset = current && caret ? current.carryBack(current.lines.offsetAt(caret)) : undefined;
    const isKnown = file !== undefined && offset !== undefined;
    return {
      mechanisms: isKnown ? mechanismsAround(analysis, file, offset) : [],
      robots: isKnown ? robotsAround(analysis, file, offset) : [],
      file,
      shownMechanism: mechanism,
      shownRobot: robot,
    };
  }

  #chartOf(result: Result, feature: AnyFeature, name: string, want: Want) {
    const chart = feature.chartOf(result.analysis, name, want);
    const saved = this.#savedChart(result, feature, name, want);
    const beside = (shown: unknown) => (saved === undefined || isSame(shown, saved) ? null : saved);
    const key = JSON.stringify([want.view, name]);
    if (chart !== undefined) {
      this.#keep(key, chart);
      return { chart, saved: beside(chart), old: null };
    }
    const last = this.#lastGood.get(key) ?? saved;
    return last === undefined ? undefined : { chart: last, saved: beside(last), old: feature.whyOld(result.analysis, name) };
  }

  /** The chart for what is saved; undefined where there is none, or where everything is saved. */
  #savedChart(result: Result, feature: AnyFeature, name: string, want: Want): unknown {
    const saved = this.#savedAnalysis(result);
    return saved && feature.chartOf(saved, name, want);
  }

  /** `undefined` where everything is saved. */
  #savedAnalysis({ analysis, analyse }: Result): Analysis | undefined {
    const { saved, isSaved } = this.#texts.capture();
    if (isSaved) return undefined;
    const known = this.#saved.get(saved) ?? analyse([...analysis.files.keys()], saved);
    this.#saved.set(saved, known);
    return known;
  }

  #keep(key: string, chart: unknown): void {
    this.#lastGood.delete(key);
    this.#lastGood.set(key, chart);
    const [oldest] = this.#lastGood.keys();
    if (this.#lastGood.size > KEPT && oldest !== undefined) this.#lastGood.delete(oldest);
  }
}

function isSame(one: unknown, other: unknown): boolean {
  return JSON.stringify(one) === JSON.stringify(other);
}
