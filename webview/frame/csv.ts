/** A table as comma-separated values (RFC 4180). Numbers have a decimal point, whatever the country. */
import type { Table } from "./sheet.js";

export function csvOf({ head, rows }: Table): string {
  return [head, ...rows].map((cells) => `${cells.map(quoted).join(",")}\r\n`).join("");
}

/** A number with ten digits; nothing where there is none. */
export function digits(value: number | null): string {
  return value === null ? "" : String(Number(value.toPrecision(10)));
}

function quoted(cell: string): string {
  return /[",\r\n]/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell;
}
