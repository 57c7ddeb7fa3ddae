/** A canvas with a pixel for each of the screen's, as large as what it stands in or as it was made. */

export interface Fitted {
  readonly pen: CanvasRenderingContext2D;
  /** In CSS pixels, in which the pen draws. */
  readonly width: number;
  readonly height: number;
  /** Pixels of the canvas for each of them. */
  readonly ratio: number;
}

/** Empties it. `box`: what it fills; null where `own` is its size. `undefined` where there is no room or no pen. */
export function fitCanvas(
  canvas: HTMLCanvasElement,
  box: HTMLElement | null,
  own: { readonly width: number; readonly height: number },
  pixelRatio: number | undefined,
): Fitted | undefined {
  const { width, height } = box === null ? own : { width: box.clientWidth, height: box.clientHeight };
  const ratio = pixelRatio ?? window.devicePixelRatio;
  const pen = canvas.getContext("2d");
  if (pen === null || width === 0 || height === 0) return undefined;
  canvas.width = Math.round(width * ratio);
  canvas.height = Math.round(height * ratio);
  if (box !== null) [canvas.style.width, canvas.style.height] = [`${width}px`, `${height}px`];
  pen.setTransform(ratio, 0, 0, ratio, 0, 0);
  return { pen, width, height, ratio };
}
