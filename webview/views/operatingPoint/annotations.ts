/**
 * Zones and upright lines of a plot for chart.js's annotation plugin: the only file that knows its options.
 *
 * Words are not its work: they are placed with the curves' own (words.ts).
 */

import type { HatchKind } from "../../plots/hatch.js";
import type { Theme } from "../../theme/theme.js";
import type { Drawing } from "./drawing.js";

/** The part of the plugin's options that is used here; its own types cannot be read from an ES module. */
export type AnnotationOptions = BoxOptions | LineOptions;

interface BoxOptions {
  readonly type: "box";
  readonly xScaleID: string;
  readonly yScaleID: string;
  readonly adjustScaleRange: boolean;
  readonly xMin: number;
  readonly xMax: number;
  readonly backgroundColor: CanvasPattern | string;
  readonly borderWidth: number;
  readonly drawTime: "beforeDatasetsDraw";
}

interface LineOptions {
  readonly type: "line";
  readonly scaleID: string;
  readonly value: number;
  readonly adjustScaleRange: boolean;
  readonly borderColor: string;
  readonly borderWidth: number;
  readonly borderDash: readonly number[];
  readonly drawTime: "beforeDatasetsDraw";
}

export type HatchFill = (kind: HatchKind) => CanvasPattern | undefined;

/** With two value axes the plugin must be told which one; zones and lines take the whole height of either. */
const ON_AXES = { xScaleID: "torque", yScaleID: "left", adjustScaleRange: false } as const;

export function annotationsOf(drawing: Drawing, theme: Theme, fill: HatchFill): Record<string, AnnotationOptions> {
  const { zones, boundaries, needed, wasNeeded } = drawing;
  const entries: [string, AnnotationOptions | undefined][] = [
    ...zones.map(({ kind, from, to }): [string, AnnotationOptions] => [
      `zone ${kind}`,
      {
        type: "box",
        ...ON_AXES,
        xMin: from,
        xMax: to,
        backgroundColor: fill(kind) ?? "transparent",
        borderWidth: 0,
        drawTime: "beforeDatasetsDraw",
      },
    ]),
    ...boundaries.map(({ x }, index): [string, AnnotationOptions] => [
      `boundary ${index}`,
      uprightLine(x, theme.foreground, 1, []),
    ]),
    ["needed", needed.outside ? undefined : uprightLine(needed.x, theme.foreground, 1.5, [])],
    ["saved", wasNeeded === null || wasNeeded.outside ? undefined : uprightLine(wasNeeded.x, theme.quiet, 1, [2, 3])],
  ];
  return Object.fromEntries(entries.flatMap(([name, options]) => (options ? [[name, options]] : [])));
}

function uprightLine(x: number, colour: string, width: number, dash: readonly number[]): AnnotationOptions {
  return {
    type: "line",
    scaleID: "torque",
    value: x,
    adjustScaleRange: false,
    borderColor: colour,
    borderWidth: width,
    borderDash: dash,
    drawTime: "beforeDatasetsDraw",
  };
}
