// The README's pictures as data: what is open, what is done, and which colours. takePictures.ts carries it out.

export type Step =
  /** Puts the line that holds the text in the middle of the view. */
  | { readonly do: "reveal"; readonly file: string; readonly text: string }
  | { readonly do: "retype"; readonly text: string; readonly by: string }
  /** Waits for a squiggle under a text that holds this one. */
  | { readonly do: "expectSquiggle"; readonly under: string }
  /** Leaves the hover open; `holds` is what it must say, and guards the picture against showing something else. */
  | { readonly do: "hover"; readonly over: string; readonly holds: RegExp }
  | { readonly do: "runCommand"; readonly title: string }
  /** Waits for a webview that shows what the selector asks for. */
  | { readonly do: "expectWebview"; readonly selector: string };

export interface Shot {
  /** The picture's file name, without its ending. */
  readonly name: string;
  readonly theme: "Dark Modern" | "Light Modern" | "Default High Contrast" | "Default High Contrast Light";
  /** The file of the demo that is opened first. */
  readonly file: string;
  readonly steps: readonly Step[];
}

export const shots: readonly Shot[] = [];
