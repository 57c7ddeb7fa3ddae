/**
 * What the last commit holds, as the editor's own Git knows it: the server asks for texts, the client says when the commit is another one.
 *
 * Where there is no Git, no repository or no commit yet, there is nothing to compare with, and nothing is shown.
 */
import * as v from "valibot";

/** Server to client: texts of the last commit. Gives an answer for each address, in their order; `null` where there is no commit. */
export const READ_COMMITTED = "loadmark/readCommitted";

/** Client to server: whatever was answered may not hold any more. */
export const COMMIT_MOVED = "loadmark/commitMoved";

/** Addresses in one question: a robot of some hundred files is asked for in several. */
export const MOST_ASKED = 64;

export const committedQuestionSchema = v.object({ uris: v.pipe(v.array(v.string()), v.maxLength(MOST_ASKED)) });

const committedTextSchema = v.variant("kind", [
  v.object({ kind: v.literal("text"), text: v.string() }),
  /** Not in the commit. */
  v.object({ kind: v.literal("absent") }),
  /** In no repository: counts as it is on disk. */
  v.object({ kind: v.literal("outside") }),
]);

export const committedAnswerSchema = v.nullable(v.array(committedTextSchema));

export type CommittedText = v.InferOutput<typeof committedTextSchema>;
export type CommittedAnswer = v.InferOutput<typeof committedAnswerSchema>;
