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

/** Files to try, best first. The first of them alone is nearly always right, so a host is asked for it alone. */
export function listCandidates(fromFile: string, specifier: string): readonly string[] {
  const target = joinPath(fromFile, specifier);
  if (target === undefined) return [];
  const index = [...SOURCE_ENDINGS, ".json"].map((ending) => `${target}/index${ending}`);
  if (/(^|\/)\.{0,2}$/.test(specifier)) return index;
  const [ending = ""] = /\.[^./]*$/.exec(target) ?? [];
  const compiled = COMPILED.get(ending);
  if (compiled !== undefined) {
    const stem = target.slice(0, -ending.length);
    return [...compiled.map((source) => stem + source), ...SOURCE_ENDINGS.slice(0, 2).map((more) => target + more)];
  }
  if (SOURCE_ENDINGS.includes(ending) || ending === ".json") return [target];
  return [...[...SOURCE_ENDINGS, ".json"].map((source) => target + source), ...index];
}

/** Joins by segments; `undefined` when the specifier leads out above the root. */
export function joinPath(fromFile: string, specifier: string): string | undefined {
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
