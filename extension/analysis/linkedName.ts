/**
 * The name by which a workspace knows a file of its own that was reached through a link below node_modules.
 *
 * Real paths alone would not do: a workspace may itself have been opened through a link, and its files keep the names that it gives
 * them. Asks the host for real paths; touches no disk.
 */

const INSTALLED = "/node_modules/";

/**
 * `file` under the folder that holds its node_modules, or a folder above that, where its real place lies below one of them; else the
 * real path. `realPath` gives `undefined` for what is not there.
 */
export function nameBehindLinks(file: string, realPath: (name: string) => string | undefined): string {
  const at = file.lastIndexOf(INSTALLED);
  const real = at < 0 ? undefined : realPath(file);
  if (real === undefined) return file;
  for (let folder = file.slice(0, at); folder.includes("/"); folder = folder.slice(0, folder.lastIndexOf("/"))) {
    const realFolder = realPath(folder);
    if (realFolder !== undefined && real.startsWith(`${realFolder}/`)) return folder + real.slice(realFolder.length);
  }
  return real;
}
