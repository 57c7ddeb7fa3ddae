// Waits for something to become true by looking again and again, and says what it saw last when time runs out.

export async function waitUntil<T>(
  what: string,
  look: () => Promise<T | undefined>,
  timeoutMs = 30_000,
  describeLast?: () => string,
): Promise<T> {
  const end = Date.now() + timeoutMs;
  for (;;) {
    const found = await look();
    if (found !== undefined) return found;
    if (Date.now() > end)
      throw new Error(`Waited ${timeoutMs / 1000} s for ${what}${describeLast ? `; ${describeLast()}` : ""}.`);
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
}
