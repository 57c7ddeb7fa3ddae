/**
 * Colours of the four quantities on dark and on light ground.
 *
 * Chosen so that the two curves of one plot stay apart with every kind of colour blindness, with a contrast of at least 3 to the
 * usual grounds. High contrast themes use the foreground colour instead.
 */
import type { QuantityName } from "../views/operatingPoint/quantities.js";

export type Palette = Readonly<Record<QuantityName, string>>;

export const ON_DARK: Palette = { speed: "#6cb6ff", current: "#f0a33c", power: "#4fc79a", efficiency: "#e08bc9" };

export const ON_LIGHT: Palette = { speed: "#1f5fb4", current: "#b3500b", power: "#0b7a55", efficiency: "#a03a86" };
