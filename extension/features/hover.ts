/** What a hover says about the text at an offset, as one block of Markdown. Which links a host trusts is the host's business. */
import type { Analysis } from "../analysis/analysis.js";
import type { DefinitionCall, Span } from "../evaluator/value.js";
import { describeConstant } from "./hovers/constant.js";
import { describeLoad } from "./hovers/load.js";
import { describeMechanisms } from "./hovers/mechanism.js";
import { describeMotor } from "./hovers/motor.js";
import { describeStage } from "./hovers/stage.js";
import { type Committed, NO_COMMIT } from "./sinceCommit.js";
import { type Subject, subjectAt } from "./subject.js";
import type { Analyse } from "./variant.js";

export interface Hover {
  readonly span: Span;
  /** Names from source are inert in it; its only links are commands of the product. */
  readonly markdown: string;
}

/** `analyse`: how the analysis was made, to ask what another value would do. `committed`: what the last commit has. */
export function hoverAt(
  analysis: Analysis,
  file: string,
  offset: number,
  analyse: Analyse,
  committed: Committed = NO_COMMIT,
): Hover | undefined {
  const subject = subjectAt(analysis, file, offset);
  const markdown = subject && describe(analysis, subject, { analyse, committed });
  return subject && markdown !== undefined ? { span: subject.span, markdown } : undefined;
}

interface Asking {
  readonly analyse: Analyse;
  readonly committed: Committed;
}

function describe(analysis: Analysis, subject: Subject, { analyse, committed }: Asking): string | undefined {
  switch (subject.kind) {
    case "mechanism":
      return describeMechanisms(analysis, subject.mechanisms, committed);
    case "constant":
      return describeConstant(analysis, subject.constant, analyse, committed);
    case "built":
      return describeBuilt(analysis, subject.call);
  }
}

function describeBuilt(analysis: Analysis, call: DefinitionCall): string | undefined {
  if (call.definition === "motor") return describeMotor(analysis, call);
  if (STAGES.has(call.definition)) return describeStage(analysis, call);
  return LOADS.has(call.definition) ? describeLoad(analysis, call) : undefined;
}

const STAGES: ReadonlySet<string> = new Set(["spur", "chain", "belt", "planetary", "worm", "reduction"]);
const LOADS: ReadonlySet<string> = new Set(["lift", "arm", "wheels", "flywheel", "screw", "roller", "loadCurve"]);
