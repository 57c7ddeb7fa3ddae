/**
 * Colours of what is plotted on dark and on light ground.
 *
 * Chosen so that the curves of one plot stay apart with every kind of colour blindness, with a contrast of at least 3 to the usual
 * grounds; so do neighbours in a stack, which differ by hatch as well. High contrast themes use the foreground colour instead.
 */

export type ColourName = "speed" | "current" | "power" | "efficiency" | "torque" | "voltage";

export interface Palette {
  readonly curves: Readonly<Record<ColourName, string>>;
  /** For the parts of a stack, in turn. */
  readonly stack: readonly string[];
}

export const ON_DARK: Palette = {
  curves: {
    speed: "#6cb6ff",
    current: "#f0a33c",
    power: "#4fc79a",
    efficiency: "#e08bc9",
    torque: "#4fc79a",
    voltage: "#6cb6ff",
  },
  stack: ["#6cb6ff", "#f0a33c", "#4fc79a", "#e08bc9", "#ded65c", "#b4b4b4"],
};

export const ON_LIGHT: Palette = {
  curves: {
    speed: "#1f5fb4",
    current: "#b3500b",
    power: "#0b7a55",
    efficiency: "#a03a86",
    torque: "#0b7a55",
    voltage: "#1f5fb4",
  },
  stack: ["#1f5fb4", "#b3500b", "#0b7a55", "#a03a86", "#7d6a00", "#646464"],
};
