/** Links for hovers: commands with their arguments. Which commands exist is the client's business; these are those that texts lead to. */
import type { Span } from "../evaluator/value.js";

/** Opens the chart; takes the mechanism's name. */
export const SHOW_CHART_COMMAND = "loadmark.showChart";

/** The same for the map over its ratio. */
export const SHOW_RATIO_MAP_COMMAND = "loadmark.showRatioMap";

/** Shows a stretch of source; takes a span of UTF-16 offsets. */
export const REVEAL_COMMAND = "loadmark.reveal";

export function chartLink(mechanism: string): string {
  return `[Chart](${commandUri(SHOW_CHART_COMMAND, mechanism)})`;
}

export function ratioMapLink(mechanism: string): string {
  return `[Ratio map](${commandUri(SHOW_RATIO_MAP_COMMAND, mechanism)})`;
}

/** `label` must be fixed text of the product, never a name from source. */
export function revealLink(label: string, { file, start, end }: Span): string {
  return `[${label}](${commandUri(REVEAL_COMMAND, { file, start, end })})`;
}

function commandUri(command: string, argument: unknown): string {
  // JSON.stringify escapes lone surrogates, so encoding cannot fail; the characters left alone by it would end the link or start markup.
  const encoded = encodeURIComponent(JSON.stringify([argument])).replaceAll(
    /[!'()*_~]/g,
    (character) => `%${character.charCodeAt(0).toString(16).toUpperCase()}`,
  );
  return `command:${command}?${encoded}`;
}
