/**
 * All that the page shows of one answer, as each view gives it: words, facts, plots, the read-out at each abscissa, and the table.
 *
 * The frame does the same with every sheet: cursor, keys, table, files. Sheets hold text for people and no element of the page.
 */
import type { PageMessage } from "../../extension/protocol/chartMessages.js";
import type { ChartFinding } from "../../extension/protocol/charts/parts.js";
import type { Theme } from "../theme/theme.js";

export interface Sheet {
  /** The name of what it is about; text from people's code. */
  readonly title: string;
  readonly state: "error" | "warning" | "fine" | "unknown";
  readonly verdict: string;
  /** Short remarks beside the verdict. */
  readonly notes: readonly string[];
  readonly facts: readonly Fact[];
  readonly findings: readonly ChartFinding[];
  readonly assumed: readonly string[];
  readonly notChecked: readonly string[];
  readonly plots: readonly PlotPart[];
  /** What lies across, for the cursor's own name: "Torque". */
  readonly across: string;
  /** Stops lie below each other: the key down leads to the next. Absent: they lie beside each other. */
  readonly downwards?: true;
  /** Where the cursor can stand, rising, SI. */
  readonly stops: readonly number[];
  /** Where the read-out stands, and the cursor at its first step; SI. */
  readonly restsAt: number;
  readonly readAt: (stop: number) => ReadOut;
  /** For people: some rows, numbers as they are written. */
  readonly table: () => Table;
  /** For programs: all rows, each number with ten digits. */
  readonly file: () => Table;
  /** What of it can be chosen; may be empty. */
  readonly choices: readonly Choice[];
  /** What a person may have written into the code, with the cursor at a stop or away; absent: nothing. */
  readonly actionsAt?: (stop: number | null) => readonly SheetAction[];
  /** Null where nothing can be tried. */
  readonly probe: SheetProbe | null;
  /** As long as this stays the same so do the plots; absent where they always may differ. */
  readonly plotsKey?: string;
  /** Null where the abscissa is always shown whole. */
  readonly zoom: Zoom | null;
  /** What fills stand for, where a picture stands alone; absent where words stand at everything. */
  readonly keys?: readonly Key[];
  /** A line below the picture that is saved. */
  readonly footnote: string;
}

/** A button. Nothing happens in the code before it is pressed. */
export interface SheetAction {
  /** What it writes, with numbers. */
  readonly words: string;
  readonly message: PageMessage;
}

/** One of a few things to choose from; what is chosen is remembered under its key. */
export interface Choice {
  readonly key: string;
  readonly label: string;
  readonly chosen: string;
  readonly options: readonly { readonly value: string; readonly words: string }[];
}

/** Something to try at an abscissa: what is dragged, and what the model answers. */
export interface SheetProbe {
  readonly label: string;
  /** Where it stands, SI; null while nobody tries. */
  readonly at: number | null;
  /** Where it starts. */
  readonly restsAt: number;
  readonly least: number;
  readonly greatest: number;
  readonly words: (at: number) => string;
  /** What the model says of it; the last answer while the next is on its way. */
  readonly says: readonly string[];
  readonly canWrite: boolean;
}

/** What is shown of the abscissa, and all that could be, SI. */
export interface Zoom {
  readonly from: number;
  readonly to: number;
  readonly least: number;
  readonly greatest: number;
  /** A span in words: "from 3 s to 5 s". */
  readonly words: (from: number, to: number) => string;
}

export interface Fact {
  readonly name: string;
  readonly now: string;
  /** Of the saved result; null where it reads the same. */
  readonly was: string | null;
}

/** All values at one abscissa. */
export interface ReadOut {
  /** "0.525 N·m, 40 % of stall" */
  readonly at: string;
  /** What the place is known for; may be empty. */
  readonly names: string;
  readonly head: readonly string[];
  readonly rows: readonly ReadOutRow[];
  /** The same in a sentence, for those who hear it. */
  readonly spoken: string;
}

export interface Key {
  readonly name: string;
  /** `pixelRatio`: the window's where absent. */
  readonly swatch: (canvas: HTMLCanvasElement, theme: Theme, pixelRatio?: number) => void;
}

export interface ReadOutRow {
  readonly name: string;
  readonly cells: readonly string[];
  /** How it is filled in the plot; absent for what is not. */
  readonly swatch?: Key["swatch"];
}

export interface Table {
  readonly caption: string;
  readonly head: readonly string[];
  readonly rows: readonly (readonly string[])[];
}

/** One plot of a sheet, and how it is described to those who do not see it. */
export interface PlotPart {
  /** Of the plot on the page, px. */
  readonly height: number;
  /** Of the plot in a picture, where it must be as high as what is in it. */
  readonly pictureHeight?: number;
  readonly words: string;
  readonly create: (canvas: HTMLCanvasElement, options: PlotOptions) => Plot;
}

export interface PlotOptions {
  /** Device pixels per px. Where absent the plot follows the size of what it stands in. */
  readonly pixelRatio?: number;
}

export interface Plot {
  draw(theme: Theme): void;
  /** By index of the stop; null takes it away. */
  setCursor(stop: number | null): void;
  /** Where the probe stands, SI; absent where there is none. */
  setProbe?(at: number | null): void;
  /** Abscissa at a distance from the canvas's left edge, SI; `undefined` where nothing lies across. */
  at(px: number): number | undefined;
  destroy(): void;
}

/** What was, beside what is; only where it reads differently. */
export function factsBeside(
  now: readonly (readonly [name: string, text: string])[],
  saved: readonly (readonly [name: string, text: string])[],
): readonly Fact[] {
  const before = new Map(saved);
  return now.map(([name, text]) => {
    const was = before.get(name) ?? null;
    return { name, now: text, was: was === text ? null : was };
  });
}
