/**
 * The editor's theme as the chart needs it: its kind, ground and letters, and the colours of the curves.
 *
 * Reads the classes and variables that the editor puts on the page; says when they change.
 */
import { blend, type Colour, luminance, parseColour, withContrast, writeColour } from "./colour.js";
import { type ColourName, ON_DARK, ON_LIGHT, type Palette } from "./palette.js";

export type ThemeKind = "light" | "dark" | "high-contrast" | "high-contrast-light";

export interface Theme {
  readonly kind: ThemeKind;
  readonly background: string;
  readonly foreground: string;
  /** For grids, sheet lines and hatches. */
  readonly grid: string;
  readonly quiet: string;
  readonly hatch: string;
  readonly curves: Palette["curves"];
  /** For the parts of a stack, in turn; the letters' colour alone in high contrast. */
  readonly stack: readonly string[];
  readonly fontFamily: string;
}

/** Curves are named in their own colours, so these need the contrast of letters (WCAG 2.2, 1.4.3), more than that of lines. */
const LEAST_CONTRAST = 4.5;

/** A light high contrast theme carries both high contrast classes. */
export function themeKind(classes: DOMTokenList): ThemeKind {
  if (classes.contains("vscode-high-contrast-light")) return "high-contrast-light";
  if (classes.contains("vscode-high-contrast")) return "high-contrast";
  return classes.contains("vscode-light") ? "light" : "dark";
}

export function readTheme(body: HTMLElement): Theme {
  const kind = themeKind(body.classList);
  const style = getComputedStyle(body);
  const isLight = kind === "light" || kind === "high-contrast-light";
  const background = colourOf(style, "--vscode-editor-background") ?? (isLight ? WHITE : BLACK);
  const foreground = colourOf(style, "--vscode-editor-foreground") ?? (isLight ? BLACK : WHITE);
  const tint = (opacity: number): string => writeColour(blend(foreground, background, opacity));
  const isHighContrast = kind === "high-contrast" || kind === "high-contrast-light";
  return {
    kind,
    background: writeColour(background),
    foreground: writeColour(foreground),
    grid: isHighContrast ? tint(0.4) : tint(0.14),
    quiet: isHighContrast
      ? tint(1)
      : writeColour(withContrast(blend(foreground, background, 0.65), background, LEAST_CONTRAST, foreground)),
    hatch: isHighContrast ? tint(0.65) : tint(0.32),
    ...(isHighContrast ? allAlike(writeColour(foreground)) : coloursOn(background, foreground)),
    fontFamily: style.getPropertyValue("--vscode-font-family").trim() || "sans-serif",
  };
}

/** Black on white, for paper, whatever the editor's theme. */
export function paperTheme(): Theme {
  const tint = (opacity: number): string => writeColour(blend(BLACK, WHITE, opacity));
  return {
    kind: "light",
    background: writeColour(WHITE),
    foreground: tint(0.9),
    grid: tint(0.14),
    quiet: tint(0.62),
    hatch: tint(0.32),
    ...coloursOn(WHITE, BLACK),
    fontFamily: "sans-serif",
  };
}

/** Calls back when the editor changes the page's classes or variables. */
export function watchTheme(document: Document, onChange: () => void): void {
  const observer = new MutationObserver(onChange);
  observer.observe(document.body, { attributes: true, attributeFilter: ["class", "data-vscode-theme-id", "style"] });
  observer.observe(document.documentElement, { attributes: true, attributeFilter: ["style", "class"] });
}

const WHITE: Colour = { red: 255, green: 255, blue: 255, alpha: 1 };
const BLACK: Colour = { red: 0, green: 0, blue: 0, alpha: 1 };

function coloursOn(background: Colour, foreground: Colour): Palette {
  const { curves, stack } = luminance(background) > 0.2 ? ON_LIGHT : ON_DARK;
  const readable = (text: string): string =>
    writeColour(withContrast(parseColour(text) ?? foreground, background, LEAST_CONTRAST, foreground));
  return { curves: eachCurve((name) => readable(curves[name])), stack: stack.map(readable) };
}

function allAlike(colour: string): Palette {
  return { curves: eachCurve(() => colour), stack: [colour] };
}

function eachCurve(give: (name: ColourName) => string): Palette["curves"] {
  return Object.fromEntries(Object.keys(ON_DARK.curves).map((name) => [name, give(name as ColourName)])) as Palette["curves"];
}

/** Any colour that a style sheet may hold, opaque: a canvas gives it back in one of two forms. */
function colourOf(style: CSSStyleDeclaration, variable: string): Colour | undefined {
  const text = style.getPropertyValue(variable).trim();
  const context = document.createElement("canvas").getContext("2d");
  if (text === "" || context === null) return undefined;
  context.fillStyle = text;
  const colour = parseColour(String(context.fillStyle));
  return colour && { ...colour, alpha: 1 };
}
