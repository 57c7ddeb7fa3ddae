// Serves the demo for a person to look at in a browser of their own, until Ctrl-C. It opens test/demo itself, so what is
// tried there can be kept.

import { demoFolder } from "./paths.js";
import { startServer } from "./server.js";
import { calmSettings } from "./settings.js";
import { stageExtension } from "./stageExtension.js";

export async function serveDemo(openFile: string | undefined): Promise<void> {
  const extension = await stageExtension();
  try {
    const server = await startServer({ name: "demo", settings: calmSettings });
    const address = server.address({ folder: demoFolder, openFile, extension: extension.folder });
    console.log(`\n  ${address}\n\nOpen this address in a browser. Ctrl-C ends it.`);
    await new Promise<void>((resolve) => {
      for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"] as const) process.once(signal, () => resolve());
    });
    await server.stop();
  } finally {
    await extension.remove();
  }
}
