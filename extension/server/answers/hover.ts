/** Hovers: Markdown whose links are the product's own commands, as far as the client has them. */
import { type Hover, MarkupKind, type Position } from "vscode-languageserver";
import { hoverAt } from "../../features/hover.js";
import type { CommittedMechanisms } from "../committed.js";
import type { CurrentFile } from "../current.js";

/** How long a hover waits for what the last commit has; a later one has it at once. */
const COMMIT_PATIENCE_MS = 400;

/** `commands`: those that the client has. */
export async function answerHover(
  current: CurrentFile,
  position: Position,
  commands: readonly string[],
  committed: CommittedMechanisms,
): Promise<Hover | null> {
  const { result, file, lines } = current;
  const offset = current.carryBack(lines.offsetAt(position));
  if (offset === undefined) return null;
  const ask = () => hoverAt(result.analysis, file, offset, result.analyse, committed.of(result));
  const first = ask();
  const hover = first && (await committed.settled(COMMIT_PATIENCE_MS)) ? ask() : first;
  if (hover === undefined) return null;
  const contents = { kind: MarkupKind.Markdown, value: withLinksTo(commands, hover.markdown) };
  return hover.span.file === file ? { contents, range: lines.rangeOf(current.carry(hover.span)) } : { contents };
}

/** Links stand in a row at the end. A name from source can't look like one: its brackets are escaped. */
function withLinksTo(commands: readonly string[], markdown: string): string {
  return markdown
    .replaceAll(/\[[^\]\\]*\]\(command:([\w.]+)[^)]*\)(?: · )?/g, (link, command) => (commands.includes(command) ? link : ""))
    .replace(/(?: · |\s+)$/, "");
}
