// Builds dist/ from the sources with esbuild: every bundle of targets.mjs, the shared TypeScript, the type declarations
// of the npm entry and the files that are only copied. With --watch it stays and rebuilds on change, with source maps.
// It checks no types: `npm run typecheck` does.

import { existsSync } from "node:fs";
import { chmod, cp, mkdir, readdir, rm, rmdir, writeFile } from "node:fs/promises";
import { dirname, join, relative, resolve } from "node:path";
import { fileURLToPath } from "node:url";
import * as esbuild from "esbuild";
import { writeDeclarationTypes } from "./declarationTypes.mjs";
import { repositoryRoot } from "./repositoryRoot.mjs";
import { copies, targets } from "./targets.mjs";
import { writeNotices } from "./thirdPartyNotices.mjs";
import { buildTypeScript, shareTypeScript } from "./typescriptModule.mjs";

const dist = join(repositoryRoot, "dist");
const DECLARATIONS = "extension/declarations/index.ts";

if (process.argv[1] && resolve(process.argv[1]) === fileURLToPath(import.meta.url)) {
  try {
    if (process.argv.includes("--watch")) await watch();
    else await bundle();
  } catch (error) {
    console.error(`The build stopped: ${error instanceof Error ? error.message : String(error)}`);
    process.exitCode = 1;
  }
}

/** Builds everything once, minified, and removes what an earlier build left. */
export async function bundle() {
  const [results, types, copied] = await Promise.all([
    Promise.all([
      buildTypeScript(join(dist, "typescript.js")),
      ...targets.map((target) => esbuild.build(optionsOf(target, { minify: true }))),
    ]),
    writeDeclarationTypes(DECLARATIONS, join(dist, "declarations")),
    copyFiles(),
  ]);
  const notices = join(dist, "THIRD-PARTY-NOTICES.txt");
  await writeFile(notices, await writeNotices(results.flatMap(({ metafile }) => Object.keys(metafile.inputs))));
  await markExecutable();
  const outputs = results.flatMap(({ metafile }) => Object.keys(metafile.outputs).map((file) => join(repositoryRoot, file)));
  await removeOthers(dist, new Set([...outputs, ...types, ...copied, notices]));
}

async function watch() {
  await Promise.all([buildTypeScript(join(dist, "typescript.js")), copyFiles()]);
  let running = 0;
  /** @type {esbuild.Plugin} */
  const announce = {
    name: "announce",
    setup(builder) {
      builder.onStart(() => {
        if (running === 0) console.log("[watch] build started");
        running += 1;
      });
      builder.onEnd(async ({ metafile }) => {
        if (metafile && DECLARATIONS in metafile.inputs) await refreshTypes();
        await markExecutable();
        running -= 1;
        if (running === 0) console.log("[watch] build finished");
      });
    },
  };
  const contexts = await Promise.all(
    targets.map((target) => {
      const options = optionsOf(target, { sourcemap: true, logLevel: "warning" });
      return esbuild.context({ ...options, plugins: [...options.plugins, announce] });
    }),
  );
  // Counted as one build, so that whoever waits for its end finds every bundle.
  running = 1;
  console.log("[watch] build started");
  await Promise.all(contexts.map((context) => context.watch()));
  await Promise.allSettled(contexts.map((context) => context.rebuild()));
  running -= 1;
  if (running === 0) console.log("[watch] build finished");
}

/** A half-typed declaration should not end the watch. */
async function refreshTypes() {
  try {
    await writeDeclarationTypes(DECLARATIONS, join(dist, "declarations"));
  } catch (error) {
    console.error(error instanceof Error ? error.message : error);
  }
}

/**
 * @param {import("./targets.mjs").Target} target
 * @param {esbuild.BuildOptions} more
 * @returns {esbuild.BuildOptions & { plugins: esbuild.Plugin[], metafile: true }}
 */
function optionsOf({ entry, outfile, options }, more) {
  const path = join(dist, outfile);
  return {
    absWorkingDir: repositoryRoot,
    entryPoints: [entry],
    outfile: path,
    bundle: true,
    legalComments: "none",
    define: { "process.env.NODE_ENV": '"production"' },
    logLevel: "error",
    plugins: [shareTypeScript(relative(dirname(path), dist) || ".")],
    ...options,
    ...more,
    metafile: true,
  };
}

async function copyFiles() {
  const copied = [];
  for (const { from, to } of copies) {
    const source = join(repositoryRoot, from);
    if (!existsSync(source)) continue;
    await mkdir(dirname(join(dist, to)), { recursive: true });
    await cp(source, join(dist, to), { recursive: true });
    copied.push(join(dist, to));
  }
  return copied;
}

async function markExecutable() {
  const command = join(dist, "command.js");
  if (existsSync(command)) await chmod(command, 0o755);
}

/**
 * Prunes instead of emptying first, so that an editor or a test that is using dist/ meanwhile keeps its files.
 * @param {string} folder
 * @param {Set<string>} wanted
 * @returns {Promise<boolean>} whether the folder still holds something
 */
async function removeOthers(folder, wanted) {
  for (const entry of await readdir(folder, { withFileTypes: true })) {
    const path = join(folder, entry.name);
    if (wanted.has(path)) continue;
    if (!entry.isDirectory()) await rm(path);
    else if (!(await removeOthers(path, wanted))) await rmdir(path);
  }
  return (await readdir(folder)).length > 0;
}
