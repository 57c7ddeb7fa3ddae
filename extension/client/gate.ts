/**
 * Whether a workspace uses the declarations, so that elsewhere no server is started.
 *
 * Asks the cheapest first and stops at the first yes. Knows no editor: what it asks of one is listed here.
 */

export interface GateWorkspace {
  /** Open documents in languages that can hold declarations. */
  openSources(): readonly OpenSource[];
  /** The text of the nearest package.json at or above a document's folder; `undefined` where there is none. */
  readNearestManifest(uri: string): Promise<string | undefined>;
  /** Whether a settings file of the product lies anywhere in the workspace. */
  hasSettingsFile(): Promise<boolean>;
}

export interface OpenSource {
  readonly uri: string;
  text(): string;
}

const PACKAGE = "loadmark";

export async function usesDeclarations(workspace: GateWorkspace): Promise<boolean> {
  const sources = workspace.openSources();
  if (sources.some((source) => importsDeclarations(source.text()))) return true;
  for (const { uri } of sources) {
    const manifest = await workspace.readNearestManifest(uri);
    if (manifest !== undefined && namesPackage(manifest)) return true;
  }
  return workspace.hasSettingsFile();
}

/** True when the name stands in quotes, as it does in every way to import it. */
export function importsDeclarations(text: string): boolean {
  return /(["'`])loadmark\1/.test(text);
}

/** True for the manifest of a package that depends on the declarations, or is them. */
export function namesPackage(manifest: string): boolean {
  try {
    const { name, ...fields } = JSON.parse(manifest);
    const lists = ["dependencies", "devDependencies", "peerDependencies", "optionalDependencies"];
    return name === PACKAGE || lists.some((list) => Object.hasOwn(Object(fields[list]), PACKAGE));
  } catch {
    return false;
  }
}
