/** Places in files, as the protocol counts them: lines and characters from 0. */
import * as v from "valibot";

const count = v.pipe(v.number(), v.integer(), v.minValue(0));
const positionSchema = v.object({ line: count, character: count });

export const placeSchema = v.object({ uri: v.string(), range: v.object({ start: positionSchema, end: positionSchema }) });

export type Place = v.InferOutput<typeof placeSchema>;

/** Client to server: where a span of a file is now. Gives a place, or `null` when the file is not known. */
export const FIND_PLACE = "loadmark/findPlace";

/** A span as links carry it: a file by the server's own name for it, and UTF-16 offsets. */
export const spanSchema = v.object({ file: v.string(), start: count, end: count });

export type PlaceQuery = v.InferOutput<typeof spanSchema>;
