// Runs a program with its output kept back; a failure shows that output and throws one sentence.

import { spawn } from "node:child_process";

/**
 * @param {string} program
 * @param {string[]} args
 * @param {{ folder: string, shell?: boolean, env?: Record<string, string> }} options
 * @returns {Promise<string>} the standard output
 */
export function runQuietly(program, args, { folder, shell = false, env = {} }) {
  return new Promise((resolve, reject) => {
    const child = spawn(program, args, {
      cwd: folder,
      shell,
      stdio: ["ignore", "pipe", "pipe"],
      env: { ...process.env, ...env },
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
    child.on("error", (error) => reject(new Error(`${program} could not be started: ${error.message}`)));
    child.on("close", (code) => {
      if (code === 0) return resolve(output);
      console.error(`\n${everything.trimEnd()}`);
      reject(new Error(`"${[program, ...args].join(" ")}" failed with exit status ${code} in ${folder}.`));
    });
  });
}

/**
 * Takes the npm that started this process where there is one, which spares finding npm.cmd on Windows.
 * @param {string[]} args
 * @param {string} folder
 */
export function runNpm(args, folder) {
  const script = process.env.npm_execpath;
  if (script !== undefined && /npm-cli\.c?js$/.test(script)) return runQuietly(process.execPath, [script, ...args], { folder });
  return runQuietly("npm", args, { folder, shell: process.platform === "win32" });
}
