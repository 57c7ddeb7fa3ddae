// Makes folders outside the repository that last no longer than what needs them: they are removed when asked, or at the
// latest when the process exits.

import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";

export interface TemporaryFolder {
  readonly folder: string;
  remove(): Promise<void>;
}

export function makeTemporaryFolder(name: string): TemporaryFolder {
  const folder = mkdtempSync(join(tmpdir(), `loadmark-${name}-`));
  const removeNow = () => rmSync(folder, { recursive: true, force: true, maxRetries: 5 });
  process.once("exit", removeNow);
  return {
    folder,
    remove: async () => {
      process.off("exit", removeNow);
      removeNow();
    },
  };
}
