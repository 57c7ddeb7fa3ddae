// Prints one progress line per step with the seconds that it took. It leaves errors to the caller.

/**
 * @template T
 * @param {string} name what is being done, for people
 * @param {() => T | Promise<T>} work
 * @returns {Promise<T>}
 */
export async function takeStep(name, work) {
  process.stdout.write(`  ${name} … `);
  const start = performance.now();
  try {
    const result = await work();
    console.log(`${((performance.now() - start) / 1000).toFixed(1)} s`);
    return result;
  } catch (error) {
    console.log("failed");
    throw error;
  }
}
