/** The canvases of a sheet's plots: kept from sheet to sheet while there are as many, so that nothing on the page jumps. */
import { element } from "../page/element.js";
import type { Theme } from "../theme/theme.js";
import type { Plot, PlotPart } from "./sheet.js";

export interface PlotRow {
  show(parts: readonly PlotPart[]): void;
  draw(theme: Theme): void;
  setCursor(stop: number | null): void;
  setProbe(at: number | null): void;
  /** Abscissa below a pointer, SI. */
  at(clientX: number): number | undefined;
}

export function createPlotRow(box: HTMLElement): PlotRow {
  let canvases: readonly HTMLCanvasElement[] = [];
  let plots: readonly Plot[] = [];
  return {
    show(parts) {
      for (const plot of plots) plot.destroy();
      if (canvases.length !== parts.length) {
        canvases = parts.map(() => element("canvas", { attributes: { role: "img" } }));
        for (const old of box.querySelectorAll(":scope > .plot")) old.remove();
        box.prepend(...canvases.map((canvas) => element("div", { class: "plot" }, [canvas])));
      }
      plots = parts.flatMap(({ create, words, height }, index) => {
        const canvas = canvases[index];
        if (canvas === undefined) return [];
        canvas.setAttribute("aria-label", words);
        // By a property, which the page's policy lets in.
        if (canvas.parentElement !== null) canvas.parentElement.style.height = `${height}px`;
        return [create(canvas, {})];
      });
    },
    draw(theme) {
      for (const plot of plots) plot.draw(theme);
    },
    setCursor(stop) {
      for (const plot of plots) plot.setCursor(stop);
    },
    setProbe(at) {
      for (const plot of plots) plot.setProbe?.(at);
    },
    at(clientX) {
      const [canvas] = canvases;
      return canvas && plots[0]?.at(clientX - canvas.getBoundingClientRect().left);
    },
  };
}
