/** Server to client: file access for a server that has no disk of its own. */
import * as v from "valibot";

/** Takes an address; gives the text, or `null` where there is no such file. */
export const READ_FILE = "loadmark/readFile";

/** Takes a folder's address; gives the addresses of the sources below it. */
export const LIST_SOURCES = "loadmark/listSources";

export const fileQuerySchema = v.object({ uri: v.string() });
export const fileTextSchema = v.nullable(v.string());
export const fileListSchema = v.array(v.string());

export type FileQuery = v.InferOutput<typeof fileQuerySchema>;
