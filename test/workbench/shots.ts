// The README's pictures as data: what is open, what is done, and which colours. takePictures.ts carries it out.

export type Step =
  /** Puts the line that holds the text in the middle of the view. */
  | { readonly do: "reveal"; readonly file: string; readonly text: string }
  | { readonly do: "retype"; readonly text: string; readonly by: string }
  /** Waits for a squiggle under a text that holds this one. */
  | { readonly do: "expectSquiggle"; readonly under: string }
  /** Waits for the lens above a mechanism, which comes on its own time. */
  | { readonly do: "expectLens" }
  /** Leaves the hover open; `holds` is what it must say, and guards the picture against showing something else. */
  | { readonly do: "hover"; readonly over: string; readonly holds: RegExp }
  | { readonly do: "runCommand"; readonly title: string }
  /** Opens the next problem below its line; `holds` is what it must say. */
  | { readonly do: "showProblem"; readonly holds: string }
  | { readonly do: "hideView"; readonly title: string }
  /** Puts the Mechanisms view in place of the files. */
  | { readonly do: "showMechanisms" }
  /** Waits for a webview that shows what the selector asks for. */
  | { readonly do: "expectWebview"; readonly selector: string }
  /** Presses a key, so often, on what the selector finds in the webview, and waits for a text there. */
  | {
      readonly do: "pressInWebview";
      readonly selector: string;
      readonly key: string;
      readonly times: number;
      readonly holds: string;
    };

export interface Shot {
  /** The picture's file name, without its ending. */
  readonly name: string;
  readonly theme: "Dark Modern" | "Light Modern" | "Default High Contrast" | "Default High Contrast Light";
  /** The file of the demo that is opened first. */
  readonly file: string;
  /** What is kept of the page, from its upper left corner, in CSS pixels. */
  readonly size: { readonly width: number; readonly height: number };
  readonly steps: readonly Step[];
}

const HIDE_SIDE_BAR: Step = { do: "runCommand", title: "View: Toggle Primary Side Bar Visibility" };

const MECHANISMS_ALONE: readonly Step[] = [
  { do: "hideView", title: "Outline" },
  { do: "hideView", title: "Timeline" },
  { do: "showMechanisms" },
];

const NARROWER: Step = { do: "runCommand", title: "Decrease Editor Width" };

const LIFT = "mechanisms/shelfLift.ts";
const WHEELS = "mechanisms/driveBase.ts";
const CARRIER = "carrier.ts";

type Scene = Omit<Shot, "theme"> & { readonly themes: readonly ("dark" | "light")[] };

/** What is shown. The chart is there in both kinds of theme, so that the README can follow its reader's colours. */
const scenes: readonly Scene[] = [
  {
    name: "warning",
    themes: ["dark"],
    file: LIFT,
    size: { width: 1200, height: 520 },
    steps: [
      { do: "expectSquiggle", under: "shelfLift" },
      { do: "expectLens" },
      ...MECHANISMS_ALONE,
      { do: "reveal", file: LIFT, text: "import { pack }" },
      { do: "showProblem", holds: "takes it back below half" },
    ],
  },
  {
    name: "hover",
    themes: ["light"],
    file: "gearing.ts",
    size: { width: 1200, height: 520 },
    steps: [HIDE_SIDE_BAR, { do: "hover", over: "PINION", holds: /tray hoist\t[\s\S]*const PINION/ }],
  },
  {
    name: "chart",
    themes: ["dark", "light"],
    file: LIFT,
    size: { width: 1200, height: 850 },
    steps: [
      HIDE_SIDE_BAR,
      { do: "expectSquiggle", under: "shelfLift" },
      { do: "expectLens" },
      { do: "reveal", file: LIFT, text: "motorCount" },
      { do: "runCommand", title: "Loadmark: Show Operating Point" },
      { do: "expectWebview", selector: "#view-operating-point .content:not([hidden])" },
      NARROWER,
      { do: "pressInWebview", selector: ".probe input", key: "ArrowLeft", times: 76, holds: "of stall" },
    ],
  },
  {
    name: "travel",
    themes: ["dark", "light"],
    file: WHEELS,
    size: { width: 1200, height: 800 },
    steps: [
      HIDE_SIDE_BAR,
      { do: "expectLens" },
      { do: "reveal", file: WHEELS, text: "stages" },
      { do: "runCommand", title: "Loadmark: Show Travel" },
      { do: "expectWebview", selector: "#view-travel .content:not([hidden])" },
      NARROWER,
    ],
  },
  {
    name: "ratio-map",
    themes: ["dark", "light"],
    file: LIFT,
    size: { width: 1200, height: 930 },
    steps: [
      HIDE_SIDE_BAR,
      { do: "expectSquiggle", under: "shelfLift" },
      { do: "expectLens" },
      { do: "reveal", file: LIFT, text: "stages" },
      { do: "runCommand", title: "Loadmark: Show Ratio Map" },
      { do: "expectWebview", selector: "#view-ratio-map .content:not([hidden])" },
      NARROWER,
    ],
  },
  {
    name: "power",
    themes: ["dark", "light"],
    file: CARRIER,
    size: { width: 1200, height: 900 },
    steps: [
      HIDE_SIDE_BAR,
      { do: "reveal", file: CARRIER, text: "loadCycle" },
      { do: "runCommand", title: "Loadmark: Show Power by Mechanism" },
      { do: "expectWebview", selector: "#view-power .content:not([hidden])" },
      NARROWER,
      { do: "pressInWebview", selector: ".plots", key: "ArrowRight", times: 1, holds: "step 5" },
    ],
  },
];

export const shots: readonly Shot[] = scenes.flatMap(({ themes, ...scene }) =>
  themes.map((theme) => ({
    ...scene,
    name: `${scene.name}-${theme}`,
    theme: theme === "dark" ? "Dark Modern" : "Light Modern",
  })),
);
