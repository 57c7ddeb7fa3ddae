/** How the language client is set up, the same on every host. Loaded with the client itself, which is not small. */
import type * as vscode from "vscode";
import {
  CloseAction,
  ErrorAction,
  type ErrorHandler,
  type LanguageClientOptions,
  RevealOutputChannelOn,
} from "vscode-languageclient";
import type { StartOptions } from "../protocol/commands.js";
import { documentSelector } from "./documents.js";
import { createRestartLimit } from "./restartLimit.js";

export interface ClientParts {
  readonly log: vscode.LogOutputChannel;
  /** Commands of ours that texts of the server may lead to. */
  readonly commands: readonly string[];
  /** The server ended too often to be started again. */
  readonly onGivenUp: () => void;
}

export function clientOptions({ log, commands, onGivenUp }: ClientParts): LanguageClientOptions {
  return {
    documentSelector: documentSelector(),
    diagnosticCollectionName: "loadmark",
    outputChannel: log,
    revealOutputChannelOn: RevealOutputChannelOn.Never,
    initializationOptions: { commands } satisfies StartOptions,
    initializationFailedHandler: () => false,
    errorHandler: createErrorHandler(log, onGivenUp),
    markdown: { isTrusted: { enabledCommands: commands }, supportHtml: false },
    textSynchronization: { delayOpenNotifications: true },
  };
}

/** Restarts are written to the log; people are asked only when there will be none. */
function createErrorHandler(log: vscode.LogOutputChannel, onGivenUp: () => void): ErrorHandler {
  const mayRestart = createRestartLimit();
  return {
    error(error) {
      log.error(error);
      return { action: ErrorAction.Continue, handled: true };
    },
    closed() {
      if (mayRestart()) return { action: CloseAction.Restart, handled: true, message: "The server ended and is started again." };
      onGivenUp();
      return { action: CloseAction.DoNotRestart, handled: true, message: "The server ended too often and is not started again." };
    },
  };
}
