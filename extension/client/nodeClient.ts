/** The language client for a server in a Node process. */
import { LanguageClient, TransportKind } from "vscode-languageclient/node";
import { type ClientParts, clientOptions } from "./clientOptions.js";
import { ENGINE_OPTIONS, serverArguments } from "./serverProcess.js";

export interface NodeServer {
  readonly serverModule: string;
  /** Where the process runs: not in the workspace, whose folders must stay free to be moved. */
  readonly folder: string;
  /** Where it keeps what the engine compiled of it. */
  readonly compiledCode: string;
}

export function makeNodeClient({ serverModule, folder, compiledCode }: NodeServer, parts: ClientParts): LanguageClient {
  const server = {
    module: serverModule,
    transport: TransportKind.ipc,
    args: serverArguments(compiledCode),
    options: { cwd: folder, execArgv: [...ENGINE_OPTIONS] },
  };
  return new LanguageClient("loadmark", "Loadmark", { run: server, debug: server }, clientOptions(parts));
}
