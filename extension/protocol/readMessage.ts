/** Checks a message at the border where it arrives: what doesn't fit is dropped, and the caller may say so in a log. */
import * as v from "valibot";

/** The message, or `undefined` when it is not what the schema says. */
export function readMessage<S extends v.GenericSchema>(schema: S, message: unknown): v.InferOutput<S> | undefined {
  const result = v.safeParse(schema, message);
  return result.success ? result.output : undefined;
}
