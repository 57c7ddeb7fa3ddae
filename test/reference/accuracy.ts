/** Prints how far the model is from each published value, worst first as a share of what the row allows. */
import { shareOfTolerance, topics } from "./topics.js";

const table = topics
  .flatMap(({ rows, answers }) => rows.map((row) => ({ row, answer: answers[row.id]?.() ?? Number.NaN })))
  .map(({ row, answer }) => ({ row, answer, used: shareOfTolerance(row, answer) }))
  .sort((one, other) => other.used - one.used);

const lines = table.map(({ row, answer, used }) => {
  const error = (answer - row.value) / (row.absolute ? 1 : row.value);
  const cells = [
    `${(100 * used).toFixed(1)} %`.padStart(8),
    error.toExponential(1).padStart(9),
    row.id.padEnd(28),
    String(Number(answer.toPrecision(9))).padStart(14),
    String(row.value).padStart(14),
    row.unit.padEnd(8),
    `${row.source}${row.fromMemory ? " [from memory]" : ""}`,
  ];
  return cells.join("  ");
});

console.log("allowance     error  row                                  model       published  unit      source");
console.log(lines.join("\n"));
console.log(`${table.length} values, ${table.filter(({ used }) => !(used <= 1)).length} outside their tolerance`);
process.exitCode = table.every(({ used }) => used <= 1) ? 0 : 1;
