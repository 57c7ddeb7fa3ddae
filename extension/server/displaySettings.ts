/**
 * The editor's settings, per file: how things are shown, never what is found.
 *
 * Asked for when a file needs them and kept until the client says that settings changed.
 */
import { type Connection, DidChangeConfigurationNotification } from "vscode-languageserver";

export interface DisplaySettings {
  readonly hints: "all" | "warningsOnly" | "off";
  readonly codeLens: boolean;
}

export const SECTION = "loadmark";

const DEFAULTS: DisplaySettings = { hints: "all", codeLens: true };

export class DisplaySettingsReader {
  readonly #known = new Map<string, Promise<DisplaySettings>>();
  readonly #connection: Connection;
  readonly #canAsk: boolean;

  /** `canAsk`: the client answers `workspace/configuration`. */
  constructor(connection: Connection, canAsk: boolean) {
    this.#connection = connection;
    this.#canAsk = canAsk;
  }

  /** Asks to be told of changes; `forget` is to be called then. */
  async watch(): Promise<void> {
    await this.#connection.client.register(DidChangeConfigurationNotification.type, { section: SECTION });
  }

  of(uri: string): Promise<DisplaySettings> {
    const known = this.#known.get(uri);
    if (known !== undefined) return known;
    const asked = this.#ask(uri);
    this.#known.set(uri, asked);
    return asked;
  }

  forget(uri?: string): void {
    if (uri === undefined) this.#known.clear();
    else this.#known.delete(uri);
  }

  async #ask(uri: string): Promise<DisplaySettings> {
    if (!this.#canAsk) return DEFAULTS;
    try {
      return readSettings(await this.#connection.workspace.getConfiguration({ scopeUri: uri, section: SECTION }));
    } catch {
      this.#known.delete(uri);
      return DEFAULTS;
    }
  }
}

/** Settings come from people: what isn't understood means the default. */
function readSettings(settings: unknown): DisplaySettings {
  const { hints, codeLens } = (settings ?? {}) as Record<string, unknown>;
  return {
    hints: hints === "warningsOnly" || hints === "off" ? hints : DEFAULTS.hints,
    codeLens: typeof codeLens === "boolean" ? codeLens : DEFAULTS.codeLens,
  };
}
