/** The parser that tests of the product run on: in vitest the one that is shipped, not the package that it was cut out of. */
import { loadParser } from "../../extension/analysis/parser.js";

export const parser = await loadParser();
