/** The colours of the curves: contrast to usual grounds, and distance from each other for every kind of colour blindness. */
import { describe, expect, it } from "vitest";
import { type Colour, contrast, parseColour } from "../../webview/theme/colour.js";
import { ON_DARK, ON_LIGHT, type Palette } from "../../webview/theme/palette.js";

/** Editor grounds from very light to very dark, plain and tinted. */
const GROUNDS: readonly [string, Palette, readonly string[]][] = [
  ["light", ON_LIGHT, ["#ffffff", "#fdf6e3", "#f3f3f3", "#f5efe0", "#e8eef5"]],
  ["dark", ON_DARK, ["#000000", "#1e1e1e", "#1f1f1f", "#002b36", "#282c34", "#272822"]],
];

function colour(text: string): Colour {
  const parsed = parseColour(text);
  if (parsed === undefined) throw new Error(`${text} is no colour.`);
  return parsed;
}

/**
 * What a reader with one kind of cone missing sees, in linear light: Machado, Oliveira, Fernandes, "A physiologically-based model for
 * simulation of color vision deficiency", IEEE TVCG 15 (2009), severity 1.0.
 */
const MISSING: Readonly<Record<string, readonly (readonly number[])[]>> = {
  none: [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ],
  "long-wave": [
    [0.152286, 1.052583, -0.204868],
    [0.114503, 0.786281, 0.099216],
    [-0.003882, -0.048116, 1.051998],
  ],
  "middle-wave": [
    [0.367322, 0.860646, -0.227968],
    [0.280085, 0.672501, 0.047413],
    [-0.01182, 0.04294, 0.968881],
  ],
  "short-wave": [
    [1.255528, -0.076749, -0.178779],
    [-0.078411, 0.930809, 0.147602],
    [0.004733, 0.691367, 0.3039],
  ],
};

function linear({ red, green, blue }: Colour): readonly number[] {
  return [red, green, blue].map((channel) => {
    const share = channel / 255;
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
  });
}

function times(matrix: readonly (readonly number[])[], vector: readonly number[]): readonly number[] {
  return matrix.map((row) => row.reduce((sum, factor, index) => sum + factor * (vector[index] ?? 0), 0));
}

/** CIELAB of linear sRGB, D65 (IEC 61966-2-1, ISO/CIE 11664-4). */
function lab(light: readonly number[]): readonly number[] {
  const clipped = light.map((channel) => Math.min(Math.max(channel, 0), 1));
  const [x = 0, y = 0, z = 0] = times(
    [
      [0.4124, 0.3576, 0.1805],
      [0.2126, 0.7152, 0.0722],
      [0.0193, 0.1192, 0.9505],
    ],
    clipped,
  );
  const [fx = 0, fy = 0, fz = 0] = [x / 0.9505, y, z / 1.089].map((value) =>
    value > (6 / 29) ** 3 ? Math.cbrt(value) : value / (3 * (6 / 29) ** 2) + 4 / 29,
  );
  return [116 * fy - 16, 500 * (fx - fy), 200 * (fy - fz)];
}

function distance(one: string, other: string, missing: string): number {
  const [a = [], b = []] = [one, other].map((text) => lab(times(MISSING[missing] ?? [], linear(colour(text)))));
  return Math.hypot(...a.map((value, index) => value - (b[index] ?? 0)));
}

describe("contrast", () => {
  it("is 21 between black and white, 1 of a colour to itself, and known for a grey (WCAG 2.2)", () => {
    expect(contrast(colour("#000000"), colour("#ffffff"))).toBeCloseTo(21, 6);
    expect(contrast(colour("#1f5fb4"), colour("#1f5fb4"))).toBe(1);
    // The much cited lightest grey that passes 4.5 on white.
    expect(contrast(colour("#767676"), colour("#ffffff"))).toBeCloseTo(4.54, 2);
  });
});

describe.each(GROUNDS)("the palette on %s ground", (_name, palette, grounds) => {
  it.each([...Object.entries(palette.curves), ...palette.stack.map((text, index) => [`part ${index}`, text] as const)])(
    "draws %s with a contrast of at least 3",
    (_quantity, text) => {
      for (const ground of grounds) expect(contrast(colour(text), colour(ground)), ground).toBeGreaterThanOrEqual(3);
    },
  );

  it.each(Object.keys(MISSING))("keeps the curves of one plot apart, %s cones missing", (missing) => {
    // A difference of about 2.3 is just noticed; twenty is another colour.
    const { speed, current, power, efficiency, torque, voltage } = palette.curves;
    expect(distance(speed, current, missing)).toBeGreaterThan(20);
    expect(distance(power, efficiency, missing)).toBeGreaterThan(20);
    expect(distance(voltage, current, missing)).toBeGreaterThan(20);
    expect(distance(torque, efficiency, missing)).toBeGreaterThan(20);
  });

  it.each(Object.keys(MISSING))("keeps neighbours in a stack apart, %s cones missing", (missing) => {
    for (const [index, text] of palette.stack.entries()) {
      const next = palette.stack[(index + 1) % palette.stack.length] ?? "";
      expect(distance(text, next, missing), `${index}`).toBeGreaterThan(10);
    }
  });
});
