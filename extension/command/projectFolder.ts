/** The folder of the project that a checked file or folder belongs to. Looks at names and manifests alone. */
import { existsSync, readFileSync } from "node:fs";
import { homedir } from "node:os";
import path from "node:path";

/** Any of these marks the folder of a project. */
const MARKS = ["package.json", "tsconfig.json", ".git"];
/** No project is looked for further up. */
const MOST_LEVELS = 16;

/** The nearest folder at or above that is marked as a project, or the workspace that holds it; else the folder itself. */
export function projectFolderOf(folder: string): string {
  const marked = foldersUpFrom(folder).filter((one) => MARKS.some((mark) => existsSync(path.join(one, mark))));
  return marked.find(isWorkspace) ?? marked[0] ?? folder;
}

/** Home and the root of the disk hold far more than one project. */
function foldersUpFrom(folder: string): string[] {
  const folders: string[] = [];
  for (
    let one = folder;
    folders.length < MOST_LEVELS && one !== homedir() && one !== path.dirname(one);
    one = path.dirname(one)
  ) {
    folders.push(one);
  }
  return folders;
}

function isWorkspace(folder: string): boolean {
  if (existsSync(path.join(folder, "pnpm-workspace.yaml"))) return true;
  try {
    return Object.hasOwn(Object(JSON.parse(readFileSync(path.join(folder, "package.json"), "utf8"))), "workspaces");
  } catch {
    return false;
  }
}
