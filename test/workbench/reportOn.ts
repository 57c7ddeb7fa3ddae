// What the built command reports about a folder: the numbers and findings that the editor must show as well. Only what is
// saved counts there.

import { execFile } from "node:child_process";
import { join } from "node:path";
import type { MechanismNumbers } from "../../extension/model/numbers.js";
import type { Report } from "../../extension/report/report.js";
import { repositoryRoot } from "./paths.js";

export type ComputedMechanism = { readonly name: string } & MechanismNumbers;

export async function reportOn(folder: string): Promise<Report> {
  const command = join(repositoryRoot, "dist/command.js");
  // Desktop VS Code's own program behaves as Node only when told so.
  const env = { ...process.env, ELECTRON_RUN_AS_NODE: "1" };
  const output = await new Promise<string>((resolve, reject) => {
    execFile(process.execPath, [command, "check", folder, "--format", "json"], { env }, (error, stdout, stderr) => {
      // Findings make it end with 1, which is no failure here.
      if (error !== null && error.code !== 1) reject(new Error(`The check could not run: ${stderr}`));
      else resolve(stdout);
    });
  });
  return JSON.parse(output);
}

export function mechanismIn({ mechanisms }: Report, name: string): ComputedMechanism {
  const found = mechanisms.find((mechanism) => mechanism.name === name);
  if (!found?.hardest) throw new Error(`The report has no numbers for "${name}".`);
  return found as ComputedMechanism;
}

/** Of all motors together, behind all stages: N·m. */
export function outputTorque({ hardest, ratio, stageEfficiency }: ComputedMechanism, motorCount: number): number {
  return hardest.motorTorqueNm * motorCount * ratio * stageEfficiency;
}

/** Behind all stages: revolutions per minute. */
export function outputRpm({ hardest, ratio }: ComputedMechanism): number {
  return ((hardest.motorSpeedRadPerS / ratio) * 60) / (2 * Math.PI);
}
