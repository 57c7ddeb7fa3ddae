/**
 * The language client for a server in a worker, and the files of the editor that such a server asks for.
 *
 * A worker cannot be started from an extension's address, which may not be one that a browser understands: its text is read and started
 * from memory.
 */
import * as vscode from "vscode";
import {
  BrowserMessageReader,
  BrowserMessageWriter,
  LanguageClient,
  type MessageTransports,
} from "vscode-languageclient/browser";
import { addressSchema, FIND_PARSER, LIST_SOURCES, READ_FILE } from "../protocol/files.js";
import { readMessage } from "../protocol/readMessage.js";
import { type ClientParts, clientOptions } from "./clientOptions.js";
import { listSources } from "./listSources.js";
import { readText } from "./readText.js";

export async function makeWorkerClient(extension: vscode.Uri, parts: ClientParts): Promise<LanguageClient> {
  const addressOf = (file: string) => addressInMemory(vscode.Uri.joinPath(extension, "dist", file));
  const startWorker = async (): Promise<MessageTransports> => {
    const address = await addressOf("server.web.js");
    const worker = new Worker(address, { name: "Loadmark" });
    worker.addEventListener("error", ({ message }) => parts.log.error(`The server's worker: ${message}`));
    // An editor may put a worker of its own making in place of the browser's: only its messages can be relied on, not its class.
    return { reader: new BrowserMessageReader(worker), writer: new BrowserMessageWriter(worker) };
  };
  const client = new LanguageClient("loadmark", "Loadmark", startWorker, clientOptions(parts));
  let parser: Promise<string> | undefined;
  client.onRequest(FIND_PARSER, () => {
    parser ??= addressOf("typescript.js");
    return parser;
  });
  client.onRequest(READ_FILE, (message: unknown) => {
    const query = readMessage(addressSchema, message);
    return query === undefined ? null : readText(vscode.Uri.parse(query.uri));
  });
  client.onRequest(LIST_SOURCES, async (message: unknown) => {
    const query = readMessage(addressSchema, message);
    const found = query === undefined ? [] : await listSources(vscode.Uri.parse(query.uri));
    return found.map((uri) => uri.toString());
  });
  return client;
}

async function addressInMemory(file: vscode.Uri): Promise<string> {
  const content = await vscode.workspace.fs.readFile(file);
  return URL.createObjectURL(new Blob([new Uint8Array(content)], { type: "text/javascript" }));
}
