/** The parser that an analyser needs, for hosts that may not import the evaluator's room. */
export { loadTypeScript as loadParser } from "../evaluator/typescript.js";
