/**
 * The texts of the last commit for the server, through the editor's own Git extension; no process is started here.
 *
 * The extension is asked when the server first asks. Where it is missing, as in a browser, the answer is that there is no commit.
 */
import * as vscode from "vscode";
import {
  COMMIT_MOVED,
  type CommittedAnswer,
  type CommittedText,
  committedQuestionSchema,
  READ_COMMITTED,
} from "../protocol/committed.js";
import { readMessage } from "../protocol/readMessage.js";
import type { Server } from "./server.js";

/** As much of the Git extension's interface, version 1, as is used here. */
interface Git {
  readonly repositories: readonly Repository[];
  readonly onDidOpenRepository: vscode.Event<Repository>;
  readonly onDidCloseRepository: vscode.Event<Repository>;
  getRepository(uri: vscode.Uri): Repository | null;
}

interface Repository {
  readonly state: { readonly HEAD?: { readonly commit?: string } | undefined; readonly onDidChange: vscode.Event<void> };
  /** The text of a file, given by its path on disk. Rejects where the commit has no such file. */
  show(ref: string, path: string): Promise<string>;
}

const EXTENSION = "vscode.git";
/** Each text is a process of the Git extension. */
const AT_ONCE = 6;

export function shareCommits(server: Server, log: vscode.LogOutputChannel): vscode.Disposable {
  const listeners: vscode.Disposable[] = [];
  let git: Promise<Git | undefined> | undefined;
  /** Switched on or off by the user's settings, it is another one, and its interface with it. */
  const onEnablement = (event: vscode.Event<boolean>) => {
    listeners.push(
      event(() => {
        git = undefined;
        commits.clear();
        server.tell(COMMIT_MOVED);
      }),
    );
  };
  /** By repository, the commit that the server was told of. */
  const commits = new Map<Repository, string | undefined>();
  const follow = (repository: Repository) => {
    if (commits.has(repository)) return;
    commits.set(repository, repository.state.HEAD?.commit);
    listeners.push(
      repository.state.onDidChange(() => {
        const { commit } = repository.state.HEAD ?? {};
        if (commits.get(repository) === commit) return;
        commits.set(repository, commit);
        server.tell(COMMIT_MOVED);
      }),
    );
  };
  const load = async () => {
    const found = await findGit(log, onEnablement);
    if (found === undefined) return undefined;
    for (const repository of found.repositories) follow(repository);
    listeners.push(
      found.onDidOpenRepository((repository) => {
        follow(repository);
        server.tell(COMMIT_MOVED);
      }),
      found.onDidCloseRepository((repository) => {
        commits.delete(repository);
        server.tell(COMMIT_MOVED);
      }),
    );
    return found;
  };
  server.answer(READ_COMMITTED, async (message) => {
    const question = readMessage(committedQuestionSchema, message);
    git ??= load();
    const found = await git;
    return question === undefined || found === undefined
      ? null
      : readCommitted(
          found,
          question.uris.map((uri) => vscode.Uri.parse(uri)),
        );
  });
  return { dispose: () => vscode.Disposable.from(...listeners).dispose() };
}

interface GitExtension {
  readonly enabled: boolean;
  readonly onDidChangeEnablement: vscode.Event<boolean>;
  getAPI(version: 1): Git;
}

async function findGit(
  log: vscode.LogOutputChannel,
  onEnablement: (event: vscode.Event<boolean>) => void,
): Promise<Git | undefined> {
  const extension = vscode.extensions.getExtension<GitExtension>(EXTENSION);
  if (extension === undefined) return undefined;
  try {
    const exported = await extension.activate();
    onEnablement(exported.onDidChangeEnablement);
    // Switched off in the settings it gives no interface.
    return exported.enabled ? exported.getAPI(1) : undefined;
  } catch (error) {
    log.debug(`The last commit cannot be read: ${String(error)}`);
    return undefined;
  }
}

async function readCommitted(git: Git, uris: readonly vscode.Uri[]): Promise<CommittedAnswer> {
  const repositories = uris.map((uri) => git.getRepository(uri));
  // A repository without a commit has nothing to compare with.
  if (repositories.some((one) => one !== null && one.state.HEAD?.commit === undefined)) return null;
  const answers: CommittedText[] = uris.map(() => ({ kind: "outside" }));
  let next = 0;
  const work = async () => {
    for (let index = next++; index < uris.length; index = next++) {
      const [repository, uri] = [repositories[index], uris[index]];
      if (repository && uri) answers[index] = await readOne(repository, uri);
    }
  };
  await Promise.all(Array.from({ length: AT_ONCE }, work));
  return answers;
}

async function readOne(repository: Repository, { fsPath }: vscode.Uri): Promise<CommittedText> {
  try {
    const text = await repository.show("HEAD", fsPath);
    return { kind: "text", text: text.startsWith("\ufeff") ? text.slice(1) : text };
  } catch {
    return { kind: "absent" };
  }
}
