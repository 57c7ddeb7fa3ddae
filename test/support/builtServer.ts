/** Bundles of the product, built from the sources of now in the way that dist/ is, so that no test ever talks to an old one. */
import { copyFileSync, mkdirSync } from "node:fs";
import path from "node:path";
import { build } from "esbuild";
import { targets } from "../../extension/build/targets.mjs";
import { shareTypeScript } from "../../extension/build/typescriptModule.mjs";

const ROOT = path.join(import.meta.dirname, "../..");

/** Gives the path of a server that can be run with Node. `name` keeps test files that run at once apart. */
export async function buildServer(name: string): Promise<string> {
  await buildBundle("server.main.cjs", name);
  return buildBundle("server.cjs", name);
}

/** The same for the command. */
export function buildCommand(name: string): Promise<string> {
  return buildBundle("command.js", name);
}

async function buildBundle(bundle: string, name: string): Promise<string> {
  const target = targets.find(({ outfile }) => outfile === bundle);
  if (target === undefined) throw new Error(`The build has no ${bundle}.`);
  const folder = path.join(ROOT, "node_modules/.cache/loadmark/server", name);
  mkdirSync(folder, { recursive: true });
  // The parser that all tests run on.
  copyFileSync(path.join(ROOT, "dist/typescript.js"), path.join(folder, "typescript.js"));
  const outfile = path.join(folder, target.outfile);
  await build({
    absWorkingDir: ROOT,
    entryPoints: [target.entry],
    outfile,
    bundle: true,
    minify: true,
    legalComments: "none",
    define: { "process.env.NODE_ENV": '"production"' },
    logLevel: "error",
    plugins: [shareTypeScript(".")],
    ...target.options,
  });
  return outfile;
}
