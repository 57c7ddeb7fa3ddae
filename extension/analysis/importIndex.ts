/** The evaluator's index of who imports whom, for hosts that know the analysis alone. */
export { createImportIndex, type ImportIndex } from "../evaluator/importIndex.js";
