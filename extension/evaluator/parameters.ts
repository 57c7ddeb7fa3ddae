/** Which parameters of a function take arguments. */
import type ts from "typescript";
import type { TypeScript } from "./typescript.js";

/** The parameters that take arguments: `this` is written like one, but takes none. */
export function listParameters(ts: TypeScript, { parameters }: ts.SignatureDeclaration): readonly ts.ParameterDeclaration[] {
  const [first] = parameters;
  const isThis = first !== undefined && ts.isIdentifier(first.name) && first.name.text === "this";
  return (isThis ? parameters.slice(1) : parameters).filter((each) => ts.isParameter(each));
}
