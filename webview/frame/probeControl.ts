/** The probe: dragged on the plots or moved by its slider; says what the model answers, and asks to write it to the code. Changes nothing itself. */
import { element, setShown, setText } from "../page/element.js";
import type { SheetProbe } from "./sheet.js";

export interface ProbeControl {
  readonly element: HTMLElement;
  /** What the model answers: to be put where nothing else moves as it grows. */
  readonly answers: HTMLElement;
  show(probe: SheetProbe | null): void;
  readonly isDragging: () => boolean;
}

export interface ProbeParts {
  /** Around the plots. */
  readonly box: HTMLElement;
  /** Abscissa below a pointer. */
  readonly at: (clientX: number) => number | undefined;
  readonly onProbe: (at: number | null) => void;
  readonly onWrite: () => void;
}

/** Steps of the slider from end to end. */
const STEPS = 400;
/** So near a pointer takes hold of it, px. */
const NEAR = 9;

export function createProbeControl({ box, at, onProbe, onWrite }: ProbeParts): ProbeControl {
  const slider = element("input", { attributes: { type: "range", min: "0", max: String(STEPS), step: "1" } });
  const name = element("span");
  const value = element("output");
  const write = element("button", { text: "Write to code", attributes: { type: "button" } });
  const clear = element("button", { text: "Clear", attributes: { type: "button" } });
  const says = element("ul", { class: "says", attributes: { "aria-live": "polite" } });
  const control = element("div", { class: "probe" }, [element("label", {}, [name, slider]), value, write, clear]);
  let probe: SheetProbe | null = null;
  let dragging = false;

  const put = (wanted: number): void => {
    if (probe !== null) onProbe(Math.min(Math.max(wanted, probe.least), probe.greatest));
  };
  const isNear = (clientX: number): boolean => {
    const [here, beside] = [at(clientX), at(clientX + 1)];
    if (probe === null || here === undefined || beside === undefined) return false;
    return Math.abs(here - (probe.at ?? probe.restsAt)) < NEAR * Math.abs(beside - here);
  };

  slider.addEventListener("input", () => {
    if (probe !== null) put(probe.least + (Number(slider.value) / STEPS) * (probe.greatest - probe.least));
  });
  write.addEventListener("click", onWrite);
  clear.addEventListener("click", () => {
    onProbe(null);
    slider.focus();
  });
  box.addEventListener("pointerdown", (event) => {
    if (event.button !== 0 || !isNear(event.clientX)) return;
    dragging = true;
    box.setPointerCapture(event.pointerId);
    event.preventDefault();
  });
  box.addEventListener("pointermove", (event) => {
    box.classList.toggle("near-probe", dragging || isNear(event.clientX));
    const wanted = dragging ? at(event.clientX) : undefined;
    if (wanted !== undefined) put(wanted);
  });
  for (const end of ["pointerup", "pointercancel"] as const) {
    box.addEventListener(end, () => {
      dragging = false;
    });
  }

  return {
    element: control,
    answers: says,
    isDragging: () => dragging,
    show(next) {
      probe = next;
      setShown(control, probe !== null);
      if (probe === null) return;
      const stands = probe.at ?? probe.restsAt;
      const step = String(Math.round(((stands - probe.least) / (probe.greatest - probe.least)) * STEPS));
      // While someone moves it, the slider is where they hold it.
      if (slider.value !== step && document.activeElement !== slider) slider.value = step;
      const words = probe.words(stands);
      setText(name, probe.label);
      setText(value, words);
      slider.setAttribute("aria-valuetext", words);
      const sentences = probe.at === null ? [] : probe.says;
      if (says.textContent !== sentences.join("")) says.replaceChildren(...sentences.map((text) => element("li", { text })));
      write.disabled = !probe.canWrite;
      clear.disabled = probe.at === null;
    },
  };
}
