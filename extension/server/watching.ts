/**
 * What the client is asked to watch, and its events in the session's terms.
 *
 * The client watches; nothing here polls.
 */
import {
  type Connection,
  DidChangeWatchedFilesNotification,
  FileChangeType,
  type FileEvent,
  WatchKind,
} from "vscode-languageserver";
import { keyOf } from "./fileKeys.js";
import type { FileEvent as SessionEvent } from "./workspaceFiles.js";

/**
 * Changes matter in sources and in JSON alone. Whatever comes or goes may be a folder, whose files are not announced one by one; and a
 * file that was deleted and written anew within a moment is announced as changed.
 */
const WATCHERS = [
  { globPattern: "**/*.{ts,tsx,mts,cts,js,jsx,mjs,cjs,json}", kind: WatchKind.Change },
  { globPattern: "**/*", kind: WatchKind.Create | WatchKind.Delete },
];

export async function watchFiles(connection: Connection): Promise<void> {
  await connection.client.register(DidChangeWatchedFilesNotification.type, { watchers: WATCHERS });
}

export function eventsOf(changes: readonly FileEvent[]): SessionEvent[] {
  return changes.map(({ uri, type }) => ({ file: keyOf(uri), kind: kindOf(type) }));
}

function kindOf(type: FileChangeType): SessionEvent["kind"] {
  if (type === FileChangeType.Created) return "created";
  return type === FileChangeType.Deleted ? "deleted" : "changed";
}
