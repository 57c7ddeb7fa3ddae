// An hour's worth of edits at full speed: what the server's memory does meanwhile.

import { LanguageServer } from "./languageServer.js";
import { residentMB } from "./processMemory.js";
import type { BenchWorkspace } from "./workspace.js";

export interface SoakMoment {
  readonly edits: number;
  readonly memoryMB: number;
  /** Since the moment before, ms an edit. */
  readonly msAnEdit: number;
}

/** Edits turn by turn in a file of mechanisms and in a file of constants; calls back at the start and after each part. */
export async function soak(
  workspace: BenchWorkspace,
  edits: number,
  parts: number,
  onMoment: (moment: SoakMoment) => void,
): Promise<void> {
  const { folder, mechanism, constants } = workspace;
  const server = new LanguageServer();
  await server.start(folder);
  const opened = server.published([mechanism.path]);
  for (const path of new Set([mechanism.path, constants.path, ...constants.users])) server.open(path);
  await opened;
  onMoment({ edits: 0, memoryMB: residentMB(server.process), msAnEdit: 0 });
  let start = performance.now();
  const part = Math.ceil(edits / parts);
  for (let edit = 1; edit <= edits; edit++) {
    const [file, shown] = edit % 2 === 0 ? [mechanism, [mechanism.path]] : [constants, constants.users];
    const done = server.published(shown);
    server.edit(file, file.numberAt(edit));
    await done;
    if (edit % part !== 0 && edit !== edits) continue;
    onMoment({ edits: edit, memoryMB: residentMB(server.process), msAnEdit: (performance.now() - start) / part });
    start = performance.now();
  }
  await server.stop();
}
