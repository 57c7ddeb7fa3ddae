/** How the process of the server is run. */

/**
 * The engine keeps new objects in a space that grows to three times 16 MB by itself. What an edit makes fits into half of it; a quarter of
 * that saves another 10 MB and costs a fifth of the speed (`npm run bench`).
 */
export const ENGINE_OPTIONS: readonly string[] = ["--max-semi-space-size=8"];

/** `compiledCode`: the folder for what the engine compiled of the server, for the next start. */
export function serverArguments(compiledCode: string): string[] {
  return [`--compiled-code=${compiledCode}`];
}
