/**
 * From a relative specifier to the files that it may mean, in the order in which TypeScript looks for them.
 *
 * Files are opaque names with slashes, absolute paths and addresses alike. Reads nothing.
 */

const SOURCE_ENDINGS = [".ts", ".tsx", ".mts", ".cts", ".js", ".jsx", ".mjs", ".cjs"];

/** What a written ending may be compiled from. */
const COMPILED: ReadonlyMap<string, readonly string[]> = new Map([
  [".js", [".ts", ".tsx", ".js", ".jsx"]],
  [".jsx", [".tsx", ".jsx"]],
  [".mjs", [".mts", ".mjs"]],
  [".cjs", [".cts", ".cjs"]],
]);

export function isRelative(specifier: string): boolean {
  return /^\.\.?(\/|$)/.test(specifier);
}

/** Files to try, best first. The first of them alone is nearly always right, so the others are made when they are asked for. */
export function* listCandidates(fromFile: string, specifier: string): Generator<string, undefined> {
  const target = joinPath(fromFile, specifier);
  if (target === undefined) return;
  const [ending = ""] = /\.[^./]*$/.exec(target) ?? [];
  const compiled = COMPILED.get(ending);
  const isFolder = /(^|\/)\.{0,2}$/.test(specifier);
  if (compiled !== undefined && !isFolder) {
    const stem = target.slice(0, -ending.length);
    for (const source of compiled) yield stem + source;
    for (const more of SOURCE_ENDINGS.slice(0, 2)) yield target + more;
    return;
  }
  const endings = [...SOURCE_ENDINGS, ".json"];
  if (endings.includes(ending) && !isFolder) {
    yield target;
    return;
  }
  if (!isFolder) for (const source of endings) yield target + source;
  for (const source of endings) yield `${target}/index${source}`;
}

/** Joins by segments; `undefined` when the specifier leads out above the root. */
export function joinPath(fromFile: string, specifier: string): string | undefined {
  const neighbour = /^\.\/[^./][^/]*$/.test(specifier);
  if (neighbour) return fromFile.slice(0, fromFile.lastIndexOf("/")) + specifier.slice(1);
  const segments = fromFile.split("/").slice(0, -1);
  const root = /^[a-z][a-z0-9+.-]*:\/\//i.test(fromFile) ? 3 : 1;
  for (const segment of specifier.split("/")) {
    if (segment === "..") {
      if (segments.length <= root) return undefined;
      segments.pop();
    } else if (segment !== "." && segment !== "") segments.push(segment);
  }
  return segments.join("/");
}
