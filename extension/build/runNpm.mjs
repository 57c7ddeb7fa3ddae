// Runs npm in a folder with its output kept back; a failure shows that output and throws one sentence. It takes the npm
// that started this process where there is one, which spares finding npm.cmd on Windows.

import { spawn } from "node:child_process";

/**
 * @param {string[]} args
 * @param {string} folder
 * @returns {Promise<string>} npm's standard output
 */
export function runNpm(args, folder) {
  const script = process.env.npm_execpath;
  const byScript = script !== undefined && /npm-cli\.c?js$/.test(script);
  const [program, before] = byScript ? [process.execPath, [script]] : ["npm", []];
  return new Promise((resolve, reject) => {
    const child = spawn(program, [...before, ...args], {
      cwd: folder,
      stdio: ["ignore", "pipe", "pipe"],
      shell: !byScript && process.platform === "win32",
    });
    let output = "";
    let everything = "";
    child.stdout.on("data", (chunk) => {
      output += chunk;
      everything += chunk;
    });
    child.stderr.on("data", (chunk) => {
      everything += chunk;
    });
    child.on("error", (error) => reject(new Error(`npm could not be started: ${error.message}`)));
    child.on("close", (code) => {
      if (code === 0) return resolve(output);
      console.error(`\n${everything.trimEnd()}`);
      reject(new Error(`"npm ${args.join(" ")}" failed with exit status ${code} in ${folder}.`));
    });
  });
}
