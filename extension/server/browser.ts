/**
 * The server as a worker of a browser, with files through the editor and the parser from the extension's own folder.
 *
 * Reads nothing by itself: what it needs it asks of the client, wherever the workspace lies.
 */
import { BrowserMessageReader, BrowserMessageWriter, type Connection, createConnection } from "vscode-languageserver/browser";
import { createAnalyser } from "../analysis/analyser.js";
import type { TypeScript } from "../evaluator/typescript.js";
import { addressesSchema, FIND_PARSER, LIST_SOURCES, moduleAddressSchema, READ_FILE, textSchema } from "../protocol/files.js";
import { readMessage } from "../protocol/readMessage.js";
import type { FileHost } from "./discovery.js";
import type { Engine } from "./engine.js";
import { keyOf, uriOf } from "./fileKeys.js";
import { describeError } from "./guard.js";
import { serve } from "./serve.js";

const worker = self as DedicatedWorkerGlobalScope;
const connection = createConnection(new BrowserMessageReader(worker), new BrowserMessageWriter(worker));
const report = (error: unknown) => connection.console.error(`Unexpected: ${describeError(error)}`);
worker.addEventListener("error", ({ error, message }) => report(error ?? message));
worker.addEventListener("unhandledrejection", ({ reason }) => report(reason));
serve(connection, { host: createEditorFiles(connection), loadEngine: () => loadEngine(connection) });

function createEditorFiles(client: Connection): FileHost {
  return {
    async readFile(file) {
      try {
        return readMessage(textSchema, await client.sendRequest(READ_FILE, { uri: uriOf(file) })) ?? null;
      } catch {
        return null;
      }
    },
    async *listSources(folder) {
      try {
        yield (readMessage(addressesSchema, await client.sendRequest(LIST_SOURCES, { uri: uriOf(folder) })) ?? []).map(keyOf);
      } catch (error) {
        report(error);
      }
    },
  };
}

/** A worker that was started from text knows no folder, so that the client says where the parser is. */
async function loadEngine(client: Connection): Promise<Engine> {
  const address = readMessage(moduleAddressSchema, await client.sendRequest(FIND_PARSER));
  if (address === undefined) throw new Error("The client does not say where the parser is.");
  const { default: typescript }: { readonly default: TypeScript } = await import(address);
  return createAnalyser(typescript);
}
