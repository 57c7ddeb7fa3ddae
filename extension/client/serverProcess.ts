/** How the process of the server is run. */

/**
 * The engine keeps new objects in a space that grows to three times 16 MB by itself; an edit makes few enough that 2 MB do, which costs a
 * twentieth of the speed and saves a quarter of the memory (`npm run bench`).
 */
export const ENGINE_OPTIONS: readonly string[] = ["--max-semi-space-size=2"];
