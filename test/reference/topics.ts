/** All topics: their rows and the model's answers to them. */
import { foundAnswers } from "./answers/found.js";
import { furtherAnswers } from "./answers/further.js";
import { motorAnswers } from "./answers/motor.js";
import { temperatureAnswers } from "./answers/temperature.js";
import { timeAnswers } from "./answers/time.js";
import { transmissionAnswers } from "./answers/transmission.js";
import type { Answers, ReferenceRow } from "./row.js";
import { foundRows } from "./rows/found.js";
import { furtherRows } from "./rows/further.js";
import { motorRows } from "./rows/motor.js";
import { temperatureRows } from "./rows/temperature.js";
import { timeRows } from "./rows/time.js";
import { transmissionRows } from "./rows/transmission.js";

export interface Topic {
  readonly name: string;
  readonly rows: readonly ReferenceRow[];
  readonly answers: Answers;
}

export const topics: readonly Topic[] = [
  { name: "motor", rows: motorRows, answers: motorAnswers },
  { name: "temperature", rows: temperatureRows, answers: temperatureAnswers },
  { name: "transmission", rows: transmissionRows, answers: transmissionAnswers },
  { name: "time", rows: timeRows, answers: timeAnswers },
  { name: "further", rows: furtherRows, answers: furtherAnswers },
  { name: "found", rows: foundRows, answers: foundAnswers },
];

/** Error of an answer as a share of what its row allows: at most 1 passes. */
export function shareOfTolerance(row: ReferenceRow, answer: number): number {
  return Math.abs(answer - row.value) / (row.tolerance * (row.absolute ? 1 : Math.abs(row.value)));
}
