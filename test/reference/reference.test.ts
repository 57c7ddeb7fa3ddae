/** Holds the model to every row of reference data, and the data to having an answer each: a dropped row or answer fails. */
import { describe, expect, it } from "vitest";
import { shareOfTolerance, topics } from "./topics.js";

describe.each(topics)("published values: $name", ({ rows, answers }) => {
  it("has one answer for each row and one row for each answer", () => {
    expect(Object.keys(answers).sort()).toEqual(rows.map((row) => row.id).sort());
    for (const row of rows) expect(row.source.length, row.id).toBeGreaterThan(0);
  });

  it.each(rows.map((row) => [row.id, row] as const))("%s", (id, row) => {
    const answer = answers[id]?.() ?? Number.NaN;
    const message = `${row.quantity}: ${answer} ${row.unit}, published ${row.value} (${row.source})`;
    expect(shareOfTolerance(row, answer), message).toBeLessThanOrEqual(1);
  });
});
