/** The parser that an analyser needs, for hosts that may not import the evaluator's room. */
export { loadTypeScript as loadParser, type TypeScript as Parser } from "../evaluator/typescript.js";
