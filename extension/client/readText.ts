/** A file's text through the editor, wherever the file lies. */
import * as vscode from "vscode";

/** `null` where there is no such file, or none that can be read. Editors count characters without the byte order mark: so does this. */
export async function readText(uri: vscode.Uri): Promise<string | null> {
  try {
    return new TextDecoder().decode(await vscode.workspace.fs.readFile(uri));
  } catch {
    return null;
  }
}
