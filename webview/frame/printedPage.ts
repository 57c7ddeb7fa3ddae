/**
 * A sheet as one page of HTML for the printer or an e-mail: its words and numbers, and its plots as pictures on white paper.
 *
 * Self-contained: no script, nothing from elsewhere. An editor's panel cannot be printed itself, so it is saved and opened in a browser.
 */
import { CAUTIONS } from "../page/cautions.js";
import { LEVELS } from "../page/remarks.js";
import { paperTheme } from "../theme/theme.js";
import { swatchOf } from "./picture.js";
import type { Key, PlotPart, Sheet, Table } from "./sheet.js";

const PIXEL_RATIO = 2;
/** As wide as a sheet of paper between its margins, px. */
const WIDTH = 680;

export function printedPage(sheet: Sheet, view: string, old: string | null): string {
  const { title, verdict, notes, facts, findings, assumed, notChecked, plots } = sheet;
  const remarks = [...notes, ...(old === null ? [] : [old])];
  return [
    "<!DOCTYPE html>",
    '<html lang="en">',
    "<head>",
    '<meta charset="utf-8">',
    `<meta http-equiv="Content-Security-Policy" content="default-src 'none'; img-src data:; style-src 'unsafe-inline'">`,
    '<meta name="viewport" content="width=device-width, initial-scale=1">',
    `<title>${text(`${title}: ${view}`)}</title>`,
    `<style>${STYLE}</style>`,
    "</head>",
    "<body>",
    `<h1>${text(title)}</h1>`,
    `<p>${text([view, verdict, ...remarks].join(" · "))}</p>`,
    `<dl>${facts.map(({ name, now, was }) => `<div><dt>${text(name)}</dt><dd>${text(now)}${was === null ? "" : ` <small>was ${text(was)}</small>`}</dd></div>`).join("")}</dl>`,
    ...keysOf(sheet.keys ?? []),
    ...plots.map((part) => `<img alt="${text(part.words)}" src="${pictureOf(part)}">`),
    `<p>${text(sheet.footnote)}</p>`,
    ...(findings.length === 0
      ? []
      : [
          `<h2>Findings</h2><ul>${findings.map(({ level, message }) => `<li><b>${text(LEVELS[level])}:</b> ${text(message)}</li>`).join("")}</ul>`,
        ]),
    ...listOf("Assumed", assumed),
    ...listOf("Not checked", notChecked),
    ...tablesOf(sheet.table()),
    `<footer>${text(CAUTIONS)}</footer>`,
    "</body>",
    "</html>",
    "",
  ].join("\n");
}

const STYLE = [
  "@page{margin:14mm}",
  "body{max-width:680px;margin:16px auto;padding:0 12px;color:#1b1b1b;background:#fff;font:12px/1.4 sans-serif}",
  "h1{margin:0;font-size:18px}h2{margin:12px 0 2px;font-size:13px}p,ul{margin:4px 0}",
  "dl{display:grid;grid-template-columns:repeat(4,1fr);gap:4px 12px;margin:8px 0;padding:6px 0;border:solid #999;border-width:1px 0}",
  "dt{font-size:11px}dd{margin:0;font-weight:bold}small{display:block;font-weight:normal}",
  "img{display:block;width:100%;break-inside:avoid}",
  ".keys{display:flex;flex-wrap:wrap;gap:2px 14px;padding:0;list-style:none}.keys img{display:inline;width:18px;height:11px}",
  "table{margin-top:12px;border-collapse:collapse;font-size:10px;font-variant-numeric:tabular-nums}",
  "caption{text-align:left;font-weight:bold}th,td{padding:1px 8px 1px 0;border-bottom:1px solid #ccc;text-align:left}tr{break-inside:avoid}",
  "footer{margin-top:12px;padding-top:6px;border-top:1px solid #999;font-size:11px}",
].join("");

function keysOf(keys: readonly Key[]): string[] {
  if (keys.length === 0) return [];
  const items = keys.map(
    (key) => `<li><img alt="" src="${swatchOf(key, paperTheme()).toDataURL("image/png")}"> ${text(key.name)}</li>`,
  );
  return [`<ul class="keys">${items.join("")}</ul>`];
}

function listOf(heading: string, sentences: readonly string[]): string[] {
  if (sentences.length === 0) return [];
  return [`<h2>${heading}</h2><ul>${sentences.map((one) => `<li>${text(one)}</li>`).join("")}</ul>`];
}

/** As wide as the paper: what has more columns goes on below, with the first one again. */
function tablesOf({ caption, head, rows }: Table): string[] {
  const tables: string[] = [];
  for (let from = 1; from === 1 || from < head.length; from += COLUMNS) {
    const part = (texts: readonly string[]): readonly string[] => [...texts.slice(0, 1), ...texts.slice(from, from + COLUMNS)];
    tables.push(tableOf({ caption: from === 1 ? caption : `${caption}, continued`, head: part(head), rows: rows.map(part) }));
  }
  return tables;
}

const COLUMNS = 12;

function tableOf({ caption, head, rows }: Table): string {
  const cells = (tag: "td" | "th", texts: readonly string[]): string =>
    texts.map((one) => `<${tag}>${text(one)}</${tag}>`).join("");
  return `<table><caption>${text(caption)}</caption><thead><tr>${cells("th", head)}</tr></thead><tbody>${rows.map((row) => `<tr>${cells("td", row)}</tr>`).join("")}</tbody></table>`;
}

function pictureOf({ create, height }: PlotPart): string {
  const canvas = document.createElement("canvas");
  [canvas.width, canvas.height] = [WIDTH, height];
  const plot = create(canvas, { pixelRatio: PIXEL_RATIO });
  plot.draw(paperTheme());
  const address = canvas.toDataURL("image/png");
  plot.destroy();
  return address;
}

/** Names come from people's code and may hold markup. */
function text(raw: string): string {
  return raw.replaceAll("&", "&amp;").replaceAll("<", "&lt;").replaceAll(">", "&gt;").replaceAll('"', "&quot;");
}
