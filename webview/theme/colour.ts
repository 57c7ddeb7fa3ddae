/** Colours as numbers: how two of them contrast, and what lies between. Parses none but `#rrggbb` and `rgb(…)`, as a canvas gives them back. */

/** Red, green and blue from 0 to 255, and opacity from 0 to 1. */
export interface Colour {
  readonly red: number;
  readonly green: number;
  readonly blue: number;
  readonly alpha: number;
}

/** `undefined` for anything else. */
export function parseColour(text: string): Colour | undefined {
  const hex = /^#([\da-f]{2})([\da-f]{2})([\da-f]{2})([\da-f]{2})?$/i.exec(text);
  if (hex) {
    const [red = 0, green = 0, blue = 0, alpha = 255] = hex.slice(1).map((part) => (part ? Number.parseInt(part, 16) : 255));
    return { red, green, blue, alpha: alpha / 255 };
  }
  const numbers =
    /^rgba?\(([^)]+)\)$/i
      .exec(text)?.[1]
      ?.split(/[\s,/]+/)
      .map(Number) ?? [];
  const [red, green, blue, alpha = 1] = numbers;
  if (red === undefined || green === undefined || blue === undefined || numbers.some(Number.isNaN)) return undefined;
  return { red, green, blue, alpha };
}

export function writeColour({ red, green, blue, alpha }: Colour): string {
  const channels = [red, green, blue].map(Math.round).join(", ");
  return alpha >= 1 ? `rgb(${channels})` : `rgba(${channels}, ${alpha})`;
}

/** What is seen of `over` upon an opaque colour. */
export function blend(over: Colour, under: Colour, opacity = over.alpha): Colour {
  const mix = (one: number, other: number): number => one * opacity + other * (1 - opacity);
  return {
    red: mix(over.red, under.red),
    green: mix(over.green, under.green),
    blue: mix(over.blue, under.blue),
    alpha: 1,
  };
}

/** Contrast ratio from 1 to 21 (WCAG 2.2). */
export function contrast(one: Colour, other: Colour): number {
  const [dark = 0, light = 0] = [luminance(one), luminance(other)].sort((a, b) => a - b);
  return (light + 0.05) / (dark + 0.05);
}

/** Relative luminance from 0 to 1 (WCAG 2.2). */
export function luminance({ red, green, blue }: Colour): number {
  return 0.2126 * linear(red) + 0.7152 * linear(green) + 0.0722 * linear(blue);
}

/** Moves a colour towards another until it has a contrast to its ground, or gives the other. */
export function withContrast(colour: Colour, ground: Colour, least: number, towards: Colour): Colour {
  for (let share = 0; share <= 1; share += 0.1) {
    const moved = blend(towards, colour, share);
    if (contrast(moved, ground) >= least) return moved;
  }
  return towards;
}

function linear(channel: number): number {
  const share = channel / 255;
  return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
}
