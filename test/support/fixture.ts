/**
 * Fixtures: the files of a small robot in one string.
 *
 * `//- path.ts` starts a file; without one the text is `robot.ts`. Under a line, `// ^^^^ warning past-peak: text` marks the exact characters of a
 * finding and a part of its message. Marks are comments, so they stay in the text that is analysed.
 */
import { createImportIndex } from "../../extension/evaluator/importIndex.js";
import type { Snapshot } from "../../extension/evaluator/value.js";

export interface Mark {
  readonly file: string;
  readonly start: number;
  readonly end: number;
  readonly level: string;
  readonly rule: string;
  readonly says: string;
}

export interface Fixture {
  readonly files: ReadonlyMap<string, string>;
  readonly marks: readonly Mark[];
  readonly snapshot: Snapshot;
}

const FOLDER = "/robot/";

/** File names become absolute: `robot.ts` is `/robot/robot.ts`. */
export function readFixture(text: string): Fixture {
  const files = new Map<string, string>();
  const sections = text.split(/^\/\/- (.+)\n/m);
  const [before = "", ...named] = sections;
  if (before.trim() !== "") files.set(`${FOLDER}robot.ts`, before);
  for (let index = 0; index < named.length; index += 2) files.set(FOLDER + (named[index] ?? "").trim(), named[index + 1] ?? "");
  const index = createImportIndex();
  for (const [file, content] of files) index.set(file, content);
  return {
    files,
    marks: [...files].flatMap(([file, content]) => readMarks(file, content)),
    snapshot: { read: (file) => files.get(file) ?? null, importersOf: (file, aliases) => index.importersOf(file, aliases) },
  };
}

function readMarks(file: string, content: string): Mark[] {
  const marks: Mark[] = [];
  let offset = 0;
  let marked = 0;
  for (const line of content.split(/(?<=\n)/)) {
    const match = /^(\s*\/\/\s*)(\^+) (error|warning|information) ([\w-]+): (.*)$/.exec(line.trimEnd());
    if (match === null) marked = offset;
    else {
      const [, lead = "", carets = "", level = "", rule = "", says = ""] = match;
      const start = marked + lead.length;
      marks.push({ file, start, end: start + carets.length, level, rule, says });
    }
    offset += line.length;
  }
  return marks;
}
