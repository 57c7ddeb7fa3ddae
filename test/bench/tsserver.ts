// The installed TypeScript's own server as a process, asked as editors ask it: the yardstick of the bench. It counts no time.

import { type ChildProcessByStdio, spawn } from "node:child_process";
import { readFileSync } from "node:fs";
import { join } from "node:path";
import type { Readable, Writable } from "node:stream";
import { repositoryRoot } from "../workbench/paths.js";
import { readFrames } from "./frames.js";
import type { EditedFile } from "./workspace.js";

interface Message {
  readonly type: string;
  readonly event?: string;
  readonly request_seq?: number;
  readonly success?: boolean;
  readonly body?: { readonly file?: string; readonly diagnostics?: readonly unknown[]; readonly request_seq?: number };
}

export class TsServer {
  readonly process: ChildProcessByStdio<Writable, Readable, null>;
  readonly #texts = new Map<string, string>();
  #sequence = 0;
  #heard: (message: Message) => void = () => {};
  /** Until the server has done all that it was asked for. */
  #quiet: Promise<void> = Promise.resolve();

  constructor() {
    const server = join(repositoryRoot, "node_modules/typescript/lib/tsserver.js");
    const args = [server, "--noGetErrOnBackgroundUpdate", "--disableAutomaticTypingAcquisition"];
    this.process = spawn(process.execPath, args, { stdio: ["pipe", "pipe", "inherit"] });
    readFrames<Message>(this.process.stdout, (message) => this.#heard(message));
  }

  open(path: string): void {
    const text = readFileSync(path, "utf8");
    this.#texts.set(path, text);
    this.#send("open", { file: path, fileContent: text, scriptKindName: "TS" });
  }

  edit({ path, start }: EditedFile, number: string): void {
    const current = this.#texts.get(path) ?? "";
    const end = current.indexOf(";", start);
    this.#texts.set(path, current.slice(0, start) + number + current.slice(end));
    const lines = current.slice(0, start).split("\n");
    const line = lines.length;
    const offset = (lines.at(-1)?.length ?? 0) + 1;
    this.#send("change", { file: path, line, offset, endLine: line, endOffset: offset + end - start, insertString: number });
  }

  /** Until the semantic diagnostics of open files are there; gives how many there are in all. */
  semanticDiagnostics(paths: readonly string[]): Promise<number> {
    const waiting = new Set(paths);
    let count = 0;
    const asked = this.#send("geterr", { delay: 0, files: paths });
    return new Promise<number>((resolve) => {
      let becomeQuiet = () => {};
      this.#quiet = new Promise((quiet) => {
        becomeQuiet = quiet;
      });
      this.#heard = ({ event, body }) => {
        if (event === "requestCompleted" && body?.request_seq === asked) becomeQuiet();
        if (event !== "semanticDiag" || body?.file === undefined) return;
        if (waiting.delete(body.file)) count += body.diagnostics?.length ?? 0;
        if (waiting.size === 0) resolve(count);
      };
    });
  }

  /** Until it has told what comes after the diagnostics that were asked for, such as suggestions. */
  whenQuiet(): Promise<void> {
    return this.#quiet;
  }

  stop(): void {
    this.process.kill();
  }

  /** Gives the number of the request. */
  #send(command: string, args: unknown): number {
    this.#sequence += 1;
    this.process.stdin.write(`${JSON.stringify({ seq: this.#sequence, type: "request", command, arguments: args })}\n`);
    return this.#sequence;
  }
}
