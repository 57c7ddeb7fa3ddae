/**
 * The files below a folder that may hold declarations, as the editor finds them.
 *
 * The editor's own search is quick, but some places have none, and it then finds nothing: their folders are gone through one by one.
 */
import * as vscode from "vscode";

const SOURCES = "**/*.{ts,tsx,mts,cts,js,jsx,mjs,cjs}";
const SOURCE = /\.(?:[mc]?[jt]s|[jt]sx)$/;
/** Never entered by the server either. */
const INSTALLED = "node_modules";
const FOLDERS_AT_ONCE = 16;

export async function listSources(folder: vscode.Uri): Promise<readonly vscode.Uri[]> {
  const found = await vscode.workspace.findFiles(new vscode.RelativePattern(folder, SOURCES), `**/${INSTALLED}/**`);
  return found.length > 0 ? found : walk(folder);
}

/** Links are not followed: they may run in a circle. */
async function walk(start: vscode.Uri): Promise<vscode.Uri[]> {
  const files: vscode.Uri[] = [];
  const waiting = [start];
  while (waiting.length > 0) {
    const folders = waiting.splice(0, FOLDERS_AT_ONCE);
    const listings = await Promise.all(folders.map(async (folder) => ({ folder, entries: await listFolder(folder) })));
    for (const { folder, entries } of listings) {
      for (const [name, type] of entries) {
        const uri = vscode.Uri.joinPath(folder, name);
        if (type === vscode.FileType.Directory && name !== INSTALLED && !name.startsWith(".")) waiting.push(uri);
        if (type === vscode.FileType.File && SOURCE.test(name)) files.push(uri);
      }
    }
  }
  return files;
}

async function listFolder(folder: vscode.Uri): Promise<[string, vscode.FileType][]> {
  try {
    return await vscode.workspace.fs.readDirectory(folder);
  } catch {
    return [];
  }
}
