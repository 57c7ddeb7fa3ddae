/**
 * The document of the chart's page: nothing but its one script, its one style sheet and a place to put the chart.
 *
 * The policy lets nothing else in: no inline script or style, no code from text, nothing from anywhere else.
 */

export interface ChartHtmlOptions {
  /** The source that the editor serves the page's files from. */
  readonly cspSource: string;
  /** Unguessable, new for each document. */
  readonly nonce: string;
  readonly scriptUri: string;
  readonly styleUri: string;
  /** The units that were chosen in an earlier chart. */
  readonly units: string;
}

export function chartHtml({ cspSource, nonce, scriptUri, styleUri, units }: ChartHtmlOptions): string {
  return `<!DOCTYPE html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta http-equiv="Content-Security-Policy" content="${escapeAttribute(chartPolicy(cspSource, nonce))}">
<meta name="viewport" content="width=device-width, initial-scale=1">
<link rel="stylesheet" href="${escapeAttribute(styleUri)}">
<title>Loadmark chart</title>
</head>
<body data-units="${escapeAttribute(units)}">
<main id="chart"></main>
<script nonce="${escapeAttribute(nonce)}" src="${escapeAttribute(scriptUri)}"></script>
</body>
</html>
`;
}

export function chartPolicy(cspSource: string, nonce: string): string {
  return [
    "default-src 'none'",
    `script-src 'nonce-${nonce}'`,
    `style-src ${cspSource}`,
    "img-src data: blob:",
    `font-src ${cspSource}`,
  ].join("; ");
}

function escapeAttribute(text: string): string {
  return text.replaceAll("&", "&amp;").replaceAll('"', "&quot;").replaceAll("<", "&lt;").replaceAll(">", "&gt;");
}
