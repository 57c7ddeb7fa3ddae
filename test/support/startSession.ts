/** A session over files in memory and an engine that says what it is told to, with time that passes on request. */
import { vi } from "vitest";
import { type Result, Session, TYPING_DELAY_MS } from "../../extension/server/session.js";
import { createMemoryFiles } from "./memoryFiles.js";
import { createStubEngine } from "./stubEngine.js";

export function startSession(disk: Readonly<Record<string, string>> = {}) {
  const files = createMemoryFiles(disk);
  const engine = createStubEngine();
  const results: Result[] = [];
  const errors: unknown[] = [];
  const loadEngine = vi.fn(async () => engine);
  const session = new Session({
    host: files,
    loadEngine,
    onResult: (result) => results.push(result),
    onError: (_what, error) => errors.push(error),
  });
  const settle = (ms = TYPING_DELAY_MS) => vi.advanceTimersByTimeAsync(ms);
  const messages = () => results.at(-1)?.analysis.findings.map(({ at, message }) => `${at.file} ${message}`) ?? [];
  return { files, engine, results, errors, loadEngine, session, settle, messages };
}

export const whole = (text: string) => [{ text }];
