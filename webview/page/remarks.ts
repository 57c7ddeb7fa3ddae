/** Findings, assumptions and what was not checked, as lists of sentences. */
import type { ChartFinding } from "../../extension/protocol/charts/parts.js";
import { element } from "./element.js";

export const LEVELS: Readonly<Record<ChartFinding["level"], string>> = {
  error: "Error",
  warning: "Warning",
  information: "Note",
};

export function showFindings(list: HTMLElement, findings: readonly ChartFinding[]): void {
  list.hidden = findings.length === 0;
  list.replaceChildren(
    ...findings.map(({ level, message }) =>
      element("li", { class: level }, [
        element("span", { class: "level", text: `${LEVELS[level]}: ` }),
        element("span", { text: message }),
      ]),
    ),
  );
}

export function showSentences(section: HTMLElement, title: string, sentences: readonly string[]): void {
  section.hidden = sentences.length === 0;
  section.replaceChildren(
    element("h2", { text: title }),
    element(
      "ul",
      {},
      sentences.map((text) => element("li", { text })),
    ),
  );
}
