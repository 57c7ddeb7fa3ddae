// Plain robot code for the bench's workspace: state machines, filters and tables that use the cell's constants, about 150 lines a file,
// valid under the strict compiler. It declares no mechanism.

/** The same numbers give the same text. */
export function plainFile(cell: number, part: number): string {
  const head = part < 100 ? `import { DRIVEN, PINION } from "./gearing.js";\n` : "";
  const sections = Array.from({ length: 6 }, (_, section) => sectionOf(cell, part, section));
  return `import { setTimeout as pause } from "node:timers/promises";\n${head}\n${sections.join("\n")}\nexport const ratioOfPart${part} = DRIVEN.slow / PINION;\n`;
}

function sectionOf(cell: number, part: number, section: number): string {
  const name = `C${cell}P${part}S${section}`;
  const gain = ((cell * 7 + part * 3 + section) % 17) / 10 + 0.1;
  return `/** Readings of one sensor, smoothed, with what to do about them. */
export interface ${name}Reading {
  readonly atMs: number;
  readonly value: number;
  readonly source: "${name}.near" | "${name}.far";
}

export type ${name}State =
  | { readonly kind: "idle" }
  | { readonly kind: "moving"; readonly target: number; readonly since: number }
  | { readonly kind: "stopped"; readonly why: string };

export class ${name}Follower {
  #state: ${name}State = { kind: "idle" };
  #smoothed = 0;
  readonly #history: ${name}Reading[] = [];

  step(reading: ${name}Reading): ${name}State {
    this.#history.push(reading);
    this.#smoothed += (reading.value - this.#smoothed) * ${gain.toFixed(2)};
    const recent = this.#history.filter(({ atMs }) => reading.atMs - atMs < 500);
    const spread = Math.max(...recent.map(({ value }) => value)) - Math.min(...recent.map(({ value }) => value));
    if (spread > ${(gain * 10).toFixed(1)}) this.#state = { kind: "stopped", why: \`spread \${spread.toFixed(2)}\` };
    else if (this.#state.kind === "idle") this.#state = { kind: "moving", target: this.#smoothed, since: reading.atMs };
    return this.#state;
  }

  async settle(forMs: number): Promise<number> {
    await pause(forMs);
    return this.#smoothed;
  }

  get smoothed(): number {
    return this.#smoothed;
  }
}
`;
}
