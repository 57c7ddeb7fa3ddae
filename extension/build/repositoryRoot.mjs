// The one place that knows where the repository's root is, so that no script depends on the folder it is started from.

import { resolve } from "node:path";
import { fileURLToPath } from "node:url";

export const repositoryRoot = resolve(fileURLToPath(import.meta.url), "../../..");
