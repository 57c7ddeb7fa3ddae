/**
 * Destructuring: `const { teeth = 40, ...rest } = GEARS`, in variables, parameters and loop heads, with defaults and rest.
 *
 * A name that isn't there and has no default is a slip, as with any other access.
 */
import type ts from "typescript";
import { getProperty, listItems, listProperties } from "./access.js";
import type { Context, Frame } from "./context.js";
import { originOf } from "./operations.js";
import { evaluateName } from "./propertyName.js";
import { type Binding, resolveName } from "./source.js";
import { dependent, known, unsupported } from "./unknown.js";
import type { Span, Value } from "./value.js";

/** Binds every name of a parameter or a loop variable to its part of a value. */
export function bindPattern(
  ctx: Context,
  declaration: ts.ParameterDeclaration | ts.VariableDeclaration | ts.BindingElement,
  given: Value,
  frame: Frame,
  bound: Map<Binding, Value>,
): void {
  const { ts } = ctx;
  const value = ts.isBindingElement(declaration) ? given : orDefault(ctx, declaration, given, frame);
  if (ts.isIdentifier(declaration.name)) {
    const binding = resolveName(ts, declaration.name, frame.module.source);
    if (binding !== undefined) bound.set(binding, value);
    return;
  }
  for (const element of declaration.name.elements) {
    if (!ts.isOmittedExpression(element)) bindPattern(ctx, element, takePart(ctx, element, value, frame), frame, bound);
  }
}

/** The value of one destructured name; `whole` gives the value of the declaration that it belongs to. */
export function valueOfElement(ctx: Context, element: ts.BindingElement, frame: Frame, whole: () => Value): Value {
  const holder = element.parent.parent;
  const outer = ctx.ts.isBindingElement(holder) ? valueOfElement(ctx, holder, frame, whole) : whole();
  return takePart(ctx, element, outer, frame);
}

function takePart(ctx: Context, element: ts.BindingElement, whole: Value, frame: Frame): Value {
  const { ts } = ctx;
  const { parent: pattern, name } = element;
  if (!whole.known) return dependent(name, frame.module, originOf("access", name, frame, [whole]), whole);
  if (element.dotDotDotToken !== undefined) return takeRest(ctx, element, whole, frame);
  if (ts.isArrayBindingPattern(pattern)) {
    const items = listItems(ctx, whole);
    if (items === undefined) return unsupported(pattern, frame.module, "takes something apart that is not a list");
    const item = items[pattern.elements.indexOf(element)];
    if (item !== undefined) return orDefault(ctx, element, locate(item, name, frame), frame);
    return orDefault(ctx, element, getProperty(ctx, whole, String(pattern.elements.indexOf(element)), name, frame), frame);
  }
  const property = element.propertyName ?? name;
  if (ts.isObjectBindingPattern(property) || ts.isArrayBindingPattern(property))
    return unsupported(element, frame.module, "is not followed");
  const key = evaluateName(ctx, property, frame);
  if (typeof key !== "string") return dependent(name, frame.module, originOf("access", name, frame, [whole, key]), key);
  return orDefault(ctx, element, getProperty(ctx, whole, key, name, frame), frame);
}

function locate(item: Value, name: ts.Node, frame: Frame): Value {
  const origin = originOf("access", name, frame, [item]);
  return item.known ? known(item.data, origin) : dependent(name, frame.module, origin, item);
}

function takeRest(ctx: Context, element: ts.BindingElement, whole: Value & { readonly known: true }, frame: Frame): Value {
  const { ts } = ctx;
  const { parent: pattern, name } = element;
  const origin = originOf("access", name, frame, [whole]);
  if (ts.isArrayBindingPattern(pattern)) {
    const items = listItems(ctx, whole);
    if (items === undefined) return unsupported(pattern, frame.module, "takes something apart that is not a list");
    return known({ kind: "array", items: items.slice(pattern.elements.length - 1) }, origin);
  }
  const taken = new Set<string>();
  for (const other of pattern.elements) {
    if (other === element) continue;
    const property = other.propertyName ?? other.name;
    if (ts.isObjectBindingPattern(property) || ts.isArrayBindingPattern(property)) continue;
    const key = evaluateName(ctx, property, frame);
    if (typeof key !== "string") return dependent(name, frame.module, origin, key);
    taken.add(key);
  }
  const properties = listProperties(ctx, whole);
  if (properties === undefined) return unsupported(pattern, frame.module, "takes something apart that is not an object");
  const kept = properties.filter((property) => !taken.has(property.name));
  const keys = kept.flatMap((property): [string, Span][] => (property.key === undefined ? [] : [[property.name, property.key]]));
  return known(
    { kind: "object", entries: new Map(kept.map((property) => [property.name, property.value])), keys: new Map(keys) },
    origin,
  );
}

/** The value, or the default where nothing was given. */
function orDefault(
  ctx: Context,
  declaration: ts.ParameterDeclaration | ts.VariableDeclaration | ts.BindingElement,
  value: Value,
  frame: Frame,
): Value {
  const { initializer } = declaration;
  if (initializer === undefined || ctx.ts.isVariableDeclaration(declaration)) return value;
  const absent = value.known
    ? value.data.kind === "primitive" && value.data.value === undefined
    : value.cause === undefined && value.reason.code === "no-such-property";
  return absent ? ctx.evaluate(initializer, frame) : value;
}
