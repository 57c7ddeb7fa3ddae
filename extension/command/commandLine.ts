/** The command line: words in, a plan or a refusal out. */
import { parseArgs } from "node:util";

export type CommandLine =
  | CheckLine
  | { readonly kind: "help" }
  | { readonly kind: "version" }
  | { readonly kind: "refused"; readonly message: string };

export interface CheckLine {
  readonly kind: "check";
  readonly path: string;
  readonly format: Format;
  readonly failOn: FailOn;
  readonly propose: boolean;
  /** Tell what moved since this commit, instead of reporting. */
  readonly against?: string;
  /** Least change that is told, as a share. */
  readonly movedBy: number;
}

export type Format = "text" | "json" | "markdown";
export type FailOn = "error" | "warning" | "information" | "never";

const FORMATS: readonly string[] = ["text", "json", "markdown"] satisfies Format[];
const FAIL_ON: readonly string[] = ["error", "warning", "information", "never"] satisfies FailOn[];

export const USAGE = `usage: loadmark check <file or folder> [options]

  --format text|json                           text for people (the default), json for programs
  --fail-on error|warning|information|never    exit with 1 from this level up (default: error)
  --propose                                    with text, also what would clear each finding
  --against <commit>                           instead, the mechanisms whose numbers moved since that commit;
                                               --format markdown makes a table for a pull request
  --moved-by <per cent>                        with --against, the least change that is told (default: 1)
  --help, --version

Exit status: 0 nothing at or above --fail-on, 1 findings, 2 the check could not run.
`;

export function parseCommandLine(words: readonly string[]): CommandLine {
  let parsed: ReturnType<typeof parseWords>;
  try {
    parsed = parseWords(words);
  } catch (error) {
    return refuse(error instanceof Error ? error.message : String(error));
  }
  const { values, positionals } = parsed;
  if (values.help) return { kind: "help" };
  if (values.version) return { kind: "version" };
  const [command, path, ...rest] = positionals;
  if (command !== "check") return refuse(command === undefined ? "say what to do: check" : `"${command}" is not a command`);
  if (path === undefined) return refuse("check needs a file or folder");
  if (rest.length > 0) return refuse("check takes one file or folder");
  const format = values.format ?? "text";
  const failOn = values["fail-on"] ?? "error";
  if (!FORMATS.includes(format)) return refuse(`"${format}" is not a format: ${FORMATS.join(", ")}`);
  if (!FAIL_ON.includes(failOn)) return refuse(`"${failOn}" is not a level: ${FAIL_ON.join(", ")}`);
  const { against, propose = false } = values;
  const movedBy = Number(values["moved-by"] ?? "1") / 100;
  if (!(movedBy >= 0)) return refuse(`"${values["moved-by"]}" is not a number of per cent`);
  if (format === "markdown" && against === undefined) return refuse("markdown goes with --against");
  if (format === "json" && against !== undefined) return refuse("--against gives text or markdown");
  const common = { kind: "check", path, format: format as Format, failOn: failOn as FailOn, propose, movedBy } as const;
  return against === undefined ? common : { ...common, against };
}

function parseWords(words: readonly string[]) {
  return parseArgs({
    args: [...words],
    allowPositionals: true,
    options: {
      format: { type: "string" },
      "fail-on": { type: "string" },
      propose: { type: "boolean" },
      against: { type: "string" },
      "moved-by": { type: "string" },
      help: { type: "boolean", short: "h" },
      version: { type: "boolean" },
    },
  });
}

function refuse(message: string): CommandLine {
  return { kind: "refused", message };
}
