/** Waits for the built server to have judged the newest texts, by a question that it answers after the result. */
import type { ServerClient } from "./serverClient.js";

/** The server answers without a result after two seconds; then it is asked again. */
const ANSWERED_EARLY_MS = 1900;

/** Fails where it takes longer than the budget. */
export async function whenJudged({ connection, errors }: ServerClient, budgetMs: number): Promise<void> {
  const start = performance.now();
  for (;;) {
    const asked = performance.now();
    await connection.sendRequest("workspace/symbol", { query: "" });
    const now = performance.now();
    if (now - asked < ANSWERED_EARLY_MS) return;
    if (now - start > budgetMs) throw new Error(`No result after ${budgetMs} ms. ${errors.join("\n")}`);
  }
}
