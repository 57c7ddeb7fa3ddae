/** Zooming to a span of the abscissa: by dragging over the plots, by keys there, and by buttons. Changes nothing itself. */
import { element, setShown, setText } from "../page/element.js";
import type { Zoom } from "./sheet.js";
import { afterKey, type Span, scaled, spanned } from "./zoomSpan.js";

export interface ZoomControl {
  readonly element: HTMLElement;
  show(zoom: Zoom | null): void;
  /** True where the key was for it. */
  onKey(event: KeyboardEvent, about: number): boolean;
  readonly isDragging: () => boolean;
}

export interface ZoomParts {
  /** Around the plots. */
  readonly box: HTMLElement;
  /** Abscissa below a pointer. */
  readonly at: (clientX: number) => number | undefined;
  readonly onZoom: (span: Span | null) => void;
}

/** A pointer that moves less has clicked, px. */
const CLICK = 5;

export function createZoomControl({ box, at, onZoom }: ZoomParts): ZoomControl {
  const button = (text: string, label: string): HTMLButtonElement =>
    element("button", { text, attributes: { type: "button", "aria-label": label, title: label } });
  const closer = button("+", "Zoom in");
  const wider = button("−", "Zoom out");
  const all = button("All", "Show all");
  const words = element("span", { class: "span", attributes: { role: "status" } });
  const mark = element("div", { class: "selection" });
  let zoom: Zoom | null = null;
  let start: { readonly clientX: number; readonly value: number } | null = null;
  let dragging = false;
  setShown(mark, false);
  box.append(mark);

  const middle = (): number => (zoom === null ? 0 : (zoom.from + zoom.to) / 2);
  closer.addEventListener("click", () => zoom && onZoom(scaled(zoom, 0.5, middle())));
  wider.addEventListener("click", () => zoom && onZoom(scaled(zoom, 2, middle())));
  all.addEventListener("click", () => onZoom(null));

  box.addEventListener("pointerdown", (event) => {
    const value = at(event.clientX);
    if (zoom === null || value === undefined || event.button !== 0) return;
    start = { clientX: event.clientX, value };
  });
  box.addEventListener("pointermove", (event) => {
    if (start === null) return;
    if (!dragging && Math.abs(event.clientX - start.clientX) < CLICK) return;
    if (!dragging) box.setPointerCapture(event.pointerId);
    dragging = true;
    const { left } = box.getBoundingClientRect();
    const [one, other] = [start.clientX - left, event.clientX - left].sort((a, b) => a - b);
    [mark.style.left, mark.style.width] = [`${one ?? 0}px`, `${(other ?? 0) - (one ?? 0)}px`];
    setShown(mark, true);
  });
  const end = (event: PointerEvent, isKept: boolean): void => {
    const value = at(event.clientX);
    const span = dragging && isKept && start && zoom && value !== undefined ? spanned(zoom, start.value, value) : undefined;
    [start, dragging] = [null, false];
    setShown(mark, false);
    if (span !== undefined) onZoom(span);
  };
  box.addEventListener("pointerup", (event) => end(event, true));
  box.addEventListener("pointercancel", (event) => end(event, false));

  const control = element("div", { class: "zoom", attributes: { role: "group", "aria-label": "Zoom" } }, [
    closer,
    wider,
    all,
    words,
  ]);
  return {
    element: control,
    isDragging: () => dragging,
    show(next) {
      zoom = next;
      setShown(control, zoom !== null);
      if (zoom === null) return;
      const { from, to, least, greatest } = zoom;
      const isAll = from <= least && to >= greatest;
      setText(words, zoom.words(from, to));
      wider.disabled = isAll;
      all.disabled = isAll;
    },
    onKey(event, about) {
      const span = zoom === null ? undefined : afterKey(zoom, event.key, event.shiftKey, about);
      if (span === undefined) return false;
      onZoom(span);
      return true;
    },
  };
}
