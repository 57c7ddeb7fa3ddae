/** The shape of every hover: a verdict, a few lines, a small table, notes, links last. Text given here is Markdown already. */
export interface Block {
  /** The first line, in bold up to its first colon. */
  readonly verdict: string;
  readonly lines?: readonly string[];
  readonly table?: Table;
  readonly notes?: readonly string[];
  readonly links?: readonly string[];
}

export interface Table {
  readonly head: readonly string[];
  readonly rows: readonly (readonly string[])[];
}

export function writeBlock({ verdict, lines = [], table, notes = [], links = [] }: Block): string {
  const parts = [
    [emphasise(verdict), ...lines].join(LINE_BREAK),
    table && table.rows.length > 0 ? writeTable(table) : "",
    notes.join(LINE_BREAK),
    links.join(" · "),
  ];
  return parts.filter((part) => part !== "").join("\n\n");
}

/** Two spaces before the line's end keep lines of one paragraph apart. */
const LINE_BREAK = "  \n";

function emphasise(verdict: string): string {
  const [words = "", ...rest] = verdict.split(": ");
  return rest.length === 0 ? `**${words}**` : `**${words}:** ${rest.join(": ")}`;
}

function writeTable({ head, rows }: Table): string {
  // Numbers line up by their units when columns after the first are aligned right.
  const rule = head.map((_, column) => (column === 0 ? "---" : "---:"));
  return [spread(head), rule, ...rows.map(spread)].map((cells) => `| ${cells.join(" | ")} |`).join("\n");
}

/** Hosts set columns so close that "138 %" and "never arrives" would read as one; plain spaces would be taken away. */
function spread(cells: readonly string[]): string[] {
  return cells.map((cell, column) => (column === 0 || cell === "" ? cell : `&ensp;${cell}`));
}
